import { InconsistentInputError } from '#common/errors.ts';
import { formatDuration } from '#common/units/format-duration.ts';
import type { ExchangePhase } from '../link/exchange-plan.types.ts';
import type { ExchangeDuration, StateRole } from '../scenario/scenario.types.ts';
import type { StepModel } from './layout.types.ts';
import { fromMicros } from './micros.ts';
import type { NodeReport } from './node-report.ts';
import type { PartModel, StateModel } from './part-model.ts';
import { transitionPath } from './transition-path.ts';

interface Context {
  parts: readonly PartModel[];
  report: NodeReport;
  isEnabled: boolean;
}

type Own = Pick<StepModel, 'step' | 'path' | 'named'>;

/** Which role stands in for a missing one. Listening and receiving are the same circuit. */
const STAND_INS: Partial<Record<StateRole, StateRole>> = {
  synthesiser: 'idle',
  listen: 'receive',
  receive: 'listen',
};

/**
 * The radio whose states an exchange sets: the one that it names, else the only part of kind `radio`; among several the only one
 * that the step names.
 *
 * @param context The node's parts, and the report: `unknown-part` for a radio that does not exist; a caution `radio-open` where
 *   several could be meant.
 * @param own The step.
 * @param exchange Its exchange.
 * @returns The radio; null where there is none.
 * @example radioOf(context, own, exchange)?.part.id
 */
export function radioOf(context: Context, own: Own, exchange: ExchangeDuration): PartModel | null {
  const { parts, report, isEnabled } = context;
  const { radioPartId } = exchange;
  if (radioPartId !== undefined) {
    const found = parts.find(({ part }) => part.id === radioPartId);
    if (found) return found;
    const expected = `one of ${parts.map(({ part }) => part.id).join(', ') || 'no part at all'}`;
    report.inconsistent(
      'unknown-part',
      `${own.path}.duration.radioPartId`,
      `There is no part "${radioPartId}"; the node has ${expected}.`,
      { value: radioPartId, expected },
    );
    return null;
  }
  const radios = parts.filter(({ part }) => part.kind === 'radio');
  if (radios.length < 2) return radios[0] ?? null;
  const [first, ...others] = radios.filter(({ index }) => own.named[index] !== undefined);
  if (first && others.length === 0) return first;
  if (isEnabled) {
    report.remark({
      code: 'radio-open',
      message: `The node has ${radios.length} radios and the exchange "${own.step.name}" does not say which one it uses, so each keeps the state of the step throughout. Choose the radio.`,
      path: `${own.path}.duration.radioPartId`,
    });
  }
  return null;
}

/**
 * The state that the radio takes in a phase: that of the phase's role, the one typed in the step where several have it. Where none
 * has it, the synthesiser's stands for idle and listening for receiving and back; then the state typed, for idle and sleep the rest
 * state. Each such stand-in is a caution `role-fallback`.
 *
 * @param context Gets the cautions, and an error `role-missing` where nothing can stand in.
 * @param own The step.
 * @param wanted The phase and the radio.
 * @returns The state; undefined where there is none.
 * @example radioState(context, own, { phase, radio })?.stateId // 'transmit'
 */
export function radioState(
  context: Context,
  own: Own,
  { phase, radio }: { phase: ExchangePhase; radio: PartModel },
): StateModel | undefined {
  const { role } = phase;
  const typed = own.named[radio.index];
  const exact = withRole(radio, role, typed);
  if (exact) return exact;
  const standIn = STAND_INS[role];
  const isQuiet = role === 'sleep' || role === 'idle';
  const state =
    (standIn && withRole(radio, standIn, typed)) ??
    (typed?.isRest === false ? typed : isQuiet ? radio.rest : undefined);
  if (state) {
    if (context.isEnabled) remarkStandIn(context.report, own, { phase, radio, state });
    return state;
  }
  context.report.add(
    new InconsistentInputError(
      `"${radio.part.name}" has no state with the role "${role}", which "${phase.name}" of "${own.step.name}" needs; give one of its states that role.`,
      {
        code: 'role-missing',
        field: `node.parts[${radio.index}].states`,
        expected: `a state with the role "${role}"`,
        relatedFields: [`${own.path}.duration`],
      },
    ),
  );
  return undefined;
}

function withRole(radio: PartModel, role: StateRole, typed: StateModel | undefined): StateModel | undefined {
  return typed?.role === role ? typed : radio.states.find((state) => state.role === role);
}

function remarkStandIn(
  report: NodeReport,
  { step }: Own,
  { phase, radio, state }: { phase: ExchangePhase; radio: PartModel; state: StateModel },
): void {
  const name = radio.part.states[state.index]?.name ?? state.stateId;
  report.remark({
    code: 'role-fallback',
    message: `"${radio.part.name}" has no state with the role "${phase.role}", so "${name}" stands for it in "${phase.name}" of "${step.name}".`,
    path: `node.parts[${radio.index}].states`,
  });
}

/**
 * Says where a time of the standard and a declared transition of the radio cover the same thing, since both count.
 *
 * @param context Gets the cautions `turnaround-and-transition` and `start-up-and-transition`.
 * @param models The phases.
 * @param radio The radio.
 * @example remarkDoubleCounts(context, models, radio)
 */
export function remarkDoubleCounts({ report }: Context, models: readonly StepModel[], radio: PartModel): void {
  models.forEach((model, index) => {
    const next = models[index + 1]?.named[radio.index];
    const state = model.named[radio.index];
    if (!state) return;
    if (model.phase?.id === 'turnaround' && next) {
      remarkBoth(report, radio, { model, code: 'turnaround-and-transition', from: state, to: next });
    } else if (model.phase?.id === 'crystal-start') {
      remarkBoth(report, radio, { model, code: 'start-up-and-transition', from: radio.rest, to: state });
    }
  });
}

function remarkBoth(
  report: NodeReport,
  radio: PartModel,
  { model, code, from, to }: { model: StepModel; code: string; from: StateModel; to: StateModel },
): void {
  const totalUs = transitionPath(radio, from, to)?.totalUs ?? 0;
  if (!(totalUs > 0)) return;
  const nameOf = ({ index, stateId }: StateModel): string => radio.part.states[index]?.name ?? stateId;
  const way = `from "${nameOf(from)}" to "${nameOf(to)}"`;
  const remedy =
    code === 'turnaround-and-transition'
      ? 'If the radio makes that way within the turnaround, set the duration of the transition to 0.'
      : 'If they are the same start, leave one of them out.';
  report.remark({
    code,
    message: `"${model.phase?.name ?? ''}" of "${model.step.name}" takes ${formatDuration(model.durationS)}, and the way of "${radio.part.name}" ${way} takes ${formatDuration(fromMicros(totalUs))}: both count. ${remedy}`,
    path: `node.parts[${radio.index}].transitions`,
  });
}
