/** Random scenarios that use everything the mean-current level knows, most of them with an end within the horizon. */
import fc from 'fast-check';
import type { Scenario, Schedule, State, Supply } from '#common/engine/index.ts';
import { arbitraryScenario } from './arbitrary-scenario.ts';

const YEAR_S = 31_557_600;

const regulators: fc.Arbitrary<Supply['regulator']> = fc.constantFrom<Supply['regulator']>(
  { kind: 'none' },
  { kind: 'linear', outputV: 2, quiescentA: 1e-6, dropoutV: 0.15 },
  { kind: 'linear', outputV: 2.8, quiescentA: 5e-7, dropoutV: 0.1, minimumInputV: 2.2 },
  { kind: 'switching', outputV: 2.2, quiescentA: 4e-7, efficiency: 0.85, minimumInputV: 1.9 },
);

const whens: fc.Arbitrary<Schedule['when']> = fc.constantFrom<Schedule['when']>(
  undefined,
  { months: [11, 12, 1, 2] },
  { belowC: 4 },
  { aboveC: 8 },
);

/** A random scenario that is drained within years: less charge than usual, sometimes a high resistance. */
export const variedScenario: fc.Arbitrary<Scenario> = fc
  .record({
    scenario: arbitraryScenario({ maxParts: 3, maxRoutines: 3 }),
    // A life of this length at the mean current of some 20 µA; currents spread over decades anyway.
    capacityMah: fc.integer({ min: 5, max: 900 }),
    ohm: fc.integer({ min: 1, max: 3_000 }),
    regulator: regulators,
    when: whens,
    storageDays: fc.constantFrom(0, 0, 100, 700),
    loss: fc.constantFrom<{ q10?: number; activationEnergyJPerMol?: number }>(
      {},
      { q10: 2.5 },
      { activationEnergyJPerMol: 50_000 },
    ),
    pack: fc.constantFrom({ series: 1, parallel: 1 }, { series: 2, parallel: 1 }, { series: 1, parallel: 3 }),
    extra: fc.record({
      rateTable: fc.boolean(),
      always: fc.boolean(),
      monitor: fc.boolean(),
      coldNight: fc.boolean(),
      shelfYears: fc.constantFrom(undefined, undefined, 12),
      leakNa: fc.integer({ min: 1, max: 20_000 }),
      hold: fc.boolean(),
    }),
  })
  .map((choice) => assemble(choice));

interface Choice {
  scenario: Scenario;
  capacityMah: number;
  ohm: number;
  regulator: Supply['regulator'];
  when: Schedule['when'];
  storageDays: number;
  loss: { q10?: number; activationEnergyJPerMol?: number };
  pack: { series: number; parallel: number };
  extra: {
    rateTable: boolean;
    always: boolean;
    monitor: boolean;
    coldNight: boolean;
    shelfYears: number | undefined;
    leakNa: number;
    hold: boolean;
  };
}

function assemble({ scenario, capacityMah, ohm, regulator, when, storageDays, loss, pack, extra }: Choice): Scenario {
  const { node, supply, climate } = scenario;
  const capacityC = capacityMah * 3.6;
  const routines = node.routines.map((routine, index) =>
    index === 0 && when ? { ...routine, schedule: { ...routine.schedule, when } } : routine,
  );
  const first = routines[0];
  // A routine that runs back to back replaces the second one; its steps are any.
  if (extra.always && routines[1]) routines[1] = { ...routines[1], schedule: { kind: 'always' } };
  const parts = node.parts.map((part, index) => ({
    ...part,
    lowestVoltageV: { typical: 1.7 + index / 10 },
    states: extra.hold && index === 0 ? part.states.map(holdingRest(part.restStateId)) : part.states,
  }));
  return {
    ...scenario,
    node: {
      ...node,
      parts,
      routines: first ? routines : [],
      leakages: [...node.leakages, { id: 'board', name: 'Board', current: { typical: extra.leakNa * 1e-9 } }],
    },
    supply: {
      ...supply,
      ...pack,
      regulator,
      cutOffV: 1.8 * pack.series,
      ...(extra.monitor
        ? {
            lowBattery: {
              thresholdV: 2.3,
              hysteresisV: 0.1,
              readAt: 'rest',
              chargePerReadingC: 0.001,
              readingsPerDay: 24,
            },
          }
        : {}),
      cell: {
        ...supply.cell,
        ...(extra.shelfYears === undefined ? {} : { shelfLifeS: extra.shelfYears * YEAR_S }),
        capacityC: { min: 0.9 * capacityC, typical: capacityC, max: 1.05 * capacityC },
        ...(extra.rateTable
          ? {
              rateTable: [
                [1e-6, capacityC],
                [1e-4, 0.9 * capacityC],
                [1e-2, 0.6 * capacityC],
              ],
            }
          : {}),
        resistanceOhm: [
          { pulseS: 0.01, ohm: { typical: ohm / 20 } },
          { pulseS: 1, ohm: { typical: ohm / 10 } },
        ],
        selfDischarge: { lossPerYear: supply.cell.selfDischarge.lossPerYear, referenceC: 20, ...loss },
      },
    },
    climate: {
      ...climate,
      ...(storageDays > 0 ? { storage: { durationS: storageDays * 86_400, temperatureC: 25, currentA: 1e-7 } } : {}),
      ...(extra.coldNight ? { extremes: { coldest: { temperatureC: -25, month: 2 } } } : {}),
    },
  };
}

const holdingRest =
  (restStateId: string) =>
  (state: State): State =>
    state.id === restStateId ? { ...state, lowestVoltageV: { typical: 1.9 } } : state;
