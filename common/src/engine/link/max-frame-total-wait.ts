import { powerSum } from './attempts.ts';
import { backoffSettings } from './csma-ca.ts';
import type { BackoffSettings } from './csma-ca.ts';
import { frameAirtimeS } from './frame-airtime.ts';
import { phyConstant } from './phy-constant.ts';
import type { Phy } from './phy.types.ts';

/**
 * Longest wait for a frame that the parent has announced (macMaxFrameTotalWaitTime):
 * `[Σ_{k<m} 2^(minBE+k) + (2^maxBE − 1)(maxBackoffs − m)] · backoff unit + longest frame`, `m = min(maxBE − minBE, maxBackoffs)`.
 *
 * Source: IEEE 802.15.4-2006 7.4.2 equation (14). The 2003 edition has a constant of 1220 symbols instead; stacks may wait longer.
 *
 * @param phy A preset or a PHY of one's own.
 * @param settings Backoff settings, the standard's by default.
 * @returns Longest wait, s.
 * @throws InconsistentInputError code `constant-unknown` when the PHY gives no backoff unit, headers or longest PSDU; code
 *   `backoff-exponents`.
 * @throws OutOfRangeError code `out-of-range` for a setting outside its range.
 * @example maxFrameTotalWaitS(phyPresets['oqpsk-2450']) // 0.031776
 */
export function maxFrameTotalWaitS(phy: Phy, settings: BackoffSettings = {}): number {
  const { macMinBE, macMaxBE, macMaxCSMABackoffs } = backoffSettings(settings);
  const growing = Math.min(macMaxBE - macMinBE, macMaxCSMABackoffs);
  const units = 2 ** macMinBE * powerSum(2, growing) + (2 ** macMaxBE - 1) * (macMaxCSMABackoffs - growing);
  return units * phyConstant(phy, 'unitBackoffS') + frameAirtimeS(phy, phyConstant(phy, 'maxPsduOctets'));
}
