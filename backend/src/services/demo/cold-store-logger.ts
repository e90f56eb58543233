import { catalogueCell, catalogueClimate } from '#common/catalogue/catalogue.ts';
import { windowOpenS } from '#common/engine/link/chirp-windows.ts';
import type { Node, Part, Scenario, Supply } from '#common/engine/scenario/scenario.types.ts';
import { fromUnit } from '#common/units/unit-lookup.ts';
import { controller, current, fixed, instantly, move, radio, typicalOnly, voltage } from './demo-figures.ts';
import type { DemoProject } from './demo.types.ts';

const chirpRadio: Part = radio({
  name: 'Transceiver, chirp spread spectrum',
  sleep: '… 0.8 … 2 µA',
  idle: '0.5 … 0.7 … 1.2 mA',
  synthesiser: '3 … 5 … 7 mA',
  listen: '5 … 6 … 9 mA',
  receive: '5 … 6.5 … 9 mA',
  transmit: '38 … 43 … 52 mA',
  transmitName: 'Transmit at 14 dBm',
  start: ['1 … 2.5 … 5 ms', '0.7 mA'],
  lock: ['50 … 80 … 150 µs', '3 mA'],
  lowestVoltage: '1.9 V',
});

const thermometer: Part = {
  id: 'thermometer',
  name: 'Store thermometer',
  kind: 'sensor',
  restStateId: 'sleep',
  lowestVoltageV: voltage('1.9 V'),
  states: [
    { id: 'sleep', name: 'Sleep', role: 'sleep', current: current('… 0.2 … 1 µA') },
    { id: 'measuring', name: 'Measuring', role: 'active', current: current('0.5 mA') },
  ],
  transitions: [move('sleep', 'measuring', '0.5 ms', '50 µA'), ...instantly('measuring', 'sleep')],
};

function node(spreadingFactor: number): Node {
  return {
    parts: [controller('0.6 … 1.2 … 3 µA'), chirpRadio, thermometer],
    leakages: [{ id: 'board', name: 'Board leakage', current: current('… 0.3 … 1 µA') }],
    routines: [
      {
        id: 'uplink',
        name: 'Measure and send',
        enabled: true,
        schedule: { kind: 'every', periodS: 1_800 },
        steps: [
          {
            id: 'measure',
            name: 'Measure the store',
            states: { controller: 'idle', thermometer: 'measuring' },
            duration: fixed('15 … 20 … 30 ms'),
          },
          {
            id: 'send',
            name: 'Send the uplink',
            states: { controller: 'idle', radio: 'transmit' },
            duration: {
              kind: 'exchange',
              pattern: 'chirp',
              spreadingFactor,
              bandwidthHz: 125_000,
              codingRate: 1,
              payloadOctets: 24,
            },
          },
          { id: 'wait', name: 'Wait for the window', states: {}, duration: fixed('0.95 s') },
          {
            id: 'window',
            name: 'Listen in the window',
            states: { controller: 'idle', radio: 'listen' },
            duration: fixed('30 … 40 … 60 ms'),
          },
        ],
      },
    ],
  };
}

/** How many symbols the radio listens for a preamble in each receive window. */
const WINDOW_SYMBOLS = 8;

/** The uplink with both receive windows as one exchange; the controller sleeps meanwhile. */
function derivedNode(spreadingFactor: number): Node {
  const typed = node(spreadingFactor);
  const openS = windowOpenS(spreadingFactor, 125_000, WINDOW_SYMBOLS);
  const receiveWindows = [
    { delayS: 1, openS },
    { delayS: 2, openS },
  ];
  return {
    ...typed,
    link: { dutyCycleBand: 'eu-868.0-868.6' },
    routines: typed.routines.map((routine) => ({
      ...routine,
      steps: routine.steps.flatMap((step) => {
        if (step.id === 'measure') return [step];
        if (step.duration.kind !== 'exchange' || step.duration.pattern !== 'chirp') return [];
        return [{ ...step, states: {}, duration: { ...step.duration, receiveWindows } }];
      }),
    })),
  };
}

const twoCells = (designation: string): Supply => ({
  cell: catalogueCell(designation),
  series: 2,
  parallel: 1,
  regulator: { kind: 'none' },
  reserveFraction: 0.05,
});

function document(name: string, loggerNode: Node, supply: Supply): Scenario {
  return {
    schemaVersion: 1,
    name,
    node: loggerNode,
    supply,
    climate: { ...catalogueClimate('cold-store'), startMonth: 6 },
    target: { lifeS: fromUnit(5, 'y'), confidence: 0.9 },
  };
}

const LITHIUM_NAME = 'Two FR6 at −20 °C';

export const COLD_STORE_LOGGER: DemoProject = {
  name: 'Cold-store logger',
  description:
    'Always at −20 °C in the apple stores, long-range chirp spread-spectrum uplink twice an hour. All figures are invented.',
  scenarios: [
    {
      revisions: [
        {
          note: 'First draft at spreading factor 10, typical currents only.',
          author: 'engineer',
          document: document(LITHIUM_NAME, typicalOnly(node(10)), twoCells('FR6')),
        },
        {
          note: 'Only spreading factor 12 reaches the gateway through the insulated door. Ranges added.',
          author: 'engineer',
          document: document(LITHIUM_NAME, node(12), twoCells('FR6')),
        },
        {
          note: 'Both receive windows of the uplink counted, eight symbols each.',
          author: 'engineer',
          document: document(LITHIUM_NAME, derivedNode(12), twoCells('FR6')),
        },
      ],
    },
    {
      revisions: [
        {
          note: 'For comparison: what the cheap cells would do in the cold.',
          author: 'engineer',
          document: document('Two LR6 at −20 °C', derivedNode(12), twoCells('LR6')),
        },
      ],
    },
  ],
};
