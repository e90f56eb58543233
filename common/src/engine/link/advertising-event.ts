import { requireNumber } from './checks.ts';

export type AdvertisingPhy = '1M' | '2M' | 'coded-s8' | 'coded-s2';

/** Advertiser's address in each advertising packet, octets. */
const ADDRESS_OCTETS = 6;
const HEADER_OCTETS = 2;
const CRC_OCTETS = 3;
const ACCESS_ADDRESS_OCTETS = 4;
/** Coded PHY: preamble 80 µs, then block 1 at eight symbols a bit: access address 256 µs, coding indicator 16, end 24. */
const CODED_START_US = 80 + 256 + 16 + 24;
const CODED_END_BITS = 3;

/** Time on air of an uncoded packet's octet, µs, and its preamble, octets. */
const UNCODED = { '1M': { octetUs: 8, preambleOctets: 1 }, '2M': { octetUs: 4, preambleOctets: 2 } } as const;
/** Time of one bit in block 2 of the coded PHY, µs. */
const CODED_BIT_US = { 'coded-s8': 8, 'coded-s2': 2 } as const;

/**
 * Time on air of one packet of a 2.4 GHz connectionless or connected link.
 *
 * Source: Zephyr subsys/bluetooth/controller/ll_sw/pdu.h @01006be (cites Bluetooth Core 5.1 Vol 6 Part B 2.1, 2.2).
 *
 * @param phy Physical layer.
 * @param payloadOctets Payload without header, integrity code and CRC; whole, 0 to 255.
 * @param micOctets Message integrity code, octets; 0 or 4, default 0.
 * @returns Time on air, s.
 * @throws OutOfRangeError code `out-of-range` for octets outside their range.
 * @example advertisingPacketS('1M', 37) // 0.000376
 */
export function advertisingPacketS(phy: AdvertisingPhy, payloadOctets: number, micOctets = 0): number {
  requireNumber(payloadOctets, { field: 'payloadOctets', min: 0, max: 255, whole: true, unit: 'octets' });
  requireNumber(micOctets, { field: 'micOctets', min: 0, max: 4, whole: true, unit: 'octets' });
  const octets = HEADER_OCTETS + payloadOctets + micOctets + CRC_OCTETS;
  if (phy === 'coded-s8' || phy === 'coded-s2') {
    return (CODED_START_US + CODED_BIT_US[phy] * (8 * octets + CODED_END_BITS)) / 1e6;
  }
  const { octetUs, preambleOctets } = UNCODED[phy];
  return (octetUs * (preambleOctets + ACCESS_ADDRESS_OCTETS + octets)) / 1e6;
}

/** One advertising event: the same packet on each channel in turn. */
export interface AdvertisingEventInput {
  phy: AdvertisingPhy;
  /** Advertising data beside the 6-octet address; whole, 0 to 249. */
  dataOctets: number;
  /** 1 to 3. */
  channels: number;
}

/**
 * Time on air of a connectionless advertising event. The payload is the 6-octet address and the data on every PHY.
 *
 * Source: as `advertisingPacketS`; channels 37, 38, 39.
 *
 * @param input PHY, data octets, number of channels.
 * @returns Time of one packet and of all packets of the event, s.
 * @throws OutOfRangeError code `out-of-range` for data or channels outside their range.
 * @example advertisingEvent({ phy: '1M', dataOctets: 31, channels: 3 }) // { packetS: 0.000376, transmitS: 0.001128 }
 */
export function advertisingEvent(input: AdvertisingEventInput): { packetS: number; transmitS: number } {
  const { phy, dataOctets, channels } = input;
  const max = 255 - ADDRESS_OCTETS;
  requireNumber(dataOctets, { field: 'dataOctets', min: 0, max, whole: true, unit: 'octets' });
  requireNumber(channels, { field: 'channels', min: 1, max: 3, whole: true });
  const packetS = advertisingPacketS(phy, ADDRESS_OCTETS + dataOctets);
  return { packetS, transmitS: Math.round(packetS * 1e6 * channels) / 1e6 };
}

/** Time between two packets of one exchange on one channel (T_IFS), s. */
export const ADVERTISING_SPACE_S = 150e-6;
/** Most that T_IFS may be off, s. */
const SPACE_TOLERANCE_S = 2e-6;
/** Unit in which the advertising interval is set, s. */
export const ADVERTISING_INTERVAL_UNIT_S = 625e-6;
/** Random delay added to each interval, s: anything from 0 to this. */
const LONGEST_DELAY_S = 0.01;
/** A scan request carries two addresses. */
const SCAN_REQUEST_OCTETS = 2 * ADDRESS_OCTETS;

/**
 * Time between the starts of two advertising events: the interval and a random delay of 0 to 10 ms.
 *
 * Source: Bluetooth Core Vol 6 Part B 4.4.2 (from memory).
 *
 * @param intervalS Advertising interval, s, 0 or more; a multiple of 0.625 ms on the air.
 * @returns Shortest, mean and longest time, s.
 * @throws OutOfRangeError code `out-of-range` for a negative interval.
 * @example advertisingPeriodS(0.02).meanS // 0.025
 */
export function advertisingPeriodS(intervalS: number): { shortestS: number; meanS: number; longestS: number } {
  requireNumber(intervalS, { field: 'intervalS', min: 0, unit: 's' });
  return { shortestS: intervalS, meanS: intervalS + LONGEST_DELAY_S / 2, longestS: intervalS + LONGEST_DELAY_S };
}

/** An advertising event after each packet of which a scanner may ask for more. */
export interface ScannableEventInput extends AdvertisingEventInput {
  /** Data of the scan response beside the 6-octet address; whole, 0 to 249. */
  responseDataOctets: number;
  /** Share of channels on which a scanner asks; 0 to 1. */
  scanRequestProbability: number;
}

/** Times of an advertising event with scan responses, all channels together, s. */
export interface ScannableEvent {
  packetS: number;
  requestS: number;
  responseS: number;
  transmitS: number;
  /** Receiver on without a request. */
  listenS: number;
  receiveS: number;
  /** Spaces between packets, synthesiser on. */
  spaceS: number;
  meanS: number;
  worst: { transmitS: number; listenS: number; receiveS: number; spaceS: number; durationS: number };
}

/**
 * Time of a scannable advertising event. After each packet follows one space of 150 µs; then the receiver listens for
 * preamble and access address of a request, and 2 µs more for the tolerance of the space. A request is received whole and,
 * one space later, answered.
 *
 * Source: as `advertisingPacketS`; T_IFS and its tolerance from Zephyr subsys/bluetooth/controller/ll_sw/pdu.h @01006be.
 * Valid for: requests and responses on the advertising channels (1M); ramp-up is a transition of the radio and not in here.
 *
 * @param input PHY, data octets, channels, response, share of channels with a request.
 * @returns Mean times and the longest, which answers on every channel, s.
 * @throws OutOfRangeError code `out-of-range` for a figure outside its range.
 * @example scannableEvent({ phy: '1M', dataOctets: 31, channels: 3, responseDataOctets: 31, scanRequestProbability: 0 }).listenS
 *   // 0.000126
 */
export function scannableEvent(input: ScannableEventInput): ScannableEvent {
  const { phy, channels, responseDataOctets, scanRequestProbability: asked } = input;
  const max = 255 - ADDRESS_OCTETS;
  requireNumber(responseDataOctets, { field: 'responseDataOctets', min: 0, max, whole: true, unit: 'octets' });
  requireNumber(asked, { field: 'scanRequestProbability', min: 0, max: 1 });
  const { packetS, transmitS } = advertisingEvent(input);
  const requestS = advertisingPacketS(phy, SCAN_REQUEST_OCTETS);
  const responseS = advertisingPacketS(phy, ADDRESS_OCTETS + responseDataOctets);
  const waitS = detectionS(phy) + SPACE_TOLERANCE_S;
  const at = (share: number) => ({
    transmitS: transmitS + channels * share * responseS,
    listenS: channels * (1 - share) * waitS,
    receiveS: channels * share * requestS,
    spaceS: channels * (1 + share) * ADVERTISING_SPACE_S,
  });
  const sum = (times: ReturnType<typeof at>): number => times.transmitS + times.listenS + times.receiveS + times.spaceS;
  const mean = at(asked);
  const all = at(1);
  return {
    packetS,
    requestS,
    responseS,
    ...mean,
    meanS: sum(mean),
    // Without any request the receiver listens longest; with one on each channel the event lasts longest.
    worst: { ...all, listenS: at(0).listenS, durationS: sum(all) },
  };
}

/** Preamble and access address of a packet, s. */
function detectionS(phy: AdvertisingPhy): number {
  if (phy === 'coded-s8' || phy === 'coded-s2') return (80 + 256) / 1e6;
  const { octetUs, preambleOctets } = UNCODED[phy];
  return (octetUs * (preambleOctets + ACCESS_ADDRESS_OCTETS)) / 1e6;
}
