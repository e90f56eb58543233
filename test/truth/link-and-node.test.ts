import { describeTruth } from '#test/support/truth.ts';
import { linkEvaluators } from './link-evaluators.ts';
import { nodeEvaluators } from './node-evaluators.ts';

const evaluators = { ...linkEvaluators, ...nodeEvaluators };

describeTruth('computed.json', evaluators);
describeTruth('contiki-ng.json', evaluators);
describeTruth('course-notes.json', evaluators);
describeTruth('exercises.json', evaluators);
describeTruth('ieee-802-15-4-2006.json', evaluators);
describeTruth('latre-2006.json', evaluators);
describeTruth('mote-manual.json', evaluators);
describeTruth('node-blog.json', evaluators);
describeTruth('ns-3-lorawan.json', evaluators);
describeTruth('ns-3.json', evaluators);
describeTruth('riot.json', evaluators);
describeTruth('szewczyk-2004.json', evaluators);
describeTruth('zephyr-bluetooth.json', evaluators);
describeTruth('zephyr.json', evaluators);
