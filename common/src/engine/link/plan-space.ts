import type { LinkSettings } from '../scenario/scenario.types.ts';
import { phaseOf } from './assemble-plan.ts';
import type { ExchangePhase } from './exchange-plan.types.ts';
import { interframeSpaceS } from './interframe-space.ts';
import type { Phy } from './phy.types.ts';

/**
 * The space that follows a frame, or its acknowledgement, where the link asks for it.
 *
 * @param link Link settings.
 * @param phy The PHY.
 * @param psduOctets Octets of the frame that the space follows.
 * @param counts Mean and largest number of spaces.
 * @returns No phase or one.
 * @throws What `interframeSpaceS` throws.
 * @example spacePhase({ includeInterframeSpace: true }, phy, 20, { mean: 1, worst: 1 })[0]?.meanS // 0.00064
 */
export function spacePhase(
  { includeInterframeSpace }: LinkSettings,
  phy: Phy,
  psduOctets: number,
  { mean, worst }: { mean: number; worst: number },
): ExchangePhase[] {
  if (includeInterframeSpace !== true) return [];
  const spaceS = interframeSpaceS(phy, psduOctets);
  const origin = {
    formula: 'macSIFSPeriod up to 18 octets of MPDU, else macLIFSPeriod',
    source: 'IEEE 802.15.4-2006 7.5.1.3 as coded in ns-3 lr-wpan-mac.cc @1406464',
  };
  return [phaseOf('interframe-space', { meanS: mean * spaceS, worstS: worst * spaceS, longestS: spaceS }, origin)];
}
