import type { SlotTemplateId } from '../scenario/scenario.types.ts';

/** Timing template of a slot, after the attributes macTs… of IEEE 802.15.4-2015; all times in s. */
export interface SlotTemplate {
  id: SlotTemplateId;
  /** Beginning of the slot to the channel assessment, and how long it lasts. */
  ccaOffsetS: number;
  ccaS: number;
  /** Beginning of the slot to the first symbol of the frame's preamble. */
  txOffsetS: number;
  /** Beginning of the slot to the receiver's window, and how long it waits for a frame. */
  rxOffsetS: number;
  rxWaitS: number;
  /** End of the frame to the sender's window for the acknowledgement, and how long it waits. */
  rxAckDelayS: number;
  ackWaitS: number;
  /** End of the frame to the acknowledgement. */
  txAckDelayS: number;
  rxTxS: number;
  maxAckS: number;
  maxTxS: number;
  slotS: number;
  source: string;
}

/**
 * Conflict: a public PIB header after 802.15.4e gives macTsRxOffset 1120 µs, which puts the window of 2200 µs 100 µs late of
 * the frame's start at 2120 µs; Contiki-NG calls it an error of the standard to be fixed and centres the window by
 * `RxOffset = TxOffset − RxWait/2`, 1020 µs in the template of 10 ms, and a public template class after 802.15.4-2015 has 1020
 * too. The centred window is taken in all templates.
 */
export const SLOT_TEMPLATE_CONFLICT =
  'macTsRxOffset: 1120 µs in an 802.15.4e PIB header, 1020 µs in Contiki-NG and in a public 802.15.4-2015 template class; the window centred on the frame is taken. macTsTxOffset marks the first preamble symbol here; one source reads it as the end of the start-of-frame delimiter, which moves the frame by its synchronisation header';

type Row = Record<
  'cca' | 'ccaOffset' | 'txOffset' | 'rxWait' | 'rxAckDelay' | 'ackWait' | 'txAckDelay' | 'rxTx' | 'maxAck' | 'maxTx',
  number
> & { slot: number; source: string };

/** Columns in µs. */
function template(id: SlotTemplateId, row: Row): SlotTemplate {
  return {
    id,
    ccaOffsetS: row.ccaOffset / 1e6,
    ccaS: row.cca / 1e6,
    txOffsetS: row.txOffset / 1e6,
    rxOffsetS: (row.txOffset - row.rxWait / 2) / 1e6,
    rxWaitS: row.rxWait / 1e6,
    rxAckDelayS: row.rxAckDelay / 1e6,
    ackWaitS: row.ackWait / 1e6,
    txAckDelayS: row.txAckDelay / 1e6,
    rxTxS: row.rxTx / 1e6,
    maxAckS: row.maxAck / 1e6,
    maxTxS: row.maxTx / 1e6,
    slotS: row.slot / 1e6,
    source: row.source,
  };
}

/** The templates by id. */
export const slotTemplates: Readonly<Record<SlotTemplateId, SlotTemplate>> = {
  'oqpsk-10-ms': template('oqpsk-10-ms', {
    ccaOffset: 1800,
    cca: 128,
    txOffset: 2120,
    rxWait: 2200,
    rxAckDelay: 800,
    ackWait: 400,
    txAckDelay: 1000,
    rxTx: 192,
    maxAck: 2400,
    maxTx: 4256,
    slot: 10_000,
    source: `Contiki-NG os/net/mac/tsch/tsch-timeslot-timing.c @0163ca8. ${SLOT_TEMPLATE_CONFLICT}`,
  }),
  'oqpsk-15-ms': template('oqpsk-15-ms', {
    ccaOffset: 1800,
    cca: 128,
    txOffset: 4000,
    rxWait: 2200,
    rxAckDelay: 3600,
    ackWait: 800,
    txAckDelay: 4000,
    rxTx: 2072,
    maxAck: 2400,
    maxTx: 4256,
    slot: 15_000,
    source: `Contiki-NG slot template of 15 ms for slower radios @9f80681. ${SLOT_TEMPLATE_CONFLICT}`,
  }),
  'sun-fsk-50-40-ms': template('sun-fsk-50-40-ms', {
    ccaOffset: 1800,
    cca: 128,
    txOffset: 2500,
    rxWait: 2200,
    rxAckDelay: 2000,
    ackWait: 3000,
    txAckDelay: 3000,
    rxTx: 192,
    maxAck: 10_000,
    maxTx: 21_600,
    slot: 40_000,
    source: `Contiki-NG slot template of 40 ms for 50 kbit/s @fbbf602; another of its 50 kbit/s templates has 31.46 ms. ${SLOT_TEMPLATE_CONFLICT}`,
  }),
};
