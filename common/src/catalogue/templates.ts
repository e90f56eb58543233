import type { Node, Routine, Scenario } from '#common/engine/scenario/scenario.types.ts';
import { InconsistentInputError } from '#common/errors.ts';
import { scenarioSchema } from '#common/schemas/scenario.schema.ts';
import { fromUnit } from '#common/units/unit-lookup.ts';
import { cataloguePart } from './catalogue.ts';
import { EXCHANGE_TEMPLATES } from './exchange-templates.table.ts';
import { boardLeakage, fixed, orchard, supply, target } from './template-pieces.ts';

/** Groups of templates, in the order in which they are offered. */
export const TEMPLATE_GROUPS = [
  { id: 'plain', name: 'Empty, or with typed times' },
  { id: 'link', name: 'Times on the air derived from the link' },
] as const;

/** A scenario to start from. */
export interface ScenarioTemplate {
  id: string;
  name: string;
  description: string;
  group: (typeof TEMPLATE_GROUPS)[number]['id'];
  document: Scenario;
}

const reportingNode = (): Node => ({
  parts: [
    cataloguePart('controller-low-power', 'controller'),
    cataloguePart('transceiver-2450', 'radio'),
    cataloguePart('sensor-temperature-humidity', 'sensor'),
  ],
  leakages: [boardLeakage()],
  link: { phy: 'oqpsk-2450' },
  routines: [
    {
      id: 'report',
      name: 'Measure and report',
      enabled: true,
      schedule: { kind: 'every', periodS: 900 },
      steps: [
        {
          id: 'measure',
          name: 'Measure',
          states: { controller: 'idle', sensor: 'measuring' },
          duration: fixed('10 … 15 … 20 ms'),
        },
        { id: 'prepare', name: 'Prepare the frame', states: { controller: 'active' }, duration: fixed('3 ms') },
        {
          id: 'send',
          name: 'Send the frame',
          states: { controller: 'idle', radio: 'transmit' },
          duration: { kind: 'exchange', pattern: 'frame', payloadOctets: 24 },
        },
        {
          id: 'acknowledgement',
          name: 'Wait for the acknowledgement',
          states: { controller: 'idle', radio: 'listen' },
          duration: fixed('… 0.7 … 0.9 ms'),
        },
      ],
    },
  ],
});

const eventRoutine: Routine = {
  id: 'event',
  name: 'Count and report an event',
  enabled: true,
  schedule: { kind: 'random', meanPerDay: 140, busiestPerDay: 400 },
  steps: [
    {
      id: 'debounce',
      name: 'Wait until the contact rests',
      states: { contact: 'closed', controller: 'active' },
      duration: fixed('10 … 20 … 50 ms'),
    },
    {
      id: 'send',
      name: 'Send the frame',
      states: { contact: 'closed', controller: 'idle', radio: 'transmit' },
      duration: { kind: 'exchange', pattern: 'frame', payloadOctets: 12 },
    },
  ],
};

const eventNode = (): Node => ({
  parts: [
    cataloguePart('controller-low-power', 'controller'),
    cataloguePart('transceiver-868', 'radio'),
    cataloguePart('switch-contact', 'contact'),
  ],
  leakages: [boardLeakage()],
  link: { phy: 'sun-fsk-50' },
  routines: [
    eventRoutine,
    {
      id: 'alive',
      name: 'Sign of life',
      enabled: true,
      schedule: { kind: 'every', periodS: fromUnit(12, 'h') },
      steps: [
        {
          id: 'send-alive',
          name: 'Send the frame',
          states: { controller: 'idle', radio: 'transmit' },
          duration: { kind: 'exchange', pattern: 'frame', payloadOctets: 12 },
        },
      ],
    },
  ],
});

const longRangeNode = (): Node => ({
  parts: [
    cataloguePart('controller-low-power', 'controller'),
    cataloguePart('transceiver-chirp', 'radio'),
    cataloguePart('sensor-temperature-humidity', 'sensor'),
  ],
  leakages: [boardLeakage()],
  routines: [
    {
      id: 'report',
      name: 'Measure and report',
      enabled: true,
      schedule: { kind: 'every', periodS: fromUnit(1, 'h') },
      steps: [
        {
          id: 'measure',
          name: 'Measure',
          states: { controller: 'idle', sensor: 'measuring' },
          duration: fixed('10 … 15 … 20 ms'),
        },
        {
          id: 'send',
          name: 'Send the uplink',
          states: { controller: 'idle', radio: 'transmit' },
          duration: {
            kind: 'exchange',
            pattern: 'chirp',
            spreadingFactor: 9,
            bandwidthHz: 125_000,
            codingRate: 1,
            payloadOctets: 20,
          },
        },
        { id: 'wait', name: 'Wait for the window', states: {}, duration: fixed('0.95 s') },
        {
          id: 'window',
          name: 'Listen in the window',
          states: { controller: 'idle', radio: 'listen' },
          duration: fixed('… 25 … 40 ms'),
        },
      ],
    },
  ],
});

const TEMPLATES: readonly ScenarioTemplate[] = [
  {
    id: 'empty',
    name: 'Empty',
    description: 'No parts and no routines yet; two LR6 in an oceanic orchard.',
    group: 'plain',
    document: {
      schemaVersion: 1,
      name: 'New scenario',
      node: { parts: [], leakages: [], routines: [] },
      supply: supply('LR6', 2),
      climate: orchard(4),
      target: target(5),
    },
  },
  {
    id: 'reporting-sensor',
    name: 'Reporting sensor',
    description: 'Measures and reports every 15 min over a 2.4 GHz IEEE 802.15.4 radio; two LR6.',
    group: 'plain',
    document: {
      schemaVersion: 1,
      name: 'Reporting sensor',
      node: reportingNode(),
      supply: supply('LR6', 2),
      climate: orchard(4),
      target: target(5),
    },
  },
  {
    id: 'event-counter',
    name: 'Event counter',
    description: 'Reports each closing of a contact, 140 a day in the mean, below 1 GHz; one CR17345.',
    group: 'plain',
    document: {
      schemaVersion: 1,
      name: 'Event counter',
      node: eventNode(),
      supply: supply('CR17345', 1),
      climate: orchard(4),
      target: target(5),
    },
  },
  {
    id: 'long-range-reporter',
    name: 'Long-range reporter',
    description:
      'Measures and reports every hour by chirp spread spectrum, with a window to be answered in; one ER34615.',
    group: 'plain',
    document: {
      schemaVersion: 1,
      name: 'Long-range reporter',
      node: longRangeNode(),
      supply: supply('ER34615', 1),
      climate: orchard(4),
      target: target(8),
    },
  },
  ...EXCHANGE_TEMPLATES,
];

/**
 * Scenarios to start from; each is complete and can be forecast as it is.
 *
 * @returns Copies, so that a caller may change what it gets.
 * @example scenarioTemplates().map((template) => template.name)[0] // 'Empty'
 */
export function scenarioTemplates(): ScenarioTemplate[] {
  return TEMPLATES.map((template) => ({ ...template, document: scenarioSchema.parse(template.document) }));
}

/**
 * One template.
 *
 * @param id Such as `empty` or `reporting-sensor`.
 * @returns A copy.
 * @throws InconsistentInputError if there is none.
 * @example scenarioTemplate('empty').document.node.parts.length // 0
 */
export function scenarioTemplate(id: string): ScenarioTemplate {
  const template = scenarioTemplates().find((candidate) => candidate.id === id);
  if (template) return template;
  throw new InconsistentInputError(`There is no template "${id}".`, { code: 'not-found', field: 'id', value: id });
}
