import { describe, expect, test } from 'vitest';
import { forecast } from '#common/engine/index.ts';
import type { Forecast, Scenario } from '#common/engine/index.ts';
import { flatMonths, pulsingNode, simpleScenario } from '#test/support/simple-scenario.ts';

const YEAR_S = 31_557_600;
const DEKAD_S = YEAR_S / 36;

const fast = (scenario: Scenario): Forecast => forecast(scenario, { withLedger: false });
const codes = ({ cautions }: Forecast): string[] => cautions.map(({ code }) => code);
/** −10 °C in January, 20 °C in July. */
const northern = (amplitudeK = 0): { meanC: number; amplitudeK: number }[] =>
  Array.from({ length: 12 }, (_, month) => ({ meanC: 5 - 15 * Math.cos((2 * Math.PI * month) / 12), amplitudeK }));

describe('forecast outcomes', () => {
  test('charge-exhausted: a constant current lasts capacity over current', () => {
    const { outcome, lifeS, limitedBy, chargeLeftFraction } = fast(simpleScenario());
    expect({ outcome, limitedBy, chargeLeftFraction }).toEqual({
      outcome: 'charge-exhausted',
      limitedBy: 'charge',
      chargeLeftFraction: 0,
    });
    expect(lifeS).toBeCloseTo(1e8, 3);
  });

  test('undervoltage: a pulse ends life where open-circuit voltage less its drop meets the limit', () => {
    const { outcome, criticalStepId, failingPartId, limitedBy, chargeLeftFraction, dekads } = fast(
      simpleScenario({ node: pulsingNode(600, 0.02, 2.3) }),
    );
    expect({ outcome, criticalStepId, failingPartId, limitedBy }).toEqual({
      outcome: 'undervoltage',
      criticalStepId: 'send',
      failingPartId: 'radio',
      limitedBy: 'part',
    });
    // 3 − d − 10 Ω · 20 mA = 2.3 V at depth 0.5.
    expect(chargeLeftFraction).toBeCloseTo(0.5, 9);
    expect(dekads.at(-1)?.headroomV).toBeCloseTo(0, 12);
  });

  test('never-starts: the fresh cell cannot carry the pulse', () => {
    const { outcome, lifeS, failingPartId } = fast(simpleScenario({ node: pulsingNode(600, 0.1, 2.3) }));
    expect({ outcome, lifeS, failingPartId }).toEqual({ outcome: 'never-starts', lifeS: 0, failingPartId: 'radio' });
  });

  test('never-starts: a rail limit above the regulator output is never met', () => {
    const result = fast(
      simpleScenario({
        node: pulsingNode(600, 0.001, 2.5),
        supply: { regulator: { kind: 'linear', outputV: 2, quiescentA: 0, dropoutV: 0.1 } },
      }),
    );
    expect(result.outcome).toBe('never-starts');
    expect(codes(result)).toContain('limit-above-output');
  });

  test('shelf-life: counts from the start of storage', () => {
    const { outcome, lifeS } = fast(
      simpleScenario({
        cell: { shelfLifeS: 2 * YEAR_S },
        climate: { storage: { durationS: YEAR_S / 2, temperatureC: 20, currentA: 0 } },
      }),
    );
    expect({ outcome, lifeS }).toEqual({ outcome: 'shelf-life', lifeS: 1.5 * YEAR_S });
  });

  test('outlives-horizon: nothing is drawn for 40 years', () => {
    const { outcome, lifeS, endMonth, lastReportS, dekads } = fast(simpleScenario({ node: { leakages: [] } }));
    expect({ outcome, lifeS, endMonth, lastReportS }).toEqual({
      outcome: 'outlives-horizon',
      lifeS: null,
      endMonth: null,
      lastReportS: null,
    });
    expect(dekads).toHaveLength(40 * 36);
  });

  test('oversubscribed: a routine is longer than its period', () => {
    const result = fast(simpleScenario({ node: pulsingNode(0.005) }));
    expect(result.outcome).toBe('oversubscribed');
    expect(result.lifeS).toBeNull();
    expect(result.cautions[0]).toMatchObject({ code: 'oversubscribed', path: 'node.routines[0].schedule' });
  });
});

describe('forecast of charge', () => {
  test('reserve and storage lower the starting charge', () => {
    const { startingChargeC } = fast(
      simpleScenario({
        supply: { reserveFraction: 0.1 },
        climate: { storage: { durationS: 1e6, temperatureC: 20, currentA: 1e-4 } },
      }),
    );
    expect(startingChargeC).toBeCloseTo(800, 9);
  });

  test('self-discharge in storage takes its share of what is there', () => {
    const { startingChargeC } = fast(
      simpleScenario({
        cell: { selfDischarge: { lossPerYear: { typical: 0.2 }, referenceC: 20 } },
        climate: { storage: { durationS: YEAR_S, temperatureC: 20, currentA: 0 } },
      }),
    );
    expect(startingChargeC).toBeCloseTo(800, 9);
  });

  test('a rate table gives the capacity at the mean current of the first year', () => {
    const rateTable: [number, number][] = [
      [1e-6, 1_000],
      [1e-4, 500],
    ];
    expect(fast(simpleScenario({ cell: { rateTable } })).startingChargeC).toBeCloseTo(750, 6);
  });

  test('a rate table beyond its ends is held constant, with a caution', () => {
    const rateTable: [number, number][] = [
      [1e-3, 1_000],
      [1e-2, 500],
    ];
    const result = fast(simpleScenario({ cell: { rateTable } }));
    expect(result.startingChargeC).toBe(1_000);
    expect(result.cautions).toContainEqual(
      expect.objectContaining({ code: 'table-held-constant', path: 'supply.cell.rateTable' }),
    );
  });

  test('a resistive load follows the voltage all the way: an exponential of the charge', () => {
    const result = fast(
      simpleScenario({
        node: {
          leakages: [],
          parts: [
            {
              id: 'load',
              name: 'Load',
              kind: 'other',
              restStateId: 'on',
              lowestVoltageV: { typical: 0 },
              transitions: [],
              states: [{ id: 'on', name: 'On', current: { typical: 3e-5 }, law: 'resistive', referenceVoltageV: 3 }],
            },
          ],
        },
      }),
    );
    // V = 2 + Q/1000 from 3 V to 2 V under g = 1e-5 S: t = 1000/1e-5 · ln(3/2).
    expect(result.lifeS).toBeCloseTo(1e8 * Math.log(1.5), 0);
  });

  test('a routine that runs once takes its charge at its time', () => {
    const node = pulsingNode(600, 0.5, 0);
    const once = simpleScenario({ node: { ...node, leakages: [{ id: 'l', name: 'L', current: { typical: 1e-5 } }] } });
    once.node.routines[0] = {
      id: 'setup',
      name: 'Set up',
      enabled: true,
      schedule: { kind: 'once', afterS: 1_000_000 },
      steps: [{ id: 'run', name: 'Run', states: { radio: 'send' }, duration: { kind: 'fixed', typical: 100 } }],
    };
    once.supply.cell.resistanceOhm = [{ pulseS: 100, ohm: { typical: 0.001 } }];
    // 100 s · (0.5 A − 1 µA) beside 11 µA.
    expect(fast(once).lifeS).toBeCloseTo((1_000 - 100 * (0.5 - 1e-6)) / 1.1e-5, 1);
  });

  test('when: a routine that is on in one month draws a twelfth of its charge a year', () => {
    const always = fast(simpleScenario({ node: pulsingNode(60) }));
    const january = simpleScenario({ node: pulsingNode(60) });
    for (const routine of january.node.routines)
      routine.schedule = { kind: 'every', periodS: 60, when: { months: [1] } };
    january.supply.cell.capacityC = { typical: 100_000 };
    const year = forecast(january, { withLedger: true }).ledger;
    const sends = year?.entries.find(({ stepId }) => stepId === 'send');
    expect(Number(sends?.chargePerCycleC)).toBeCloseTo(0.01 * (0.02 - 1e-6), 12);
    expect(Number(sends?.chargeC)).toBeCloseTo((YEAR_S / 60 / 12) * 0.01 * (0.02 - 1e-6), 6);
    expect(always.outcome).toBe('charge-exhausted');
  });
});

describe('forecast in the cold', () => {
  test('ends at the border of a dekad when the next one is too cold to start', () => {
    const { lifeS, outcome } = fast(
      simpleScenario({
        node: pulsingNode(600, 0.02, 1.5),
        cell: {
          resistanceFactorByTemperature: [
            [-10, 8],
            [20, 1],
          ],
        },
        climate: { startMonth: 7, months: northern() },
      }),
    );
    expect(outcome).toBe('undervoltage');
    expect((lifeS ?? 0) % DEKAD_S).toBe(0);
  });

  test('judges at the coldest hour: a daily swing ends life sooner', () => {
    const cold: [number, number][] = [
      [-20, 10],
      [20, 1],
    ];
    const life = (amplitudeK: number): number =>
      fast(
        simpleScenario({
          node: pulsingNode(600, 0.02, 1.9),
          cell: { resistanceFactorByTemperature: cold },
          climate: { months: flatMonths(10, amplitudeK) },
        }),
      ).lifeS ?? 0;
    expect(life(10)).toBeLessThan(life(0));
  });

  test('a coldest night ends life in the middle dekad of its month', () => {
    const { endMonth, dekads } = fast(
      simpleScenario({
        node: pulsingNode(600, 0.02, 1.9),
        cell: {
          resistanceFactorByTemperature: [
            [-20, 10],
            [20, 1],
          ],
        },
        climate: { extremes: { coldest: { temperatureC: -20, month: 2 } } },
      }),
    );
    expect(endMonth).toBe(2);
    expect(dekads.at(-1)).toMatchObject({ dekadOfYear: 4, coldestC: -20, timeS: 4 * DEKAD_S });
  });

  test('tells the outage of a winter and the last report after it', () => {
    const { outcome, lifeS, outages, lastReportS } = fast(
      simpleScenario({
        node: pulsingNode(600, 0.02, 1.5),
        cell: {
          resistanceFactorByTemperature: [
            [-10, 8],
            [20, 1],
          ],
        },
        climate: { startMonth: 7, months: northern() },
      }),
    );
    expect(outcome).toBe('undervoltage');
    expect(outages[0]).toMatchObject({ winter: 1, startS: lifeS });
    // Without a daily swing every hour of the outage is silent.
    expect(outages[0]?.hours).toBeCloseTo(((outages[0]?.endS ?? 0) - (lifeS ?? 0)) / 3_600, 6);
    expect(outages[0]?.endS).toBeLessThan((lifeS ?? 0) + YEAR_S / 2);
    expect(lastReportS).toBeGreaterThan(lifeS ?? 0);
  });

  test('no later report where nothing revives the node', () => {
    const { lifeS, lastReportS, outages } = fast(simpleScenario({ node: pulsingNode(600, 0.02, 2.3) }));
    expect(lastReportS).toBe(lifeS);
    expect(outages).toEqual([]);
  });
});

describe('forecast warnings', () => {
  const monitored = (months: Scenario['climate']['months'], perK = 0.004): Forecast =>
    fast(
      simpleScenario({
        node: pulsingNode(60, 0.02, 2.1),
        supply: { lowBattery: { thresholdV: 2.48, stepV: 0.05, hysteresisV: 0.05, readAt: 'rest' } },
        cell: { openCircuitTemperatureVPerK: perK },
        climate: { months },
      }),
    );

  test('the threshold is rounded up to the step', () => {
    expect(monitored(flatMonths(20)).warning?.thresholdV).toBeCloseTo(2.5, 12);
  });

  test('leads the end by the time the charge takes from the threshold to the limit', () => {
    const { warning, meanCurrentA, lifeS } = monitored(flatMonths(20));
    // Rest draws 1 µA through 10 Ω: 2.5 V at depth 0.49999; the pulse fails at 2.3 V open circuit, depth 0.7.
    expect(warning?.leadS).toBeCloseTo(((0.7 - 0.49999) * 1_000) / meanCurrentA, 0);
    expect((warning?.timeS ?? 0) + (warning?.leadS ?? 0)).toBeCloseTo(lifeS ?? 0, 3);
    expect(warning?.falseAlarmTimesS).toEqual([]);
  });

  test('a cold spell that warns and clears is a false alarm', () => {
    const result = monitored(northern(), 0.008);
    expect(result.warning?.falseAlarmTimesS.length).toBeGreaterThan(0);
    expect(codes(result)).toContain('false-alarms');
  });
});

describe('forecast cautions', () => {
  test('names what the document holds and the forecast leaves out', () => {
    const result = fast(
      simpleScenario({
        supply: {
          capacitor: { capacitanceF: { typical: 1e-4 }, esrOhm: 0.1, leakageA: { typical: 1e-8 } },
          regulator: {
            kind: 'switching',
            outputV: 1.8,
            quiescentA: 0,
            minimumInputV: 1,
            efficiency: [
              [1e-6, 0.5],
              [1e-2, 0.9],
            ],
          },
        },
        cell: { kinetic: { availableFraction: 0.5, rateConstantPerS: 1e-4 } },
      }),
    );
    const paths = result.cautions.filter(({ code }) => code === 'not-modelled').map(({ path }) => path);
    expect(paths).toEqual(['supply.cell.kinetic', 'supply.capacitor', 'supply.regulator.efficiency']);
    // The lowest efficiency counts: 10 µA · 1.8 V / 0.5 over a voltage that falls from 3 V to 2 V.
    expect(result.lifeS).toBeCloseTo((1_000 * 2.5 * 0.5) / (1e-5 * 1.8), -1);
  });

  test('a resistance without pulse length, a climate beyond cell and table, a pulse above the limit', () => {
    const result = fast(
      simpleScenario({
        node: pulsingNode(600, 0.02, 1),
        cell: {
          resistanceOhm: [{ ohm: { typical: 1 } }],
          resistanceFactorByTemperature: [
            [0, 2],
            [20, 1],
          ],
          limits: { lowestC: -5, highestC: 15, pulseA: 0.01, continuousA: 1e-9 },
        },
        climate: { months: northern(2) },
      }),
    );
    expect(codes(result)).toEqual(
      expect.arrayContaining([
        'instant-moves',
        'resistance-without-duration',
        'table-held-constant',
        'colder-than-cell',
        'hotter-than-cell',
        'pulse-above-limit',
        'mean-above-limit',
      ]),
    );
  });

  test('two routines that may meet: the sum of their pulses and how often', () => {
    const node = pulsingNode(600, 0.02, 1.8);
    const [report] = node.routines ?? [];
    const second = { ...report, id: 'second', name: 'Second', schedule: { kind: 'every', periodS: 1_200 } };
    const scenario = simpleScenario({ node });
    scenario.node.routines.push({ ...scenario.node.routines[0], ...second } as Scenario['node']['routines'][number]);
    const { peak, cautions } = fast(scenario);
    expect(peak?.meeting?.perYear).toBeCloseTo((0.02 / 600 / 1_200) * YEAR_S, 9);
    expect(peak?.meeting?.currentA).toBeCloseTo(0.04 - 1e-6, 9);
    expect(cautions.map(({ code }) => code)).toContain('routines-meet');
  });
});

test('forecast: does not change the scenario', () => {
  const scenario = simpleScenario({ node: pulsingNode(600) });
  const before = structuredClone(scenario);
  forecast(scenario);
  expect(scenario).toEqual(before);
});

test('forecast: without a ledger it is null, with one it is of the cell and of a year', () => {
  expect(fast(simpleScenario()).ledger).toBeNull();
  expect(forecast(simpleScenario()).ledger).toMatchObject({ side: 'cell', periodS: YEAR_S });
});

test('forecast: counts the winters whose last dekad has passed', () => {
  const months = northern();
  // Life of 3.17 years from March: winters of December to February end after 1, 2 and 3 years.
  expect(fast(simpleScenario({ climate: { months, startMonth: 3 } })).wintersSurvived).toBe(3);
});

test('forecast: stays finite where a document asks for a rate beyond all sense', () => {
  const { outcome, dekads } = fast(
    simpleScenario({
      cell: { selfDischarge: { lossPerYear: { typical: 0.5 }, referenceC: 20, q10: 1e300 } },
      climate: { months: flatMonths(-50, 100) },
    }),
  );
  expect(outcome).toBe('charge-exhausted');
  expect(dekads.every(({ selfDischargeA, remainingC }) => Number.isFinite(selfDischargeA + remainingC))).toBe(true);
});

test('forecast: beside a routine that runs always, a part in use is not held to the limit of its rest state', () => {
  const scenario = simpleScenario({ node: pulsingNode(600, 0.001, 2.1) });
  const [radio] = scenario.node.parts;
  if (!radio) throw new Error('The node has a radio.');
  // The radio's memory needs 2.5 V at rest; the clock ticks always, and the radio sends always beside it.
  radio.states = radio.states.map((state) =>
    state.id === 'off' ? { ...state, lowestVoltageV: { typical: 2.5 } } : state,
  );
  const clock = {
    ...radio,
    id: 'clock',
    name: 'Clock',
    states: radio.states.map(({ id, name, current }) => ({ id, name, current })),
  };
  scenario.node.parts.push(clock);
  const step = (states: Record<string, string>): Scenario['node']['routines'][number]['steps'] => [
    { id: 'run', name: 'Run', states, duration: { kind: 'fixed', typical: 0.01 } },
  ];
  const always = { enabled: true, schedule: { kind: 'always' } } as const;
  scenario.node.routines = [
    { id: 'tick', name: 'Tick', ...always, steps: step({ clock: 'send' }) },
    { id: 'send', name: 'Send', ...always, steps: step({ radio: 'send' }) },
  ];
  const { limitedBy, chargeLeftFraction } = fast(scenario);
  expect(limitedBy).toBe('part');
  // 3 − d − 10 Ω · 2 mA = 2.1 V.
  expect(chargeLeftFraction).toBeCloseTo(0.12, 9);
});
