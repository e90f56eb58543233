import fc from 'fast-check';
import { expect, test } from 'vitest';
import { forecast } from '#common/engine/index.ts';
import { referenceLife } from '#test/support/ode-reference.ts';
import { variedScenario } from '#test/support/varied-scenario.ts';
import { IS_LONG } from '#test/support/long.ts';

const COUNT = IS_LONG ? 600 : 60;
/** Relative agreement of lives that the mean-current level promises. */
const AGREEMENT = 1e-4;

test(
  `forecast: agrees with an independent ODE solution to 1e-4 on ${COUNT} random scenarios`,
  { timeout: 600_000 },
  () => {
    const outcomes = new Set<string>();
    fc.assert(
      fc.property(variedScenario, (scenario) => {
        const engine = forecast(scenario, { withLedger: false });
        fc.pre(engine.outcome !== 'oversubscribed');
        const reference = referenceLife(scenario);
        outcomes.add(engine.outcome);
        expect(engine.startingChargeC / reference.startingC).toBeCloseTo(1, 5);
        expect(engine.outcome).toBe(reference.outcome);
        const difference = Math.abs((engine.lifeS ?? 0) - (reference.lifeS ?? 0));
        expect(difference).toBeLessThanOrEqual(AGREEMENT * (reference.lifeS ?? 0));
      }),
      { numRuns: COUNT, seed: 20 },
    );
    expect([...outcomes].sort()).toEqual(expect.arrayContaining(['charge-exhausted', 'undervoltage']));
  },
);
