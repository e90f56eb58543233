import type { z } from 'zod';
import type { KeepAlive, Node, Part, Quantity, Routine } from '#common/engine/scenario/scenario.types.ts';

type Refinement = z.core.$RefinementCtx;
type Path = (string | number)[];

/** Whether a time in seconds is the double nearest to a whole number of microseconds. */
export function isWholeMicroseconds(timeS: number): boolean {
  return Math.round(timeS * 1e6) / 1e6 === timeS;
}

/** Whether the first column of a table increases strictly. */
export function isIncreasing(rows: readonly (readonly [number, number])[]): boolean {
  return rows.every((row, index) => index === 0 || row[0] > (rows[index - 1]?.[0] ?? -Infinity));
}

/** min ≤ typical ≤ max, told at the side that is out of order. */
export function checkQuantityOrder(quantity: Pick<Quantity, 'min' | 'typical' | 'max'>, context: Refinement): void {
  if (quantity.min !== undefined && quantity.min > quantity.typical) {
    context.addIssue({
      code: 'custom',
      path: ['min'],
      message: `The minimum ${quantity.min} is above the typical ${quantity.typical}.`,
    });
  }
  if (quantity.max !== undefined && quantity.max < quantity.typical) {
    context.addIssue({
      code: 'custom',
      path: ['max'],
      message: `The maximum ${quantity.max} is below the typical ${quantity.typical}.`,
    });
  }
}

/** The shortest of poll, supervision and child timeout is the period. */
export function checkKeepAlive(
  { periodS, keepAlive }: { periodS: number; keepAlive?: KeepAlive | undefined },
  context: Refinement,
): void {
  const given = Object.values(keepAlive ?? {}).filter((timeS): timeS is number => typeof timeS === 'number');
  if (given.length === 0 || Math.min(...given) === periodS) return;
  const message = `The period is the shortest of poll, supervision and child timeout: ${Math.min(...given)} s.`;
  context.addIssue({ code: 'custom', path: ['periodS'], message });
}

/** Ids are unique and every reference inside a node points to something that exists. */
export function checkNodeReferences(node: Node, context: Refinement): void {
  const report = (path: Path, message: string): void => context.addIssue({ code: 'custom', path, message });
  reportDuplicates(node.parts, ['parts'], report);
  reportDuplicates(node.leakages, ['leakages'], report);
  reportDuplicates(node.routines, ['routines'], report);
  const statesOf = new Map(node.parts.map((part) => [part.id, new Set(part.states.map((state) => state.id))]));
  node.parts.forEach((part, index) => checkPart(part, ['parts', index], statesOf, report));
  node.routines.forEach((routine, index) => checkRoutine(routine, ['routines', index], statesOf, report));
}

type Report = (path: Path, message: string) => void;
type StatesOf = ReadonlyMap<string, ReadonlySet<string>>;

function reportDuplicates(items: readonly { id: string }[], path: Path, report: Report): void {
  const seen = new Set<string>();
  items.forEach((item, index) => {
    if (seen.has(item.id)) report([...path, index, 'id'], `The id "${item.id}" is used twice.`);
    seen.add(item.id);
  });
}

function checkState(statesOf: StatesOf, partId: string, stateId: string): string | null {
  const states = statesOf.get(partId);
  if (!states) return `There is no part with the id "${partId}".`;
  return states.has(stateId) ? null : `The part "${partId}" has no state with the id "${stateId}".`;
}

function checkPart(part: Part, path: Path, statesOf: StatesOf, report: Report): void {
  const expectState = (at: Path, partId: string, stateId: string): void => {
    const problem = checkState(statesOf, partId, stateId);
    if (problem) report([...path, ...at], problem);
  };
  reportDuplicates(part.states, [...path, 'states'], report);
  expectState(['restStateId'], part.id, part.restStateId);
  part.transitions.forEach((transition, index) => {
    expectState(['transitions', index, 'fromStateId'], part.id, transition.fromStateId);
    expectState(['transitions', index, 'toStateId'], part.id, transition.toStateId);
    if (transition.busy) {
      expectState(['transitions', index, 'busy'], transition.busy.partId, transition.busy.stateId);
    }
  });
  part.states.forEach((state, index) => {
    state.needs?.stateIds.forEach((stateId, at) =>
      expectState(['states', index, 'needs', 'stateIds', at], state.needs?.partId ?? '', stateId),
    );
  });
}

function checkRoutine(routine: Routine, path: Path, statesOf: StatesOf, report: Report): void {
  reportDuplicates(routine.steps, [...path, 'steps'], report);
  routine.steps.forEach((step, index) => {
    for (const [partId, stateId] of Object.entries(step.states)) {
      const problem = checkState(statesOf, partId, stateId);
      if (problem) report([...path, 'steps', index, 'states', partId], problem);
    }
  });
}
