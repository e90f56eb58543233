import type { Phy } from './phy.types.ts';
import { probabilityOf } from './plan-context.ts';
import type { PlanContext } from './plan-context.ts';

/**
 * Probability that a frame is lost: as given, else from the received level over its length, else assumed.
 *
 * @param context Gets the figure and a caution where it is assumed.
 * @param phy The PHY.
 * @param psduOctets Length of the frame, octets.
 * @returns The probability.
 * @throws OutOfRangeError code `out-of-range` outside 0 to 1.
 * @example frameLossOf(context, phy, 127)
 */
export function frameLossOf(context: PlanContext, _phy: Phy, _psduOctets: number): number {
  const { frameErrorRate: quantity } = context.link;
  return probabilityOf(context, 'frameErrorRate', { quantity, field: 'link.frameErrorRate' });
}

/**
 * Probability that an acknowledgement is lost; as `frameLossOf`.
 *
 * @param context Gets the figure and a caution where it is assumed.
 * @param phy The PHY.
 * @param psduOctets Length of the acknowledgement, octets.
 * @returns The probability.
 * @throws OutOfRangeError code `out-of-range` outside 0 to 1.
 * @example ackLossOf(context, phy, 5)
 */
export function ackLossOf(context: PlanContext, _phy: Phy, _psduOctets: number): number {
  const { ackErrorRate: quantity } = context.link;
  return probabilityOf(context, 'ackErrorRate', { quantity, field: 'link.ackErrorRate' });
}
