import { requireNumber } from './checks.ts';
import { frameAirtimeS, type FrameAirtimeOptions } from './frame-airtime.ts';
import type { Phy } from './phy.types.ts';
import { BASE_SUPERFRAME_SYMBOLS } from './superframe.ts';

/** Beacon request: frame control 2, sequence number 1, destination PAN 2, short destination 2, command 1, FCS 2, octets. */
export const BEACON_REQUEST_PSDU_OCTETS = 10;

/** A scan for a parent over a list of channels. */
export interface ScanInput extends FrameAirtimeOptions {
  /** Number of channels, whole, 1 or more. */
  channels: number;
  /** Scan duration n, whole, 0 to 14. */
  scanDuration: number;
  /** Change to the next channel, s. */
  retuneS: number;
  /** Octets of the beacon request sent on each channel of an active scan; null: a passive scan. */
  requestPsduOctets: number | null;
}

/** Times of a scan, all channels together unless said otherwise, s. */
export interface ScanTimes {
  /** Receiver on, one channel. */
  channelS: number;
  listenS: number;
  /** Beacon requests; access to the channel before them is not in here. */
  transmitS: number;
  retuneS: number;
  durationS: number;
}

/**
 * Times of a scan: on each channel one change of channel, the beacon request of an active scan, then the receiver on for
 * `aBaseSuperframeDuration · (2^n + 1)` MAC symbols.
 *
 * Source: IEEE 802.15.4-2006 7.5.2.1, quoted by openDSME BeaconManager (802.15.4e-2012 6.2.10.1). That every channel takes one
 * change, and that the scan runs over all channels whether or not a beacon is heard: common practice, no source.
 *
 * @param phy A preset or a PHY of one's own.
 * @param input Channels, scan duration, change of channel, s, request, octets or null.
 * @returns Times, s.
 * @throws OutOfRangeError code `out-of-range` for a figure outside its range.
 * @throws InconsistentInputError what `frameAirtimeS` throws.
 * @example scanTimes(phyPresets['oqpsk-2450'], { channels: 16, scanDuration: 3, retuneS: 0, requestPsduOctets: null }).channelS
 *   // 0.13824
 */
export function scanTimes(phy: Phy, input: ScanInput): ScanTimes {
  const { channels, scanDuration, requestPsduOctets } = input;
  requireNumber(channels, { field: 'channels', min: 1, whole: true });
  requireNumber(scanDuration, { field: 'scanDuration', min: 0, max: 14, whole: true });
  requireNumber(input.retuneS, { field: 'retuneS', min: 0, unit: 's' });
  const channelS = BASE_SUPERFRAME_SYMBOLS * (2 ** scanDuration + 1) * phy.macSymbolS;
  const requestS = requestPsduOctets === null ? 0 : frameAirtimeS(phy, requestPsduOctets, input);
  const listenS = channels * channelS;
  const transmitS = channels * requestS;
  const retuneS = channels * input.retuneS;
  return { channelS, listenS, transmitS, retuneS, durationS: listenS + transmitS + retuneS };
}
