import { requireNumber } from './checks.ts';

/** Symbol time from which the modems' low-data-rate optimisation is on, s. No standard setting lies at exactly 16 ms. */
const LOW_DATA_RATE_FROM_S = 0.016;

/** Settings of a chirp-spread-spectrum frame. */
export interface ChirpInput {
  /** 7 to 12. */
  spreadingFactor: number;
  bandwidthHz: number;
  /** 1 to 4 for 4/5 to 4/8. */
  codingRate: number;
  preambleSymbols: number;
  /** PHY payload, octets. */
  payloadOctets: number;
  implicitHeader: boolean;
  crc: boolean;
  lowDataRateOptimisation: boolean;
}

/**
 * Whether low-data-rate optimisation is due: from a symbol time of 16 ms on.
 *
 * Source: signetlabdei/lorawan class-a-end-device-lorawan-mac.cc @82ea58a.
 *
 * @param spreadingFactor 7 to 12.
 * @param bandwidthHz Bandwidth, Hz, above 0.
 * @returns Whether it is due.
 * @example isLowDataRate(12, 125_000) // true
 */
export function isLowDataRate(spreadingFactor: number, bandwidthHz: number): boolean {
  return 2 ** spreadingFactor / bandwidthHz >= LOW_DATA_RATE_FROM_S;
}

/**
 * Time on air of a chirp-spread-spectrum frame.
 *
 * `T = (n_pre + 4.25)·Ts + Ts·(8 + max(⌈(8PL − 4SF + 28 + 16CRC − 20IH)/(4(SF − 2DE))⌉·(CR + 4), 0))`, `Ts = 2^SF/BW`;
 * PL payload octets, SF spreading factor, IH 1 without header, DE 1 with low-data-rate optimisation, CR coding rate.
 *
 * Source: ns-3 module signetlabdei/lorawan model/lora-phy.cc @82ea58a.
 * Valid for: spreading factors 7 to 12; 5 and 6 differ in newer modems.
 *
 * @param input Modem settings; every field is needed.
 * @returns Time on air, s.
 * @throws OutOfRangeError code `out-of-range` for a setting outside its range.
 * @example chirpAirtimeS({ spreadingFactor: 7, bandwidthHz: 125_000, codingRate: 1, preambleSymbols: 8, payloadOctets: 10,
 *   implicitHeader: false, crc: true, lowDataRateOptimisation: false }) // 0.041216
 */
export function chirpAirtimeS(input: ChirpInput): number {
  const { spreadingFactor, bandwidthHz, codingRate, preambleSymbols, payloadOctets } = input;
  requireNumber(spreadingFactor, { field: 'spreadingFactor', min: 7, max: 12, whole: true });
  requireNumber(bandwidthHz, { field: 'bandwidthHz', min: Number.MIN_VALUE, unit: 'Hz' });
  requireNumber(codingRate, { field: 'codingRate', min: 1, max: 4, whole: true });
  requireNumber(preambleSymbols, { field: 'preambleSymbols', min: 0, whole: true, unit: 'symbols' });
  requireNumber(payloadOctets, { field: 'payloadOctets', min: 0, whole: true, unit: 'octets' });
  const bits = 8 * payloadOctets - 4 * spreadingFactor + 28 + (input.crc ? 16 : 0) - (input.implicitHeader ? 20 : 0);
  const bitsPerBlock = 4 * (spreadingFactor - (input.lowDataRateOptimisation ? 2 : 0));
  const payloadSymbols = 8 + Math.max(Math.ceil(bits / bitsPerBlock) * (codingRate + 4), 0);
  return ((preambleSymbols + 4.25 + payloadSymbols) * 2 ** spreadingFactor) / bandwidthHz;
}

/**
 * PHY payload of an uplink of the common public network protocol: header 1, address 4, control 1, counter 2, options, port 1,
 * application's octets, integrity code 4.
 *
 * Source: LoRaWAN 1.0.x frame format (from memory).
 *
 * @param applicationOctets The application's payload, octets; whole, 0 or more.
 * @param optionOctets Frame options; whole, 0 to 15, default 0.
 * @returns PHY payload, octets.
 * @throws OutOfRangeError code `out-of-range` for octets outside their range.
 * @example networkPayloadOctets(24) // 37
 */
export function networkPayloadOctets(applicationOctets: number, optionOctets = 0): number {
  requireNumber(applicationOctets, { field: 'applicationOctets', min: 0, whole: true, unit: 'octets' });
  requireNumber(optionOctets, { field: 'optionOctets', min: 0, max: 15, whole: true, unit: 'octets' });
  return 1 + 4 + 1 + 2 + optionOctets + 1 + applicationOctets + 4;
}
