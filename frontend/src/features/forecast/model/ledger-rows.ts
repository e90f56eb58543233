import { Decimal } from 'decimal.js';
import type { Ledger, LedgerEntry, Scenario } from '#common/engine/index.ts';
import { formatQuantity, withUnit } from '#common/units/format-quantity.ts';
import { MAH_C } from '#common/units/si.ts';
import { partName, routineName, stateName } from './names.ts';

/** Wide enough for any sum of entries on the engine's grid. */
const Exact = Decimal.clone({ precision: 80 });
type Sum = InstanceType<typeof Exact>;

export interface LedgerRow {
  id: string;
  what: string;
  detail: string;
  /** Exact charge per period, C, every digit. */
  exactC: string;
  chargeC: number;
  /** Share of the total and charge as shown; the shown rows of a group add up to the shown figure of their heading. */
  share: string;
  charge: string;
  children: LedgerRow[];
}

export interface LedgerView {
  rows: LedgerRow[];
  totalExactC: string;
  total: string;
}

interface Draft {
  id: string;
  what: string;
  detail: string;
  sum: Sum;
  children: Draft[];
}

/** Rows with a smaller share than this are gathered under "Everything else", if there are at least two. */
const SMALL_SHARE = 0.01;
/** Lines of a group that are shown at once. */
const FIRST_LINES = 5;

/** Entries grouped for reading: each routine, rest, leakage, and what the supply takes; every sum exact. */
export function ledgerView(scenario: Scenario, ledger: Ledger): LedgerView {
  const total = sumOf(ledger.entries);
  const groups = new Map<string, LedgerEntry[]>();
  for (const entry of ledger.entries) {
    const key = entry.routineId === null ? entry.kind : `routine:${entry.routineId}`;
    groups.set(key, [...(groups.get(key) ?? []), entry]);
  }
  const drafts = [...groups].map(([key, entries]) => groupOf(scenario, key, entries)).sort(bySize);
  const totalC = total.toNumber();
  const grid = chargeGrid(totalC);
  const totalUnits = { share: 1_000, charge: Math.round(totalC / MAH_C / grid.stepMah) };
  const rows = shown(gatherSmall(drafts, total), totalUnits, grid);
  return { rows, totalExactC: total.toFixed(), total: grid.format(totalUnits.charge) };
}

function sumOf(entries: readonly LedgerEntry[]): Sum {
  return entries.reduce((sum, { chargeC }) => sum.plus(chargeC), new Exact(0));
}

const bySize = (a: Draft, b: Draft): number => b.sum.abs().comparedTo(a.sum.abs());

function groupOf(scenario: Scenario, key: string, entries: LedgerEntry[]): Draft {
  const lines = entries.map((entry, i) => lineOf(scenario, entry, `${key}/${i}`)).sort(bySize);
  const children = gatherTail(lines, key);
  const [first] = entries;
  const isRoutine = first !== undefined && first.routineId !== null;
  const isAlone = entries.length === 1 && !isRoutine;
  return {
    id: key,
    what: isRoutine ? routineName(scenario, first.routineId) : GROUP_WORDS[first?.kind ?? 'rest'].what,
    detail: isRoutine ? linesInWords(entries.length) : GROUP_WORDS[first?.kind ?? 'rest'].detail,
    sum: sumOf(entries),
    children: isAlone && first?.kind !== 'rest' && first?.kind !== 'leakage' ? [] : children,
  };
}

const GROUP_WORDS: Record<LedgerEntry['kind'], { what: string; detail: string }> = {
  step: { what: 'Steps', detail: '' },
  transition: { what: 'Transitions', detail: '' },
  rest: { what: 'Rest, all parts', detail: 'sleep of every part, all year' },
  leakage: { what: 'Leakage', detail: 'flows always' },
  regulator: { what: 'Regulator', detail: 'what it takes for itself' },
  capacitor: { what: 'Leakage of the capacitor', detail: 'flows always' },
  monitor: { what: 'Low-battery monitor', detail: 'its readings' },
  'self-discharge': { what: 'Self-discharge', detail: 'mean year in this climate' },
};

const linesInWords = (count: number): string => `${count} ${count === 1 ? 'entry' : 'entries'}`;

function lineOf(scenario: Scenario, entry: LedgerEntry, id: string): Draft {
  return { id, ...lineWords(scenario, entry), sum: new Exact(entry.chargeC), children: [] };
}

function lineWords(scenario: Scenario, entry: LedgerEntry): { what: string; detail: string } {
  const part = partName(scenario, entry.partId);
  const state = stateName(scenario, entry.partId, entry.stateId);
  const perCycle = entry.chargePerCycleC === null ? '' : ` · ${perCycleCharge(entry.chargePerCycleC)} a cycle`;
  switch (entry.kind) {
    case 'step':
      return { what: stepName(scenario, entry), detail: `${part}, ${state}${perCycle}` };
    case 'transition': {
      const from = stateName(scenario, entry.partId, entry.fromStateId);
      return { what: stepName(scenario, entry), detail: `${part}, ${from} → ${state}${perCycle}` };
    }
    case 'rest':
      return { what: part, detail: `rest: ${state}` };
    case 'leakage':
      return {
        what: scenario.node.leakages.find((leakage) => leakage.id === entry.leakageId)?.name ?? 'A removed leakage',
        detail: 'flows always',
      };
    default:
      return GROUP_WORDS[entry.kind];
  }
}

function stepName(scenario: Scenario, entry: LedgerEntry): string {
  const steps = scenario.node.routines.find((routine) => routine.id === entry.routineId)?.steps;
  return steps?.find((step) => step.id === entry.stepId)?.name ?? 'Return to rest';
}

function perCycleCharge(chargeC: string): string {
  return formatQuantity(Number(chargeC), 'charge');
}

/** Of a long list the smaller lines come under one, so that what matters is seen at once. */
function gatherTail(lines: Draft[], key: string): Draft[] {
  if (lines.length <= FIRST_LINES + 1) return lines;
  const tail = lines.slice(FIRST_LINES);
  const sum = tail.reduce((total, line) => total.plus(line.sum), new Exact(0));
  const gathered = {
    id: `${key}/smaller`,
    what: 'Smaller entries',
    detail: linesInWords(tail.length),
    sum,
    children: tail,
  };
  return [...lines.slice(0, FIRST_LINES), gathered];
}

function gatherSmall(drafts: Draft[], total: Sum): Draft[] {
  const isSmall = (draft: Draft): boolean =>
    draft.id !== 'rest' && draft.id !== 'leakage' && draft.sum.abs().lessThan(total.abs().times(SMALL_SHARE));
  const small = drafts.filter(isSmall);
  if (small.length < 2) return drafts;
  const rest: Draft = {
    id: 'everything-else',
    what: 'Everything else',
    detail: small.map((draft) => draft.what).join(', '),
    sum: small.reduce((sum, draft) => sum.plus(draft.sum), new Exact(0)),
    children: small.map((draft) => ({ ...draft, children: [] })),
  };
  return [...drafts.filter((draft) => !isSmall(draft)), rest];
}

interface Units {
  /** Tenths of a per cent. */
  share: number;
  /** Steps of the charge grid. */
  charge: number;
}

interface ChargeGrid {
  stepMah: number;
  format: (units: number) => string;
}

/** Four significant digits of the total, for all rows alike, so that columns can be added up by hand. */
function chargeGrid(totalC: number): ChargeGrid {
  const exponent = totalC === 0 ? 0 : Math.floor(Math.log10(Math.abs(totalC) / MAH_C)) - 3;
  const stepMah = 10 ** exponent;
  const format = (units: number): string =>
    withUnit((units * stepMah).toFixed(Math.max(0, -exponent)).replace('-', '\u2212'), 'mAh');
  return { stepMah, format };
}

function shown(drafts: readonly Draft[], units: Units, grid: ChargeGrid): LedgerRow[] {
  const charges = drafts.map((draft) => draft.sum.toNumber());
  const shares = apportion(charges, units.share);
  const steps = apportion(charges, units.charge);
  return drafts.map((draft, i) => {
    const own = { share: shares[i] ?? 0, charge: steps[i] ?? 0 };
    return {
      id: draft.id,
      what: draft.what,
      detail: draft.detail,
      exactC: draft.sum.toFixed(),
      chargeC: charges[i] ?? 0,
      share: withUnit((own.share / 10).toFixed(1).replace('-', '\u2212'), '%'),
      charge: grid.format(own.charge),
      children: shown(draft.children, own, grid),
    };
  });
}

/** Whole numbers in proportion to the values that add up to `units`: the largest remainders are rounded up. */
export function apportion(values: readonly number[], units: number): number[] {
  const total = values.reduce((sum, value) => sum + value, 0);
  if (total === 0) return values.map(() => 0);
  const exact = values.map((value) => (value / total) * units);
  const whole = exact.map(Math.floor);
  let missing = units - whole.reduce((sum, floor) => sum + floor, 0);
  const order = exact.map((value, i) => ({ i, remainder: value - Math.floor(value) }));
  order.sort((a, b) => b.remainder - a.remainder);
  for (const { i } of order) {
    if (missing <= 0) break;
    whole[i] = (whole[i] ?? 0) + 1;
    missing -= 1;
  }
  return whole;
}
