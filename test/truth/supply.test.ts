import { describeTruth } from '#test/support/truth.ts';
import { supplyEvaluators } from './supply-evaluators.ts';

describeTruth('coin-cell-article.json', supplyEvaluators);
describeTruth('coin-cell-blog.json', supplyEvaluators);
describeTruth('computed-supply.json', supplyEvaluators);
describeTruth('cr2450-specification.json', supplyEvaluators);
describeTruth('homework-exercise.json', supplyEvaluators);
describeTruth('lr6-forum.json', supplyEvaluators);
