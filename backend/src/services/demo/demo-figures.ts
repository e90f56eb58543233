import { typedFigure } from '#common/catalogue/typed-figure.ts';
import type {
  Climate,
  LinkSettings,
  Node,
  Part,
  Provenance,
  Quantity,
  State,
  Step,
  Transition,
} from '#common/engine/scenario/scenario.types.ts';

/** Tarnfold Orchards does not exist, and no figure of its nodes belongs to a product. */
const INVENTED: Provenance = { kind: 'assumed', text: 'Invented for the demo' };
const INVENTED_SHEET: Provenance = { kind: 'typical', text: 'Invented for the demo, in the manner of a data sheet' };

/** Figures with a range look like those of a data sheet, single ones like a guess. */
const provenanceOf = (text: string): Provenance => (text.includes('…') ? INVENTED_SHEET : INVENTED);

/**
 * A current of the demo.
 *
 * @param text Typed figure, such as `… 1.7 … 3.1 µA`.
 * @returns The quantity in A, marked as invented.
 */
export const current = (text: string): Quantity => typedFigure('current', text, provenanceOf(text));
/**
 * A voltage of the demo.
 *
 * @param text Typed figure, such as `1.8 V`.
 * @returns The quantity in V, marked as invented.
 */
export const voltage = (text: string): Quantity => typedFigure('voltage', text, provenanceOf(text));
/**
 * A time of the demo.
 *
 * @param text Typed figure, such as `10 … 15 … 20 ms`.
 * @returns The quantity in s, marked as invented.
 */
export const duration = (text: string): Quantity => typedFigure('duration', text, provenanceOf(text));
/**
 * A typed duration of a step.
 *
 * @param text Typed figure, such as `544 µs`.
 * @returns The duration, marked as invented.
 */
export const fixed = (text: string): Step['duration'] => ({ kind: 'fixed', ...duration(text) });

/**
 * A probability or tolerance of the demo.
 *
 * @param typical The figure: a share, or ± ppm.
 * @returns The quantity, marked as invented.
 */
export const plain = (typical: number): Quantity => ({ typical, provenance: INVENTED });

/** How often the orchards' channels are busy, and frames and acknowledgements are lost. */
export const orchardLosses: LinkSettings = {
  busyProbability: plain(0.1),
  frameErrorRate: plain(0.05),
  ackErrorRate: plain(0.01),
};

/**
 * A transition of the demo.
 *
 * @param fromStateId State left.
 * @param toStateId State reached.
 * @param time Typed figure of its duration.
 * @param amps Typed figure of its current.
 * @returns The transition.
 */
export const move = (fromStateId: string, toStateId: string, time: string, amps: string): Transition => ({
  fromStateId,
  toStateId,
  durationS: duration(time),
  current: current(amps),
});

/**
 * Switching off, or changes whose time a step of its own tells.
 *
 * @param from State left.
 * @param to States reached without time and charge.
 * @returns A transition to each.
 */
export const instantly = (from: string, ...to: string[]): Transition[] =>
  to.map((state) => move(from, state, '0 s', '0 A'));

const AIR: readonly string[] = ['listen', 'receive', 'transmit'];

export interface RadioFigures {
  name: string;
  sleep: string;
  idle: string;
  synthesiser: string;
  listen: string;
  receive: string;
  transmit: string;
  transmitName: string;
  /** Crystal start, and what it draws. */
  start: [time: string, current: string];
  /** Synthesiser lock, and what it draws. */
  lock: [time: string, current: string];
  lowestVoltage: string;
}

/**
 * A radio of the demo with the usual states, from sleep over crystal and synthesiser to the air.
 *
 * @param figures Its currents and times as typed figures.
 * @returns A part with the id `radio`.
 * @example radio({ ...figures, transmit: '… 14 … 18 mA' }).restStateId // 'sleep'
 */
export function radio(figures: RadioFigures): Part {
  const state = (id: string, name: string, role: State['role'], amps: string): State => ({
    id,
    name,
    role,
    current: current(amps),
  });
  return {
    id: 'radio',
    name: figures.name,
    kind: 'radio',
    restStateId: 'sleep',
    lowestVoltageV: voltage(figures.lowestVoltage),
    states: [
      { ...state('sleep', 'Sleep', 'sleep', figures.sleep), doublingK: 10 },
      state('idle', 'Idle, crystal on', 'idle', figures.idle),
      state('synthesiser', 'Synthesiser on', 'synthesiser', figures.synthesiser),
      state('listen', 'Listen', 'listen', figures.listen),
      state('receive', 'Receive', 'receive', figures.receive),
      state('transmit', figures.transmitName, 'transmit', figures.transmit),
    ],
    transitions: [
      move('sleep', 'idle', ...figures.start),
      move('idle', 'synthesiser', ...figures.lock),
      ...instantly('synthesiser', ...AIR, 'idle', 'sleep'),
      ...AIR.flatMap((from) => instantly(from, ...AIR.filter((to) => to !== from), 'synthesiser', 'idle', 'sleep')),
      ...instantly('idle', 'sleep'),
    ],
  };
}

/**
 * The microcontroller that all nodes of the demo share.
 *
 * @param deepSleep Its current in deep sleep as a typed figure.
 * @returns A part with the id `controller`.
 * @example controller('0.8 … 1.4 … 4 µA').restStateId // 'deep-sleep'
 */
export function controller(deepSleep: string): Part {
  return {
    id: 'controller',
    name: 'Microcontroller',
    kind: 'controller',
    restStateId: 'deep-sleep',
    lowestVoltageV: voltage('1.8 V'),
    states: [
      {
        id: 'deep-sleep',
        name: 'Deep sleep, clock and memory kept',
        role: 'sleep',
        current: current(deepSleep),
        doublingK: 12,
        lowestVoltageV: voltage('1.6 V'),
      },
      { id: 'idle', name: 'Core stopped, bus running', role: 'idle', current: current('0.5 … 0.7 … 1 mA') },
      { id: 'active', name: 'Core running', role: 'active', current: current('2 … 2.6 … 3.4 mA') },
    ],
    transitions: [
      move('deep-sleep', 'active', '30 … 80 … 200 µs', '1.5 mA'),
      ...instantly('active', 'idle', 'deep-sleep'),
      ...instantly('idle', 'active', 'deep-sleep'),
    ],
  };
}

const ORCHARD_MEANS_C = [-3.5, -2, 3, 8.5, 13.5, 17, 19.5, 18.5, 14, 8.5, 3, -1.5];
const ORCHARD_AMPLITUDES_K = [4, 4.5, 5.5, 6.5, 7, 7, 7.5, 7.5, 7, 5.5, 4, 3.5];

/**
 * The invented climate of Tarnfold's orchards: −18 °C in the coldest night of each January, 36 °C in the hottest hour of July.
 *
 * @param startMonth Calendar month in which the node is hung up.
 * @returns The climate with two months of storage before use.
 * @example orchardClimate(10).months.length // 12
 */
export function orchardClimate(startMonth: number): Climate {
  return {
    months: ORCHARD_MEANS_C.map((meanC, index) => ({ meanC, amplitudeK: ORCHARD_AMPLITUDES_K[index] ?? 0 })),
    startMonth,
    extremes: { coldest: { temperatureC: -18, month: 1 }, hottest: { temperatureC: 36, month: 7 } },
    storage: { durationS: 60 * 86_400, temperatureC: 20, currentA: 0 },
  };
}

/**
 * The same node with typical figures only, as a first draft has them.
 *
 * @param node A node with ranges.
 * @returns The node without any minimum and maximum.
 * @example typicalOnly(node).leakages[0].current.max // undefined
 */
export function typicalOnly(node: Node): Node {
  const single = ({ typical }: Quantity): Quantity => ({ typical, provenance: INVENTED });
  return {
    ...node,
    leakages: node.leakages.map((leakage) => ({ ...leakage, current: single(leakage.current) })),
    parts: node.parts.map((part) => ({
      ...part,
      states: part.states.map((state) => ({ ...state, current: single(state.current) })),
      transitions: part.transitions.map((transition) => ({
        ...transition,
        durationS: single(transition.durationS),
        current: single(transition.current),
      })),
    })),
    routines: node.routines.map((routine) => ({
      ...routine,
      steps: routine.steps.map((step) =>
        step.duration.kind === 'fixed'
          ? { ...step, duration: { kind: 'fixed' as const, ...single(step.duration) } }
          : step,
      ),
    })),
  };
}
