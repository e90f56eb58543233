import type { ExchangePattern } from '#common/engine/scenario/scenario.types.ts';
import {
  countOf,
  OCTETS,
  PERIOD,
  PROBABILITY,
  STEP_TIME,
} from '#frontend/features/scenario-editor/model/figure-options.ts';
import type { FieldDescriptor } from './field-descriptor.ts';
import type { LinkSectionId } from './link-fields.table.ts';

export type PatternId = ExchangePattern['pattern'];

/** An exchange as the builder offers it. */
export interface ExchangeKind {
  label: string;
  group: string;
  /** What happens in it, in a sentence. */
  note: string;
  /** What it begins with. */
  start: ExchangePattern;
  fields: readonly FieldDescriptor[];
  /** Sections of the link settings that it heeds. */
  link: readonly LinkSectionId[];
}

const PAYLOAD: FieldDescriptor = {
  type: 'figure',
  key: 'payloadOctets',
  label: 'Payload',
  hint: 'an octet is a byte',
  options: OCTETS,
  isOptional: true,
};
const PSDU: FieldDescriptor = {
  type: 'figure',
  key: 'psduOctets',
  label: 'or whole frame (PSDU)',
  hint: 'FCS included',
  options: OCTETS,
  isOptional: true,
};
const ACK: FieldDescriptor = {
  type: 'figure',
  key: 'ackPsduOctets',
  label: 'Acknowledgement',
  hint: 'PSDU; empty: the usual one',
  options: OCTETS,
  isOptional: true,
};
const SIZE = [PAYLOAD, PSDU] as const;

const figure = (
  key: string,
  label: string,
  more: Omit<Extract<FieldDescriptor, { type: 'figure' }>, 'type' | 'key' | 'label'>,
): FieldDescriptor => ({ type: 'figure', key, label, ...more });
const yesOrNo = (
  key: string,
  label: string,
  absent: string,
  words: readonly [string, string] = ['yes', 'no'],
): FieldDescriptor => ({
  type: 'choice',
  key,
  label,
  absent,
  choices: [
    { value: true, label: words[0] },
    { value: false, label: words[1] },
  ],
});

const CHANNEL_ACCESS: readonly LinkSectionId[] = ['phy', 'frame', 'channel', 'access', 'crystal', 'region'];
const FRAME_ONLY: readonly LinkSectionId[] = ['phy', 'frame', 'crystal', 'region'];
const LISTENING: readonly LinkSectionId[] = ['phy', 'crystal'];

const REPORTS = 'Reports';
const POLLING = 'Polling and beacons';
const SLOTS = 'Slots and sampling';
const OTHERS = 'From and for others';
const LONG = 'Long range and advertising';
const SCANS = 'Scan';

/** Every exchange with its fields; the order is that of the choice. */
export const EXCHANGES: Readonly<Record<PatternId, ExchangeKind>> = {
  acknowledged: {
    label: 'acknowledged report',
    group: REPORTS,
    note: 'Waits for a clear channel, sends the frame and listens for the acknowledgement; repeated where none comes.',
    start: { pattern: 'acknowledged', payloadOctets: 24 },
    fields: [...SIZE, ACK],
    link: CHANNEL_ACCESS,
  },
  unacknowledged: {
    label: 'unacknowledged report',
    group: REPORTS,
    note: 'Waits for a clear channel and sends the frame once; nobody answers.',
    start: { pattern: 'unacknowledged', payloadOctets: 24 },
    fields: SIZE,
    link: CHANNEL_ACCESS,
  },
  'listen-before-talk': {
    label: 'report on the next channel when one is busy',
    group: REPORTS,
    note: 'Where a channel stays busy the radio retunes to the next one of the list and tries again there.',
    start: { pattern: 'listen-before-talk', payloadOctets: 24, channels: 3, retuneS: 0.000192 },
    fields: [
      ...SIZE,
      ACK,
      figure('channels', 'Channels', { options: countOf(1, 1024), hint: 'of the list, in turn' }),
      figure('retuneS', 'Retuning takes', { options: STEP_TIME }),
    ],
    link: CHANNEL_ACCESS,
  },
  frame: {
    label: 'one frame, airtime alone',
    group: REPORTS,
    note: 'The time of the frame on air in the state that the step names; no channel access, no acknowledgement.',
    start: { pattern: 'frame', payloadOctets: 24 },
    fields: SIZE,
    link: FRAME_ONLY,
  },
  poll: {
    label: 'poll of the parent',
    group: POLLING,
    note: 'A data request; where the parent holds a message, the receiver stays on until it comes.',
    start: { pattern: 'poll', pendingProbability: { typical: 0.1, provenance: { kind: 'assumed' } } },
    fields: [
      {
        type: 'quantity',
        key: 'pendingProbability',
        label: 'A message is waiting',
        options: PROBABILITY,
      },
      figure('responsePsduOctets', 'Its frame (PSDU)', { options: OCTETS, isOptional: true, hint: 'FCS included' }),
      figure('responseDelayS', 'It comes after', {
        options: STEP_TIME,
        isOptional: true,
        hint: 'empty: the parent’s channel access',
      }),
      figure('waitS', 'Longest wait for it', {
        options: STEP_TIME,
        isOptional: true,
        hint: 'empty: macMaxFrameTotalWaitTime',
      }),
      figure('dataRequestOctets', 'Data request (PSDU)', {
        options: OCTETS,
        isOptional: true,
        hint: 'empty: from the frame format',
      }),
    ],
    link: CHANNEL_ACCESS,
  },
  beacon: {
    label: 'beacon of a superframe, tracked',
    group: POLLING,
    note: 'The receiver is up in time for the beacon, guard time included, and may stay for the contention period.',
    start: { pattern: 'beacon', beaconOrder: 6, superframeOrder: 3, beaconPsduOctets: 20 },
    fields: [
      figure('beaconOrder', 'Beacon order', { options: countOf(0, 14), hint: 'the interval doubles with each' }),
      figure('superframeOrder', 'Superframe order', { options: countOf(0, 14), hint: 'at most the beacon order' }),
      figure('beaconPsduOctets', 'Beacon (PSDU)', { options: OCTETS, hint: 'FCS included' }),
      {
        type: 'quantity',
        key: 'missedBeaconProbability',
        label: 'Beacon missed',
        hint: 'empty: assumed',
        options: PROBABILITY,
        isOptional: true,
      },
      figure('contentionS', 'Stays on afterwards', { options: STEP_TIME, isOptional: true, hint: 'empty: not at all' }),
    ],
    link: ['phy', 'channel', 'crystal', 'region'],
  },
  slot: {
    label: 'slot of a channel-hopping network',
    group: SLOTS,
    note: 'One slot of the template of times: something is sent, something is received, or nothing comes.',
    start: { pattern: 'slot', slotUse: 'transmit', psduOctets: 60 },
    fields: [
      {
        type: 'choice',
        key: 'slotUse',
        label: 'Used to',
        choices: [
          { value: 'transmit', label: 'transmit' },
          { value: 'receive', label: 'receive' },
          { value: 'idle-listen', label: 'listen in vain' },
        ],
      },
      figure('psduOctets', 'Frame (PSDU)', { options: OCTETS, isOptional: true, hint: 'FCS included' }),
      ACK,
      yesOrNo('shared', 'Shared with others', 'no'),
      {
        type: 'choice',
        key: 'template',
        label: 'Template of times',
        absent: 'that of the PHY',
        choices: [
          { value: 'oqpsk-10-ms', label: '10 ms, O-QPSK' },
          { value: 'oqpsk-15-ms', label: '15 ms, O-QPSK' },
          { value: 'sun-fsk-50-40-ms', label: '40 ms, SUN FSK 50 kbit/s' },
        ],
      },
    ],
    link: CHANNEL_ACCESS,
  },
  'sampled-listener': {
    label: 'sampled listening, the listener',
    group: SLOTS,
    note: 'The receiver looks at the channel for a moment each period and sleeps on where nothing is to be heard.',
    start: { pattern: 'sampled-listener', periodUnits: 3125, sampleS: 0.002 },
    fields: [
      figure('periodUnits', 'Sampling period', { options: countOf(1, 65_535), hint: 'units of 10 symbols' }),
      figure('sampleS', 'One look takes', { options: STEP_TIME }),
    ],
    link: LISTENING,
  },
  'sampled-sender': {
    label: 'sampled listening, the sender',
    group: SLOTS,
    note: 'Wake-up frames one after the other until the listener must have looked, then the frame itself.',
    start: { pattern: 'sampled-sender', periodUnits: 3125, psduOctets: 60, synchronised: false },
    fields: [
      figure('periodUnits', 'Listener’s period', { options: countOf(1, 65_535), hint: 'units of 10 symbols' }),
      figure('psduOctets', 'Frame (PSDU)', { options: OCTETS, hint: 'FCS included' }),
      yesOrNo('synchronised', 'Knows when the listener looks', 'no'),
    ],
    link: CHANNEL_ACCESS,
  },
  guard: {
    label: 'expected frame, with guard time',
    group: SLOTS,
    note: 'Both clocks have drifted since they last met, so the receiver is up earlier and later than agreed.',
    start: { pattern: 'guard', intervalS: 60 },
    fields: [
      figure('intervalS', 'Since clocks last met', { options: PERIOD }),
      figure('jitterS', 'Jitter of the start', { options: STEP_TIME, isOptional: true, hint: 'empty: none' }),
      figure('psduOctets', 'Frame (PSDU)', { options: OCTETS, isOptional: true, hint: 'empty: none comes' }),
    ],
    link: LISTENING,
  },
  receive: {
    label: 'frame received',
    group: OTHERS,
    note: 'The receiver waits for a frame and acknowledges it.',
    start: { pattern: 'receive', payloadOctets: 24 },
    fields: [
      ...SIZE,
      ACK,
      figure('listenS', 'Listens before it', { options: STEP_TIME, isOptional: true, hint: 'empty: not at all' }),
    ],
    link: CHANNEL_ACCESS,
  },
  forward: {
    label: 'frame forwarded',
    group: OTHERS,
    note: 'A frame is received, acknowledged and sent on to the next node.',
    start: { pattern: 'forward', payloadOctets: 24 },
    fields: [...SIZE, ACK],
    link: CHANNEL_ACCESS,
  },
  overhear: {
    label: 'frame overheard',
    group: OTHERS,
    note: 'A frame for somebody else, received in full or up to the address.',
    start: { pattern: 'overhear', payloadOctets: 24 },
    fields: [...SIZE, yesOrNo('stopsAfterHeader', 'Receives', 'all of it', ['up to the address', 'all of it'])],
    link: FRAME_ONLY,
  },
  chirp: {
    label: 'chirp spread-spectrum uplink',
    group: LONG,
    note: 'One long frame and, where they are given, windows in which an answer may come.',
    start: { pattern: 'chirp', spreadingFactor: 9, bandwidthHz: 125_000, codingRate: 1, payloadOctets: 25 },
    fields: [
      {
        ...PAYLOAD,
        label: 'Payload with headers',
        type: 'figure',
        options: OCTETS,
        isOptional: false,
      },
      figure('spreadingFactor', 'Spreading factor', { options: countOf(7, 12) }),
      {
        type: 'choice',
        key: 'bandwidthHz',
        label: 'Bandwidth',
        choices: [
          { value: 125_000, label: '125 kHz' },
          { value: 250_000, label: '250 kHz' },
          { value: 500_000, label: '500 kHz' },
        ],
      },
      {
        type: 'choice',
        key: 'codingRate',
        label: 'Coding rate',
        choices: [
          { value: 1, label: '4/5' },
          { value: 2, label: '4/6' },
          { value: 3, label: '4/7' },
          { value: 4, label: '4/8' },
        ],
      },
      figure('preambleSymbols', 'Preamble', {
        options: countOf(0, 65_535),
        isOptional: true,
        hint: 'symbols; empty: 8',
      }),
      yesOrNo('implicitHeader', 'Header', 'explicit', ['implicit', 'explicit']),
      yesOrNo('crc', 'Check octets (CRC)', 'yes'),
      yesOrNo('lowDataRateOptimisation', 'Low data rate optimisation', 'from 16 ms a symbol on'),
    ],
    link: ['crystal', 'region'],
  },
  advertising: {
    label: 'advertising event, 2.4 GHz',
    group: LONG,
    note: 'The same short packet on up to three channels; with a scan response the receiver listens after each.',
    start: { pattern: 'advertising', advertisingPhy: '1M', dataOctets: 24, channels: 3 },
    fields: [
      figure('dataOctets', 'Data', { options: OCTETS, hint: 'an octet is a byte' }),
      {
        type: 'choice',
        key: 'advertisingPhy',
        label: 'PHY',
        choices: [
          { value: '1M', label: '1 Mbit/s' },
          { value: '2M', label: '2 Mbit/s' },
          { value: 'coded-s2', label: 'coded, S = 2' },
          { value: 'coded-s8', label: 'coded, S = 8' },
        ],
      },
      figure('channels', 'Channels', { options: countOf(1, 3) }),
      yesOrNo('scanResponse', 'Scan response', 'no'),
      {
        type: 'quantity',
        key: 'scanRequestProbability',
        label: 'Somebody asks for it',
        hint: 'empty: assumed',
        options: PROBABILITY,
        isOptional: true,
      },
    ],
    link: ['crystal'],
  },
  scan: {
    label: 'scan of channels',
    group: SCANS,
    note: 'The receiver stays on each channel in turn, to find a parent or to see how busy it is.',
    start: { pattern: 'scan', channels: 16, scanDuration: 3, retuneS: 0.000192 },
    fields: [
      figure('channels', 'Channels', { options: countOf(1, 1024) }),
      figure('scanDuration', 'ScanDuration', { options: countOf(0, 14), hint: 'exponent of the time on each' }),
      figure('retuneS', 'Retuning takes', { options: STEP_TIME }),
    ],
    link: LISTENING,
  },
};
