import type { ExchangePlan } from '#common/engine/link/exchange-plan.types.ts';
import { linkOf } from '#common/engine/link/link-of.ts';
import type {
  ExchangeDuration,
  LinkSettings,
  Provenance,
  Routine,
  Scenario,
  Step,
} from '#common/engine/scenario/scenario.types.ts';
import { formatDuration } from '#common/units/format-duration.ts';
import { formatNumber, formatShare } from '#common/units/format-quantity.ts';
import { withPeriod } from '../keep-alive.ts';
import { valueAt, withValueAt } from '../link/link-values.ts';
import { planOf } from '../link/plan-of.ts';
import { onExchange, withExchangeValue, withLink } from '../operations/exchange-operations.ts';
import { updateRoutine, updateStep } from '../operations/routine-operations.ts';

/** The step that the questions are about. */
export interface WhatIfTarget {
  routineId: string;
  stepId: string;
}

export type AxisId = 'payload' | 'busy' | 'loss' | 'retries' | 'security' | 'interval';

/** One other value, and the document that has it. */
export interface Alternative {
  value: number;
  label: string;
  isCurrent: boolean;
  change: (document: Scenario) => Scenario;
}

/** Something that could be otherwise, with a few values beside the present one. */
export interface Axis {
  id: AxisId;
  title: string;
  /** What an edit of it is called. */
  word: string;
  alternatives: Alternative[];
}

/** What an axis is made of: the present value, others to try, how they read and what they change. */
interface AxisPieces {
  id: AxisId;
  title: string;
  word: string;
  current: number;
  others: readonly number[];
  label: (value: number) => string;
  change: (value: number) => Alternative['change'];
}

interface Subject {
  routine: Routine;
  step: Step;
  exchange: ExchangeDuration;
  link: LinkSettings;
  plan: ExchangePlan;
}

/** Octets that an exchange sends or receives by its own choice, the first that it has. */
const SIZES = [
  { key: 'payloadOctets', title: 'Payload' },
  { key: 'psduOctets', title: 'Frame' },
  { key: 'dataOctets', title: 'Data' },
] as const;

const MOST_ALTERNATIVES = 5;

/** What could be otherwise about a step on the air; nothing where it cannot be told what it does now. */
export function whatIfAxes(document: Scenario, { routineId, stepId }: WhatIfTarget): Axis[] {
  const routine = document.node.routines.find(({ id }) => id === routineId);
  const step = routine?.steps.find(({ id }) => id === stepId);
  if (!routine || step?.duration.kind !== 'exchange') return [];
  const exchange = step.duration;
  const result = planOf(exchange, document.node.link);
  if (result.kind === 'problem') return [];
  const subject = { routine, step, exchange, link: linkOf(document.node.link, exchange.link), plan: result.plan };
  return [payload, busy, loss, retries, security, interval].flatMap((make) => {
    const pieces = make(subject);
    return pieces ? [axisOf(pieces)] : [];
  });
}

function axisOf({ id, title, word, current, others, label, change }: AxisPieces): Axis {
  const values = [...new Set([current, ...others])].sort((a, b) => a - b);
  const at = values.indexOf(current);
  const from = Math.max(0, Math.min(at - 2, values.length - MOST_ALTERNATIVES));
  return {
    id,
    title,
    word,
    alternatives: values.slice(from, from + MOST_ALTERNATIVES).map((value) => ({
      value,
      label: label(value),
      isCurrent: value === current,
      change: value === current ? (document) => document : change(value),
    })),
  };
}

const onStep =
  ({ routine, step }: Pick<Subject, 'routine' | 'step'>, apply: (exchange: ExchangeDuration) => ExchangeDuration) =>
  (document: Scenario): Scenario =>
    updateStep(document, routine.id, step.id, (before) => ({
      ...before,
      duration: onExchange(apply)(before.duration),
    }));

const figureOf = ({ plan }: Subject, id: string): number | undefined =>
  plan.figures.find((figure) => figure.id === id)?.value;

/** Which octets a step chooses, where it does. */
export function sizeOf(exchange: ExchangeDuration): { key: string; title: string; octets: number } | null {
  for (const { key, title } of SIZES) {
    const octets = valueAt(exchange, key);
    if (typeof octets === 'number') return { key, title, octets };
  }
  return null;
}

const LADDER = [1, 2, 4, 8, 12, 16, 24, 32, 48, 64, 80, 100, 127, 200, 400, 800, 1_600];

function payload(subject: Subject): AxisPieces | null {
  const size = sizeOf(subject.exchange);
  if (!size) return null;
  return {
    id: 'payload',
    title: size.title,
    word: size.title.toLowerCase(),
    current: size.octets,
    others: LADDER,
    label: (octets) => `${formatNumber(octets)} octets`,
    change: (octets) => onStep(subject, (exchange) => withExchangeValue(exchange, size.key, octets)),
  };
}

function probability(
  subject: Subject,
  key: 'busyProbability' | 'frameErrorRate',
  words: Pick<AxisPieces, 'id' | 'title' | 'word' | 'others'>,
): AxisPieces | null {
  const current = figureOf(subject, key);
  if (current === undefined) return null;
  return {
    ...words,
    current,
    label: (share) => formatShare(share),
    change: (share) => withProbability(subject, key, share),
  };
}

const TAKEN: Provenance = { kind: 'assumed', text: 'Taken from a what-if' };

/** A change that gives a step a probability of its own; range and origin of the old one no longer hold. */
export function withProbability(
  subject: Pick<Subject, 'routine' | 'step'>,
  key: 'busyProbability' | 'frameErrorRate',
  typical: number,
): Alternative['change'] {
  return onStep(subject, (exchange) =>
    withLink(exchange, (link) => ({ ...link, [key]: { typical, provenance: TAKEN } })),
  );
}

const busy = (subject: Subject): AxisPieces | null =>
  probability(subject, 'busyProbability', {
    id: 'busy',
    title: 'Busy channel',
    word: 'busy channel',
    others: [0.01, 0.1, 0.3, 0.5],
  });

const loss = (subject: Subject): AxisPieces | null =>
  probability(subject, 'frameErrorRate', {
    id: 'loss',
    title: 'Loss',
    word: 'loss of frames',
    others: [0.01, 0.05, 0.1, 0.25],
  });

const RETRYING: readonly ExchangeDuration['pattern'][] = ['acknowledged', 'listen-before-talk', 'forward', 'poll'];
const USUAL_RETRIES = 3;

function retries(subject: Subject): AxisPieces | null {
  if (!RETRYING.includes(subject.exchange.pattern)) return null;
  return {
    id: 'retries',
    title: 'Retries',
    word: 'retries',
    current: subject.link.macMaxFrameRetries ?? USUAL_RETRIES,
    others: [0, 1, 3, 5, 7],
    label: (count) => formatNumber(count),
    change: (count) =>
      onStep(subject, (exchange) => withLink(exchange, (link) => ({ ...link, macMaxFrameRetries: count }))),
  };
}

const SECURITY_WORDS: Readonly<Record<number, string>> = {
  0: 'none',
  1: 'MIC 4',
  2: 'MIC 8',
  3: 'MIC 16',
  4: 'encrypted',
  5: 'encrypted, MIC 4',
  6: 'encrypted, MIC 8',
  7: 'encrypted, MIC 16',
};

/** Only frames that are put together from a payload have a header to secure. */
function security(subject: Subject): AxisPieces | null {
  if (!subject.plan.frame?.fields.some(({ id }) => id === 'payload')) return null;
  const { frame } = subject.link;
  return {
    id: 'security',
    title: 'Security',
    word: 'security level',
    current: frame?.securityLevel ?? 0,
    others: [0, 1, 5, 6, 7],
    label: (level) => SECURITY_WORDS[level] ?? formatNumber(level),
    change: (level) =>
      onStep(subject, (exchange) =>
        withLink(exchange, (link) => withValueAt(link, 'frame', { ...link.frame, securityLevel: level })),
      ),
  };
}

function interval(subject: Subject): AxisPieces | null {
  const { id, schedule } = subject.routine;
  const factors = [0.25, 0.5, 2, 4];
  if (schedule.kind === 'random') {
    return {
      id: 'interval',
      title: 'Interval',
      word: 'interval',
      current: schedule.meanPerDay,
      others: factors.map((factor) => factor * schedule.meanPerDay),
      label: (perDay) => `${formatNumber(perDay, { significantDigits: 3 })} a day`,
      change: (meanPerDay) => (document) =>
        updateRoutine(document, id, (before) => ({
          ...before,
          schedule: before.schedule.kind === 'random' ? { ...before.schedule, meanPerDay } : before.schedule,
        })),
    };
  }
  if (!('periodS' in schedule)) return null;
  return {
    id: 'interval',
    title: 'Interval',
    word: 'interval',
    current: schedule.periodS,
    others: factors.map((factor) => Math.max(1, Math.round(factor * schedule.periodS * 1e6)) / 1e6),
    label: (periodS) => formatDuration(periodS),
    change: (periodS) => (document) =>
      updateRoutine(document, id, (before) => ({ ...before, schedule: withPeriod(before.schedule, periodS) })),
  };
}
