import { catalogueCell } from '#common/catalogue/catalogue.ts';
import type { Node, Part, Routine, Scenario, Supply } from '#common/engine/scenario/scenario.types.ts';
import { fromUnit } from '#common/units/unit-lookup.ts';
import {
  controller,
  current,
  fixed,
  orchardClimate,
  orchardLosses,
  plain,
  radio,
  typicalOnly,
  voltage,
} from './demo-figures.ts';
import type { DemoProject } from './demo.types.ts';

const gateRadio: Part = radio({
  name: 'Transceiver below 1 GHz',
  sleep: '… 0.4 … 2 µA',
  idle: '0.4 … 0.6 … 1 mA',
  synthesiser: '4 … 6 … 8 mA',
  listen: '11 … 12.5 … 15 mA',
  receive: '11 … 13 … 16 mA',
  transmit: '26 … 29 … 36 mA',
  transmitName: 'Transmit at 12 dBm',
  start: ['0.4 … 0.8 … 1.5 ms', '0.6 mA'],
  lock: ['100 … 160 … 300 µs', '4 mA'],
  lowestVoltage: '2.0 V',
});

/** Wear of the contact decides how long it bounces; nobody has measured the worst one. */
const contact: Part = {
  id: 'contact',
  name: 'Gate contact with pull-up',
  kind: 'sensor',
  restStateId: 'open',
  lowestVoltageV: voltage('0 V'),
  states: [
    { id: 'open', name: 'Open', role: 'sleep', current: current('… 2 … 50 nA') },
    { id: 'closed', name: 'Closed', role: 'active', law: 'resistive', current: current('2.8 … 3 … 3.3 µA') },
  ],
  transitions: [],
};

const followBeacon: Routine = {
  id: 'follow-beacon',
  name: "Follow the gateway's beacon",
  enabled: true,
  schedule: { kind: 'every', periodS: 240 },
  steps: [
    {
      id: 'hear-beacon',
      name: 'Hear the beacon',
      states: { controller: 'idle', radio: 'receive' },
      duration: fixed('45 … 60 … 90 ms'),
    },
  ],
};

const alive: Routine = {
  id: 'alive',
  name: 'Sign of life',
  enabled: true,
  schedule: { kind: 'every', periodS: 21_600 },
  steps: [
    {
      id: 'send-alive',
      name: 'Send the sign of life',
      states: { controller: 'idle', radio: 'transmit' },
      duration: { kind: 'exchange', pattern: 'frame', payloadOctets: 24 },
    },
    {
      id: 'answer-alive',
      name: 'Listen for settings',
      states: { controller: 'idle', radio: 'receive' },
      duration: fixed('80 … 120 … 200 ms'),
    },
  ],
};

/** The gateway's answer stands for an acknowledgement; how long it may take is the application's choice. */
const ANSWER_LISTENING_S = 0.6;

const derivedRoutines: Routine[] = [
  {
    id: 'gate-opens',
    name: 'Gate opens',
    enabled: true,
    schedule: { kind: 'random', meanPerDay: 140, busiestPerDay: 600 },
    steps: [
      {
        id: 'debounce',
        name: 'Wait until the contact rests',
        states: { contact: 'closed', controller: 'active' },
        duration: fixed('40 ms'),
      },
      {
        id: 'send',
        name: 'Send the count',
        states: { contact: 'closed', controller: 'idle' },
        duration: { kind: 'exchange', pattern: 'unacknowledged', payloadOctets: 16 },
      },
      {
        id: 'answer',
        name: 'Listen for the answer',
        states: { contact: 'closed', controller: 'idle' },
        duration: { kind: 'exchange', pattern: 'receive', payloadOctets: 16, listenS: ANSWER_LISTENING_S },
      },
      {
        id: 'gate-stays-open',
        name: 'Gate stays open',
        states: { contact: 'closed' },
        duration: fixed('8 … 20 … 60 s'),
      },
    ],
  },
  {
    ...followBeacon,
    steps: [
      {
        id: 'hear-beacon',
        name: 'Hear the beacon',
        states: { controller: 'idle' },
        duration: { kind: 'exchange', pattern: 'guard', intervalS: 240, psduOctets: 30 },
      },
    ],
  },
  {
    ...alive,
    steps: [
      {
        id: 'send-alive',
        name: 'Send the sign of life',
        states: { controller: 'idle' },
        duration: { kind: 'exchange', pattern: 'unacknowledged', payloadOctets: 24 },
      },
      {
        id: 'answer-alive',
        name: 'Listen for settings',
        states: { controller: 'idle' },
        duration: { kind: 'exchange', pattern: 'receive', payloadOctets: 32, listenS: 0.12 },
      },
    ],
  },
];

function derivedNode(): Node {
  return {
    ...node('600 ms'),
    link: { phy: 'sun-fsk-50', ...orchardLosses, tolerancePpm: plain(60), peerTolerancePpm: plain(20) },
    routines: derivedRoutines,
  };
}

function node(answerWindow: string): Node {
  return {
    parts: [controller('1 … 1.5 … 4 µA'), gateRadio, contact],
    leakages: [{ id: 'board', name: 'Board leakage', current: current('… 0.4 … 1.5 µA') }],
    link: { phy: 'sun-fsk-50' },
    routines: [
      {
        id: 'gate-opens',
        name: 'Gate opens',
        enabled: true,
        schedule: { kind: 'random', meanPerDay: 140, busiestPerDay: 600 },
        steps: [
          {
            id: 'debounce',
            name: 'Wait until the contact rests',
            states: { contact: 'closed', controller: 'active' },
            duration: fixed('40 ms'),
          },
          {
            id: 'send',
            name: 'Send the count',
            states: { contact: 'closed', controller: 'idle', radio: 'transmit' },
            duration: { kind: 'exchange', pattern: 'frame', payloadOctets: 16 },
          },
          {
            id: 'answer',
            name: 'Listen for the answer',
            states: { contact: 'closed', controller: 'idle', radio: 'listen' },
            duration: fixed(answerWindow),
          },
          {
            id: 'gate-stays-open',
            name: 'Gate stays open',
            states: { contact: 'closed' },
            duration: fixed('8 … 20 … 60 s'),
          },
        ],
      },
      followBeacon,
      alive,
    ],
  };
}

const oneCell: Supply = {
  cell: catalogueCell('CR17345'),
  series: 1,
  parallel: 1,
  regulator: { kind: 'none' },
  reserveFraction: 0.05,
};

function document(gateNode: Node, supply: Supply): Scenario {
  return {
    schemaVersion: 1,
    name: 'One CR17345, 140 events a day',
    node: gateNode,
    supply,
    climate: orchardClimate(4),
    target: { lifeS: fromUnit(5, 'y'), confidence: 0.9 },
  };
}

export const GATE_COUNTER: DemoProject = {
  name: 'Gate counter',
  description:
    'Counts openings of the orchard gates, 140 a day in the mean, and reports each below 1 GHz from one CR17345. All figures are invented.',
  scenarios: [
    {
      revisions: [
        {
          note: 'First draft: listens a whole second for each answer.',
          author: 'engineer',
          document: document(typicalOnly(node('1 s')), oneCell),
        },
        {
          note: 'Answer window cut to 600 ms; ranges added.',
          author: 'engineer',
          document: document(node('400 … 600 … 800 ms'), oneCell),
        },
        {
          note: 'Low-battery warning at 2.75 V.',
          author: 'engineer',
          document: document(node('400 … 600 … 800 ms'), {
            ...oneCell,
            lowBattery: { thresholdV: 2.75, stepV: 0.05, hysteresisV: 0.1, readAt: 'rest' },
          }),
        },
        {
          note: 'Channel access, times on the air and the guard before the beacon derived from the link.',
          author: 'engineer',
          document: document(derivedNode(), {
            ...oneCell,
            lowBattery: { thresholdV: 2.75, stepV: 0.05, hysteresisV: 0.1, readAt: 'rest' },
          }),
        },
      ],
    },
  ],
};
