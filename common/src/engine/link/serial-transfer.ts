import type { SerialDuration } from '../scenario/scenario.types.ts';
import { requireNumber } from './checks.ts';

/**
 * Time of a transfer on a clocked serial line: `octets · (bits per octet / clock + overhead per octet) + overhead`.
 *
 * Source: definition.
 *
 * @param transfer Octets, whole and 0 or more; clock in Hz, above 0; bits per octet, default 8 (10 for a start and a stop
 *   bit); overhead per octet and per transfer in s, default 0.
 * @returns Time, s.
 * @throws OutOfRangeError code `out-of-range` for a figure outside its range.
 * @example serialTransferS({ octets: 100, clockHz: 1_000_000 }) // 0.0008
 */
export function serialTransferS(transfer: Omit<SerialDuration, 'kind'>): number {
  const { octets, clockHz, bitsPerOctet = 8, overheadPerOctetS = 0, overheadS = 0 } = transfer;
  requireNumber(octets, { field: 'octets', min: 0, whole: true, unit: 'octets' });
  requireNumber(clockHz, { field: 'clockHz', min: Number.MIN_VALUE, unit: 'Hz' });
  requireNumber(bitsPerOctet, { field: 'bitsPerOctet', min: Number.MIN_VALUE, unit: 'bits' });
  requireNumber(overheadPerOctetS, { field: 'overheadPerOctetS', min: 0, unit: 's' });
  requireNumber(overheadS, { field: 'overheadS', min: 0, unit: 's' });
  return (octets * bitsPerOctet) / clockHz + octets * overheadPerOctetS + overheadS;
}
