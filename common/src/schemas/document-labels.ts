import type { Scenario } from '#common/engine/scenario/scenario.types.ts';
import { MONTH_NAMES } from '#common/units/format-duration.ts';

type Path = readonly (string | number)[];

/** Fields whose words differ from their name without unit. */
const WORDS: Readonly<Record<string, string>> = {
  node: '',
  typical: 'typical value',
  min: 'minimum',
  max: 'maximum',
  restStateId: 'rest state',
  openCircuitTableV: 'open-circuit voltage',
  openCircuitTemperatureVPerK: 'open-circuit voltage against temperature',
  lossPerYear: 'loss a year',
  lifeS: 'wanted life',
  cutOffV: 'cut-off',
  q10: 'Q10',
  law: 'load law',
  repeats: 'repeats',
  lowBattery: 'low-battery warning',
  busy: 'part kept busy',
  phy: 'PHY',
  phyConstants: 'constants of the PHY',
  shrOctets: 'SHR',
  phrOctets: 'PHR',
  ccaS: 'assessment',
  ackWaitS: 'acknowledgement wait',
  psduOctets: 'PSDU',
  ackPsduOctets: 'PSDU of the acknowledgement',
  fcsOctets: 'FCS',
  busyProbability: 'channel busy',
  frameErrorRate: 'frame lost',
  ackErrorRate: 'acknowledgement lost',
  macMinBE: 'macMinBE',
  macMaxBE: 'macMaxBE',
  macMaxCSMABackoffs: 'macMaxCSMABackoffs',
  macMaxFrameRetries: 'macMaxFrameRetries',
  receivedLevelStepDb: 'steps of the received level',
  radioPartId: 'radio',
};

/** What one item of a list is called. */
const ITEMS: Readonly<Record<string, string>> = {
  parts: 'part',
  states: 'state',
  transitions: 'transition',
  leakages: 'leakage',
  routines: 'routine',
  steps: 'step',
  resistanceOhm: 'resistance',
  receiveWindows: 'receive window',
};

const UNIT_SUFFIX = /(VPerK|PerK|Ohm|Dbm|Ppm|Bps|Hz|Kg|M3|A|C|F|J|K|S|V)$/;

/** A path into a document in words: names of parts, states, routines and steps, then the field. */
export function labelOf(document: Scenario, path: Path): string {
  const words: string[] = [];
  let value: unknown = document;
  let part: unknown;
  path.forEach((segment, index) => {
    const list = path[index - 1];
    const next = child(value, segment);
    if (list === 'parts' && typeof segment === 'number') part = next;
    words.push(wordOf({ document, part, list, segment, next, isOfStep: path.includes('steps') }));
    value = next;
  });
  const text = words.filter((word) => word !== '').join(', ');
  return text === '' ? 'The whole document' : text.charAt(0).toUpperCase() + text.slice(1);
}

interface Segment {
  document: Scenario;
  /** The part that the path has come through, if any. */
  part: unknown;
  list: string | number | undefined;
  segment: string | number;
  next: unknown;
  isOfStep: boolean;
}

function wordOf({ document, part, list, segment, next, isOfStep }: Segment): string {
  if (list === 'states' && isOfStep) return `state of “${nameIn(document.node.parts, String(segment))}”`;
  // The item that follows says it.
  if (segment in ITEMS || (segment === 'months' && list === 'climate')) return '';
  if (typeof segment === 'string') return fieldWords(segment);
  if (list === 'months') return MONTH_NAMES[segment] ?? `month ${segment + 1}`;
  if (list === 'transitions') {
    const states = child(part, 'states');
    const end = (key: string): string => nameIn(states, String(child(next, key)));
    return `transition from “${end('fromStateId')}” to “${end('toStateId')}”`;
  }
  const item = typeof list === 'string' ? (ITEMS[list] ?? fieldWords(list)) : 'item';
  const name = child(next, 'name');
  return typeof name === 'string' ? `${item} “${name}”` : `${item} ${segment + 1}`;
}

function fieldWords(field: string): string {
  const known = WORDS[field];
  if (known !== undefined) return known;
  const words = field.replace(UNIT_SUFFIX, '').replace(/[A-Z]/g, (letter) => ` ${letter.toLowerCase()}`);
  return words.trim();
}

/** Name of the item with this id in a list, the id itself where there is none. */
function nameIn(list: unknown, id: string): string {
  const items: readonly unknown[] = Array.isArray(list) ? list : [];
  const name = child(
    items.find((item) => child(item, 'id') === id),
    'name',
  );
  return typeof name === 'string' ? name : id;
}

function child(value: unknown, key: string | number): unknown {
  if (typeof value !== 'object' || value === null) return undefined;
  return Object.entries(value).find(([name]) => name === String(key))?.[1];
}
