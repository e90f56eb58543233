import { Decimal } from 'decimal.js';
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { arbitraryNode } from '#test/support/arbitrary-scenario.ts';
import type { Node, Step } from '../scenario/scenario.types.ts';
import type { Ledger } from '../forecast/forecast.types.ts';
import { chargeLedger } from './charge-ledger.ts';
import { compileNode } from './compile-node.ts';
import { IS_LONG } from '#test/support/long.ts';

const RUNS = IS_LONG ? 2_000 : 100;
/** A reader's own decimals, as the model fixes them: 40 significant digits. */
const Forty = Decimal.clone({ precision: 40 });

const conditions = fc.record({
  railVoltageV: fc.integer({ min: 18, max: 36 }).map((tenths) => tenths / 10),
  temperatureC: fc.integer({ min: -40, max: 60 }),
});
const check = (property: fc.IPropertyWithHooks<[Node, { railVoltageV: number; temperatureC: number }]>) =>
  fc.assert(property, { numRuns: RUNS });
const property = (predicate: (node: Node, at: { railVoltageV: number; temperatureC: number }) => void) =>
  fc.property(arbitraryNode(), conditions, predicate);

const sorted = ({ entries }: Ledger) => entries.map((entry) => JSON.stringify(entry)).sort();

describe('chargeLedger of random nodes', () => {
  test('has entries that add up to the total to the last digit, in any order', () => {
    check(
      property((node, at) => {
        const { entries, totalC } = chargeLedger(node, at);
        const add = (sum: Decimal, { chargeC }: { chargeC: string }) => sum.plus(chargeC);
        expect(entries.reduce(add, new Forty(0)).toFixed()).toBe(totalC);
        expect(entries.reduceRight(add, new Forty(0)).toFixed()).toBe(totalC);
      }),
    );
  });

  test('does not depend on the order of parts and routines', () => {
    check(
      property((node, at) => {
        const turned = { ...node, parts: [...node.parts].reverse(), routines: [...node.routines].reverse() };
        const [one, other] = [chargeLedger(node, at), chargeLedger(turned, at)];
        expect(other.totalC).toBe(one.totalC);
        expect(sorted(other)).toEqual(sorted(one));
      }),
    );
  });

  test('is unchanged when a typed step is cut into two of equal states', () => {
    check(
      property((node, at) => {
        const cut = (step: Step): Step[] => {
          if (step.duration.kind !== 'fixed' || step.repeats !== 1) return [step];
          const microseconds = Math.round(step.duration.typical * 1e6);
          const firstUs = Math.floor(microseconds / 3);
          const piece = (id: string, us: number): Step => ({
            ...step,
            id,
            duration: { kind: 'fixed', typical: us / 1e6 },
          });
          return [piece(`${step.id}a`, firstUs), piece(`${step.id}b`, microseconds - firstUs)];
        };
        const routines = node.routines.map((routine) => ({ ...routine, steps: routine.steps.flatMap(cut) }));
        const rounding = 2e-30 * 10 * node.routines.length * node.parts.length;
        const difference = new Forty(chargeLedger({ ...node, routines }, at).totalC).minus(
          chargeLedger(node, at).totalC,
        );
        expect(difference.abs().toNumber()).toBeLessThanOrEqual(rounding * 1e3);
      }),
    );
  });

  test('gains nothing from a part that draws 0 A', () => {
    check(
      property((node, at) => {
        const nothing = { typical: 0 };
        const [model] = node.parts;
        if (!model) return;
        const silent = {
          ...model,
          id: 'silent',
          kind: 'other' as const,
          states: model.states.map((state) => ({ ...state, current: nothing })),
          transitions: [],
        };
        const routines = node.routines.map((routine) => ({
          ...routine,
          steps: routine.steps.map((step) => ({ ...step, states: { ...step.states, silent: 's1' } })),
        }));
        const ledger = chargeLedger({ ...node, parts: [...node.parts, silent], routines }, at);
        expect(ledger.totalC).toBe(chargeLedger(node, at).totalC);
        expect(ledger.entries.filter(({ partId }) => partId === 'silent').every(({ chargeC }) => chargeC === '0')).toBe(
          true,
        );
      }),
    );
  });

  test('counts n equal routines like one with n times the rate', () => {
    check(
      property((node, at) => {
        const [routine] = node.routines;
        if (!routine) return;
        const random = (id: string, meanPerDay: number) => ({
          ...routine,
          id,
          schedule: { kind: 'random' as const, meanPerDay },
        });
        const three = { ...node, routines: ['a', 'b', 'c'].map((id) => random(id, 20)) };
        const one = { ...node, routines: [random('a', 60)] };
        const entries = chargeLedger(one, at).entries.length;
        const difference = new Forty(chargeLedger(three, at).totalC).minus(chargeLedger(one, at).totalC);
        expect(difference.abs().toNumber()).toBeLessThanOrEqual(2e-30 * entries);
      }),
    );
  });
});

/** Derived durations are whole microseconds on the timeline. */
const HALF_MICROSECOND_S = 0.5e-6;

describe('compileNode of random nodes', () => {
  test('covers each cycle without gap or overlap, and its segments fit the intervals', () => {
    fc.assert(
      fc.property(arbitraryNode(), (node) => {
        const { routines, parts } = compileNode(node, { defaultReferenceVoltageV: 3 });
        for (const { intervals, segments, cycleS } of routines) {
          const inCycle = intervals.filter(({ kind }) => kind !== 'return');
          const isNear = (aS: number, bS: number, roundings: number): void =>
            expect(Math.abs(aS - bS)).toBeLessThanOrEqual(roundings * HALF_MICROSECOND_S + 1e-9);
          const inCycleS = inCycle.reduce((sum, { durationS }) => sum + durationS, 0);
          isNear(inCycleS, cycleS, inCycle.length);
          intervals.forEach(({ startS, durationS }, index) => {
            const next = intervals[index + 1];
            if (next) isNear(next.startS, startS + durationS, 1);
          });
          const bySegments = parts.map(() => 0);
          for (const { partIndex, durationTermsS } of segments) {
            bySegments[partIndex] = (bySegments[partIndex] ?? 0) + durationTermsS.reduce((sum, term) => sum + term, 0);
          }
          const byIntervals = parts.map((_, partIndex) =>
            intervals
              .filter(({ occupants }) => occupants.some((occupant) => occupant.partIndex === partIndex))
              .reduce((sum, { durationS }) => sum + durationS, 0),
          );
          bySegments.forEach((timeS, index) => isNear(byIntervals[index] ?? NaN, timeS, intervals.length));
        }
      }),
      { numRuns: RUNS },
    );
  });

  test('never has a part in two activities at once', () => {
    fc.assert(
      fc.property(arbitraryNode(), (node) => {
        for (const { intervals } of compileNode(node, { defaultReferenceVoltageV: 3 }).routines) {
          for (const { occupants } of intervals) {
            expect(new Set(occupants.map(({ partIndex }) => partIndex)).size).toBe(occupants.length);
          }
        }
      }),
      { numRuns: RUNS },
    );
  });
});
