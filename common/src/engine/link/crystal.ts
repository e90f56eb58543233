import type { Crystal, CustomPhy, PhyId } from '../scenario/scenario.types.ts';
import { requireNumber } from './checks.ts';
import type { PlanCaution } from './exchange-plan.types.ts';

/** How far a crystal may be off, ± ppm, and what of it is not known. */
export interface CrystalTolerance {
  tolerancePpm: number;
  temperaturePpm: number;
  ageingPpm: number;
  /** With its sign: above 0 where the board's load is smaller than the nominal one and the crystal runs fast. */
  pullingPpm: number;
  /** All terms, the pulling by its size. */
  totalPpm: number;
  /** Terms that the crystal does not give and that count as 0. */
  notGiven: ('tolerancePpm' | 'temperaturePpm' | 'ageingPpm' | 'pulling')[];
}

/** Most that a PHY allows its symbol rate and centre frequency to be off, ± ppm. */
const PHY_LIMIT_PPM = 40;
const PHY_LIMIT_SOURCE = 'IEEE 802.15.4; printed in 802.15.4c-2009 6.6a.3.3';

/**
 * Total tolerance of a crystal in the worst case: make, temperature, ageing and load mismatch add up.
 *
 * Pulling: `Δf/f = C1/2 · (1/(C0 + CL mounted) − 1/(C0 + CL nominal))`; C1 motional, C0 shunt, CL load capacitance.
 *
 * Source: first order of the load resonance of the four-element crystal circuit, `(fL − fs)/fs = C1 / (2 (C0 + CL))`, for two
 * loads; printed so in a crystal maker's public design note on frequency pull (its section of formulas and notes), and as
 * the difference of two load resonances in another maker's page on crystal theory. That the terms add up: common practice,
 * no source.
 *
 * @param crystal Terms in ± ppm, 0 or more; capacitances in F, above 0. A term not given counts as 0 and is named.
 * @returns Terms and their sum, ppm.
 * @throws OutOfRangeError code `out-of-range` for a term below 0 or a capacitance that is not above 0.
 * @example crystalTolerance({ tolerancePpm: 10, temperaturePpm: 15, ageingPpm: 3 }).totalPpm // 28
 */
export function crystalTolerance(crystal: Crystal): CrystalTolerance {
  const term = (name: 'tolerancePpm' | 'temperaturePpm' | 'ageingPpm'): number =>
    requireNumber(crystal[name] ?? 0, { field: `crystal.${name}`, min: 0, unit: 'ppm' });
  const tolerancePpm = term('tolerancePpm');
  const temperaturePpm = term('temperaturePpm');
  const ageingPpm = term('ageingPpm');
  const pullingPpm = crystal.pulling === undefined ? 0 : pulledPpm(crystal.pulling);
  const totalPpm = tolerancePpm + temperaturePpm + ageingPpm + Math.abs(pullingPpm);
  const terms = ['tolerancePpm', 'temperaturePpm', 'ageingPpm', 'pulling'] as const;
  const notGiven = terms.filter((name) => crystal[name] === undefined);
  return { tolerancePpm, temperaturePpm, ageingPpm, pullingPpm, totalPpm, notGiven };
}

function pulledPpm(pulling: NonNullable<Crystal['pulling']>): number {
  for (const name of ['motionalCapacitanceF', 'loadCapacitanceF', 'mountedCapacitanceF'] as const) {
    requireNumber(pulling[name], { field: `crystal.pulling.${name}`, min: Number.MIN_VALUE, unit: 'F' });
  }
  const { motionalCapacitanceF, shuntCapacitanceF, loadCapacitanceF, mountedCapacitanceF } = pulling;
  requireNumber(shuntCapacitanceF, { field: 'crystal.pulling.shuntCapacitanceF', min: 0, unit: 'F' });
  const difference = 1 / (shuntCapacitanceF + mountedCapacitanceF) - 1 / (shuntCapacitanceF + loadCapacitanceF);
  return (motionalCapacitanceF / 2) * difference * 1e6;
}

/**
 * Most that a PHY's symbol rate and centre frequency may be off.
 *
 * Source: IEEE 802.15.4c-2009 6.6a.3.3 (O-QPSK symbol rate); a public conformance test of the 2450 MHz PHY (centre frequency,
 * 96.2 kHz at 2405 MHz). The same figure for BPSK, 802.15.4-2006 6.6.3, is from memory. For MSK, SUN FSK and a PHY of one's
 * own no source was found.
 *
 * @param phy Preset id or a PHY of one's own.
 * @returns ± ppm, or null where no source gives a limit.
 * @example phyLimitPpm('oqpsk-2450') // 40
 */
export function phyLimitPpm(phy: PhyId | CustomPhy): number | null {
  return typeof phy === 'string' && (phy.startsWith('oqpsk') || phy.startsWith('bpsk')) ? PHY_LIMIT_PPM : null;
}

/**
 * Whether a crystal keeps the PHY's limit, as a caution where it does not.
 *
 * Source: as `phyLimitPpm`.
 *
 * @param totalPpm Total tolerance, ± ppm, 0 or more.
 * @param phy Preset id or a PHY of one's own.
 * @returns Caution code `crystal-beyond-phy` on `link.crystal`, or null within the limit and where there is none.
 * @throws OutOfRangeError code `out-of-range` for a tolerance below 0.
 * @example crystalCaution(52, 'oqpsk-2450')?.code // 'crystal-beyond-phy'
 */
export function crystalCaution(totalPpm: number, phy: PhyId | CustomPhy): PlanCaution | null {
  requireNumber(totalPpm, { field: 'totalPpm', min: 0, unit: 'ppm' });
  const limitPpm = phyLimitPpm(phy);
  // Sums of terms in ppm carry rounding: a crystal that is just at the limit keeps it.
  if (limitPpm === null || totalPpm <= limitPpm * (1 + 1e-12)) return null;
  const rounded = Math.ceil(totalPpm * 10) / 10;
  const message = `The crystal may be off by up to ${rounded} ppm; the PHY allows ±${limitPpm} ppm of symbol rate and centre frequency (${PHY_LIMIT_SOURCE}).`;
  return { code: 'crystal-beyond-phy', message, field: 'link.crystal' };
}
