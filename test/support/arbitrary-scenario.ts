/**
 * Random valid scenarios for property tests. Every routine of every node compiles: parts either have no transition at all
 * (they move instantly) or a ring of transitions in both directions, so that each state is reachable from each other.
 * Typed times are whole microseconds, all currents non-negative. Exchanges find their radio among the parts, or none.
 */
import fc from 'fast-check';
import type {
  Climate,
  Duration,
  LoadLaw,
  Node,
  Part,
  Quantity,
  Routine,
  Scenario,
  Schedule,
  StateRole,
  Step,
  Supply,
  Transition,
} from '#common/engine/scenario/scenario.types.ts';
import { arbitraryExchange } from './arbitrary-exchange.ts';

const quantity = (typical: number): Quantity => ({ typical });
const laws: readonly LoadLaw[] = ['constant-current', 'constant-power', 'resistive'];

/** A current in A between 10 nA and 50 mA with three significant digits, spread over its logarithm. */
export const arbitraryCurrentA = fc
  .tuple(fc.integer({ min: 100, max: 999 }), fc.integer({ min: -10, max: -5 }))
  .map(([digits, exponent]) => Number(`${digits}e${exponent}`) / 2);

/** A duration in whole microseconds, written in s, spread over its logarithm up to 9.99 s. */
export const arbitraryDurationS = fc
  .tuple(fc.integer({ min: 1, max: 999 }), fc.integer({ min: 0, max: 4 }))
  .map(([digits, exponent]) => (digits * 10 ** exponent) / 1e6);

function ring(stateIds: string[], durationsS: number[], currentsA: number[]): Transition[] {
  return stateIds.flatMap((stateId, index) => {
    const next = stateIds[(index + 1) % stateIds.length] ?? stateId;
    const durationS = quantity(durationsS[index] ?? 0);
    const current = quantity(currentsA[index] ?? 0);
    return [
      { fromStateId: stateId, toStateId: next, durationS, current },
      { fromStateId: next, toStateId: stateId, durationS, current },
    ];
  });
}

/** Roles of a radio by its number of states: each that an exchange needs has a state or a stand-in. */
const RADIO_ROLES: Readonly<Record<number, readonly StateRole[]>> = {
  3: ['idle', 'listen', 'transmit'],
  4: ['sleep', 'idle', 'receive', 'transmit'],
};

function arbitraryPart(index: number): fc.Arbitrary<Part> {
  return fc
    .record({
      stateCount: fc.integer({ min: 2, max: 4 }),
      currentsA: fc.array(arbitraryCurrentA, { minLength: 8, maxLength: 8 }),
      durationsS: fc.array(arbitraryDurationS, { minLength: 4, maxLength: 4 }),
      law: fc.constantFrom(...laws),
      doublingK: fc.option(fc.integer({ min: 5, max: 30 }), { nil: undefined }),
      instant: fc.boolean(),
      isRadio: fc.boolean(),
    })
    .map(({ stateCount, currentsA, durationsS, law, doublingK, instant, isRadio }): Part => {
      const roles = isRadio ? RADIO_ROLES[stateCount] : undefined;
      const stateIds = Array.from({ length: stateCount }, (_, at) => `s${at}`);
      return {
        id: `p${index}`,
        name: `Part ${index}`,
        kind: roles ? 'radio' : 'other',
        restStateId: 's0',
        lowestVoltageV: quantity(1.8),
        states: stateIds.map((id, at) => ({
          id,
          name: `State ${at}`,
          // The rest state draws little, so that lives stay longer than hours.
          current: quantity(at === 0 ? (currentsA[at] ?? 0) / 10_000 : (currentsA[at] ?? 0)),
          law,
          ...(roles ? { role: roles[at] } : {}),
          ...(doublingK === undefined ? {} : { doublingK }),
        })),
        transitions: instant ? [] : ring(stateIds, durationsS, currentsA.slice(4)),
      };
    });
}

const arbitraryDuration: fc.Arbitrary<Duration> = fc.oneof(
  { weight: 4, arbitrary: arbitraryDurationS.map((typical): Duration => ({ kind: 'fixed', typical })) },
  {
    weight: 1,
    arbitrary: fc
      .record({ octets: fc.integer({ min: 1, max: 200 }), clockHz: fc.constantFrom(100_000, 400_000, 1_000_000) })
      .map(({ octets, clockHz }): Duration => ({ kind: 'serial', octets, clockHz, overheadS: 0.00001 })),
  },
  { weight: 1, arbitrary: arbitraryExchange },
);

function arbitraryStep(index: number, parts: readonly Part[]): fc.Arbitrary<Step> {
  return fc
    .record({
      choices: fc.array(fc.integer({ min: -2, max: 3 }), { minLength: parts.length, maxLength: parts.length }),
      duration: arbitraryDuration,
      repeats: fc.integer({ min: 1, max: 3 }),
    })
    .map(({ choices, duration, repeats }): Step => {
      const states: Record<string, string> = {};
      parts.forEach((part, at) => {
        const state = part.states[choices[at] ?? -1];
        if (state) states[part.id] = state.id;
      });
      return { id: `step${index}`, name: `Step ${index}`, states, duration, repeats };
    });
}

/** Any schedule but `always`, which a node has at most once here and which `arbitraryNode` adds itself. */
export const arbitrarySchedule: fc.Arbitrary<Schedule> = fc.oneof(
  fc.integer({ min: 60, max: 86_400 }).map((periodS): Schedule => ({ kind: 'every', periodS })),
  fc.integer({ min: 0, max: 500 }).map((meanPerDay): Schedule => ({ kind: 'random', meanPerDay })),
  fc
    .record({ fromHour: fc.integer({ min: 0, max: 23 }), toHour: fc.integer({ min: 1, max: 24 }) })
    .map(({ fromHour, toHour }): Schedule => ({ kind: 'window', fromHour, toHour, periodS: 900 })),
  fc.integer({ min: 0, max: 1_000_000 }).map((afterS): Schedule => ({ kind: 'once', afterS })),
);

function arbitraryRoutine(index: number, parts: readonly Part[]): fc.Arbitrary<Routine> {
  return fc
    .integer({ min: 1, max: 5 })
    .chain((count) =>
      fc.record({
        schedule: arbitrarySchedule,
        steps: fc.tuple(...Array.from({ length: count }, (_, at) => arbitraryStep(at, parts))),
      }),
    )
    .map(({ schedule, steps }) => ({ id: `r${index}`, name: `Routine ${index}`, enabled: true, schedule, steps }));
}

/** All other parts keep the first one busy while they move, each in a state of its own choice. */
function keepingFirstBusy([first, ...others]: Part[]): Part[] {
  if (!first) return [];
  return [
    first,
    ...others.map((part, index) => {
      const stateId = first.states[index % first.states.length]?.id ?? first.restStateId;
      const busy = { partId: first.id, stateId };
      return { ...part, transitions: part.transitions.map((transition) => ({ ...transition, busy })) };
    }),
  ];
}

export interface NodeLimits {
  maxParts?: number;
  maxRoutines?: number;
}

/** A random node whose routines all compile. */
export function arbitraryNode({ maxParts = 4, maxRoutines = 4 }: NodeLimits = {}): fc.Arbitrary<Node> {
  return fc
    .record({
      partCount: fc.integer({ min: 1, max: maxParts }),
      routineCount: fc.integer({ min: 0, max: maxRoutines }),
      leakagesA: fc.array(arbitraryCurrentA, { maxLength: 2 }),
      isFirstBusy: fc.boolean(),
    })
    .chain(({ partCount, routineCount, leakagesA, isFirstBusy }) =>
      fc.tuple(...Array.from({ length: partCount }, (_, index) => arbitraryPart(index))).chain((parts) =>
        fc
          .tuple(...Array.from({ length: routineCount }, (_, index) => arbitraryRoutine(index, parts)))
          .map((routines): Node => ({
            parts: isFirstBusy ? keepingFirstBusy(parts) : parts,
            routines,
            leakages: leakagesA.map((currentA, index) => ({
              id: `l${index}`,
              name: `Leakage ${index}`,
              current: quantity(currentA / 10_000),
            })),
          })),
      ),
    );
}

/** A supply with a falling open-circuit voltage, resistance by temperature and depth, and one of the regulators. */
export const arbitrarySupply: fc.Arbitrary<Supply> = fc
  .record({
    capacityMah: fc.integer({ min: 200, max: 3_000 }),
    ohm: fc.integer({ min: 1, max: 200 }),
    lossPerMille: fc.integer({ min: 0, max: 100 }),
    regulator: fc.constantFrom<Supply['regulator']>(
      { kind: 'none' },
      { kind: 'linear', outputV: 2.2, quiescentA: 1e-6, dropoutV: 0.1 },
      { kind: 'switching', outputV: 2.2, quiescentA: 4e-7, efficiency: 0.85, minimumInputV: 1.6 },
    ),
    coldFactor: fc.integer({ min: 1, max: 8 }),
    flat: fc.boolean(),
    reservePercent: fc.integer({ min: 0, max: 20 }),
  })
  .map(({ capacityMah, ohm, lossPerMille, regulator, coldFactor, flat, reservePercent }): Supply => ({
    series: 1,
    parallel: 1,
    regulator,
    reserveFraction: reservePercent / 100,
    cell: {
      designation: 'invented',
      capacityC: quantity(capacityMah * 3.6),
      openCircuitTableV: flat
        ? [
            [0, 3.6],
            [0.9, 3.5],
            [1, 2.4],
          ]
        : [
            [0, 3.3],
            [0.5, 2.9],
            [1, 2.1],
          ],
      openCircuitTemperatureVPerK: 0.0005,
      resistanceOhm: [{ ohm: quantity(ohm / 10) }],
      resistanceFactorByTemperature: [
        [-20, coldFactor],
        [20, 1],
        [40, 0.9],
      ],
      resistanceFactorByDepth: [
        [0, 1],
        [0.8, 1.5],
        [1, 4],
      ],
      capacityFactorByTemperature: [
        [-20, 0.8],
        [20, 1],
      ],
      selfDischarge: { lossPerYear: quantity(lossPerMille / 1_000), referenceC: 20 },
    },
  }));

/** Months that swing between a cold January and a warm July, or the same all the year. */
export const arbitraryClimate: fc.Arbitrary<Climate> = fc
  .record({
    meanC: fc.integer({ min: -10, max: 25 }),
    swingK: fc.integer({ min: 0, max: 15 }),
    amplitudeK: fc.integer({ min: 0, max: 8 }),
    startMonth: fc.integer({ min: 1, max: 12 }),
  })
  .map(({ meanC, swingK, amplitudeK, startMonth }): Climate => ({
    startMonth,
    months: Array.from({ length: 12 }, (_, month) => ({
      meanC: meanC - swingK * Math.cos((2 * Math.PI * month) / 12),
      amplitudeK,
    })),
  }));

/** A random whole scenario. */
export function arbitraryScenario(limits: NodeLimits = {}): fc.Arbitrary<Scenario> {
  return fc
    .record({ node: arbitraryNode(limits), supply: arbitrarySupply, climate: arbitraryClimate })
    .map(({ node, supply, climate }): Scenario => ({
      schemaVersion: 1,
      name: 'Random',
      node,
      supply,
      climate,
      target: { lifeS: 5 * 31_557_600, confidence: 0.9 },
    }));
}
