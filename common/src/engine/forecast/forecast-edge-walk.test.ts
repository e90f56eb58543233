import { describe, expect, test } from 'vitest';
import { forecast } from '#common/engine/index.ts';
import type { Scenario } from '#common/engine/index.ts';
import { edgeWalk } from '#test/support/edge-walk.ts';
import { pulsingNode, simpleScenario } from '#test/support/simple-scenario.ts';

const DAY_S = 86_400;

interface Case {
  name: string;
  scenario: Scenario;
}

/** The radio's routine, and a second one of longer pulses with its own period. */
function twoRoutines(periodS: number, secondS: number): Partial<Scenario['node']> {
  const node = pulsingNode(periodS, 0.02, 2.2);
  const second: Scenario['node']['routines'][number] = {
    id: 'second',
    name: 'Second',
    enabled: true,
    schedule: { kind: 'every', periodS: secondS },
    steps: [{ id: 'long', name: 'Long', states: { radio: 'send' }, duration: { kind: 'fixed', typical: 0.25 } }],
  };
  return { ...node, routines: [...(node.routines ?? []), second] };
}

const cases: Case[] = [
  {
    name: 'one routine, ended by voltage',
    scenario: simpleScenario({ node: pulsingNode(2, 0.02, 2.3), capacityC: { typical: 100 } }),
  },
  {
    name: 'two routines, ended by voltage',
    scenario: simpleScenario({ node: twoRoutines(2, 60), capacityC: { typical: 100 } }),
  },
  {
    name: 'ended by charge, with self-discharge',
    scenario: simpleScenario({
      node: pulsingNode(1, 0.005, 0),
      capacityC: { typical: 60 },
      cell: { selfDischarge: { lossPerYear: { typical: 0.6 }, referenceC: 20, q10: 2 } },
    }),
  },
  {
    name: 'through cold dekads with a capacity factor',
    scenario: simpleScenario({
      node: pulsingNode(1.5, 0.02, 2.25),
      capacityC: { typical: 250 },
      cell: {
        capacityFactorByTemperature: [
          [-20, 0.7],
          [20, 1],
        ],
        resistanceFactorByTemperature: [
          [-20, 2],
          [20, 1],
        ],
      },
      climate: {
        startMonth: 9,
        months: Array.from({ length: 12 }, (_, month) => ({
          meanC: 8 - 10 * Math.cos((2 * Math.PI * month) / 12),
          amplitudeK: 4,
        })),
      },
    }),
  },
];

/**
 * How far the mean current may be from the walk: the charge of one cycle of each routine, over the mean current. A failure waits
 * for the next heavy edge, at most one period; ripple of the charge is at most one cycle. Where a dekad's border ends life no
 * charge matters, and both fall on it or on the first heavy edge after it.
 */
function boundS({ node }: Scenario, meanCurrentA: number): number {
  return node.routines.reduce((sumS, { schedule, steps }) => {
    const periodS = schedule.kind === 'every' ? schedule.periodS : 0;
    const chargeC = steps.reduce(
      (sumC, { duration }) => sumC + 0.02 * (duration.kind === 'fixed' ? duration.typical : 0),
      0,
    );
    return sumS + periodS + chargeC / meanCurrentA;
  }, 0);
}

describe('forecast against the walk of every edge', () => {
  test.each(cases)('$name: within one cycle', ({ scenario }) => {
    const mean = forecast(scenario, { withLedger: false });
    const walked = edgeWalk(scenario, 2 * (mean.lifeS ?? 0));
    expect(mean.lifeS).toBeGreaterThan(DAY_S);
    expect(walked.outcome).toBe(mean.outcome);
    const differenceS = Math.abs((walked.lifeUs ?? 0) / 1e6 - (mean.lifeS ?? 0));
    expect(differenceS).toBeLessThanOrEqual(boundS(scenario, mean.meanCurrentA));
  });

  test('the walk itself: charge goes down by what its edges draw, to the last digits', () => {
    const scenario = simpleScenario({ node: pulsingNode(2, 0.02, 0), capacityC: { typical: 1_000 } });
    const { leftC, edges } = edgeWalk(scenario, 10 * DAY_S);
    expect(edges).toBe(2 * ((10 * DAY_S) / 2) + 1);
    // 1 µA all the time, and 432,000 pulses of 10 ms at 20 mA.
    expect(leftC).toBeCloseTo(1_000 - 10 * DAY_S * 1e-6 - 432_000 * 0.01 * (0.02 - 1e-6), 9);
  });
});
