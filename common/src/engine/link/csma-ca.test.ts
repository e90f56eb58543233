import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { InconsistentInputError, OutOfRangeError } from '#common/errors.ts';
import { errorOf } from '#test/support/build-node.ts';
import { csmaCa } from './csma-ca.ts';
import { phyOf } from './phy-of.ts';
import { phyPresets } from './phy.table.ts';

const oqpsk = phyPresets['oqpsk-2450'];

describe('csmaCa', () => {
  test('waits 3.5 units and assesses once on an idle channel, exactly', () => {
    const idle = csmaCa(oqpsk, { busyProbability: 0 });
    expect(idle).toMatchObject({
      meanBackoffUnits: 3.5,
      meanAssessments: 1,
      failureProbability: 0,
      ifSuccess: { meanBackoffUnits: 3.5, meanAssessments: 1 },
    });
    expect(idle.meanBackoffS).toBeCloseTo(1120e-6, 15);
    expect(idle.meanAccessS).toBeCloseTo(1440e-6, 15);
  });

  test('waits 57.5 units, assesses five times and fails on a channel that is always busy, exactly', () => {
    expect(csmaCa(oqpsk, { busyProbability: 1 })).toMatchObject({
      meanBackoffUnits: 57.5,
      meanAssessments: 5,
      failureProbability: 1,
      ifFailure: { meanBackoffUnits: 57.5, meanAssessments: 5 },
    });
  });

  test('takes 115 units and five assessments at the worst', () => {
    const { worstCaseUnits, worstCaseAssessments, worstCaseS, longestBackoffS } = csmaCa(oqpsk, {
      busyProbability: 0.5,
    });
    expect({ worstCaseUnits, worstCaseAssessments }).toEqual({ worstCaseUnits: 115, worstCaseAssessments: 5 });
    expect(worstCaseS).toBeCloseTo(37_440e-6, 12);
    expect(longestBackoffS).toBeCloseTo(31 * 320e-6, 12);
  });

  test('counts its times in the MAC symbol, four times shorter at one bit per symbol', () => {
    const four = csmaCa(oqpsk, { busyProbability: 0.3 }).meanAccessS;
    expect(csmaCa(phyPresets['msk-2450'], { busyProbability: 0.3 }).meanAccessS).toBeCloseTo(four / 4, 12);
  });

  test('assesses twice on an idle channel in slotted mode, each assessment within a unit', () => {
    const slotted = csmaCa(oqpsk, { busyProbability: 0, slotted: { secondBusyProbability: 0 } });
    expect(slotted).toMatchObject({ meanAssessments: 2, failureProbability: 0, worstCaseAssessments: 10 });
    expect(slotted.meanAccessS).toBeCloseTo(5.5 * 320e-6, 12);
  });

  test('fails in slotted mode when the second assessment is always busy', () => {
    const slotted = csmaCa(oqpsk, { busyProbability: 0, slotted: { secondBusyProbability: 1 } });
    expect(slotted).toMatchObject({ meanAssessments: 10, meanBackoffUnits: 57.5, failureProbability: 1 });
  });

  test('weighs success and failure back to the mean over all outcomes', () => {
    fc.assert(
      fc.property(arbitraryInput, (input) => {
        const { meanBackoffUnits, meanAssessments, failureProbability, ifSuccess, ifFailure } = csmaCa(oqpsk, input);
        const weigh = (success: number, failure: number): number =>
          (1 - failureProbability) * success + failureProbability * failure;
        expect(weigh(ifSuccess.meanBackoffUnits, ifFailure.meanBackoffUnits)).toBeCloseTo(meanBackoffUnits, 9);
        expect(weigh(ifSuccess.meanAssessments, ifFailure.meanAssessments)).toBeCloseTo(meanAssessments, 9);
      }),
    );
  });

  test('never takes longer in the mean than at the worst', () => {
    fc.assert(
      fc.property(arbitraryInput, (input) => {
        const { meanBackoffS, meanAssessmentS, meanAccessS, worstCaseS } = csmaCa(oqpsk, input);
        const slack = 1 + 1e-12;
        expect(meanBackoffS + meanAssessmentS).toBeLessThanOrEqual(worstCaseS * slack);
        expect(meanAccessS).toBeLessThanOrEqual((worstCaseS + 192e-6) * slack);
      }),
    );
  });

  test('fails more often and takes longer the busier the channel is', () => {
    fc.assert(
      fc.property(arbitraryInput, fc.double({ min: 0, max: 1, noNaN: true }), (input, share) => {
        const { busyProbability } = input;
        const busier = { ...input, busyProbability: busyProbability + (1 - busyProbability) * share };
        const [less, more] = [csmaCa(oqpsk, input), csmaCa(oqpsk, busier)];
        expect(more.failureProbability).toBeGreaterThanOrEqual(less.failureProbability * (1 - 1e-12));
        expect(more.meanBackoffS).toBeGreaterThanOrEqual(less.meanBackoffS * (1 - 1e-12));
      }),
    );
  });

  test.each([
    [{ busyProbability: 1.1 }, 'busyProbability'],
    [{ busyProbability: Number.NaN }, 'busyProbability'],
    [{ busyProbability: 0, macMinBE: 0.5 }, 'macMinBE'],
    [{ busyProbability: 0, macMaxBE: 31 }, 'macMaxBE'],
    [{ busyProbability: 0, macMaxCSMABackoffs: -1 }, 'macMaxCSMABackoffs'],
    [{ busyProbability: 0, slotted: { secondBusyProbability: -0.1 } }, 'slotted.secondBusyProbability'],
  ])('throws for %o', (input, field) => {
    expect(errorOf(OutOfRangeError, () => csmaCa(oqpsk, input))).toMatchObject({ code: 'out-of-range', field });
  });

  test('throws when the first exponent exceeds the largest', () => {
    const error = errorOf(InconsistentInputError, () => csmaCa(oqpsk, { busyProbability: 0, macMinBE: 6 }));
    expect(error).toMatchObject({ code: 'backoff-exponents', field: 'macMinBE', relatedFields: ['macMaxBE'] });
  });

  test('throws and names the backoff unit, which a PHY of ones own does not give', () => {
    const own = phyOf({ bitRateBps: 250_000, bitsPerSymbol: 4, shrOctets: 5, phrOctets: 1 });
    const error = errorOf(InconsistentInputError, () => csmaCa(own, { busyProbability: 0 }));
    expect(error).toMatchObject({ code: 'constant-unknown', field: 'unitBackoffS' });
  });
});

const probability = fc.double({ min: 0, max: 1, noNaN: true });
const arbitraryInput = fc
  .record({
    busyProbability: probability,
    macMinBE: fc.integer({ min: 0, max: 8 }),
    further: fc.integer({ min: 0, max: 5 }),
    macMaxCSMABackoffs: fc.integer({ min: 0, max: 7 }),
    secondBusyProbability: fc.option(probability, { nil: undefined }),
  })
  .map(({ macMinBE, further, secondBusyProbability, ...rest }) => ({
    ...rest,
    macMinBE,
    macMaxBE: macMinBE + further,
    ...(secondBusyProbability === undefined ? {} : { slotted: { secondBusyProbability } }),
  }));
