import { InconsistentInputError } from '#common/errors.ts';
import type { PhyConstants } from '../scenario/scenario.types.ts';
import type { Phy } from './phy.types.ts';

/** Constants of a PHY that the link settings can give. */
export const PHY_CONSTANTS: readonly (keyof PhyConstants)[] = [
  'shrOctets',
  'phrOctets',
  'turnaroundS',
  'ccaS',
  'unitBackoffS',
  'ackWaitS',
];

/** Constants that a PHY may leave unknown, and the unit of each. */
const UNITS = {
  maxPsduOctets: 'octets',
  turnaroundS: 's',
  ccaS: 's',
  unitBackoffS: 's',
  ackWaitS: 's',
} as const;

/**
 * A constant of a PHY that a formula cannot do without.
 *
 * @param phy A preset or a PHY of one's own.
 * @param name The constant.
 * @returns Its value, in s or octets as its name says.
 * @throws InconsistentInputError code `constant-unknown` when the PHY leaves it null; the field names it.
 * @example phyConstant(phyPresets['oqpsk-2450'], 'ccaS') // 0.000128
 */
export function phyConstant(phy: Phy, name: keyof typeof UNITS): number {
  const value = phy[name];
  if (value !== null) return value;
  throw new InconsistentInputError(
    `No source gives ${name} of the PHY "${phy.id}"; type it, or take a PHY that gives it.`,
    {
      code: 'constant-unknown',
      field: name,
      value: null,
      unit: UNITS[name],
      expected: `${name} typed, or a PHY that gives it`,
    },
  );
}
