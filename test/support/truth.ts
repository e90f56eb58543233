/**
 * Runs published and computed check values against the engine.
 *
 * File format, one file per first source (`test/truth/<source>.json`); rows that are only computed lie in files whose name
 * begins with `computed` and never count as published:
 *
 *   { "title": "what the source is", "rows": [ { "id", "group", "inputs": { … },
 *     "expected": { "value", "unit" }, "tolerance": { "kind": "abs" | "rel", "value" },
 *     "standing": "published" | "computed" | "from memory" | "common practice, no source",
 *     "source": "document, file, table", "note"?: "…", "published"?: { "value", "unit", "tolerance_abs" } } ] }
 *
 * `expected` is the recomputed value with the row's own tolerance; `published`, where present, is the rounded figure as
 * printed, checked with its printed tolerance. An evaluator per group maps a row to the engine's value in SI units (seconds,
 * coulomb, ampere, volt; counts and ratios plain). A row without evaluator, or whose evaluator yields no finite number, fails.
 * A disagreement with a row is a finding to report, never a tolerance to widen.
 *
 * Each area has a test file `test/truth/<area>.test.ts` that names its files:
 *
 *   describeTruth('zephyr.json', { phy: (row) => … });
 */
import { readFileSync, readdirSync } from 'node:fs';
import { describe, expect, test } from 'vitest';

export type TruthStanding = 'published' | 'computed' | 'from memory' | 'common practice, no source';

export interface TruthRow {
  id: string;
  group: string;
  inputs: Record<string, unknown>;
  expected: { value: number; unit: string };
  tolerance: { kind: 'abs' | 'rel'; value: number };
  standing: TruthStanding;
  source: string;
  note?: string;
  published?: { value: number; unit: string; tolerance_abs: number };
}

export interface TruthFile {
  title: string;
  rows: TruthRow[];
}

/** Engine's value for a row in SI units; null or a number that is not finite fails the row. */
export type TruthEvaluator = (row: TruthRow) => number | null;

/** SI value of one unit, exact where the unit is decimal. */
const UNIT_SI: Readonly<Record<string, number>> = {
  us: 1e-6,
  ms: 1e-3,
  s: 1,
  's per hour': 1,
  min: 60,
  h: 3_600,
  day: 86_400,
  // A month has no fixed length: the evaluator returns months of the length that its row gives.
  month: 1,
  year: 31_557_600,
  uA: 1e-6,
  mA: 1e-3,
  A: 1,
  uC: 1e-6,
  C: 1,
  mAh: 3.6,
  Ah: 3_600,
  'mAh/day': 3.6 / 86_400,
  mV: 1e-3,
  V: 1,
  mohm: 1e-3,
  ohm: 1,
  uF: 1e-6,
  mF: 1e-3,
  F: 1,
  J: 1,
  mW: 1e-3,
  W: 1,
  'kbit/s': 1e3,
  kHz: 1e3,
  // The evaluator returns these in the row's unit.
  degC: 1,
  'J/mol': 1,
  '1/year': 1,
  percent: 1e-2,
  ppm: 1,
  'frames per hour': 1,
  octets: 1,
  symbols: 1,
  'backoff units': 1,
  CCAs: 1,
  transmissions: 1,
  'CSMA procedures': 1,
  fraction: 1,
  probability: 1,
  '1': 1,
  '0 or 1': 1,
};

/** Reads a truth file of `test/truth`. */
export function readTruth(fileName: string): TruthFile {
  const file: unknown = JSON.parse(readFileSync(new URL(`../truth/${fileName}`, import.meta.url), 'utf8'));
  if (!isTruthFile(file)) throw new Error(`${fileName} is no truth file.`);
  return file;
}

/** Expected value of a row, in its own unit, whichever file holds it. */
export function truthValue(id: string): number {
  for (const name of readdirSync(new URL('../truth/', import.meta.url))) {
    if (!name.endsWith('.json')) continue;
    const row = readTruth(name).rows.find((one) => one.id === id);
    if (row) return row.expected.value;
  }
  throw new Error(`No truth file has the row "${id}".`);
}

function isTruthFile(file: unknown): file is TruthFile {
  return typeof file === 'object' && file !== null && 'rows' in file && Array.isArray(file.rows);
}

/** A number among a row's inputs; the row fails when it is missing. */
export function numberInput(row: TruthRow, key: string): number {
  const value = row.inputs[key];
  if (typeof value !== 'number') throw new Error(`${row.id} has no number "${key}".`);
  return value;
}

/** A text among a row's inputs; the row fails when it is missing. */
export function textInput(row: TruthRow, key: string): string {
  const value = row.inputs[key];
  if (typeof value !== 'string') throw new Error(`${row.id} has no text "${key}".`);
  return value;
}

/** A yes or no among a row's inputs, also written 1 or 0; `absent` where it is missing. */
export function flagInput(row: TruthRow, key: string, absent = false): boolean {
  const value = row.inputs[key];
  return value === undefined ? absent : value === true || value === 1;
}

function unitSi(row: TruthRow, unit: string): number {
  const factor = UNIT_SI[unit];
  if (factor === undefined) throw new Error(`${row.id}: the truth runner does not know the unit "${unit}".`);
  return factor;
}

function expectNear(value: number, expected: number, allowed: number, id: string): void {
  expect(Math.abs(value - expected), `${id}: engine ${value}, expected ${expected}`).toBeLessThanOrEqual(allowed);
}

/** One test per row of a truth file, each against the evaluator of its group. */
export function describeTruth(fileName: string, evaluators: Readonly<Record<string, TruthEvaluator>>): void {
  const { rows, title } = readTruth(fileName);
  describe(`${fileName}: ${title}`, () => {
    test.each(rows.map((row): [string, TruthRow] => [row.id, row]))('%s agrees with the engine', (_id, row) => {
      const evaluate = evaluators[row.group];
      if (!evaluate) throw new Error(`${row.id}: no evaluator for the group "${row.group}".`);
      const si = evaluate(row);
      if (si === null || !Number.isFinite(si)) throw new Error(`${row.id}: the engine gave no value.`);
      const value = si / unitSi(row, row.expected.unit);
      const { kind, value: tolerance } = row.tolerance;
      // An absolute tolerance of 0 is meant for counts; the last bit of a unit conversion is granted.
      const rounding = 4 * Number.EPSILON * Math.abs(row.expected.value);
      const allowed = kind === 'abs' ? tolerance : tolerance * Math.abs(row.expected.value);
      expectNear(value, row.expected.value, allowed + rounding, row.id);
      if (row.published) {
        const printed = si / unitSi(row, row.published.unit);
        expectNear(printed, row.published.value, row.published.tolerance_abs + rounding, `${row.id} as printed`);
      }
    });
  });
}
