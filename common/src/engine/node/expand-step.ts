import { EngineError } from '#common/errors.ts';
import type { ExchangePhase, ExchangePlan } from '../link/exchange-plan.types.ts';
import { stepDuration, stepPlan } from '../link/step-duration.ts';
import type { StepDuration } from '../link/step-duration.ts';
import type { ExchangeDuration, LinkSettings, Step } from '../scenario/scenario.types.ts';
import { checkNeeds } from './check-needs.ts';
import { radioOf, radioState, remarkDoubleCounts } from './exchange-states.ts';
import { withLoading } from './frame-loader.ts';
import { lasting, wholeMicros } from './lasting.ts';
import type { StepModel } from './layout.types.ts';
import { toMicros } from './micros.ts';
import type { NodeReport } from './node-report.ts';
import type { OnAir } from './on-air.ts';
import type { PartModel, StateModel } from './part-model.ts';

/** What all steps of a routine share. */
export interface StepContext {
  parts: readonly PartModel[];
  partById: ReadonlyMap<string, PartModel>;
  link: LinkSettings | undefined;
  report: NodeReport;
  /** Remarks of a disabled routine would tell of what is not counted anyway. */
  isEnabled: boolean;
  /** Gets the time on air of each exchange in a band with a limit. */
  onAir: OnAir[];
}

/** Sub-steps that the repeats of one step may become; beyond, durations are multiplied instead. */
const MOST_SUB_STEPS = 64;

/**
 * Makes a step ready for the timeline: itself, or for an exchange one sub-step per phase, with the radio in the state of the
 * phase's role and the other parts as the step says. The pattern `frame` is no such exchange: it lasts as long as its airtime,
 * in the states typed.
 *
 * @param context Parts, link defaults and the report, which gets every problem and remark.
 * @param step The step; its ids have been checked.
 * @param path Its path in the input.
 * @returns The step or its phases in the order of time, repeats included.
 * @example expandStep(context, step, 'node.routines[0].steps[1]').map(({ phase }) => phase?.id)
 */
export function expandStep(context: StepContext, step: Step, path: string): StepModel[] {
  const { parts, partById } = context;
  const named = new Array<StateModel | undefined>(parts.length).fill(undefined);
  for (const partId of Object.keys(step.states)) {
    const part = partById.get(partId);
    if (part) named[part.index] = part.stateById.get(step.states[partId] ?? '');
  }
  const own = { step, path, phase: null, radioIndex: -1, suffix: '', named };
  const models =
    step.duration.kind === 'exchange' ? exchangeModels(context, own, step.duration) : [wholeStep(context, own)];
  checkNeeds(context, models, path);
  return models;
}

interface Phased {
  plan: ExchangePlan;
  radio: PartModel;
  exchange: ExchangeDuration;
}

type Own = Pick<StepModel, 'step' | 'path' | 'phase' | 'radioIndex' | 'suffix' | 'named'>;

function wholeStep(context: StepContext, own: Own): StepModel {
  const { meanS, termsS } = durationOf(context, own);
  const isTyped = own.step.duration.kind === 'fixed';
  return modelOf(own, {
    durationUs: isTyped ? toMicros(meanS) : wholeMicros(meanS),
    durationS: meanS,
    termsS,
    worstS: meanS,
    longestS: meanS,
  });
}

const NO_TIME = { meanS: 0, termsS: [0] };

function durationOf({ link, report }: StepContext, { step, path }: Own): Pick<StepDuration, 'meanS' | 'termsS'> {
  try {
    return stepDuration(step, link, path);
  } catch (error) {
    if (!(error instanceof EngineError)) throw error;
    report.add(error);
    return NO_TIME;
  }
}

/** Field by field: a spread here took a sixth of a forecast. */
function modelOf(
  { step, path, phase, radioIndex, suffix, named }: Own,
  { durationUs, durationS, termsS, worstS, longestS }: Omit<StepModel, keyof Own>,
): StepModel {
  return { step, path, phase, radioIndex, suffix, named, durationUs, durationS, termsS, worstS, longestS };
}

/** Runs a computation whose errors are the input's; they are collected, and a stand-in goes on. */
function reported<T>({ report }: StepContext, standIn: T, compute: () => T): T {
  try {
    return compute();
  } catch (error) {
    if (!(error instanceof EngineError)) throw error;
    report.add(error);
    return standIn;
  }
}

function exchangeModels(context: StepContext, own: Own, exchange: ExchangeDuration): StepModel[] {
  const { path } = own;
  const found = reported(context, null, () => stepPlan(exchange, { nodeLink: context.link, path }));
  if (found === null) return [modelOf(own, { durationUs: 0, durationS: 0, termsS: [0], worstS: 0, longestS: 0 })];
  const { plan, remarks } = found;
  if (context.isEnabled) for (const remark of remarks) context.report.remark(remark);
  noteOnAir(context, own, { exchange, plan });
  const radio = radioOf(context, own, exchange);
  if (!radio || isPlain(exchange, plan)) return [wholeExchange(own, plan)];
  return repeated(context, phaseModels(context, own, { plan, radio, exchange }));
}

function noteOnAir(
  { link, onAir }: StepContext,
  { step, path }: Own,
  { exchange, plan }: { exchange: ExchangeDuration; plan: ExchangePlan },
): void {
  const ownBand = exchange.link?.dutyCycleBand;
  const bandId = ownBand ?? link?.dutyCycleBand;
  if (bandId === undefined || !(plan.onAirWorstS > 0)) return;
  const at = ownBand === undefined ? 'node' : `${path}.duration`;
  onAir.push({ bandId, onAirS: plan.onAirWorstS * (step.repeats ?? 1), path: `${at}.link.dutyCycleBand` });
}

/** A frame alone lasts as long as its airtime, in the states that the step types. */
function isPlain({ pattern }: ExchangeDuration, { phases }: ExchangePlan): boolean {
  return pattern === 'frame' && phases.length === 1;
}

/** An exchange in the states that the step types: no part follows its phases. */
function wholeExchange(own: Own, plan: ExchangePlan): StepModel {
  const { repeats = 1 } = own.step;
  const durationS = plan.meanS * repeats;
  const worstS = Math.max(durationS, plan.worstS * repeats);
  return modelOf(own, {
    durationUs: wholeMicros(durationS),
    durationS,
    termsS: [durationS],
    worstS,
    longestS: worstS,
  });
}

function phaseModels(context: StepContext, own: Own, phased: Phased): StepModel[] {
  const { plan, radio, exchange } = phased;
  const models: StepModel[] = [];
  for (const phase of plan.phases) {
    // What never happens takes the radio nowhere.
    if (!(phase.meanS > 0)) continue;
    const isTyped = exchange.pattern === 'frame' && phase.id === 'frame';
    const state = isTyped ? own.named[radio.index] : radioState(context, own, { phase, radio });
    models.push(phaseModel(own, phase, { radio, state }));
  }
  if (context.isEnabled) remarkDoubleCounts(context, models, radio);
  return exchange.loading ? withLoading(context, models, { loading: exchange.loading, plan }) : models;
}

function phaseModel(
  own: Own,
  { id, name, meanS, worstS, longestS }: ExchangePhase,
  { radio, state }: { radio: PartModel; state: StateModel | undefined },
): StepModel {
  const named = own.named.slice();
  named[radio.index] = state;
  return {
    step: own.step,
    path: own.path,
    phase: { id, name },
    radioIndex: radio.index,
    suffix: `/${id}`,
    named,
    durationUs: wholeMicros(meanS),
    durationS: meanS,
    termsS: [meanS],
    worstS: Math.max(meanS, worstS),
    longestS,
  };
}

function repeated({ report, isEnabled }: StepContext, models: StepModel[]): StepModel[] {
  const [first] = models;
  const repeats = first?.step.repeats ?? 1;
  if (!first || repeats === 1) return models;
  if (repeats * models.length <= MOST_SUB_STEPS) {
    return Array.from({ length: repeats }, (_, index) =>
      index === 0 ? models : models.map((model) => ({ ...model, suffix: `${model.suffix}@${index + 1}` })),
    ).flat();
  }
  if (isEnabled) {
    report.remark({
      code: 'repeats-merged',
      message: `The ${repeats} exchanges of "${first.step.name}" are ${models.length} phases each; they are shown and counted as one exchange that takes ${repeats} times as long, so moves of the radio between its states count once.`,
      path: `${first.path}.repeats`,
    });
  }
  return models.map((model) => {
    const durationS = model.durationS * repeats;
    const { longestS } = model;
    return { ...model, ...lasting(durationS), worstS: model.worstS * repeats, longestS };
  });
}
