import { InconsistentInputError, OutOfRangeError } from '#common/errors.ts';
import type { AddressMode } from '../scenario/scenario.types.ts';
import { requireNumber } from './checks.ts';

/** Format of a MAC frame; absent fields take the defaults told at `macHeader`. */
export interface MacHeaderInput {
  frameVersion: '2003' | '2006' | '2015';
  destination: AddressMode;
  source: AddressMode;
  panIdCompression: boolean;
  sequenceNumber?: boolean;
  securityLevel?: number;
  keyIdMode?: number;
  frameCounterSuppressed?: boolean;
  informationElementOctets?: number;
  payloadOctets?: number;
  fcsOctets?: number;
  maxPsduOctets?: number;
}

/** Sizes of a MAC frame, octets. */
export interface MacHeader {
  /** Frame control, sequence number, PAN identifiers, addresses; without security header and information elements. */
  headerOctets: number;
  securityHeaderOctets: number;
  micOctets: number;
  /** Whole PSDU with payload and FCS. */
  psduOctets: number;
  /** Payload that just fits. */
  largestPayloadOctets: number;
}

const ADDRESS_OCTETS: Readonly<Record<AddressMode, number>> = { none: 0, short: 2, extended: 8 };
/** Key identifier by key identifier mode 0 to 3, octets. */
const KEY_IDENTIFIER_OCTETS = [0, 1, 5, 9];
/** Message integrity code by security level 0 to 7, octets. */
const MIC_OCTETS = [0, 4, 8, 16, 0, 4, 8, 16];
const FRAME_CONTROL_OCTETS = 2;
const PAN_ID_OCTETS = 2;

/**
 * Size of a MAC frame from its format.
 *
 * Defaults: sequence number present, security level 0, key identifier mode 0, frame counter present, no information
 * elements, no payload, FCS 2 octets, longest PSDU 127.
 *
 * Source: Zephyr subsys/net/l2/ieee802154/ieee802154_frame.h @00cafda (cites IEEE 802.15.4-2006 7.2, 7.6); Contiki-NG
 * os/net/mac/framer/frame802154.c @9f80681 (cites 802.15.4-2015 Table 7-2).
 * Valid for: data and command frames. Security as of 2006; the security of 2003 frames is laid out differently.
 *
 * @param input Frame format; octets whole, security level 0 to 7, key identifier mode 0 to 3.
 * @returns Sizes, octets.
 * @throws OutOfRangeError code `frame-too-long` when the frame exceeds the longest PSDU; `expected` gives the largest payload
 *   that fits. Code `out-of-range` for a number outside its range.
 * @throws InconsistentInputError code `needs-frame-version` for what the frame version does not know.
 * @example macHeader({ frameVersion: '2006', destination: 'short', source: 'short', panIdCompression: true }).headerOctets // 9
 */
export function macHeader(input: MacHeaderInput): MacHeader {
  const { payloadOctets = 0, informationElementOctets = 0, fcsOctets = 2, maxPsduOctets = 127 } = input;
  const octets = { min: 0, whole: true, unit: 'octets' };
  requireNumber(payloadOctets, { field: 'payloadOctets', ...octets });
  requireNumber(informationElementOctets, { field: 'informationElementOctets', ...octets });
  requireNumber(fcsOctets, { field: 'fcsOctets', ...octets });
  requireNumber(maxPsduOctets, { field: 'maxPsduOctets', ...octets });
  requireVersion(input);
  const fields = macHeaderFields(input);
  const headerOctets =
    fields.frameControl +
    fields.sequenceNumber +
    fields.destinationPan +
    fields.destination +
    fields.sourcePan +
    fields.source;
  const { securityHeaderOctets, micOctets } = securityOctets(input);
  const overheadOctets = headerOctets + securityHeaderOctets + informationElementOctets + micOctets + fcsOctets;
  const psduOctets = overheadOctets + payloadOctets;
  const largestPayloadOctets = maxPsduOctets - overheadOctets;
  if (psduOctets > maxPsduOctets) throw tooLong(psduOctets, maxPsduOctets, { payloadOctets, largestPayloadOctets });
  return { headerOctets, securityHeaderOctets, micOctets, psduOctets, largestPayloadOctets };
}

function tooLong(
  psduOctets: number,
  maxPsduOctets: number,
  { payloadOctets, largestPayloadOctets }: { payloadOctets: number; largestPayloadOctets: number },
): OutOfRangeError {
  const expected =
    largestPayloadOctets < 0
      ? 'no payload fits: the headers alone are too long'
      : `a payload of at most ${largestPayloadOctets} octets`;
  return new OutOfRangeError(
    `The frame has ${psduOctets} octets of at most ${maxPsduOctets} with a payload of ${payloadOctets}; allowed is ${expected}.`,
    { code: 'frame-too-long', field: 'payloadOctets', value: payloadOctets, unit: 'octets', expected },
  );
}

function requireVersion(input: MacHeaderInput): void {
  const { frameVersion, securityLevel = 0, informationElementOctets = 0 } = input;
  if (frameVersion === '2015') return;
  const wanting: [boolean, string, string][] = [
    [input.sequenceNumber === false, 'sequenceNumber', 'A frame without sequence number'],
    [informationElementOctets > 0, 'informationElementOctets', 'A frame with information elements'],
    [input.frameCounterSuppressed === true, 'frameCounterSuppressed', 'A frame without its frame counter'],
  ];
  for (const [isWanting, field, what] of wanting) if (isWanting) throw needsVersion(field, what, '2015', frameVersion);
  if (frameVersion === '2003' && securityLevel > 0) {
    throw needsVersion('securityLevel', 'A frame with this security header', '2006', frameVersion);
  }
}

function needsVersion(field: string, what: string, needed: string, given: string): InconsistentInputError {
  return new InconsistentInputError(`${what} needs frame version ${needed} or later; the version given is ${given}.`, {
    code: 'needs-frame-version',
    field,
    value: given,
    expected: `frame version ${needed} or later`,
    relatedFields: ['frameVersion'],
  });
}

function securityOctets(input: MacHeaderInput): { securityHeaderOctets: number; micOctets: number } {
  const { securityLevel = 0, keyIdMode = 0 } = input;
  requireNumber(securityLevel, { field: 'securityLevel', min: 0, max: 7, whole: true });
  requireNumber(keyIdMode, { field: 'keyIdMode', min: 0, max: 3, whole: true });
  if (securityLevel === 0) return { securityHeaderOctets: 0, micOctets: 0 };
  const counterOctets = input.frameCounterSuppressed === true ? 0 : 4;
  return {
    securityHeaderOctets: 1 + counterOctets + (KEY_IDENTIFIER_OCTETS[keyIdMode] ?? 0),
    micOctets: MIC_OCTETS[securityLevel] ?? 0,
  };
}

/** PAN identifiers in the header: 2003 and 2006 one per address, the source's dropped on compression; 2015 by its Table 7-2. */
function panIds(input: MacHeaderInput): { hasDestinationPan: boolean; hasSourcePan: boolean } {
  const { frameVersion, destination, source, panIdCompression } = input;
  const hasDestination = destination !== 'none';
  const hasSource = source !== 'none';
  if (frameVersion !== '2015') {
    return { hasDestinationPan: hasDestination, hasSourcePan: hasSource && !panIdCompression };
  }
  if (!hasDestination && !hasSource) return { hasDestinationPan: panIdCompression, hasSourcePan: false };
  const isOne = !hasDestination || !hasSource || (destination === 'extended' && source === 'extended');
  if (isOne)
    return {
      hasDestinationPan: hasDestination && !panIdCompression,
      hasSourcePan: !hasDestination && !panIdCompression,
    };
  return { hasDestinationPan: true, hasSourcePan: !panIdCompression };
}

/** Fields of a MAC header in the order in which they are sent, octets; absent ones have 0. */
export interface MacHeaderFields {
  frameControl: number;
  sequenceNumber: number;
  destinationPan: number;
  destination: number;
  sourcePan: number;
  source: number;
}

/**
 * Fields of a MAC header without security header and information elements.
 *
 * Source: as `macHeader`, which adds them up.
 *
 * @param input Frame format.
 * @returns Octets of each field.
 * @example macHeaderFields({ frameVersion: '2006', destination: 'short', source: 'short', panIdCompression: true }).sourcePan // 0
 */
export function macHeaderFields(input: MacHeaderInput): MacHeaderFields {
  const { hasDestinationPan, hasSourcePan } = panIds(input);
  return {
    frameControl: FRAME_CONTROL_OCTETS,
    sequenceNumber: input.sequenceNumber === false ? 0 : 1,
    destinationPan: hasDestinationPan ? PAN_ID_OCTETS : 0,
    destination: ADDRESS_OCTETS[input.destination],
    sourcePan: hasSourcePan ? PAN_ID_OCTETS : 0,
    source: ADDRESS_OCTETS[input.source],
  };
}
