import { InconsistentInputError, OutOfRangeError } from '#common/errors.ts';
import type { SlotTemplateId } from '../scenario/scenario.types.ts';
import { requireNumber } from './checks.ts';
import { frameAirtimeS, type FrameAirtimeOptions } from './frame-airtime.ts';
import type { Phy } from './phy.types.ts';
import { slotTemplates, type SlotTemplate } from './slot-templates.table.ts';

/** Times of one slot by what the radio does, s. They add up to the slot. */
export interface SlotTimes {
  transmitS: number;
  /** Receiver on without a frame on the air. */
  listenS: number;
  receiveS: number;
  idleS: number;
}

/** One slot as its node sees it. */
export interface Slot {
  slotS: number;
  templateId: SlotTemplateId;
  mean: SlotTimes;
  /** Longest of each kind; they need not happen together, and idle is what the longest ones leave. */
  worst: SlotTimes;
}

/** What the node does in the slot. `ackPsduOctets` null: nothing acknowledges the frame. */
export type SlotInput = (
  | {
      use: 'transmit';
      psduOctets: number;
      ackPsduOctets: number | null;
      /** Probability that the frame is lost; in a shared slot collisions included. */
      frameErrorRate: number;
      ackErrorRate: number;
      /** Whether the channel is assessed before sending; default false. */
      assesses?: boolean;
    }
  | { use: 'receive'; psduOctets: number; ackPsduOctets: number | null; frameErrorRate: number }
  | { use: 'idle-listen' }
) &
  FrameAirtimeOptions & {
    /** Default: that of the PHY. */
    template?: SlotTemplateId;
  };

/**
 * The template that belongs to a PHY: 10 ms to the 250 kbit/s O-QPSK PHYs, 40 ms to SUN FSK at 50 kbit/s.
 *
 * Source: `slotTemplates`.
 *
 * @param phy A preset or a PHY of one's own.
 * @param id Template that is asked for; default: that of the PHY.
 * @returns The template.
 * @throws InconsistentInputError code `no-slot-template` where the PHY has none and none is asked for.
 * @example slotTemplateOf(phyPresets['oqpsk-2450']).slotS // 0.01
 */
export function slotTemplateOf(phy: Phy, id?: SlotTemplateId): SlotTemplate {
  if (id !== undefined) return slotTemplates[id];
  if (phy.id === 'oqpsk-2450' || phy.id === 'oqpsk-915') return slotTemplates['oqpsk-10-ms'];
  if (phy.id === 'sun-fsk-50') return slotTemplates['sun-fsk-50-40-ms'];
  throw new InconsistentInputError(`The PHY "${phy.id}" has no slot template of its own; choose one.`, {
    code: 'no-slot-template',
    field: 'template',
    expected: Object.keys(slotTemplates).join(', '),
  });
}

/**
 * Times of one slot of time-slotted channel hopping.
 *
 * Transmit: the frame, then listening from `rxAckDelay` after its end; an acknowledgement starts at `txAckDelay`; one that
 * does not come costs `ackWait`. Receive: the window opens at `rxOffset`, the frame comes on average at `txOffset`, at worst
 * at the window's end; then the acknowledgement is sent, unless the frame was lost. Idle listening: the whole window.
 *
 * Source: IEEE 802.15.4-2015 6.5.4 and Figure 6-30 as coded in Contiki-NG os/net/mac/tsch @9f80681; the assessment is off there
 * unless asked for.
 *
 * @param phy A preset or a PHY of one's own.
 * @param input Use of the slot, frame sizes in octets, probabilities 0 to 1, template.
 * @returns Mean and longest times, s.
 * @throws OutOfRangeError code `frame-too-long-for-slot` when frame or acknowledgement exceed what the template holds; code
 *   `out-of-range` for a probability outside 0 to 1.
 * @throws InconsistentInputError code `no-slot-template` as `slotTemplateOf`, and what `frameAirtimeS` throws.
 * @example slot(phyPresets['oqpsk-2450'], { use: 'idle-listen' }).mean.listenS // 0.0022
 */
export function slot(phy: Phy, input: SlotInput): Slot {
  const template = slotTemplateOf(phy, input.template);
  const { mean, worst } = activeTimes(phy, template, input);
  const { slotS, id } = template;
  return { slotS, templateId: id, mean: withIdle(mean, slotS), worst: withIdle(worst, slotS) };
}

type ActiveTimes = Omit<SlotTimes, 'idleS'>;
type MeanAndWorst = { mean: ActiveTimes; worst: ActiveTimes };

function withIdle(times: ActiveTimes, slotS: number): SlotTimes {
  return { ...times, idleS: Math.max(0, slotS - times.transmitS - times.listenS - times.receiveS) };
}

function activeTimes(phy: Phy, template: SlotTemplate, input: SlotInput): MeanAndWorst {
  if (input.use === 'idle-listen') {
    const times = { transmitS: 0, listenS: template.rxWaitS, receiveS: 0 };
    return { mean: times, worst: times };
  }
  requireNumber(input.frameErrorRate, { field: 'frameErrorRate', min: 0, max: 1 });
  const frameS = fittingS(frameAirtimeS(phy, input.psduOctets, input), template.maxTxS, 'psduOctets');
  const ackS =
    input.ackPsduOctets === null
      ? null
      : fittingS(frameAirtimeS(phy, input.ackPsduOctets, input), template.maxAckS, 'ackPsduOctets');
  return input.use === 'transmit'
    ? sent(template, input, { frameS, ackS })
    : received(template, input, { frameS, ackS });
}

interface Airtimes {
  frameS: number;
  ackS: number | null;
}

function sent(
  { ccaS, rxAckDelayS, txAckDelayS, ackWaitS }: SlotTemplate,
  { frameErrorRate, ackErrorRate, assesses = false }: Extract<SlotInput, { use: 'transmit' }>,
  { frameS, ackS }: Airtimes,
): MeanAndWorst {
  requireNumber(ackErrorRate, { field: 'ackErrorRate', min: 0, max: 1 });
  const assessmentS = assesses ? ccaS : 0;
  if (ackS === null) {
    const times = { transmitS: frameS, listenS: assessmentS, receiveS: 0 };
    return { mean: times, worst: times };
  }
  const acknowledged = (1 - frameErrorRate) * (1 - ackErrorRate);
  const aheadS = txAckDelayS - rxAckDelayS;
  return {
    mean: {
      transmitS: frameS,
      listenS: assessmentS + acknowledged * aheadS + (1 - acknowledged) * ackWaitS,
      receiveS: acknowledged * ackS,
    },
    worst: { transmitS: frameS, listenS: assessmentS + Math.max(aheadS, ackWaitS), receiveS: ackS },
  };
}

function received(
  { rxOffsetS, txOffsetS, rxWaitS }: SlotTemplate,
  { frameErrorRate }: Extract<SlotInput, { use: 'receive' }>,
  { frameS, ackS }: Airtimes,
): MeanAndWorst {
  const ackSentS = ackS ?? 0;
  return {
    mean: { transmitS: (1 - frameErrorRate) * ackSentS, listenS: txOffsetS - rxOffsetS, receiveS: frameS },
    worst: { transmitS: ackSentS, listenS: rxWaitS, receiveS: frameS },
  };
}

function fittingS(airtimeS: number, longestS: number, field: 'psduOctets' | 'ackPsduOctets'): number {
  if (airtimeS <= longestS * (1 + 1e-9)) return airtimeS;
  const what = field === 'psduOctets' ? 'frame' : 'acknowledgement';
  const inUs = (timeS: number): number => Math.round(timeS * 1e6);
  throw new OutOfRangeError(
    `The ${what} takes ${inUs(airtimeS)} µs on the air; the slot's template holds ${inUs(longestS)} µs.`,
    {
      code: 'frame-too-long-for-slot',
      field,
      value: airtimeS,
      unit: 's',
      expected: `at most ${inUs(longestS)} µs on the air`,
    },
  );
}
