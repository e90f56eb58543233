import type { ExchangePlan } from '../link/exchange-plan.types.ts';
import type { FrameLoading } from '../scenario/scenario.types.ts';
import type { StepModel } from './layout.types.ts';
import { lasting } from './lasting.ts';
import type { NodeReport } from './node-report.ts';
import type { PartModel, StateModel } from './part-model.ts';

interface Context {
  parts: readonly PartModel[];
  report: NodeReport;
}

/**
 * Puts the part that loads the frame into a state of its own meanwhile: before the exchange, or beside the beginning of the frame.
 *
 * @param context Parts, and the report, which gets errors `unknown-part` and `unknown-state`.
 * @param models Phases of the exchange.
 * @param given The loading, and the plan, which tells how much of it lies beside the frame.
 * @returns The phases, that of the frame cut in two where the loading ends within it.
 * @example withLoading(context, models, { loading, plan }).length
 */
export function withLoading(
  context: Context,
  models: StepModel[],
  { loading, plan }: { loading: FrameLoading; plan: ExchangePlan },
): StepModel[] {
  const loader = loaderOf(context, models, loading);
  if (!loader) return models;
  const besideS = plan.figures.find(({ id }) => id === 'loading-beside')?.value ?? 0;
  return models.flatMap((model): StepModel[] => {
    const named = [...model.named];
    named[loader.part.index] = loader.state;
    if (model.phase?.id === 'loading') return [{ ...model, named }];
    if (model.phase?.id !== 'frame' || besideS === 0) return [model];
    if (besideS >= model.durationS) return [{ ...model, named }];
    const restS = model.durationS - besideS;
    const worstS = Math.max(restS, model.worstS - besideS);
    return [
      { ...model, named, ...lasting(besideS), suffix: `${model.suffix}/loading` },
      { ...model, ...lasting(restS), worstS, longestS: Math.max(restS, model.longestS - besideS) },
    ];
  });
}

function loaderOf(
  { parts, report }: Context,
  models: readonly StepModel[],
  { partId, stateId }: FrameLoading,
): { part: PartModel; state: StateModel } | null {
  const part = parts.find((candidate) => candidate.part.id === partId);
  const state = part?.stateById.get(stateId);
  if (part && state) return { part, state };
  const field = `${models[0]?.path ?? ''}.duration.loading.${part ? 'stateId' : 'partId'}`;
  const known = part ? part.states.map((one) => one.stateId) : parts.map((one) => one.part.id);
  const expected = `one of ${known.join(', ')}`;
  const message = part
    ? `The part "${partId}", which loads the frame, has no state "${stateId}"; it has ${expected}.`
    : `There is no part "${partId}" that could load the frame; the node has ${expected}.`;
  report.inconsistent(part ? 'unknown-state' : 'unknown-part', field, message, {
    value: part ? stateId : partId,
    expected,
  });
  return null;
}
