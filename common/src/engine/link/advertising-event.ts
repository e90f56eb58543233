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
