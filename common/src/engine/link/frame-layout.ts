import { InconsistentInputError } from '#common/errors.ts';
import type { LinkSettings } from '../scenario/scenario.types.ts';
import type { FrameField, FrameLayout } from './exchange-plan.types.ts';
import { frameAirtimeS, octetsAirtimeS } from './frame-airtime.ts';
import { standardFrame, STANDARD_FRAME_SOURCE } from './link-defaults.table.ts';
import { macHeader, macHeaderFields } from './mac-header.ts';
import type { MacHeader, MacHeaderInput } from './mac-header.ts';
import type { Phy } from './phy.types.ts';

/** Size of a frame as a step gives it: the whole PSDU, or a payload that the frame format wraps. */
export interface FrameSize {
  payloadOctets?: number;
  psduOctets?: number;
  /** Command identifier in front of the payload, octets; default 0. */
  commandOctets?: number;
}

const HEADER_SOURCE =
  'IEEE 802.15.4-2006 7.2 as coded in Zephyr ieee802154_frame.h @00cafda and Contiki-NG frame802154.c @9f80681';
const SECURITY_SOURCE = 'IEEE 802.15.4-2006 7.6.2 as coded in Zephyr ieee802154_frame.h @00cafda';
const STEP = 'given in the step';
/** Preamble that the presets' synchronisation headers count, octets. */
const PRESET_PREAMBLE_OCTETS = 4;

/**
 * A frame octet by octet, in the order in which it is sent: preamble, start-of-frame delimiter, PHY header, MAC header, payload,
 * integrity code, FCS. A PSDU given as a whole stays one field.
 *
 * Frame format where the link gives none: version 2006, short addresses, PAN compression, FCS 2 octets (4 on SUN FSK, whose
 * macFcsType defaults to 0).
 *
 * Source: sizes by `macHeader`, airtime by `frameAirtimeS`.
 *
 * @param phy A preset or a PHY of one's own.
 * @param size Payload or PSDU, octets.
 * @param link Frame format, preamble and coding.
 * @returns Fields with formula and source, sizes in octets, airtime in s.
 * @throws InconsistentInputError code `frame-size-missing` without either size, and what `macHeader` and `frameAirtimeS` throw.
 * @throws OutOfRangeError for a frame that is too long or a size that is no whole number of octets.
 * @example frameLayout(phyPresets['oqpsk-2450'], { payloadOctets: 24 }, {}).airtimeS // 0.001312
 */
export function frameLayout(phy: Phy, size: FrameSize, link: LinkSettings): FrameLayout {
  const { preambleOctets, forwardErrorCorrection } = link;
  const inner = size.psduOctets === undefined ? wrapped(phy, size, link) : typed(size.psduOctets);
  const airtimeS = frameAirtimeS(phy, inner.psduOctets, { preambleOctets, forwardErrorCorrection });
  const outer = phyFields(phy, link);
  let outerOctets = 0;
  for (const { octets } of outer) outerOctets += octets;
  const { psduOctets, largestPayloadOctets } = inner;
  const airOctets = outerOctets + psduOctets;
  const fields = [...outer, ...inner.fields].map(({ id, name, octets, formula, source }) => ({
    id,
    name,
    octets,
    airtimeS: octetsAirtimeS(phy, octets, forwardErrorCorrection === true && !SYNCHRONISATION.has(id)),
    formula,
    source,
  }));
  return { fields, psduOctets, airOctets, airtimeS, largestPayloadOctets };
}

/** What forward error correction never codes. */
const SYNCHRONISATION: ReadonlySet<FrameField['id']> = new Set(['preamble', 'sfd']);

/** A field whose time is still to be told. */
type SizedField = Omit<FrameField, 'airtimeS'>;
type Inner = Pick<FrameLayout, 'psduOctets' | 'largestPayloadOctets'> & { fields: SizedField[] };

function typed(psduOctets: number): Inner {
  const fields = [field('psdu', 'PSDU', psduOctets, { formula: 'as given, FCS counted', source: STEP })];
  return { fields, psduOctets, largestPayloadOctets: null };
}

function field(
  id: FrameField['id'],
  name: string,
  octets: number,
  origin: { formula: string; source: string },
): SizedField {
  return { id, name, octets, formula: origin.formula, source: origin.source };
}

/** Preamble and delimiter are told apart where the preset's preamble is known. */
function phyFields(phy: Phy, { preambleOctets = PRESET_PREAMBLE_OCTETS }: LinkSettings): SizedField[] {
  const shrOctets = phy.shrOctets ?? 0;
  const source = phy.sources.shrOctets;
  const phr = field('phr', 'PHY header', phy.phrOctets ?? 0, { formula: 'length', source: phy.sources.phrOctets });
  if (phy.id === 'custom') {
    return [field('preamble', 'Synchronisation header', shrOctets, { formula: 'as given', source }), phr];
  }
  return [
    field('preamble', 'Preamble', preambleOctets, { formula: 'preambleOctets', source }),
    field('sfd', 'Start-of-frame delimiter', shrOctets - PRESET_PREAMBLE_OCTETS, { formula: 'SHR − preamble', source }),
    phr,
  ];
}

function wrapped(phy: Phy, { payloadOctets, commandOctets = 0 }: FrameSize, link: LinkSettings): Inner {
  if (payloadOctets === undefined) {
    throw new InconsistentInputError('The frame has no size; give its payload or its PSDU in octets.', {
      code: 'frame-size-missing',
      field: 'payloadOctets',
      unit: 'octets',
      expected: 'payloadOctets or psduOctets',
      relatedFields: ['psduOctets'],
    });
  }
  const input: MacHeaderInput = {
    ...standardFrame,
    fcsOctets: phy.id.startsWith('sun-fsk') ? 4 : 2,
    ...link.frame,
    payloadOctets: payloadOctets + commandOctets,
    maxPsduOctets: phy.maxPsduOctets ?? Number.MAX_SAFE_INTEGER,
  };
  const sizes = macHeader(input);
  return {
    fields: macFields(input, sizes, { payloadOctets, commandOctets }).filter(
      ({ id, octets }) => octets > 0 || id === 'payload',
    ),
    psduOctets: sizes.psduOctets,
    largestPayloadOctets: sizes.largestPayloadOctets - commandOctets,
  };
}

function macFields(
  input: MacHeaderInput,
  sizes: MacHeader,
  { payloadOctets, commandOctets }: { payloadOctets: number; commandOctets: number },
): SizedField[] {
  const { informationElementOctets = 0, fcsOctets = 2 } = input;
  const header = macHeaderFields(input);
  const format = input.frameVersion === '2006' ? `${HEADER_SOURCE}; ${STANDARD_FRAME_SOURCE}` : HEADER_SOURCE;
  const pan = { formula: '2 octets; dropped by PAN compression as the frame version says', source: format };
  const address = { formula: 'none 0, short 2, extended 8', source: format };
  const security = { formula: '1 + frame counter 0 or 4 + key identifier 0, 1, 5 or 9', source: SECURITY_SOURCE };
  const mic = { formula: 'security level 1, 5: 4; 2, 6: 8; 3, 7: 16', source: SECURITY_SOURCE };
  const fcs = { formula: '2; SUN FSK 4 unless given', source: `${HEADER_SOURCE}; openDSME PIB macFcsType @f9b26a7` };
  return [
    field('frame-control', 'Frame control', header.frameControl, { formula: '2', source: HEADER_SOURCE }),
    field('sequence-number', 'Sequence number', header.sequenceNumber, { formula: '1', source: HEADER_SOURCE }),
    field('destination-pan', 'Destination PAN', header.destinationPan, pan),
    field('destination', 'Destination address', header.destination, address),
    field('source-pan', 'Source PAN', header.sourcePan, pan),
    field('source', 'Source address', header.source, address),
    field('security-header', 'Security header', sizes.securityHeaderOctets, security),
    field('information-elements', 'Information elements', informationElementOctets, {
      formula: 'as given',
      source: STEP,
    }),
    field('command', 'Command', commandOctets, { formula: '1', source: HEADER_SOURCE }),
    field('payload', 'Payload', payloadOctets, { formula: 'as given', source: STEP }),
    field('mic', 'Message integrity code', sizes.micOctets, mic),
    field('fcs', 'Frame check sequence', fcsOctets, fcs),
  ];
}
