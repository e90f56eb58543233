import { InconsistentInputError } from '#common/errors.ts';
import { requireNumber } from './checks.ts';
import type { Phy } from './phy.types.ts';

/** Longest MPDU, in octets with FCS, that a short interframe space follows (aMaxSIFSFrameSize). */
const MAX_SIFS_FRAME_OCTETS = 18;

/**
 * Interframe space after a frame: short up to 18 octets of MPDU, long above. The limit counts octets, not symbols.
 *
 * Source: IEEE 802.15.4-2006 7.5.1.3 as coded in ns-3 lr-wpan-mac.cc GetIfsSize @1406464.
 *
 * @param phy A preset or a PHY of one's own.
 * @param mpduOctets MPDU with FCS, octets; whole, 0 or more.
 * @returns Interframe space, s.
 * @throws InconsistentInputError code `constant-unknown` when the PHY gives no such space; the field names it.
 * @throws OutOfRangeError code `out-of-range` for octets that are negative or not whole.
 * @example interframeSpaceS(phyPresets['oqpsk-2450'], 19) // 0.00064
 */
export function interframeSpaceS(phy: Phy, mpduOctets: number): number {
  requireNumber(mpduOctets, { field: 'mpduOctets', min: 0, whole: true, unit: 'octets' });
  const name = mpduOctets <= MAX_SIFS_FRAME_OCTETS ? 'sifsS' : 'lifsS';
  const spaceS = phy[name];
  if (spaceS !== null) return spaceS;
  throw new InconsistentInputError(`No source gives ${name} of the PHY "${phy.id}".`, {
    code: 'constant-unknown',
    field: name,
    value: null,
    unit: 's',
    expected: `a PHY that gives ${name}`,
  });
}
