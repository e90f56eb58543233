import type { Change } from '#common/schemas/api/scenarios.ts';
import { splitPath } from '#common/schemas/problem.ts';
import type { Dimension } from '#common/units/dimensions.table.ts';
import { formatForEdit } from '#common/units/format-for-edit.ts';
import { provenanceWord, PROVENANCE_KINDS } from './words.ts';

/** Dimension of a figure by the end of its key; the first that fits. */
const SUFFIXES: readonly (readonly [RegExp, Dimension, string?])[] = [
  [/VPerK$/, 'voltage-per-kelvin'],
  [/JPerMol$/, 'molar-energy'],
  [/PerS$/, 'rate-per-second'],
  [/(lossPerYear)$/, 'loss-per-year'],
  [/PerDay$/, 'rate-per-day'],
  [/(Ohm|ohm)$/, 'resistance'],
  [/Hz$/, 'frequency'],
  [/Bps$/, 'bit-rate'],
  [/Dbm$/, 'level'],
  [/Ppm$/, 'tolerance'],
  [/Kg$/, 'mass'],
  [/M3$/, 'volume'],
  [/Octets$|^octets$/, 'octets'],
  [/^(capacityC|chargePerReadingC)$/, 'charge', 'mAh'],
  [/(belowC|aboveC|BelowC|meanC|temperatureC|referenceC|TemperatureC|lowestC|highestC)$/, 'temperature'],
  [/(amplitudeK|doublingK)$/, 'temperature-difference'],
  [/(Probability|Rate|confidence|reserveFraction|availableFraction)$/, 'share'],
  [/V$/, 'voltage'],
  [/(A|^current)$/, 'current'],
  [/F$/, 'capacitance'],
  [/(S|^duration)$/, 'duration'],
];

/** One side of a change in words; null where only its kind can be told, as of a whole part. */
export function valueWords(change: Pick<Change, 'path'>, value: unknown): string | null {
  if (value === undefined) return 'none';
  if (typeof value === 'number') return numberWords(change.path, value);
  if (typeof value === 'boolean') return value ? 'yes' : 'no';
  if (typeof value === 'string') {
    const kind = PROVENANCE_KINDS.find((row) => row.value === value);
    return kind && change.path.endsWith('provenance.kind') ? provenanceWord(kind.value) : `“${shortened(value)}”`;
  }
  if (Array.isArray(value)) return `${value.length} rows`;
  return typeof value === 'object' && value !== null ? objectWords(change.path, value) : null;
}

/** Long notes are told by their beginning. */
function shortened(text: string): string {
  return text.length > 60 ? `${text.slice(0, 58).trimEnd()} …` : text;
}

function objectWords(path: string, value: object): string | null {
  if ('typical' in value && typeof value.typical === 'number') return numberWords(path, value.typical);
  if ('name' in value && typeof value.name === 'string') return `“${value.name}”`;
  if ('designation' in value && typeof value.designation === 'string') return value.designation;
  if ('kind' in value && typeof value.kind === 'string') return value.kind;
  return null;
}

function numberWords(path: string, value: number): string {
  const keys = splitPath(path).filter((segment) => typeof segment === 'string');
  const key = keys.findLast((segment) => !['min', 'typical', 'max'].includes(segment)) ?? '';
  const [, dimension = 'number', unit] = SUFFIXES.find(([pattern]) => pattern.test(key)) ?? [];
  return formatForEdit(value, dimension, unit);
}
