import type { PhyId } from '../scenario/scenario.types.ts';

/** Constants of a physical layer whose source `Phy.sources` tells. */
export type PhyConstant =
  | 'bitRateBps'
  | 'bitsPerSymbol'
  | 'macSymbolS'
  | 'shrOctets'
  | 'phrOctets'
  | 'maxPsduOctets'
  | 'turnaroundS'
  | 'ccaS'
  | 'unitBackoffS'
  | 'ackWaitS'
  | 'sifsS'
  | 'lifsS';

/**
 * A physical layer. Bit time, data symbol time and the symbol that the MAC counts in are fields of their own: at 250 kbit/s
 * one bit lasts 4 µs, an O-QPSK symbol of four bits 16 µs, and SUN FSK counts MAC times in 20 µs at every rate.
 * A constant that no source gives is null, never a guess.
 */
export interface Phy {
  id: PhyId | 'custom';
  bitRateBps: number;
  bitsPerSymbol: number;
  /** Time of one data bit, s. */
  bitS: number;
  /** Time of one data symbol, s. */
  symbolS: number;
  /** Symbol time that MAC constants count in, s. */
  macSymbolS: number;
  /** Data symbols per octet. */
  symbolsPerOctet: number;
  /** Synchronisation header: preamble and start-of-frame delimiter. */
  shrOctets: number | null;
  /** PHY header. */
  phrOctets: number | null;
  /** Longest PSDU, FCS counted. */
  maxPsduOctets: number | null;
  /** Time from reception to transmission or back, s. */
  turnaroundS: number | null;
  /** One clear-channel assessment, s. */
  ccaS: number | null;
  /** Backoff unit, s. */
  unitBackoffS: number | null;
  /** Wait for an acknowledgement from the last bit of the frame (macAckWaitDuration), s. */
  ackWaitS: number | null;
  /** Interframe space after an MPDU of at most 18 octets, s. */
  sifsS: number | null;
  /** Interframe space after a longer MPDU, s. */
  lifsS: number | null;
  /** Where each constant comes from; where sources disagree, which one was taken and why. */
  sources: Readonly<Record<PhyConstant, string>>;
}
