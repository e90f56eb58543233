import { backoffSettings } from '#common/engine/link/csma-ca.ts';
import {
  assumedTolerancePpm,
  linkDefaults,
  standardFrame,
  type LinkDefaultId,
} from '#common/engine/link/link-defaults.table.ts';
import type { LinkSettings } from '#common/engine/scenario/scenario.types.ts';
import {
  CRYSTAL_CAPACITANCE,
  countOf,
  LEVEL,
  LEVEL_STEP,
  OCTETS,
  PROBABILITY,
  SHUNT_CAPACITANCE,
  STEP_TIME,
  TOLERANCE,
} from '#frontend/features/scenario-editor/model/figure-options.ts';
import { formatShare } from '#common/units/format-quantity.ts';
import { describedText, type FieldDescriptor } from './field-descriptor.ts';
import { phyWords } from './phy-choice.ts';
import { valueAt } from './link-values.ts';

export type LinkSectionId = 'phy' | 'frame' | 'channel' | 'access' | 'crystal' | 'region';

/** Some of the link settings, under one line that tells them. */
export interface LinkSection {
  id: LinkSectionId;
  title: string;
  fields: readonly FieldDescriptor[];
  /** Settings that the line always tells, in a few words each; undefined where there is nothing to tell. */
  summary: (link: LinkSettings) => (string | undefined)[];
}

const percentOf = (id: LinkDefaultId): string => formatShare(linkDefaults[id].value);
const assumed = (id: LinkDefaultId): string => `assumed ${percentOf(id)}`;
/** What the standard gives where nothing is typed. */
const CSMA = backoffSettings({});

const FLAG = [
  { value: true, label: 'yes' },
  { value: false, label: 'no' },
] as const;
const ADDRESSES = [
  { value: 'none', label: 'none' },
  { value: 'short', label: 'short, 2 octets' },
  { value: 'extended', label: 'extended, 8 octets' },
] as const;
const SECURITY_LEVELS = [
  { value: 0, label: '0: none' },
  { value: 1, label: '1: MIC 4 octets' },
  { value: 2, label: '2: MIC 8 octets' },
  { value: 3, label: '3: MIC 16 octets' },
  { value: 4, label: '4: encrypted' },
  { value: 5, label: '5: encrypted, MIC 4' },
  { value: 6, label: '6: encrypted, MIC 8' },
  { value: 7, label: '7: encrypted, MIC 16' },
] as const;
const KEY_MODES = [
  { value: 0, label: '0: implicit' },
  { value: 1, label: '1: index, 1 octet' },
  { value: 2, label: '2: source 4 and index, 5 octets' },
  { value: 3, label: '3: source 8 and index, 9 octets' },
] as const;
const BANDS = [
  { value: 'eu-863-865', label: 'EU 863 to 865 MHz' },
  { value: 'eu-865-868', label: 'EU 865 to 868 MHz' },
  { value: 'eu-868.0-868.6', label: 'EU 868.0 to 868.6 MHz' },
  { value: 'eu-868.7-869.2', label: 'EU 868.7 to 869.2 MHz' },
  { value: 'eu-869.4-869.65', label: 'EU 869.4 to 869.65 MHz' },
  { value: 'eu-869.7-870.0', label: 'EU 869.7 to 870.0 MHz' },
] as const;

const FRAME: readonly FieldDescriptor[] = [
  {
    type: 'choice',
    key: 'frame.frameVersion',
    label: 'Frame version',
    absent: '2006',
    choices: [
      { value: '2003', label: '2003' },
      { value: '2006', label: '2006' },
      { value: '2015', label: '2015' },
    ],
  },
  {
    type: 'choice',
    key: 'frame.destination',
    label: 'Destination address',
    absent: 'short, 2 octets',
    choices: ADDRESSES,
  },
  { type: 'choice', key: 'frame.source', label: 'Source address', absent: 'short, 2 octets', choices: ADDRESSES },
  { type: 'choice', key: 'frame.panIdCompression', label: 'PAN ID compression', absent: 'yes', choices: FLAG },
  { type: 'choice', key: 'frame.sequenceNumber', label: 'Sequence number', absent: 'yes', choices: FLAG },
  { type: 'choice', key: 'frame.securityLevel', label: 'Security level', absent: '0: none', choices: SECURITY_LEVELS },
  { type: 'choice', key: 'frame.keyIdMode', label: 'Key identifier mode', absent: '0: implicit', choices: KEY_MODES },
  {
    type: 'choice',
    key: 'frame.frameCounterSuppressed',
    label: 'Frame counter',
    absent: 'sent',
    choices: [
      { value: true, label: 'suppressed' },
      { value: false, label: 'sent' },
    ],
  },
  {
    type: 'figure',
    key: 'frame.informationElementOctets',
    label: 'Information elements',
    hint: 'empty: none',
    options: OCTETS,
    isOptional: true,
  },
  {
    type: 'choice',
    key: 'frame.fcsOctets',
    label: 'FCS',
    absent: '2 octets, SUN FSK 4',
    choices: [
      { value: 2, label: '2 octets' },
      { value: 4, label: '4 octets' },
    ],
  },
];

const CHANNEL: readonly FieldDescriptor[] = [
  {
    type: 'quantity',
    key: 'busyProbability',
    label: 'Channel busy',
    hint: `empty: ${assumed('busyProbability')}`,
    options: PROBABILITY,
    isOptional: true,
  },
  {
    type: 'quantity',
    key: 'frameErrorRate',
    label: 'Frame lost',
    hint: `empty: from the level, else ${assumed('frameErrorRate')}`,
    options: PROBABILITY,
    isOptional: true,
  },
  {
    type: 'quantity',
    key: 'ackErrorRate',
    label: 'Acknowledgement lost',
    hint: `empty: from the level, else ${assumed('ackErrorRate')}`,
    options: PROBABILITY,
    isOptional: true,
  },
  {
    type: 'quantity',
    key: 'receivedLevelDbm',
    label: 'Received level',
    hint: 'gives the loss where none is typed',
    options: LEVEL,
    isOptional: true,
  },
  {
    type: 'figure',
    key: 'receivedLevelStepDb',
    label: 'Level told in steps of',
    hint: 'dB; empty: exactly',
    options: LEVEL_STEP,
    isOptional: true,
  },
  {
    type: 'figure',
    key: 'sensitivityDbm',
    label: 'Sensitivity',
    hint: '1 % of frames of 20 octets lost',
    options: LEVEL,
    isOptional: true,
  },
  {
    type: 'figure',
    key: 'noiseDbm',
    label: 'Noise',
    hint: 'empty: from the sensitivity',
    options: LEVEL,
    isOptional: true,
  },
];

const ACCESS: readonly FieldDescriptor[] = [
  {
    type: 'figure',
    key: 'macMinBE',
    label: 'macMinBE',
    hint: `empty: ${CSMA.macMinBE}`,
    options: countOf(0, 8),
    isOptional: true,
  },
  {
    type: 'figure',
    key: 'macMaxBE',
    label: 'macMaxBE',
    hint: `empty: ${CSMA.macMaxBE}`,
    options: countOf(3, 8),
    isOptional: true,
  },
  {
    type: 'figure',
    key: 'macMaxCSMABackoffs',
    label: 'macMaxCSMABackoffs',
    hint: `empty: ${CSMA.macMaxCSMABackoffs}`,
    options: countOf(0, 5),
    isOptional: true,
  },
  {
    type: 'figure',
    key: 'macMaxFrameRetries',
    label: 'macMaxFrameRetries',
    hint: 'empty: 3',
    options: countOf(0, 15),
    isOptional: true,
  },
  {
    type: 'choice',
    key: 'backoffIn',
    label: 'Radio waits in',
    absent: 'idle',
    choices: [
      { value: 'idle', label: 'idle' },
      { value: 'sleep', label: 'sleep' },
    ],
  },
  {
    type: 'choice',
    key: 'includeInterframeSpace',
    label: 'Interframe space after it',
    absent: 'not counted',
    choices: [
      { value: true, label: 'counted' },
      { value: false, label: 'not counted' },
    ],
  },
];

const CRYSTAL: readonly FieldDescriptor[] = [
  {
    type: 'figure',
    key: 'crystal.startUpS',
    label: 'Crystal starts in',
    hint: 'at each wake; empty: not counted',
    options: STEP_TIME,
    isOptional: true,
  },
  {
    type: 'figure',
    key: 'crystal.tolerancePpm',
    label: 'Make tolerance, ±',
    hint: 'at 25 °C; empty: none',
    options: TOLERANCE,
    isOptional: true,
  },
  {
    type: 'figure',
    key: 'crystal.temperaturePpm',
    label: 'Over temperature, ±',
    hint: 'empty: none',
    options: TOLERANCE,
    isOptional: true,
  },
  {
    type: 'figure',
    key: 'crystal.ageingPpm',
    label: 'Over its life, ±',
    hint: 'empty: none',
    options: TOLERANCE,
    isOptional: true,
  },
  {
    type: 'quantity',
    key: 'tolerancePpm',
    label: 'Own clock in all, ±',
    hint: 'empty: from the crystal, else assumed',
    options: TOLERANCE,
    isOptional: true,
  },
  {
    type: 'quantity',
    key: 'peerTolerancePpm',
    label: 'The other’s clock, ±',
    hint: `empty: assumed ${assumedTolerancePpm} ppm`,
    options: TOLERANCE,
    isOptional: true,
  },
];

/** Load of the crystal on the board against the load it was made for; all four or none. */
export const PULLING_FIELDS: readonly FieldDescriptor[] = [
  {
    type: 'figure',
    key: 'crystal.pulling.motionalCapacitanceF',
    label: 'Motional capacitance',
    options: CRYSTAL_CAPACITANCE,
  },
  { type: 'figure', key: 'crystal.pulling.shuntCapacitanceF', label: 'Shunt capacitance', options: SHUNT_CAPACITANCE },
  {
    type: 'figure',
    key: 'crystal.pulling.loadCapacitanceF',
    label: 'Made for a load of',
    options: CRYSTAL_CAPACITANCE,
  },
  {
    type: 'figure',
    key: 'crystal.pulling.mountedCapacitanceF',
    label: 'Load on the board',
    options: CRYSTAL_CAPACITANCE,
  },
];

/** A usual small crystal, and a board that loads it a little more. */
export const NEW_PULLING = {
  motionalCapacitanceF: 3e-15,
  shuntCapacitanceF: 1e-12,
  loadCapacitanceF: 9e-12,
  mountedCapacitanceF: 9e-12,
};

const REGION: readonly FieldDescriptor[] = [
  { type: 'choice', key: 'dutyCycleBand', label: 'Sub-band', absent: 'no limit counted', choices: BANDS },
];

const OF_THE_PHY = 'empty: that of the PHY';

/** Constants of the PHY, for radios that keep others and for PHYs of which no source gives them. */
const CONSTANTS: readonly FieldDescriptor[] = (
  [
    ['shrOctets', 'SHR', OCTETS],
    ['phrOctets', 'PHR', OCTETS],
    ['turnaroundS', 'Turnaround', STEP_TIME],
    ['ccaS', 'Assessment takes', STEP_TIME],
    ['unitBackoffS', 'Backoff unit', STEP_TIME],
    ['ackWaitS', 'Acknowledgement wait', STEP_TIME],
  ] as const
).map(([key, label, options]) => ({
  type: 'figure' as const,
  key: `phyConstants.${key}`,
  label,
  hint: OF_THE_PHY,
  options,
  isOptional: true,
}));

/** The text of a setting by its key; undefined where it is not set. */
function told(link: LinkSettings, fields: readonly FieldDescriptor[], key: string): string | undefined {
  const descriptor = fields.find((field) => field.key === key);
  return (descriptor && describedText(descriptor, valueAt(link, key))) ?? undefined;
}

const withWord = (text: string | undefined, before: string, otherwise?: string): string | undefined =>
  text === undefined ? otherwise : `${before} ${text}`;

function lossWords(link: LinkSettings): string | undefined {
  if (link.frameErrorRate) return withWord(told(link, CHANNEL, 'frameErrorRate'), 'lost');
  const level = told(link, CHANNEL, 'receivedLevelDbm');
  return withWord(level, 'lost from', `lost ${percentOf('frameErrorRate')} assumed`);
}

/** The link settings in sections, the most telling first. */
export const LINK_SECTIONS: readonly LinkSection[] = [
  {
    id: 'phy',
    title: 'PHY',
    fields: [
      {
        type: 'figure',
        key: 'preambleOctets',
        label: 'Preamble',
        hint: 'empty: that of the PHY',
        options: OCTETS,
        isOptional: true,
      },
      {
        type: 'choice',
        key: 'forwardErrorCorrection',
        label: 'Forward error correction',
        absent: 'no',
        choices: FLAG,
      },
      ...CONSTANTS,
    ],
    summary: ({ phy, forwardErrorCorrection, phyConstants }) => [
      phy === undefined ? 'none chosen' : phyWords(phy),
      forwardErrorCorrection === true ? 'error correction' : undefined,
      phyConstants && 'with constants of its own',
    ],
  },
  {
    id: 'frame',
    title: 'Frame format',
    fields: FRAME,
    summary: (link) => [
      told(link, FRAME, 'frame.frameVersion') ?? standardFrame.frameVersion,
      `to ${link.frame?.destination ?? standardFrame.destination}`,
      `from ${link.frame?.source ?? standardFrame.source}`,
      `security ${link.frame?.securityLevel ?? 0}`,
      withWord(told(link, FRAME, 'frame.informationElementOctets'), 'elements'),
    ],
  },
  {
    id: 'channel',
    title: 'Channel',
    fields: CHANNEL,
    summary: (link) => [
      withWord(told(link, CHANNEL, 'busyProbability'), 'busy', `busy ${percentOf('busyProbability')} assumed`),
      lossWords(link),
      withWord(told(link, CHANNEL, 'ackErrorRate'), 'acknowledgement lost'),
    ],
  },
  {
    id: 'access',
    title: 'Channel access and retries',
    fields: ACCESS,
    summary: ({ macMaxFrameRetries = 3, ...link }) => [
      `backoff exponent ${link.macMinBE ?? CSMA.macMinBE} to ${link.macMaxBE ?? CSMA.macMaxBE}`,
      `${link.macMaxCSMABackoffs ?? CSMA.macMaxCSMABackoffs} more looks`,
      `${macMaxFrameRetries} retries`,
      link.backoffIn === 'sleep' ? 'waits asleep' : undefined,
    ],
  },
  {
    id: 'crystal',
    title: 'Crystal and clocks',
    fields: CRYSTAL,
    summary: (link) => [
      withWord(told(link, CRYSTAL, 'crystal.startUpS'), 'starts in', 'start not counted'),
      withWord(told(link, CRYSTAL, 'tolerancePpm') ?? told(link, CRYSTAL, 'crystal.tolerancePpm'), '±'),
      link.crystal?.pulling && 'load counted',
    ],
  },
  {
    id: 'region',
    title: 'Share of time on air',
    fields: REGION,
    summary: (link) => [told(link, REGION, 'dutyCycleBand') ?? 'no limit counted'],
  },
];
