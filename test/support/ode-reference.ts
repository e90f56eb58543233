/**
 * An independent solution of the mean-current equations, to hold the forecast against: `odex` integrates the charge, failures are
 * found by sampling each step and halving. Only types and the compiled node are shared with the engine; tables, climate, averages,
 * pack and operating point are written again, from the definitions and by plain numerical means.
 */
import type { Scenario } from '#common/engine/index.ts';
import { DEKAD, Reference } from './ode-reference-equations.ts';
import { solve } from './ode-solve.ts';

const HORIZON = 40 * 31_557_600;

export interface ReferenceLife {
  outcome: 'charge-exhausted' | 'undervoltage' | 'shelf-life' | 'outlives-horizon' | 'never-starts';
  /** Null when the horizon is outlived. */
  lifeS: number | null;
  startingC: number;
  leftC: number;
}

/** Life of a scenario that is not oversubscribed. */
export function referenceLife(scenario: Scenario): ReferenceLife {
  const reference = new Reference(scenario);
  const startingC = reference.startingC();
  const start = 3 * (scenario.climate.startMonth - 1);
  const shelfS = Math.max(
    0,
    (scenario.supply.cell.shelfLifeS ?? Infinity) - (scenario.climate.storage?.durationS ?? 0),
  );
  const lastS = Math.min(shelfS, HORIZON);
  const end = (kind: 'charge' | 'voltage', lifeS: number, leftC: number): ReferenceLife => {
    const failed = kind === 'charge' ? 'charge-exhausted' : 'undervoltage';
    return { outcome: lifeS === 0 ? 'never-starts' : failed, lifeS, startingC, leftC };
  };
  if (!(startingC > 0)) return end('charge', 0, 0);
  let leftC = startingC;
  for (let dekad = 0; dekad * DEKAD < lastS; dekad++) {
    const index = start + dekad;
    const moments = reference.momentsAt(index);
    const failing: (left: number) => 'charge' | 'voltage' | null = (left) =>
      reference.failure(index, moments, startingC, left);
    const once = reference.onceIn(dekad, lastS);
    let nowS = dekad * DEKAD;
    for (const event of [...once, { routine: null, timeS: Math.min((dekad + 1) * DEKAD, lastS) }]) {
      const atStart = failing(leftC);
      if (atStart) return end(atStart, nowS, leftC);
      let found: ReferenceLife | null = null;
      let goodS = nowS;
      leftC = solve(
        (left) => reference.speed(index, startingC, left),
        leftC,
        { fromS: nowS, toS: event.timeS },
        (sampleS, left, at) => {
          const kind = failing(left);
          if (!kind) {
            goodS = sampleS;
            return true;
          }
          found = halve({ goodS, badS: sampleS }, at, failing, end);
          return false;
        },
      );
      if (found) return found;
      nowS = event.timeS;
      if (!event.routine) continue;
      leftC -= reference.onceC(event.routine, index, startingC, leftC);
      const own = reference.makeMoments(reference.dekad(index), event.routine);
      const kind = reference.failure(index, own, startingC, leftC);
      if (kind) return end(kind, nowS, leftC);
    }
  }
  return shelfS <= HORIZON
    ? { outcome: 'shelf-life', lifeS: lastS, startingC, leftC }
    : { outcome: 'outlives-horizon', lifeS: null, startingC, leftC };
}

/** Halves between a moment that works and one that fails. */
function halve(
  bracket: { goodS: number; badS: number },
  at: (timeS: number) => number,
  failing: (leftC: number) => 'charge' | 'voltage' | null,
  end: (kind: 'charge' | 'voltage', lifeS: number, leftC: number) => ReferenceLife,
): ReferenceLife {
  let { goodS, badS } = bracket;
  for (let halving = 0; halving < 60; halving++) {
    const middle = (goodS + badS) / 2;
    if (failing(at(middle))) badS = middle;
    else goodS = middle;
  }
  return end(failing(at(badS)) ?? 'charge', badS, at(badS));
}
