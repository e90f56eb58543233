import { csmaCa } from './csma-ca.ts';
import type { CsmaCaInput } from './csma-ca.ts';
import { phyConstant } from './phy-constant.ts';
import type { Phy } from './phy.types.ts';

/** What getting the channel takes, s, the turnaround before the frame not included. */
export interface AccessParts {
  backoffS: number;
  assessmentS: number;
  retuneS: number;
}

/** One way to get the channel for a frame: means over all outcomes, given success, given failure, and the worst case. */
export interface ChannelAccess {
  failureProbability: number;
  mean: AccessParts;
  ifSuccess: AccessParts;
  ifFailure: AccessParts;
  worst: AccessParts;
  /** Longest single backoff, s. */
  longestBackoffS: number;
}

/**
 * Channel access by unslotted carrier sense with random backoff.
 *
 * Source: as `csmaCa`.
 *
 * @param phy A preset or a PHY of one's own.
 * @param input Busy probability and backoff settings.
 * @returns What the access takes.
 * @throws As `csmaCa`.
 * @example csmaAccess(phyPresets['oqpsk-2450'], { busyProbability: 0 }).mean.backoffS // 0.00112
 */
export function csmaAccess(phy: Phy, input: Omit<CsmaCaInput, 'slotted'>): ChannelAccess {
  const { busyProbability, macMinBE, macMaxBE, macMaxCSMABackoffs } = input;
  const csma = csmaCa(phy, { busyProbability, macMinBE, macMaxBE, macMaxCSMABackoffs });
  const unitS = phyConstant(phy, 'unitBackoffS');
  const ccaS = phyConstant(phy, 'ccaS');
  const parts = (units: number, assessments: number): AccessParts => ({
    backoffS: units * unitS,
    assessmentS: assessments * ccaS,
    retuneS: 0,
  });
  return {
    failureProbability: csma.failureProbability,
    mean: parts(csma.meanBackoffUnits, csma.meanAssessments),
    ifSuccess: parts(csma.ifSuccess.meanBackoffUnits, csma.ifSuccess.meanAssessments),
    ifFailure: parts(csma.ifFailure.meanBackoffUnits, csma.ifFailure.meanAssessments),
    worst: parts(csma.worstCaseUnits, csma.worstCaseAssessments),
    longestBackoffS: csma.longestBackoffS,
  };
}

/**
 * Time of an access as a whole.
 *
 * Source: definition.
 *
 * @param parts Backoff, assessments, retuning, s.
 * @returns Their sum, s.
 * @example accessS({ backoffS: 1, assessmentS: 2, retuneS: 0 }) // 3
 */
export function accessS(parts: AccessParts): number {
  return parts.backoffS + parts.assessmentS + parts.retuneS;
}
