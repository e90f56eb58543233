import { catalogueCell } from '#common/catalogue/catalogue.ts';
import type { Node, Part, Routine, Scenario, Supply } from '#common/engine/scenario/scenario.types.ts';
import { fromUnit } from '#common/units/unit-lookup.ts';
import {
  controller,
  current,
  fixed,
  instantly,
  move,
  orchardClimate,
  orchardLosses,
  plain,
  radio,
  typicalOnly,
  voltage,
} from './demo-figures.ts';
import type { DemoProject } from './demo.types.ts';

const frostRadio: Part = radio({
  name: 'Transceiver 2.4 GHz, IEEE 802.15.4',
  sleep: '… 0.3 … 1.5 µA',
  idle: '0.3 … 0.5 … 0.8 mA',
  synthesiser: '5 … 6.5 … 9 mA',
  listen: '12 … 13.5 … 16 mA',
  receive: '12 … 14 … 17 mA',
  transmit: '15 … 17 … 22 mA',
  transmitName: 'Transmit at 4 dBm',
  start: ['0.3 … 0.6 … 1.2 ms', '0.5 mA'],
  lock: ['80 … 130 … 200 µs', '3 mA'],
  lowestVoltage: '2.1 V',
});

const airSensor: Part = {
  id: 'air',
  name: 'Air-temperature sensor',
  kind: 'sensor',
  restStateId: 'sleep',
  lowestVoltageV: voltage('1.9 V'),
  states: [
    { id: 'sleep', name: 'Sleep', role: 'sleep', current: current('… 0.2 … 1 µA'), doublingK: 10 },
    { id: 'measuring', name: 'Measuring', role: 'active', current: current('0.3 … 0.45 … 0.7 mA') },
  ],
  transitions: [move('sleep', 'measuring', '0.2 … 0.4 … 1 ms', '50 µA'), ...instantly('measuring', 'sleep')],
};

/** Its highest current is not known: the wetter the leaf, the more it draws. */
const leafSensor: Part = {
  id: 'leaf',
  name: 'Leaf-wetness sensor',
  kind: 'sensor',
  restStateId: 'off',
  lowestVoltageV: voltage('2.0 V'),
  states: [
    { id: 'off', name: 'Off', role: 'sleep', current: current('0 A') },
    { id: 'measuring', name: 'Excited', role: 'active', law: 'resistive', current: current('1.6 mA') },
  ],
  transitions: [move('off', 'measuring', '5 ms', '1.6 mA'), ...instantly('measuring', 'off')],
};

interface FrostPostOptions {
  /** How long the leaf-wetness grid is excited for a reading. */
  excitation: string;
  reportEveryS: number;
  /** Times on the air derived from the link; default: typed. */
  isDerived?: boolean;
}

const measure = (excitation: string): Routine => ({
  id: 'measure',
  name: 'Measure air and leaf',
  enabled: true,
  schedule: { kind: 'every', periodS: 300 },
  steps: [
    {
      id: 'read-air',
      name: 'Read air temperature',
      states: { controller: 'idle', air: 'measuring' },
      duration: fixed('10 … 14 … 20 ms'),
    },
    { id: 'excite', name: 'Excite the leaf grid', states: { leaf: 'measuring' }, duration: fixed(excitation) },
    {
      id: 'convert',
      name: 'Convert and store',
      states: { controller: 'active', leaf: 'measuring' },
      duration: fixed('3 … 4 … 6 ms'),
    },
  ],
});

const report = (periodS: number): Routine => ({
  id: 'report',
  name: 'Report to the star',
  enabled: true,
  schedule: { kind: 'every', periodS },
  steps: [
    {
      id: 'prepare',
      name: 'Prepare the frame',
      states: { controller: 'active' },
      duration: fixed('2 … 3 … 5 ms'),
    },
    {
      id: 'access',
      name: 'Wait for a free channel',
      states: { controller: 'idle', radio: 'listen' },
      duration: fixed('1 … 2.5 … 12 ms'),
    },
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
      duration: fixed('544 µs'),
    },
    {
      id: 'downlink',
      name: 'Listen for settings',
      states: { controller: 'idle', radio: 'receive' },
      duration: fixed('15 … 20 … 40 ms'),
    },
  ],
});

const setClock: Routine = {
  id: 'set-clock',
  name: 'Set the clock',
  enabled: true,
  schedule: { kind: 'every', periodS: 86_400 },
  steps: [
    {
      id: 'wait-for-time',
      name: 'Wait for the time frame',
      states: { controller: 'idle', radio: 'receive' },
      duration: fixed('250 ms'),
    },
  ],
};

/** The same report with times on the air that follow from the link: channel access, acknowledgement, retries. */
const derivedReport = (periodS: number): Routine => ({
  ...report(periodS),
  steps: [
    {
      id: 'prepare',
      name: 'Prepare the frame',
      states: { controller: 'active' },
      duration: fixed('2 … 3 … 5 ms'),
    },
    {
      id: 'send',
      name: 'Send the report',
      states: { controller: 'idle' },
      duration: { kind: 'exchange', pattern: 'acknowledged', payloadOctets: 24 },
    },
    {
      id: 'settings',
      name: 'Ask for settings',
      states: { controller: 'idle' },
      duration: { kind: 'exchange', pattern: 'poll', pendingProbability: plain(0.02), responsePsduOctets: 60 },
    },
  ],
});

const derivedClock: Routine = {
  ...setClock,
  steps: [
    {
      id: 'ask-for-time',
      name: 'Ask for the time',
      states: { controller: 'idle' },
      duration: { kind: 'exchange', pattern: 'poll', pendingProbability: plain(0.98), responsePsduOctets: 24 },
    },
  ],
};

function node({ excitation, reportEveryS, isDerived = false }: FrostPostOptions): Node {
  return {
    parts: [controller('1 … 1.6 … 4 µA'), frostRadio, airSensor, leafSensor],
    leakages: [
      { id: 'board', name: 'Board leakage', current: current('0.4 µA') },
      { id: 'supervisor', name: 'Reset supervisor', current: current('0.6 … 1 … 1.6 µA') },
    ],
    link: { phy: 'oqpsk-2450', ...(isDerived ? orchardLosses : {}) },
    routines: isDerived
      ? [measure(excitation), derivedReport(reportEveryS), derivedClock]
      : [measure(excitation), report(reportEveryS), setClock],
  };
}

const twoAlkaline: Supply = {
  cell: catalogueCell('LR6'),
  series: 2,
  parallel: 1,
  regulator: { kind: 'none' },
  reserveFraction: 0,
};

const withWarning = (supply: Supply, thresholdV: number): Supply => ({
  ...supply,
  lowBattery: { thresholdV, stepV: 0.05, hysteresisV: 0.1, readAt: 'critical', readingsPerDay: 4 },
});

function document(name: string, frostNode: Node, supply: Supply): Scenario {
  return {
    schemaVersion: 1,
    name,
    node: frostNode,
    supply,
    climate: orchardClimate(10),
    target: { lifeS: fromUnit(5, 'y'), confidence: 0.9 },
  };
}

const LR6_NAME = 'Two LR6, report every 15 min';
const ER_NAME = 'One ER14505';
const draft = node({ excitation: '5 s', reportEveryS: 900 });
const shortened = node({ excitation: '2.7 s', reportEveryS: 900 });
const derived = node({ excitation: '2.7 s', reportEveryS: 900, isDerived: true });
const oneLithium: Supply = { ...twoAlkaline, cell: catalogueCell('ER14505'), series: 1 };

export const FROST_POST: DemoProject = {
  name: 'Frost post',
  description:
    'Air temperature and leaf wetness every 5 min, report every 15 min over a 2.4 GHz star. Hangs in apple trees from −18 °C to 36 °C. All figures are invented.',
  scenarios: [
    {
      revisions: [
        {
          note: 'First draft with typical currents only.',
          author: 'engineer',
          document: document(LR6_NAME, typicalOnly(draft), twoAlkaline),
        },
        {
          note: 'Ranges added. Leaf sensor and board leakage still have no maximum.',
          author: 'engineer',
          document: document(LR6_NAME, draft, twoAlkaline),
        },
        {
          note: 'Excite the leaf grid for 2.7 s instead of 5 s. Low-battery warning at 2.45 V, read while sending.',
          author: 'owner',
          document: document(LR6_NAME, shortened, withWarning(twoAlkaline, 2.45)),
        },
        {
          note: 'Channel access, acknowledgement, retries and polls derived from the link instead of typed.',
          author: 'engineer',
          document: document(LR6_NAME, derived, withWarning(twoAlkaline, 2.45)),
        },
      ],
    },
    {
      revisions: [
        {
          note: 'Same node on one lithium cell. The transmit pulse is too much for it in the cold.',
          author: 'engineer',
          document: document(ER_NAME, shortened, oneLithium),
        },
        {
          note: 'Report once an hour: the mean falls, the pulse in the cold does not.',
          author: 'engineer',
          document: document(ER_NAME, node({ excitation: '2.7 s', reportEveryS: 3_600 }), oneLithium),
        },
        {
          note: 'Times on the air derived from the link.',
          author: 'engineer',
          document: document(ER_NAME, node({ excitation: '2.7 s', reportEveryS: 3_600, isDerived: true }), oneLithium),
        },
      ],
    },
  ],
};
