import type { Part, Routine, Scenario, Step } from '#common/engine/index.ts';

const ORDINALS =
  'first second third fourth fifth sixth seventh eighth ninth tenth eleventh twelfth thirteenth fourteenth fifteenth sixteenth seventeenth eighteenth nineteenth twentieth'.split(
    ' ',
  );

/** "seventh"; from the twenty-first on in digits, as "21st". */
export function ordinal(n: number): string {
  const word = ORDINALS[n - 1];
  if (word) return word;
  const lastTwo = n % 100;
  if (lastTwo >= 11 && lastTwo <= 13) return `${n}th`;
  return `${n}${['th', 'st', 'nd', 'rd'][n % 10] ?? 'th'}`;
}

/** A typed name inside a sentence: "Radio" becomes "radio", while "ADC", "I2C read" and "Rx" stay as they are. */
export function midSentence(name: string): string {
  const [first = '', second = '', third = ''] = name;
  const isWord = /\p{Ll}/u.test(second) && /[\p{Ll}\s]|^$/u.test(third) && name.length > 2;
  return isWord ? first.toLowerCase() + name.slice(1) : name;
}

export function findPart(scenario: Scenario, partId: string | null): Part | undefined {
  return scenario.node.parts.find((part) => part.id === partId);
}

export function partName(scenario: Scenario, partId: string | null): string {
  return findPart(scenario, partId)?.name ?? 'A removed part';
}

/**
 * A part inside a sentence, after "the": its name where that reads as a plain noun, else what kind of part it is where there
 * is one of that kind, else its name in quotes.
 */
export function partNoun(scenario: Scenario, partId: string): string {
  const part = findPart(scenario, partId);
  if (!part) return 'removed part';
  if (/^\p{L}[\p{L}\d-]*( \p{L}[\p{L}\d-]*){0,3}$/u.test(part.name)) return midSentence(part.name);
  const isOnly = scenario.node.parts.filter(({ kind }) => kind === part.kind).length === 1;
  return isOnly && part.kind !== 'other' ? part.kind : `part “${part.name}”`;
}

export function stateName(scenario: Scenario, partId: string | null, stateId: string | null): string {
  return findPart(scenario, partId)?.states.find((state) => state.id === stateId)?.name ?? 'a removed state';
}

export function findStep(scenario: Scenario, stepId: string | null): { routine: Routine; step: Step } | undefined {
  for (const routine of scenario.node.routines) {
    const step = routine.steps.find((candidate) => candidate.id === stepId);
    if (step) return { routine, step };
  }
  return undefined;
}

export function routineName(scenario: Scenario, routineId: string | null): string {
  return scenario.node.routines.find((routine) => routine.id === routineId)?.name ?? 'A removed routine';
}

/** "the cell" or, of a pack, "the cells". */
export function cellWords(scenario: Scenario): { the: string; its: string; isPlural: boolean } {
  const isPlural = scenario.supply.series * scenario.supply.parallel > 1;
  return isPlural ? { the: 'the cells', its: 'their', isPlural } : { the: 'the cell', its: 'its', isPlural };
}
