import { InconsistentInputError } from '#common/errors.ts';
import { requireNumber } from './checks.ts';
import type { Phy } from './phy.types.ts';

/** Preamble that the presets' synchronisation headers count, octets. */
const PRESET_PREAMBLE_OCTETS = 4;

/** Settings of one frame on the air. */
export interface FrameAirtimeOptions {
  /** Preamble instead of the preset's 4 octets. */
  preambleOctets?: number;
  /** Whole synchronisation header, where the PHY has none of its own. */
  shrOctets?: number;
  /** PHY header, where the PHY has none of its own. */
  phrOctets?: number;
  /** Rate-1/2 coding of PHR and PSDU (SUN FSK); default false. */
  forwardErrorCorrection?: boolean;
}

/** Octets on air for each octet that rate-1/2 forward error correction codes. */
const CODED = 2;

/**
 * Time on air of one frame: `8 · (SHR + PHR + PSDU) / bit rate`; rate-1/2 forward error correction doubles PHR and PSDU.
 *
 * Source: IEEE 802.15.4 PPDU format as coded in ns-3 lr-wpan-phy.cc @1406464. Doubling by forward error correction is from
 * memory of 802.15.4g.
 * Valid for: PHR sent at the data rate. Tail bits and interleaver padding of the coding are left out (below 2 % at 100 octets).
 *
 * @param phy A preset or a PHY of one's own.
 * @param psduOctets PSDU, octets, FCS counted; whole, 0 to the PHY's longest.
 * @param options Preamble, headers, coding.
 * @returns Time on air, s.
 * @throws InconsistentInputError code `constant-unknown` when SHR or PHR is null in the PHY and not supplied; the field names
 *   it. Code `no-forward-error-correction` for a PHY without it; code `preamble-unknown` for a preamble of a PHY of one's own.
 * @throws OutOfRangeError code `out-of-range` for octets outside their range.
 * @example frameAirtimeS(phyPresets['oqpsk-2450'], 127) // 0.004256
 */
export function frameAirtimeS(phy: Phy, psduOctets: number, options: FrameAirtimeOptions = {}): number {
  const max = phy.maxPsduOctets ?? Infinity;
  requireNumber(psduOctets, { field: 'psduOctets', min: 0, max, whole: true, unit: 'octets' });
  const shrOctets = shrOctetsOf(phy, options);
  const phrOctets = constantOf(phy, 'phrOctets', options.phrOctets);
  const codedOctets = phrOctets + psduOctets;
  if (options.forwardErrorCorrection !== true) return octetsAirtimeS(phy, shrOctets + codedOctets);
  if (phy.id !== 'custom' && !phy.id.startsWith('sun-fsk')) {
    throw new InconsistentInputError(`The PHY "${phy.id}" has no forward error correction; only SUN FSK has.`, {
      code: 'no-forward-error-correction',
      field: 'forwardErrorCorrection',
      value: true,
      expected: 'false, or a SUN FSK PHY',
    });
  }
  return octetsAirtimeS(phy, shrOctets + CODED * codedOctets);
}

/**
 * Time on air of some octets of a frame: `8 · octets / bit rate`, twice that where rate-1/2 forward error correction codes them.
 *
 * Source: as `frameAirtimeS`.
 *
 * @param phy A preset or a PHY of one's own.
 * @param octets Octets, 0 or more.
 * @param isCoded Whether forward error correction codes them; it never codes the synchronisation header.
 * @returns Time on air, s.
 * @example octetsAirtimeS(phyPresets['oqpsk-2450'], 24) // 0.000768
 */
export function octetsAirtimeS(phy: Phy, octets: number, isCoded = false): number {
  return (8 * (isCoded ? CODED * octets : octets)) / phy.bitRateBps;
}

function shrOctetsOf(phy: Phy, { shrOctets, preambleOctets }: FrameAirtimeOptions): number {
  const whole = constantOf(phy, 'shrOctets', shrOctets);
  if (preambleOctets === undefined || shrOctets !== undefined) return whole;
  requireNumber(preambleOctets, { field: 'preambleOctets', min: 0, whole: true, unit: 'octets' });
  if (phy.id === 'custom') {
    throw new InconsistentInputError(
      'The preamble of a PHY of your own is part of its shrOctets; change that instead.',
      {
        code: 'preamble-unknown',
        field: 'preambleOctets',
        value: preambleOctets,
        expected: 'no preambleOctets beside a PHY of your own',
      },
    );
  }
  return whole - PRESET_PREAMBLE_OCTETS + preambleOctets;
}

function constantOf(phy: Phy, name: 'shrOctets' | 'phrOctets', supplied: number | undefined): number {
  if (supplied !== undefined) return requireNumber(supplied, { field: name, min: 0, unit: 'octets' });
  const value = phy[name];
  if (value !== null) return value;
  throw new InconsistentInputError(
    `No source gives ${name} of the PHY "${phy.id}"; supply ${name}, or take a PHY of your own.`,
    {
      code: 'constant-unknown',
      field: name,
      value: null,
      unit: 'octets',
      expected: `${name} supplied by the caller`,
    },
  );
}
