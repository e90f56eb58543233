import type { Decimal } from 'decimal.js';
import type { LedgerEntryKind } from '../forecast/forecast.types.ts';
import { LedgerDecimal } from './ledger-decimal.ts';
import type { Draw, NodeProgram, Segment } from './node-program.types.ts';

/** A line of the charge account before any rate, voltage or temperature is applied. */
export interface LedgerLine {
  kind: Extract<LedgerEntryKind, 'step' | 'transition' | 'rest' | 'leakage'>;
  /** Index into NodeProgram.routines; null for rest and leakage, which always flow. */
  routineIndex: number | null;
  /** Index into NodeProgram.parts; null for leakages. */
  partIndex: number | null;
  routineId: string | null;
  stepId: string | null;
  partId: string | null;
  /** State, or for a transition the state reached. */
  stateId: string | null;
  /** For a transition the state left, otherwise null. */
  fromStateId: string | null;
  leakageId: string | null;
  draw: Draw;
  /** What the part would draw at rest and is therefore subtracted; null for rest and leakage, which are counted whole. */
  restDraw: Draw | null;
  /** Time per cycle, s, as terms whose shortest decimals add up exactly; empty for rest and leakage. */
  durationTermsS: readonly number[];
}

/**
 * Lists a node's charge account before rates: routine × step × part × state, transitions, rest of each part, leakages.
 * Segments of the same step, part and activity are one line.
 *
 * @param program A compiled node.
 * @returns Lines in the order routines, rest, leakages.
 * @example ledgerLines(compileNode(node, { defaultReferenceVoltageV: 3 }))
 */
export function ledgerLines(program: NodeProgram): LedgerLine[] {
  const routineLines = program.routines.flatMap((routine, routineIndex) => {
    const merged = new Map<string, LedgerLine>();
    for (const segment of routine.segments) {
      const key = segmentKey(segment);
      const known = merged.get(key);
      const line = known ?? segmentLine(program, routineIndex, segment);
      merged.set(key, { ...line, durationTermsS: [...line.durationTermsS, ...segment.durationTermsS] });
    }
    return [...merged.values()];
  });
  const nothing = { routineIndex: null, routineId: null, stepId: null, fromStateId: null, restDraw: null };
  const restLines = program.parts.map((part, partIndex): LedgerLine => ({
    ...nothing,
    kind: 'rest',
    partIndex,
    partId: part.partId,
    stateId: part.restStateId,
    leakageId: null,
    draw: part.restDraw,
    durationTermsS: [],
  }));
  const leakageLines = program.leakages.map((leakage): LedgerLine => ({
    ...nothing,
    kind: 'leakage',
    partIndex: null,
    partId: null,
    stateId: null,
    leakageId: leakage.leakageId,
    draw: leakage.draw,
    durationTermsS: [],
  }));
  return [...routineLines, ...restLines, ...leakageLines];
}

function segmentKey({ stepId, partIndex, activity }: Segment): string {
  return activity.kind === 'state'
    ? `${stepId}|${partIndex}|${activity.stateId}`
    : `${stepId}|${partIndex}|${activity.fromStateId}|${activity.toStateId}`;
}

function segmentLine(program: NodeProgram, routineIndex: number, segment: Segment): LedgerLine {
  const { activity } = segment;
  const part = program.parts[segment.partIndex];
  return {
    kind: activity.kind === 'state' ? 'step' : 'transition',
    routineIndex,
    partIndex: segment.partIndex,
    routineId: program.routines[routineIndex]?.routineId ?? null,
    stepId: segment.stepId,
    partId: part?.partId ?? null,
    stateId: activity.kind === 'state' ? activity.stateId : activity.toStateId,
    fromStateId: activity.kind === 'state' ? null : activity.fromStateId,
    leakageId: null,
    draw: segment.draw,
    restDraw: part?.restDraw ?? null,
    durationTermsS: [],
  };
}

/**
 * Exact time per cycle of a ledger line.
 *
 * @param durationTermsS Terms, s; each double is taken as its shortest decimal.
 * @returns Their sum, s; 0 for none.
 * @example exactDurationS([0.1, 0.2]).toFixed() // '0.3'
 */
export function exactDurationS(durationTermsS: readonly number[]): Decimal {
  return durationTermsS.reduce((sumS, termS) => sumS.plus(termS), new LedgerDecimal(0));
}
