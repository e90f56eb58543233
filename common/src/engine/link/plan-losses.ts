import { crystalTolerance } from './crystal.ts';
import { frameLoss } from './bit-error.ts';
import { requireNumber } from './checks.ts';
import { assumedTolerancePpm, ASSUMED_TOLERANCE_SOURCE } from './link-defaults.table.ts';
import type { Phy } from './phy.types.ts';
import { addFigure, probabilityOf } from './plan-context.ts';
import type { PlanContext } from './plan-context.ts';

const LEVEL_SOURCE = 'IEEE 802.15.4-2006 Annex E, E.4.1.7, as coded in ns-3 lr-wpan-error-model.cc';

/**
 * Probability that a frame is lost: as given, else from the received level over its length, else assumed.
 *
 * @param context Gets the figure and a caution where it is assumed.
 * @param phy The PHY.
 * @param psduOctets Length of the frame, octets.
 * @returns The probability.
 * @throws OutOfRangeError code `out-of-range` outside 0 to 1; what `frameLoss` throws.
 * @example frameLossOf(context, phy, 127)
 */
export function frameLossOf(context: PlanContext, phy: Phy, psduOctets: number): number {
  return lossOf(context, 'frameErrorRate', { phy, psduOctets });
}

/**
 * Probability that an acknowledgement is lost; as `frameLossOf`.
 *
 * @param context Gets the figure and a caution where it is assumed.
 * @param phy The PHY.
 * @param psduOctets Length of the acknowledgement, octets.
 * @returns The probability.
 * @throws OutOfRangeError code `out-of-range` outside 0 to 1; what `frameLoss` throws.
 * @example ackLossOf(context, phy, 5)
 */
export function ackLossOf(context: PlanContext, phy: Phy, psduOctets: number): number {
  return lossOf(context, 'ackErrorRate', { phy, psduOctets });
}

function lossOf(
  context: PlanContext,
  id: 'frameErrorRate' | 'ackErrorRate',
  { phy, psduOctets }: { phy: Phy; psduOctets: number },
): number {
  const { receivedLevelDbm, receivedLevelStepDb, noiseDbm, sensitivityDbm, [id]: quantity } = context.link;
  if (quantity !== undefined || receivedLevelDbm === undefined) {
    return probabilityOf(context, id, { quantity, field: `link.${id}` });
  }
  const level = { receivedLevelDbm: receivedLevelDbm.typical, receivedLevelStepDb, noiseDbm, sensitivityDbm };
  const { frameErrorRate: value, sinrDb } = frameLoss(phy, { psduOctets, ...level });
  addFigure(context, {
    id: 'sinr',
    name: 'Signal above noise',
    value: sinrDb,
    unit: 'dB',
    formula: 'level, rounded down to its steps − noise; noise from the sensitivity where none is given',
    source: LEVEL_SOURCE,
  });
  const what = id === 'frameErrorRate' ? 'a frame' : 'an acknowledgement';
  addFigure(context, {
    id,
    name: `Probability that ${what} is lost`,
    value,
    unit: 'probability',
    formula: '1 − (1 − BER)^bits; BER = 8/15 · 1/16 · Σ_{k=2..16} (−1)^k · C(16, k) · e^{20 · SINR · (1/k − 1)}',
    source: LEVEL_SOURCE,
  });
  return value;
}

/**
 * How far the clocks of both sides may be off: typed, else the own one from the crystal, else assumed.
 *
 * @param context Gets figures, and a caution where one is assumed.
 * @returns Both, ± ppm.
 * @throws OutOfRangeError code `out-of-range` below 0.
 * @example tolerancesOf(context).tolerancePpmA
 */
export function tolerancesOf(context: PlanContext): { tolerancePpmA: number; tolerancePpmB: number } {
  const { tolerancePpm, peerTolerancePpm, crystal } = context.link;
  const own = tolerancePpm?.typical ?? (crystal === undefined ? undefined : crystalTolerance(crystal).totalPpm);
  const ownFormula = tolerancePpm === undefined ? 'make + temperature + ageing + |pulling|' : 'as given';
  return {
    tolerancePpmA: toleranceOf(context, own, { id: 'tolerancePpm', name: 'Own clock', formula: ownFormula }),
    tolerancePpmB: toleranceOf(context, peerTolerancePpm?.typical, {
      id: 'peerTolerancePpm',
      name: "The other side's clock",
      formula: 'as given',
    }),
  };
}

function toleranceOf(
  context: PlanContext,
  given: number | undefined,
  { id, name, formula }: { id: string; name: string; formula: string },
): number {
  const value = given ?? assumedTolerancePpm;
  requireNumber(value, { field: `link.${id}`, min: 0, unit: 'ppm' });
  if (given === undefined) {
    const message = `${name} has no tolerance given: ±${assumedTolerancePpm} ppm is assumed (${ASSUMED_TOLERANCE_SOURCE}).`;
    context.cautions.push({ code: 'link-assumed', message, field: `link.${id}` });
  }
  addFigure(context, {
    id,
    name: `${name}, ±`,
    value,
    unit: 'ppm',
    formula: given === undefined ? 'assumed' : formula,
    source: given === undefined ? ASSUMED_TOLERANCE_SOURCE : 'given in the scenario',
  });
  return value;
}
