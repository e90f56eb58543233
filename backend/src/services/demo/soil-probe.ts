import { catalogueCell } from '#common/catalogue/catalogue.ts';
import type { Node, Part, Regulator, Scenario, Step, Supply } from '#common/engine/scenario/scenario.types.ts';
import { fromUnit } from '#common/units/unit-lookup.ts';
import {
  controller,
  current,
  fixed,
  instantly,
  move,
  orchardClimate,
  orchardLosses,
  radio,
  typicalOnly,
  voltage,
} from './demo-figures.ts';
import type { DemoProject } from './demo.types.ts';

const soilRadio: Part = radio({
  name: 'Transceiver 2.4 GHz, low power',
  sleep: '… 0.2 … 1 µA',
  idle: '0.3 … 0.4 … 0.6 mA',
  synthesiser: '1.8 … 2.2 … 3 mA',
  listen: '3.8 … 4.4 … 5.5 mA',
  receive: '3.8 … 4.5 … 5.5 mA',
  transmit: '4 … 4.8 … 6.2 mA',
  transmitName: 'Transmit at 0 dBm',
  start: ['0.3 … 0.5 … 1 ms', '0.4 mA'],
  lock: ['40 … 60 … 120 µs', '1.5 mA'],
  lowestVoltage: '1.8 V',
});

const probe: Part = {
  id: 'probe',
  name: 'Soil-moisture probe',
  kind: 'sensor',
  restStateId: 'off',
  lowestVoltageV: voltage('2.5 V'),
  states: [
    { id: 'off', name: 'Off', role: 'sleep', current: current('0.1 µA') },
    { id: 'measuring', name: 'Measuring', role: 'active', current: current('2.6 … 3.2 … 4 mA') },
  ],
  transitions: [move('off', 'measuring', '20 ms', '2.5 mA'), ...instantly('measuring', 'off')],
};

interface SoilProbeOptions {
  /** How long the probe settles before a reading. */
  settling: string;
  /** How long the radio listens for an answer after each report. */
  listening: string;
  /** Times on the air derived from the link, and 24 octets a report; default: typed, and 60 octets. */
  isDerived?: boolean;
}

const typedReport = (listening: string): Step[] => [
  {
    id: 'send',
    name: 'Send the frame',
    states: { controller: 'idle', radio: 'transmit' },
    duration: { kind: 'exchange', pattern: 'frame', payloadOctets: 60 },
  },
  { id: 'listen', name: 'Listen for an answer', states: { radio: 'listen' }, duration: fixed(listening) },
];

/** How long an answer may take is the application's choice; the link adds its frame and the acknowledgement of it. */
const derivedReport: Step[] = [
  {
    id: 'send',
    name: 'Send the report',
    states: { controller: 'idle' },
    duration: { kind: 'exchange', pattern: 'acknowledged', payloadOctets: 24 },
  },
  {
    id: 'listen',
    name: 'Listen for an answer',
    states: {},
    duration: { kind: 'exchange', pattern: 'receive', payloadOctets: 20, listenS: 2 },
  },
];

function node({ settling, listening, isDerived = false }: SoilProbeOptions): Node {
  return {
    parts: [controller('1 … 1.5 … 4 µA'), soilRadio, probe],
    leakages: [{ id: 'board', name: 'Board leakage', current: current('… 0.3 … 1 µA') }],
    link: { phy: 'oqpsk-2450', ...(isDerived ? orchardLosses : {}) },
    routines: [
      {
        id: 'read',
        name: 'Read the soil',
        enabled: true,
        schedule: { kind: 'every', periodS: 3_600 },
        steps: [
          { id: 'settle', name: 'Let the probe settle', states: { probe: 'measuring' }, duration: fixed(settling) },
          {
            id: 'convert',
            name: 'Convert and store',
            states: { controller: 'active', probe: 'measuring' },
            duration: fixed('6 … 8 … 12 ms'),
          },
        ],
      },
      {
        id: 'report',
        name: 'Report four times a day',
        enabled: true,
        schedule: { kind: 'every', periodS: 21_600 },
        steps: [
          {
            id: 'prepare',
            name: 'Prepare the frame',
            states: { controller: 'active' },
            duration: fixed('4 … 5 … 8 ms'),
          },
          ...(isDerived ? derivedReport : typedReport(listening)),
        ],
      },
    ],
  };
}

/** A buck-boost regulator hides the falling voltage of the cell, and asks for more current the lower it is. */
const buckBoost: Regulator = {
  kind: 'switching',
  outputV: 3,
  quiescentA: fromUnit(1.2, 'µA'),
  efficiency: 0.85,
  minimumInputV: 1.8,
};

const coin: Supply = {
  cell: catalogueCell('CR2477'),
  series: 1,
  parallel: 1,
  regulator: buckBoost,
  reserveFraction: 0,
};

function document(name: string, soilNode: Node, supply: Supply): Scenario {
  return {
    schemaVersion: 1,
    name,
    node: soilNode,
    supply,
    climate: orchardClimate(10),
    target: { lifeS: fromUnit(3, 'y'), confidence: 0.9 },
  };
}

const COIN_NAME = 'CR2477 behind a buck-boost regulator';
const draft = node({ settling: '30 s', listening: '3 s' });
const final = node({ settling: '18 … 22 … 30 s', listening: '1.5 … 2 … 4 s' });
const derived = node({ settling: '18 … 22 … 30 s', listening: '1.5 … 2 … 4 s', isDerived: true });

export const SOIL_PROBE: DemoProject = {
  name: 'Soil probe',
  description:
    'Hourly reading, report four times a day from a CR2477 behind a buck-boost regulator. Capacity over mean current promises more than the three years wanted. All figures are invented.',
  scenarios: [
    {
      revisions: [
        {
          note: 'First draft with typical currents only.',
          author: 'engineer',
          document: document(COIN_NAME, typicalOnly(draft), coin),
        },
        {
          note: 'Settling time shortened to 22 s; ranges added.',
          author: 'engineer',
          document: document(COIN_NAME, final, coin),
        },
        {
          note: 'Low-battery warning at 2.4 V, to see whether it comes in time. It reads the regulated rail and stays silent.',
          author: 'owner',
          document: document(COIN_NAME, final, {
            ...coin,
            lowBattery: { thresholdV: 2.4, stepV: 0.05, hysteresisV: 0.1, readAt: 'rest' },
          }),
        },
        {
          note: 'Report packed into 24 octets, acknowledged; its times on the air derived from the link.',
          author: 'engineer',
          document: document(COIN_NAME, derived, {
            ...coin,
            lowBattery: { thresholdV: 2.4, stepV: 0.05, hysteresisV: 0.1, readAt: 'rest' },
          }),
        },
      ],
    },
    {
      revisions: [
        {
          note: 'The same node on two LR6, which outlast the three years wanted.',
          author: 'engineer',
          document: document('Two LR6 behind the same regulator', derived, {
            ...coin,
            cell: catalogueCell('LR6'),
            series: 2,
          }),
        },
      ],
    },
  ],
};
