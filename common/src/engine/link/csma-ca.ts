import { InconsistentInputError } from '#common/errors.ts';
import { meanByAttempt, powerSum } from './attempts.ts';
import { requireNumber } from './checks.ts';
import { phyConstant } from './phy-constant.ts';
import type { Phy } from './phy.types.ts';

/** Settings of the backoff; the defaults are those of the standard. */
export interface BackoffSettings {
  /** Backoff exponent of the first round, default 3; 0 to `macMaxBE`. */
  macMinBE?: number;
  /** Largest backoff exponent, default 5; 0 to 30. */
  macMaxBE?: number;
  /** Rounds after the first one, default 4; 0 to 255. */
  macMaxCSMABackoffs?: number;
}

export interface CsmaCaInput extends BackoffSettings {
  /** Probability that an assessment finds the channel busy, 0 to 1. In slotted mode, that the first one of a round does. */
  busyProbability: number;
  /** Slotted mode: a second assessment follows a first one that found the channel idle. */
  slotted?: {
    /** Probability that the second assessment finds the channel busy after the first found it idle, 0 to 1. */
    secondBusyProbability: number;
  };
}

/** Means of an outcome. */
export interface CsmaCaMeans {
  meanBackoffUnits: number;
  meanAssessments: number;
}

export interface CsmaCa extends CsmaCaMeans {
  /** Mean backoff over all outcomes, s. */
  meanBackoffS: number;
  /** Mean time of assessments over all outcomes, s. */
  meanAssessmentS: number;
  /** Probability that every round found the channel busy. */
  failureProbability: number;
  /** Given that a round found the channel idle; where none can, the limit. */
  ifSuccess: CsmaCaMeans;
  /** Given that every round found the channel busy; where none can, the limit. */
  ifFailure: CsmaCaMeans;
  /** From the start of the first backoff to the first preamble bit, given success, s. */
  meanAccessS: number;
  worstCaseUnits: number;
  worstCaseAssessments: number;
  /** Longest backoffs and assessments, turnaround not included, s. */
  worstCaseS: number;
  /** Longest single backoff, s. */
  longestBackoffS: number;
}

interface Rounds {
  /** Mean backoff of each round, units. */
  units: number[];
  worstUnits: number[];
  busy: number;
  /** Mean assessments of a round that ended busy, of one that ended idle, and at most. */
  ifBusy: number;
  ifIdle: number;
}

/**
 * Carrier sense with random backoff, in closed form for independent assessments.
 *
 * Round `i` of at most `m + 1` waits uniform{0 … 2^BE_i − 1} units, `BE_i = min(macMinBE + i, macMaxBE)`, mean
 * `W_i = (2^BE_i − 1)/2`, then assesses the channel; `b` is the probability that the round finds it busy.
 * `P(failure) = b^(m+1)`, `E[units] = Σ b^i·W_i`, `E[assessments] = Σ b^i`; given success in round `k` the weights are
 * `b^k / Σ b^j`. Slotted, with first assessment busy α and second β: `b = α + (1 − α)β`, `E[assessments] = (2 − α)·Σ b^i`,
 * and each assessment begins on a unit boundary, so that all but the last take a whole unit of `meanAccessS` and `worstCaseS`.
 *
 * Source: IEEE 802.15.4-2020 6.2.5.1 as coded in ns-3 src/lr-wpan/model/lr-wpan-csmaca.cc @1406464; expectations derived.
 * Valid for: assessments independent of each other; contention periods without end.
 *
 * @param phy A preset or a PHY of one's own.
 * @param input Busy probability, backoff settings, slotted mode.
 * @returns Means over all outcomes, given success, given failure; failure probability; worst case.
 * @throws OutOfRangeError code `out-of-range` for a figure outside its range.
 * @throws InconsistentInputError code `backoff-exponents` when `macMinBE` exceeds `macMaxBE`; code `constant-unknown` when the
 *   PHY gives no turnaround, assessment or backoff unit.
 * @example csmaCa(phyPresets['oqpsk-2450'], { busyProbability: 0 }).meanAccessS // 0.00144
 */
export function csmaCa(phy: Phy, input: CsmaCaInput): CsmaCa {
  const unitS = phyConstant(phy, 'unitBackoffS');
  const ccaS = phyConstant(phy, 'ccaS');
  const turnaroundS = phyConstant(phy, 'turnaroundS');
  const { units, worstUnits, busy, ifBusy, ifIdle } = roundsOf(input);
  const count = units.length;
  const until = (round: number): number => sum(units.slice(0, round + 1));
  const ifSuccess = {
    meanBackoffUnits: meanByAttempt(busy, count, until),
    meanAssessments: meanByAttempt(busy, count, (round) => round * ifBusy + ifIdle),
  };
  const meanBackoffUnits = sum(units.map((mean, round) => mean * busy ** round));
  const meanAssessments = powerSum(busy, count) * (busy * ifBusy + (1 - busy) * ifIdle);
  const worstCaseUnits = sum(worstUnits);
  const worstCaseAssessments = count * ifIdle;
  const slotted = input.slotted !== undefined;
  const assessedS = (assessments: number): number => (slotted ? (assessments - 1) * unitS + ccaS : assessments * ccaS);
  return {
    meanBackoffUnits,
    meanAssessments,
    meanBackoffS: meanBackoffUnits * unitS,
    meanAssessmentS: meanAssessments * ccaS,
    failureProbability: busy ** count,
    ifSuccess,
    ifFailure: { meanBackoffUnits: sum(units), meanAssessments: count * ifBusy },
    meanAccessS: ifSuccess.meanBackoffUnits * unitS + assessedS(ifSuccess.meanAssessments) + turnaroundS,
    worstCaseUnits,
    worstCaseAssessments,
    worstCaseS: worstCaseUnits * unitS + assessedS(worstCaseAssessments),
    longestBackoffS: Math.max(...worstUnits) * unitS,
  };
}

function roundsOf(input: CsmaCaInput): Rounds {
  const { busyProbability, slotted } = input;
  const { macMinBE, macMaxBE, macMaxCSMABackoffs } = backoffSettings(input);
  requireNumber(busyProbability, { field: 'busyProbability', min: 0, max: 1 });
  const worstUnits = Array.from(
    { length: macMaxCSMABackoffs + 1 },
    (_, round) => 2 ** Math.min(macMinBE + round, macMaxBE) - 1,
  );
  const units = worstUnits.map((longest) => longest / 2);
  if (!slotted) return { units, worstUnits, busy: busyProbability, ifBusy: 1, ifIdle: 1 };
  const second = requireNumber(slotted.secondBusyProbability, {
    field: 'slotted.secondBusyProbability',
    min: 0,
    max: 1,
  });
  const secondBusy = (1 - busyProbability) * second;
  const busy = busyProbability + secondBusy;
  const ifBusy = busy === 0 ? 1 : (busyProbability + 2 * secondBusy) / busy;
  return { units, worstUnits, busy, ifBusy, ifIdle: 2 };
}

/**
 * Backoff settings with the standard's defaults filled in: exponents 3 to 5, 4 further rounds.
 *
 * Source: IEEE 802.15.4-2015 Table 8-81, as coded in ns-3 lr-wpan-csmaca.cc @1406464 and openDSME MAC_PIB.h @f9b26a7.
 *
 * @param settings Settings; absent ones take the default.
 * @returns All settings.
 * @throws OutOfRangeError code `out-of-range`, InconsistentInputError code `backoff-exponents`, as `csmaCa`.
 * @example backoffSettings({ macMaxBE: 8 }) // { macMinBE: 3, macMaxBE: 8, macMaxCSMABackoffs: 4 }
 */
export function backoffSettings(settings: BackoffSettings): Required<BackoffSettings> {
  const { macMinBE = 3, macMaxBE = 5, macMaxCSMABackoffs = 4 } = settings;
  requireNumber(macMinBE, { field: 'macMinBE', min: 0, max: 30, whole: true });
  requireNumber(macMaxBE, { field: 'macMaxBE', min: 0, max: 30, whole: true });
  requireNumber(macMaxCSMABackoffs, { field: 'macMaxCSMABackoffs', min: 0, max: 255, whole: true });
  if (macMinBE <= macMaxBE) return { macMinBE, macMaxBE, macMaxCSMABackoffs };
  throw new InconsistentInputError(`The first backoff exponent ${macMinBE} exceeds the largest one, ${macMaxBE}.`, {
    code: 'backoff-exponents',
    field: 'macMinBE',
    value: macMinBE,
    expected: `0 to macMaxBE, ${macMaxBE}`,
    relatedFields: ['macMaxBE'],
  });
}

function sum(values: readonly number[]): number {
  return values.reduce((total, value) => total + value, 0);
}
