import { phyPresets } from '#common/engine/link/phy.table.ts';
import type { CustomPhy, LinkSettings, PhyId } from '#common/engine/scenario/scenario.types.ts';
import { formatQuantity } from '#common/units/format-quantity.ts';
import { BIT_RATE, countOf, OCTETS } from '#frontend/features/scenario-editor/model/figure-options.ts';
import type { FieldDescriptor } from './field-descriptor.ts';

const MODULATIONS: Record<PhyId, string> = {
  'oqpsk-2450': '2450 MHz O-QPSK',
  'msk-2450': '2450 MHz MSK',
  'oqpsk-915': '915 MHz O-QPSK',
  'oqpsk-868': '868 MHz O-QPSK',
  'bpsk-868': '868 MHz BPSK',
  'bpsk-915': '915 MHz BPSK',
  'sun-fsk-50': 'SUN FSK',
  'sun-fsk-100': 'SUN FSK',
  'sun-fsk-150': 'SUN FSK',
  'sun-fsk-200': 'SUN FSK',
};

type PhyOfLink = NonNullable<LinkSettings['phy']>;

/** A PHY in words: "2450 MHz O-QPSK, 250 kbit/s". */
export function phyWords(phy: PhyOfLink): string {
  if (typeof phy === 'object') return `own PHY, ${formatQuantity(phy.bitRateBps, 'bit-rate')}`;
  const preset = phyPresets[phy];
  return `${MODULATIONS[phy]}, ${formatQuantity(preset.bitRateBps, 'bit-rate')}`;
}

export type PhyChoice = PhyId | 'custom' | '';

/** The presets in the order of the table, and a PHY of one's own. */
export const PHY_CHOICES: readonly { value: PhyChoice; label: string }[] = [
  ...Object.values(phyPresets).flatMap(({ id }) => (id === 'custom' ? [] : [{ value: id, label: phyWords(id) }])),
  { value: 'custom', label: 'a PHY of your own' },
];

export const phyChoiceOf = (phy: LinkSettings['phy']): PhyChoice =>
  phy === undefined ? '' : typeof phy === 'object' ? 'custom' : phy;

/** What a choice stores; a PHY of one's own begins with the figures of the one before it. */
export function phyOfChoice(choice: PhyChoice, before: LinkSettings['phy']): LinkSettings['phy'] {
  if (choice === '') return undefined;
  if (choice !== 'custom') return choice;
  if (typeof before === 'object') return before;
  const { bitRateBps, bitsPerSymbol, shrOctets, phrOctets, maxPsduOctets } = phyPresets[before ?? 'oqpsk-2450'];
  const own: CustomPhy = { bitRateBps, bitsPerSymbol, shrOctets: shrOctets ?? 5, phrOctets: phrOctets ?? 1 };
  return maxPsduOctets === null ? own : { ...own, maxPsduOctets };
}

/** The figures of a PHY of one's own. */
export const CUSTOM_PHY_FIELDS: readonly FieldDescriptor[] = [
  { type: 'figure', key: 'phy.bitRateBps', label: 'Bit rate', options: BIT_RATE },
  { type: 'figure', key: 'phy.bitsPerSymbol', label: 'Bits a symbol', options: countOf(1, 16) },
  { type: 'figure', key: 'phy.shrOctets', label: 'Synchronisation header (SHR)', options: OCTETS },
  { type: 'figure', key: 'phy.phrOctets', label: 'PHY header (PHR)', options: OCTETS },
  {
    type: 'figure',
    key: 'phy.maxPsduOctets',
    label: 'Longest PSDU',
    hint: 'empty: no limit',
    options: OCTETS,
    isOptional: true,
  },
];
