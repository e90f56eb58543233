import type { ExchangePhase, ExchangePlan } from '#common/engine/link/exchange-plan.types.ts';

/** A stretch of one row of the picture; `from` and `to` as shares of the row. */
export interface Stretch {
  /** Place of the phase in the plan. */
  phase: number;
  from: number;
  to: number;
  /** Counted from 1; null for what happens once, and where attempts are too many to draw apart. */
  attempt: number | null;
  durationS: number;
}

export interface PictureRow {
  totalS: number;
  stretches: Stretch[];
  /** Where each attempt begins and ends; empty where there is one. */
  attempts: { from: number; to: number }[];
}

/** More attempts than this would be drawn as a grey wall; they are drawn as one. */
export const MOST_ATTEMPTS_DRAWN = 8;

interface Piece {
  phase: number;
  durationS: number;
  attempt: number | null;
}

/** The phases on average, one after the other. */
export function meanRow({ phases }: ExchangePlan): PictureRow {
  return laidOut(phases.flatMap(({ meanS }, phase) => (meanS > 0 ? [{ phase, durationS: meanS, attempt: null }] : [])));
}

/**
 * The phases at the worst. What happens in one stretch is drawn once; what is interrupted comes in each attempt, and its
 * time is shared out evenly between them.
 */
export function worstRow(plan: ExchangePlan): PictureRow {
  const { worstAttempts } = plan;
  const happening = phasesAtWorst(plan);
  const isRepeated = ({ worstS, longestS }: ExchangePhase): boolean => longestS < worstS;
  const repeated = happening.filter(({ phase }) => isRepeated(phase));
  const attempts = worstAttempts > MOST_ATTEMPTS_DRAWN || repeated.length === 0 ? 1 : worstAttempts;
  const first = happening.findIndex(({ phase }) => isRepeated(phase));
  const pieces: Piece[] = [];
  const once = (items: typeof happening): void =>
    items.forEach(({ phase, index }) => pieces.push({ phase: index, durationS: phase.worstS, attempt: null }));
  if (attempts === 1) once(happening);
  else {
    once(happening.slice(0, first));
    for (let attempt = 1; attempt <= attempts; attempt += 1) {
      for (const { phase, index } of repeated)
        pieces.push({ phase: index, durationS: phase.worstS / attempts, attempt });
    }
    once(happening.slice(first).filter(({ phase }) => !isRepeated(phase)));
  }
  return laidOut(pieces);
}

interface Placed {
  phase: ExchangePhase;
  index: number;
}

/** At most so many phases are taken to be missing from the longest exchange. */
const MOST_MISSING = 3;

/**
 * The phases of which the longest exchange consists. Some exclude each other: the longest exchange waits for an acknowledgement
 * that does not come. They are those whose longest times together make the longest duration; where none do, all phases.
 */
function phasesAtWorst({ phases, worstS }: ExchangePlan): Placed[] {
  const all = phases.flatMap((phase, index) => (phase.worstS > 0 ? [{ phase, index }] : []));
  for (let missing = 0; missing <= MOST_MISSING; missing += 1) {
    const found = without(all, missing).find((kept) => Math.abs(sumOf(kept) - worstS) <= 1e-9 + 1e-9 * worstS);
    if (found) return found;
  }
  return all;
}

const sumOf = (placed: readonly Placed[]): number => placed.reduce((sum, { phase }) => sum + phase.worstS, 0);

/** Every list that leaves out so many of the items. */
function without<T>(items: readonly T[], missing: number): T[][] {
  if (missing === 0) return [[...items]];
  return items.flatMap((_, at) =>
    without(items.slice(at + 1), missing - 1).map((kept) => [...items.slice(0, at), ...kept]),
  );
}

/** Whether the phases' longest times add up to more than the longest exchange, since some exclude each other. */
export function hasAlternatives({ phases, worstS }: ExchangePlan): boolean {
  return phases.reduce((sum, phase) => sum + phase.worstS, 0) > worstS + 1e-9;
}

/** Whether the row of the worst is the longest exchange, and not each phase at its longest. */
export function isOneExchange(row: PictureRow, { worstS }: ExchangePlan): boolean {
  return Math.abs(row.totalS - worstS) <= 1e-8 + 1e-8 * worstS;
}

function laidOut(pieces: readonly Piece[]): PictureRow {
  const totalS = pieces.reduce((sum, { durationS }) => sum + durationS, 0);
  let at = 0;
  const stretches = pieces.map(({ phase, durationS, attempt }) => {
    const from = at / totalS;
    at += durationS;
    return { phase, attempt, durationS, from, to: at / totalS };
  });
  const numbers = [...new Set(stretches.flatMap(({ attempt }) => attempt ?? []))];
  const attempts = numbers.map((number) => {
    const own = stretches.filter(({ attempt }) => attempt === number);
    return { from: own[0]?.from ?? 0, to: own.at(-1)?.to ?? 0 };
  });
  return { totalS, stretches, attempts: attempts.length > 1 ? attempts : [] };
}

/** Round times for the ruler, about five of them; shares of the row. */
export function rulerTicks(totalS: number): { timeS: number; at: number }[] {
  if (!(totalS > 0)) return [];
  const rough = totalS / 5;
  const power = 10 ** Math.floor(Math.log10(rough));
  const stepS = ([1, 2, 5, 10].find((factor) => factor * power >= rough) ?? 10) * power;
  const count = Math.floor(totalS / stepS + 1e-9);
  return Array.from({ length: count + 1 }, (_, i) => ({ timeS: i * stepS, at: (i * stepS) / totalS }));
}

export interface Leader {
  stretch: Stretch;
  /** Where its label stands, as a share of the row; near its middle, but never on another label. */
  label: number;
}

/** Labels for the stretches of the first attempt, kept apart by a least distance. */
export function leaders({ stretches }: PictureRow, apart = 0.045): Leader[] {
  const shown = stretches.filter(({ attempt }) => attempt === null || attempt === 1);
  let last = -Infinity;
  const placed = shown.map((stretch) => {
    last = Math.max((stretch.from + stretch.to) / 2, last + apart, apart / 2);
    return { stretch, label: last };
  });
  let next = 1 + apart / 2;
  for (const leader of placed.toReversed()) {
    leader.label = Math.min(leader.label, next - apart);
    next = leader.label;
  }
  return placed;
}
