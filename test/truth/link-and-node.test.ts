import { describeTruth } from '#test/support/truth.ts';
import { linkEvaluators } from './link-evaluators.ts';
import { nodeEvaluators } from './node-evaluators.ts';

const evaluators = { ...linkEvaluators, ...nodeEvaluators };

describeTruth('computed.json', evaluators);
describeTruth('conformance-test-2450.json', evaluators);
describeTruth('contiki-ng.json', evaluators);
describeTruth('course-notes.json', evaluators);
describeTruth('etsi-en-300-220-2.json', evaluators);
describeTruth('exercises.json', evaluators);
describeTruth('ieee-802-15-4-2006.json', evaluators);
describeTruth('ieee-802-15-4c-2009.json', evaluators);
describeTruth('latre-2006.json', evaluators);
describeTruth('mac-core-header.json', evaluators);
describeTruth('mac-performance-test.json', evaluators);
describeTruth('mote-manual.json', evaluators);
describeTruth('node-blog.json', evaluators);
describeTruth('ns-3-error-model.json', evaluators);
describeTruth('ns-3-lorawan.json', evaluators);
describeTruth('ns-3.json', evaluators);
describeTruth('openthread.json', evaluators);
describeTruth('riot.json', evaluators);
describeTruth('szewczyk-2004.json', evaluators);
describeTruth('timeslot-pib-header.json', evaluators);
describeTruth('timeslot-template-class.json', evaluators);
describeTruth('zephyr-bluetooth.json', evaluators);
describeTruth('zephyr.json', evaluators);
