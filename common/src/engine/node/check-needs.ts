import { InconsistentInputError } from '#common/errors.ts';
import type { StepModel } from './layout.types.ts';
import type { NodeReport } from './node-report.ts';
import type { PartModel } from './part-model.ts';

/**
 * Checks that in a step, or in each phase of an exchange, every part is in a state whose needs the other parts meet.
 *
 * @param context The node's parts, and the report that gets each unmet need once, code `need-unmet`.
 * @param models The step, or its phases.
 * @param path The step's path in the input.
 * @example checkNeeds({ parts, partById, report }, models, 'node.routines[0].steps[1]')
 */
export function checkNeeds(
  context: { parts: readonly PartModel[]; partById: ReadonlyMap<string, PartModel>; report: NodeReport },
  models: readonly StepModel[],
  path: string,
): void {
  for (const part of context.parts) {
    if (!part.hasNeeds) continue;
    for (const model of models) if (!areMet(context, part, model, path)) break;
  }
}

function areMet(
  { partById, report }: { partById: ReadonlyMap<string, PartModel>; report: NodeReport },
  part: PartModel,
  { named, phase }: StepModel,
  path: string,
): boolean {
  const { needs, stateId } = named[part.index] ?? part.rest;
  const needed = needs && partById.get(needs.partId);
  if (!needs || !needed) return true;
  const given = named[needed.index] ?? needed.rest;
  if (needs.stateIds.includes(given.stateId)) return true;
  const expected = `"${needed.part.name}" in ${needs.stateIds.join(' or ')}`;
  const when = phase ? ` in the phase "${phase.name}"` : '';
  report.add(
    new InconsistentInputError(
      `"${part.part.name}" in the state "${stateId}" needs ${expected}, but "${needed.part.name}" is in "${given.stateId}"${when}.`,
      {
        code: 'need-unmet',
        field: `${path}.states.${part.part.id}`,
        value: given.stateId,
        expected,
        relatedFields: [`${path}.states.${needed.part.id}`],
      },
    ),
  );
  return false;
}
