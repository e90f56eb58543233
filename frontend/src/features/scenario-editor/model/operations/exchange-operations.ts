import type {
  Duration,
  ExchangeDuration,
  FrameLoading,
  LinkSettings,
  Part,
  Step,
} from '#common/engine/scenario/scenario.types.ts';
import { EXCHANGES, type PatternId } from '../link/exchange-fields.table.ts';
import { valueAt, withValueAt } from '../link/link-values.ts';
import { withOptional } from './supply-operations.ts';

const SIZES = ['payloadOctets', 'psduOctets'] as const;

/** The usual report. A PHY is chosen only where the node has none, since the step would otherwise not follow the node. */
export function newExchange(nodeLink: LinkSettings | undefined): ExchangeDuration {
  const own: LinkSettings | undefined = nodeLink?.phy === undefined ? { phy: 'oqpsk-2450' } : undefined;
  return { kind: 'exchange', ...EXCHANGES.acknowledged.start, ...(own && { link: own }) };
}

/** Another exchange with its usual figures; radio, link, loading and the size of the frame stay where it has them. */
export function exchangeOfPattern(before: ExchangeDuration, pattern: PatternId): ExchangeDuration {
  if (before.pattern === pattern) return before;
  const { radioPartId, link, loading } = before;
  const { start, fields } = EXCHANGES[pattern];
  const made: ExchangeDuration = {
    kind: 'exchange',
    ...start,
    ...(radioPartId !== undefined && { radioPartId }),
    ...(link && { link }),
    ...(loading && { loading }),
  };
  const size = SIZES.find(
    (key) => typeof valueAt(before, key) === 'number' && fields.some((field) => field.key === key),
  );
  return size ? withExchangeValue(made, size, valueAt(before, size)) : made;
}

/** The exchange with one of its figures changed. Of the two sizes of a frame one gives the other, so setting one takes the other away. */
export function withExchangeValue(exchange: ExchangeDuration, key: string, value: unknown): ExchangeDuration {
  const other = key === 'payloadOctets' ? 'psduOctets' : key === 'psduOctets' ? 'payloadOctets' : null;
  const isOther = other !== null && EXCHANGES[exchange.pattern].fields.some((field) => field.key === other);
  const single = isOther && value !== undefined ? withValueAt(exchange, other, undefined) : exchange;
  return withValueAt(single, key, value);
}

export function withLink(exchange: ExchangeDuration, change: (link: LinkSettings) => LinkSettings): ExchangeDuration {
  const link = change(exchange.link ?? {});
  return withOptional(exchange, 'link', Object.keys(link).length === 0 ? undefined : link);
}

export function withLoading(
  exchange: ExchangeDuration,
  change: (loading: FrameLoading) => FrameLoading,
): ExchangeDuration {
  return exchange.loading ? { ...exchange, loading: change(exchange.loading) } : exchange;
}

/** Loading by the first controller, in its first state that is not rest; undefined where no part could do it. */
export function newLoading(parts: readonly Part[]): FrameLoading | undefined {
  const part = parts.find(({ kind }) => kind === 'controller') ?? parts.find(({ kind }) => kind !== 'radio');
  const state = part && workingState(part);
  return state && { partId: part.id, stateId: state.id, clockHz: 4_000_000 };
}

/** The first state of a part that is not rest, else its only one. */
export function workingState(part: Part): Part['states'][number] | undefined {
  return part.states.find(({ id }) => id !== part.restStateId) ?? part.states[0];
}

/** Whether an exchange gives the states of a part: that of its radio, phase by phase. One frame alone takes the state typed. */
export function isLedByLink({ duration }: Step, part: Part, parts: readonly Part[]): boolean {
  if (duration.kind !== 'exchange' || duration.pattern === 'frame') return false;
  if (duration.radioPartId !== undefined) return duration.radioPartId === part.id;
  return part.kind === 'radio' && parts.filter(({ kind }) => kind === 'radio').length === 1;
}

/** Applies a change to exchanges only; other durations stay as they are. */
export const onExchange =
  (change: (exchange: ExchangeDuration) => ExchangeDuration) =>
  (duration: Duration): Duration =>
    duration.kind === 'exchange' ? change(duration) : duration;
