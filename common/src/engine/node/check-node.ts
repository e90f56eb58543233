import type { Node, Part, Routine, Schedule } from '../scenario/scenario.types.ts';
import type { NodeReport } from './node-report.ts';

/** State ids by part id. */
type StatesOf = ReadonlyMap<string, ReadonlySet<string>>;

/**
 * Checks the ids, references and figures of a node's parts and leakages.
 *
 * @param node The node.
 * @param report Gets every problem, codes `duplicate-id`, `unknown-part`, `unknown-state` and `out-of-range`.
 * @returns State ids by part id, for checking steps.
 * @example checkParts(node, new NodeReport()).get('radio')?.has('sleep')
 */
export function checkParts(node: Node, report: NodeReport): StatesOf {
  checkUnique(node.parts, 'node.parts', report);
  checkUnique(node.leakages, 'node.leakages', report);
  checkUnique(node.routines, 'node.routines', report);
  const statesOf = new Map(node.parts.map((part) => [part.id, new Set(part.states.map((state) => state.id))]));
  node.parts.forEach((part, index) => {
    const path = `node.parts[${index}]`;
    checkStates(part, path, { statesOf, report });
    checkTransitions(part, path, { statesOf, report });
  });
  node.leakages.forEach((leakage, index) =>
    report.number(leakage.current.typical, `node.leakages[${index}].current.typical`, 'A'),
  );
  return statesOf;
}

/**
 * Checks the ids, references and figures of a routine; not whether its moves have paths.
 *
 * @param routine The routine.
 * @param path Its path in the input.
 * @param known State ids by part id, and the report that gets every problem.
 * @example checkRoutine(node.routines[0], 'node.routines[0]', { statesOf, report })
 */
export function checkRoutine(routine: Routine, path: string, known: { statesOf: StatesOf; report: NodeReport }): void {
  checkSchedule(routine.schedule, `${path}.schedule`, known.report);
  checkUnique(routine.steps, `${path}.steps`, known.report);
  routine.steps.forEach((step, index) => {
    for (const partId of Object.keys(step.states)) {
      const stateId = step.states[partId] ?? '';
      if (known.statesOf.get(partId)?.has(stateId) === true) continue;
      checkState(partId, stateId, `${path}.steps[${index}].states.${partId}`, known);
    }
  });
}

interface Known {
  statesOf: StatesOf;
  report: NodeReport;
}

function checkUnique(items: readonly { id: string }[], path: string, report: NodeReport): void {
  const seen = new Set<string>();
  items.forEach(({ id }, index) => {
    if (seen.has(id)) {
      const message = `The id "${id}" is used twice in ${path}; ids must differ.`;
      report.inconsistent('duplicate-id', `${path}[${index}].id`, message, { value: id, expected: 'an id of its own' });
    }
    seen.add(id);
  });
}

function checkState(partId: string, stateId: string, field: string, { statesOf, report }: Known): void {
  const stateIds = statesOf.get(partId);
  if (stateIds?.has(stateId) === true) return;
  if (!stateIds) {
    const expected = `one of ${[...statesOf.keys()].join(', ') || 'no part at all'}`;
    const message = `There is no part "${partId}"; the node has ${expected}.`;
    report.inconsistent('unknown-part', field, message, { value: partId, expected });
    return;
  }
  const expected = `one of ${[...stateIds].join(', ') || 'no state at all'}`;
  const message = `The part "${partId}" has no state "${stateId}"; it has ${expected}.`;
  report.inconsistent('unknown-state', field, message, { value: stateId, expected });
}

function checkStates(part: Part, path: string, known: Known): void {
  const { report } = known;
  checkUnique(part.states, `${path}.states`, report);
  checkState(part.id, part.restStateId, `${path}.restStateId`, known);
  report.number(part.lowestVoltageV.typical, `${path}.lowestVoltageV.typical`, 'V');
  part.states.forEach((state, index) => {
    const statePath = `${path}.states[${index}]`;
    report.number(state.current.typical, `${statePath}.current.typical`, 'A');
    report.number(state.lowestVoltageV?.typical ?? 0, `${statePath}.lowestVoltageV.typical`, 'V');
    report.number(state.referenceVoltageV ?? 1, `${statePath}.referenceVoltageV`, 'V', { isAbove: true });
    report.number(state.referenceTemperatureC ?? 0, `${statePath}.referenceTemperatureC`, '°C', { min: -273.15 });
    report.number(state.doublingK ?? 1, `${statePath}.doublingK`, 'K', { isAbove: true });
    const { needs } = state;
    needs?.stateIds.forEach((stateId, at) =>
      checkState(needs.partId, stateId, `${statePath}.needs.stateIds[${at}]`, known),
    );
  });
}

function checkTransitions(part: Part, path: string, known: Known): void {
  part.transitions.forEach((transition, index) => {
    const { fromStateId, toStateId, durationS, current, busy } = transition;
    const transitionPath = `${path}.transitions[${index}]`;
    checkState(part.id, fromStateId, `${transitionPath}.fromStateId`, known);
    checkState(part.id, toStateId, `${transitionPath}.toStateId`, known);
    if (busy) checkState(busy.partId, busy.stateId, `${transitionPath}.busy`, known);
    known.report.number(durationS.typical, `${transitionPath}.durationS.typical`, 's');
    known.report.number(current.typical, `${transitionPath}.current.typical`, 'A');
  });
}

function checkSchedule(schedule: Schedule, path: string, report: NodeReport): void {
  if (schedule.kind === 'every' || schedule.kind === 'window') {
    report.number(schedule.periodS, `${path}.periodS`, 's', { isAbove: true });
  }
  if (schedule.kind === 'random') report.number(schedule.meanPerDay, `${path}.meanPerDay`, 'a day');
  if (schedule.kind === 'once') report.number(schedule.afterS, `${path}.afterS`, 's');
  if (schedule.kind === 'window') {
    report.number(schedule.fromHour, `${path}.fromHour`, 'h', { max: 24 });
    report.number(schedule.toHour, `${path}.toHour`, 'h', { max: 24 });
  }
}
