import type { Caution, Provenance, Scenario } from '#common/engine/index.ts';

export const STANDING_CAUTION =
  'An estimate is no guarantee: measure a production sample over temperature before you promise a life, and follow the cell maker’s and local rules for lithium cells.';
export const HARM_CAUTION =
  'For alarms, medical devices and other uses where a silent node does harm, local codes and licensed practice decide, not this page.';

export interface CautionGroup {
  code: string;
  messages: string[];
}

/** Cautions of one kind together, in the order in which each kind first appears; repeated messages once. */
export function groupCautions(cautions: readonly Caution[]): CautionGroup[] {
  const groups = new Map<string, Set<string>>();
  for (const { code, message } of cautions) groups.set(code, (groups.get(code) ?? new Set()).add(message));
  return [...groups].map(([code, messages]) => ({ code, messages: [...messages] }));
}

type Kind = Provenance['kind'];

/** Says how many figures of a scenario nobody has cited or measured; null when all are. */
export function unsourcedFigures(scenario: Scenario): string | null {
  const kinds = provenanceKinds(scenario);
  const assumed = kinds.filter((kind) => kind === 'assumed').length;
  const memory = kinds.filter((kind) => kind === 'memory').length;
  if (assumed + memory === 0) return null;
  const are = (count: number): string => `${count} ${count === 1 ? 'is' : 'are'}`;
  const told = [assumed > 0 ? `${are(assumed)} assumed` : '', memory > 0 ? `${are(memory)} from memory` : ''];
  return `Of the ${kinds.length} figures in this scenario ${told.filter(Boolean).join(', ')}.`;
}

/** Provenance of every quantity of the document; absent counts as assumed. */
function provenanceKinds(value: unknown): Kind[] {
  if (typeof value !== 'object' || value === null) return [];
  if (isQuantity(value)) return [value.provenance?.kind ?? 'assumed'];
  return Object.values(value).flatMap(provenanceKinds);
}

function isQuantity(value: object): value is { typical: number; provenance?: Provenance } {
  return 'typical' in value && typeof value.typical === 'number';
}
