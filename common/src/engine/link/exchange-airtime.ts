import { InconsistentInputError } from '#common/errors.ts';
import type { ExchangeDuration, LinkSettings } from '../scenario/scenario.types.ts';
import { advertisingEvent } from './advertising-event.ts';
import { chirpAirtimeS, isLowDataRate } from './chirp-airtime.ts';
import { frameAirtimeS } from './frame-airtime.ts';
import { macHeader } from './mac-header.ts';
import { phyOf } from './phy-of.ts';
import type { Phy } from './phy.types.ts';

/** Airtime of an exchange's main frame, and what of the exchange it leaves out. */
export interface ExchangeAirtime {
  airtimeS: number;
  /** What is not counted, in words; null where the airtime is the whole exchange. */
  notCounted: string | null;
}

type FramePattern = Exclude<
  ExchangeDuration['pattern'],
  'chirp' | 'advertising' | 'poll' | 'beacon' | 'sampled-listener' | 'guard' | 'scan'
>;

/** Size of a frame as a step gives it. */
interface FrameSize {
  payloadOctets?: number;
  psduOctets?: number;
}

/** What the airtime of the main frame leaves out, by pattern. */
const NOT_COUNTED: Readonly<Record<FramePattern, string | null>> = {
  frame: null,
  acknowledged: 'channel access, acknowledgement and retries',
  unacknowledged: 'channel access',
  'listen-before-talk': 'listening, channel changes, acknowledgement and retries',
  slot: 'the rest of the slot',
  'sampled-sender': 'wake-up frames and channel access',
  receive: 'listening and acknowledgement',
  forward: 'reception, channel access, acknowledgements and retries',
  overhear: null,
};

/** A command frame's identifier, octets. */
const COMMAND_OCTETS = 1;
/** Preamble of a chirp frame where the step gives none, symbols: that of the common public network protocol. */
const CHIRP_PREAMBLE_SYMBOLS = 8;

/**
 * Time on air of an exchange's main frame: the one sent, in a receiving slot the one received, of a poll the data request,
 * of an advertising event all its packets.
 *
 * Frame sizes: `psduOctets` where given, else payload and frame format by `macHeader`. Frame format defaults: version 2006,
 * short addresses, PAN compression, FCS 2 octets (4 on SUN FSK, whose macFcsType defaults to 0). Chirp defaults: 8 preamble
 * symbols, header and CRC sent, low-data-rate optimisation from 16 ms a symbol.
 *
 * @param exchange The exchange step's duration.
 * @param link Its link settings, defaults of the node filled in.
 * @returns Airtime, s, unrounded, and what it leaves out.
 * @throws InconsistentInputError code `no-frame` for an exchange without a frame of its own, `phy-missing`,
 *   `frame-size-missing`, or what `frameAirtimeS` and `macHeader` throw; fields are relative to the exchange.
 * @throws OutOfRangeError for figures outside their range, such as a frame that is too long.
 * @example exchangeAirtime({ kind: 'exchange', pattern: 'frame', psduOctets: 5 }, { phy: 'oqpsk-2450' }).airtimeS // 0.000352
 */
export function exchangeAirtime(exchange: ExchangeDuration, link: LinkSettings): ExchangeAirtime {
  switch (exchange.pattern) {
    case 'chirp':
      return chirp(exchange);
    case 'advertising':
      return advertising(exchange);
    case 'poll':
      return {
        airtimeS: framedS({ psduOctets: exchange.dataRequestOctets, payloadOctets: COMMAND_OCTETS }, link),
        notCounted: 'channel access, acknowledgement and the wait for a response',
      };
    case 'beacon':
      throw noFrame('A beacon-enabled superframe');
    case 'sampled-listener':
      throw noFrame('A sampling listener');
    case 'scan':
      throw noFrame('A scan');
    case 'guard':
      throw noFrame('A guard window');
    default:
      if (exchange.pattern === 'slot' && exchange.slotUse === 'idle-listen') throw noFrame('A slot that only listens');
      return { airtimeS: framedS(exchange, link), notCounted: NOT_COUNTED[exchange.pattern] };
  }
}

function noFrame(what: string): InconsistentInputError {
  return new InconsistentInputError(
    `${what} has no frame of its own whose airtime could be its duration; type the duration.`,
    { code: 'no-frame', field: '', expected: 'a fixed duration' },
  );
}

function chirp(exchange: Extract<ExchangeDuration, { pattern: 'chirp' }>): ExchangeAirtime {
  const { spreadingFactor, bandwidthHz, codingRate, payloadOctets, receiveWindows = [] } = exchange;
  const airtimeS = chirpAirtimeS({
    spreadingFactor,
    bandwidthHz,
    codingRate,
    payloadOctets,
    preambleSymbols: exchange.preambleSymbols ?? CHIRP_PREAMBLE_SYMBOLS,
    implicitHeader: exchange.implicitHeader ?? false,
    crc: exchange.crc ?? true,
    lowDataRateOptimisation: exchange.lowDataRateOptimisation ?? isLowDataRate(spreadingFactor, bandwidthHz),
  });
  return { airtimeS, notCounted: receiveWindows.length > 0 ? 'receive windows' : null };
}

function advertising(exchange: Extract<ExchangeDuration, { pattern: 'advertising' }>): ExchangeAirtime {
  const { advertisingPhy: phy, dataOctets, channels, scanResponse = false } = exchange;
  const { transmitS } = advertisingEvent({ phy, dataOctets, channels });
  return { airtimeS: transmitS, notCounted: scanResponse ? 'listening for and answering scan requests' : null };
}

function framedS(size: FrameSize, link: LinkSettings): number {
  if (link.phy === undefined) {
    throw new InconsistentInputError('The airtime of a frame needs a PHY; choose one for the step or the node.', {
      code: 'phy-missing',
      field: 'link.phy',
      expected: 'a PHY preset or a PHY of your own',
    });
  }
  const phy = phyOf(link.phy);
  const { preambleOctets, forwardErrorCorrection } = link;
  return frameAirtimeS(phy, psduOctetsOf(phy, size, link), { preambleOctets, forwardErrorCorrection });
}

function psduOctetsOf(phy: Phy, { payloadOctets, psduOctets }: FrameSize, { frame = {} }: LinkSettings): number {
  if (psduOctets !== undefined) return psduOctets;
  if (payloadOctets === undefined) {
    throw new InconsistentInputError('The frame has no size; give its payload or its PSDU in octets.', {
      code: 'frame-size-missing',
      field: 'payloadOctets',
      unit: 'octets',
      expected: 'payloadOctets or psduOctets',
      relatedFields: ['psduOctets'],
    });
  }
  return macHeader({
    frameVersion: '2006',
    destination: 'short',
    source: 'short',
    panIdCompression: true,
    fcsOctets: phy.id.startsWith('sun-fsk') ? 4 : 2,
    ...frame,
    payloadOctets,
    maxPsduOctets: phy.maxPsduOctets ?? Number.MAX_SAFE_INTEGER,
  }).psduOctets;
}
