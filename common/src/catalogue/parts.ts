import type { Part, Provenance, Quantity, State, Transition } from '#common/engine/scenario/scenario.types.ts';
import type { CataloguePart } from './catalogue.types.ts';
import { typedFigure } from './typed-figure.ts';

const MEMORY: Provenance = {
  kind: 'memory',
  text: 'Typical of the class, from memory; of no particular product',
};

const current = (text: string): Quantity => typedFigure('current', text, MEMORY);
const duration = (text: string): Quantity => typedFigure('duration', text, MEMORY);
const voltage = (text: string): Quantity => typedFigure('voltage', text, MEMORY);

const move = (from: string, to: string, time: string, amps: string): Transition => ({
  fromStateId: from,
  toStateId: to,
  durationS: duration(time),
  current: current(amps),
});

/** Switching off, and the changes whose time the link already counts. */
const instantly = (from: string, ...to: string[]): Transition[] => to.map((state) => move(from, state, '0 s', '0 A'));

/** Leakage currents of silicon double about every ten kelvins. */
const LEAKY = { doublingK: 10 };

const AIR: readonly string[] = ['listen', 'receive', 'transmit'];

/**
 * The moves of a radio: from sleep over idle (crystal running) and synthesiser to the air and back. Between synthesiser and
 * air there is no time of its own, because turnaround times belong to the link.
 */
function radioMoves(start: Transition, lock: Transition): Transition[] {
  return [
    start,
    lock,
    ...instantly('synthesiser', ...AIR, 'idle', 'sleep'),
    ...AIR.flatMap((state) =>
      instantly(state, ...AIR.filter((other) => other !== state), 'synthesiser', 'idle', 'sleep'),
    ),
    ...instantly('idle', 'sleep'),
  ];
}

interface RadioFigures {
  sleep: string;
  idle: string;
  synthesiser: string;
  listen: string;
  receive: string;
  transmit: string;
}

function radioStates(figures: RadioFigures, transmitName: string): State[] {
  return [
    { id: 'sleep', name: 'Sleep', role: 'sleep', current: current(figures.sleep), ...LEAKY },
    { id: 'idle', name: 'Idle, crystal on', role: 'idle', current: current(figures.idle) },
    { id: 'synthesiser', name: 'Synthesiser on', role: 'synthesiser', current: current(figures.synthesiser) },
    { id: 'listen', name: 'Listen', role: 'listen', current: current(figures.listen) },
    { id: 'receive', name: 'Receive', role: 'receive', current: current(figures.receive) },
    { id: 'transmit', name: transmitName, role: 'transmit', current: current(figures.transmit) },
  ];
}

const PARTS: readonly Part[] = [
  {
    id: 'transceiver-2450',
    name: 'Transceiver 2.4 GHz, IEEE 802.15.4',
    kind: 'radio',
    restStateId: 'sleep',
    lowestVoltageV: voltage('1.8 V'),
    states: radioStates(
      {
        sleep: '0.02 … 0.1 … 1 µA',
        idle: '0.3 … 0.4 … 0.6 mA',
        synthesiser: '5 … 6 … 8 mA',
        listen: '11 … 12 … 15 mA',
        receive: '12 … 13 … 16 mA',
        transmit: '13 … 14 … 18 mA',
      },
      'Transmit at 3 dBm',
    ),
    transitions: radioMoves(
      move('sleep', 'idle', '0.3 … 0.5 … 1 ms', '0.4 mA'),
      move('idle', 'synthesiser', '80 … 110 … 200 µs', '3 mA'),
    ),
  },
  {
    id: 'transceiver-2450-connectionless',
    name: 'Transceiver 2.4 GHz, connectionless advertising',
    kind: 'radio',
    restStateId: 'sleep',
    lowestVoltageV: voltage('1.8 V'),
    states: radioStates(
      {
        sleep: '0.1 … 0.4 … 2 µA',
        idle: '0.3 … 0.4 … 0.7 mA',
        synthesiser: '2 … 2.5 … 4 mA',
        listen: '4.5 … 5.5 … 7 mA',
        receive: '4.5 … 5.5 … 7 mA',
        transmit: '4.5 … 5.3 … 8 mA',
      },
      'Transmit at 0 dBm',
    ),
    transitions: radioMoves(
      move('sleep', 'idle', '0.3 … 0.4 … 1.5 ms', '0.4 mA'),
      move('idle', 'synthesiser', '30 … 60 … 140 µs', '2 mA'),
    ),
  },
  {
    id: 'transceiver-868',
    name: 'Transceiver below 1 GHz',
    kind: 'radio',
    restStateId: 'sleep',
    lowestVoltageV: voltage('1.8 V'),
    states: radioStates(
      {
        sleep: '0.05 … 0.2 … 1.5 µA',
        idle: '0.4 … 0.6 … 1 mA',
        synthesiser: '4 … 6 … 8 mA',
        listen: '10 … 12 … 15 mA',
        receive: '10 … 12 … 15 mA',
        transmit: '24 … 26 … 32 mA',
      },
      'Transmit at 10 dBm',
    ),
    transitions: radioMoves(
      move('sleep', 'idle', '0.3 … 0.6 … 1.5 ms', '0.6 mA'),
      move('idle', 'synthesiser', '80 … 150 … 300 µs', '4 mA'),
    ),
  },
  {
    id: 'transceiver-chirp',
    name: 'Transceiver, long-range chirp spread spectrum',
    kind: 'radio',
    restStateId: 'sleep',
    lowestVoltageV: voltage('1.8 V'),
    states: radioStates(
      {
        sleep: '0.1 … 0.6 … 2 µA',
        idle: '0.5 … 0.7 … 1.2 mA',
        synthesiser: '3 … 5 … 7 mA',
        listen: '5 … 6 … 9 mA',
        receive: '5 … 6 … 9 mA',
        transmit: '38 … 44 … 55 mA',
      },
      'Transmit at 14 dBm',
    ),
    transitions: radioMoves(
      move('sleep', 'idle', '1 … 2.5 … 5 ms', '0.7 mA'),
      move('idle', 'synthesiser', '50 … 80 … 150 µs', '3 mA'),
    ),
  },
  {
    id: 'controller-low-power',
    name: 'Microcontroller, low power',
    kind: 'controller',
    restStateId: 'deep-sleep',
    lowestVoltageV: voltage('1.8 V'),
    states: [
      {
        id: 'deep-sleep',
        name: 'Deep sleep, clock and memory kept',
        role: 'sleep',
        current: current('0.6 … 1.1 … 4 µA'),
        lowestVoltageV: voltage('1.6 V'),
        ...LEAKY,
      },
      { id: 'idle', name: 'Core stopped, bus running', role: 'idle', current: current('0.5 … 0.8 … 1.2 mA') },
      { id: 'active', name: 'Core running', role: 'active', current: current('2 … 2.8 … 3.6 mA') },
    ],
    transitions: [
      move('deep-sleep', 'active', '20 … 60 … 200 µs', '1.5 mA'),
      ...instantly('active', 'idle', 'deep-sleep'),
      ...instantly('idle', 'active', 'deep-sleep'),
    ],
  },
  {
    id: 'sensor-temperature-humidity',
    name: 'Temperature and humidity sensor',
    kind: 'sensor',
    restStateId: 'sleep',
    lowestVoltageV: voltage('1.9 V'),
    states: [
      { id: 'sleep', name: 'Sleep', role: 'sleep', current: current('0.05 … 0.15 … 1 µA'), ...LEAKY },
      { id: 'measuring', name: 'Measuring', role: 'active', current: current('0.3 … 0.5 … 0.9 mA') },
    ],
    transitions: [move('sleep', 'measuring', '0.2 … 0.5 … 1 ms', '50 µA'), ...instantly('measuring', 'sleep')],
  },
  {
    id: 'sensor-leaf-wetness',
    name: 'Leaf-wetness sensor, resistive grid',
    kind: 'sensor',
    restStateId: 'off',
    lowestVoltageV: voltage('2.0 V'),
    states: [
      { id: 'off', name: 'Off', role: 'sleep', current: current('0 A') },
      { id: 'measuring', name: 'Measuring', role: 'active', law: 'resistive', current: current('0.2 … 0.8 … 2 mA') },
    ],
    transitions: [move('off', 'measuring', '2 … 5 … 10 ms', '0.8 mA'), ...instantly('measuring', 'off')],
  },
  {
    id: 'sensor-soil',
    name: 'Soil-moisture probe, capacitive',
    kind: 'sensor',
    restStateId: 'off',
    lowestVoltageV: voltage('2.5 V'),
    states: [
      { id: 'off', name: 'Off', role: 'sleep', current: current('… 0.05 … 0.5 µA') },
      { id: 'measuring', name: 'Measuring', role: 'active', current: current('4 … 6 … 10 mA') },
    ],
    transitions: [move('off', 'measuring', '10 … 20 … 50 ms', '5 mA'), ...instantly('measuring', 'off')],
  },
  {
    id: 'switch-contact',
    name: 'Contact with pull-up (gate, reed)',
    kind: 'sensor',
    restStateId: 'open',
    lowestVoltageV: voltage('0 V'),
    states: [
      { id: 'open', name: 'Open', role: 'sleep', current: current('… 1 … 20 nA') },
      { id: 'closed', name: 'Closed', role: 'active', law: 'resistive', current: current('2.5 … 3 … 3.5 µA') },
    ],
    transitions: [],
  },
  {
    id: 'actuator-latching-valve',
    name: 'Latching valve',
    kind: 'actuator',
    restStateId: 'off',
    lowestVoltageV: voltage('2.4 V'),
    states: [
      { id: 'off', name: 'Off', role: 'sleep', current: current('0 A') },
      { id: 'switching', name: 'Switching', role: 'active', law: 'resistive', current: current('180 … 250 … 350 mA') },
    ],
    transitions: [],
  },
  {
    id: 'board-leakage',
    name: 'Board leakage',
    kind: 'other',
    restStateId: 'always',
    lowestVoltageV: voltage('0 V'),
    states: [{ id: 'always', name: 'Always', current: current('0.02 … 0.1 … 1 µA'), ...LEAKY }],
    transitions: [],
  },
  {
    id: 'voltage-divider',
    name: 'Voltage divider, 10 MΩ',
    kind: 'other',
    restStateId: 'always',
    lowestVoltageV: voltage('0 V'),
    states: [{ id: 'always', name: 'Always', law: 'resistive', current: current('0.29 … 0.3 … 0.31 µA') }],
    transitions: [],
  },
];

const NOTE =
  'Example part: figures typical of the class, from memory, of no product. Overwrite them with your data sheet.';

/** Generic parts to begin with, each marked as an example. */
export const CATALOGUE_PARTS: readonly CataloguePart[] = PARTS.map((part) => ({
  id: `part:${part.id}`,
  name: part.name,
  note: NOTE,
  part,
}));
