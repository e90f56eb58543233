import { describe, expect, test } from 'vitest';
import { EngineErrors, OutOfRangeError } from '#common/errors.ts';
import { buildNode, buildPart, buildRoutine, buildStep, buildTransition, errorOf } from '#test/support/build-node.ts';
import type { Node, Schedule } from '../scenario/scenario.types.ts';
import { chargeLedger } from './charge-ledger.ts';

const conditions = { railVoltageV: 3, temperatureC: 25 };
const radio = buildPart(
  'radio',
  { sleep: 1e-6, on: 0.01 },
  { transitions: [buildTransition('sleep>on', 0.002, 0.003), buildTransition('on>sleep', 0.001, 0)] },
);
const lamp = buildPart('lamp', { off: 0, on: 0.02 });

function litCharge(schedule: Schedule, options = conditions): { perCycleC: string | null; perDayC: string } {
  const node = buildNode([lamp], [buildRoutine('r', [buildStep('s', 0.5, { lamp: 'on' })], schedule)]);
  const entry = chargeLedger(node, options).entries.find(({ kind }) => kind === 'step');
  return { perCycleC: entry?.chargePerCycleC ?? null, perDayC: entry?.chargeC ?? '' };
}

describe('chargeLedger', () => {
  test('accounts routine, step, part and state in excess of rest, transitions, rest and leakages', () => {
    const node: Node = buildNode(
      [radio],
      [buildRoutine('report', [buildStep('send', 0.01, { radio: 'on' })], { kind: 'every', periodS: 86_400 })],
      { leakages: [{ id: 'divider', name: 'Divider', current: { typical: 2e-7 } }] },
    );
    const ledger = chargeLedger(node, conditions);
    expect(ledger).toMatchObject({ side: 'rail', periodS: 86_400 });
    const lines = ledger.entries.map((entry) => [
      entry.kind,
      entry.fromStateId,
      entry.stateId ?? entry.leakageId,
      entry.chargePerCycleC,
      entry.chargeC,
    ]);
    expect(lines).toEqual([
      ['transition', 'sleep', 'on', '0.000005998', '0.000005998'],
      ['step', null, 'on', '0.00009999', '0.00009999'],
      ['transition', 'on', 'sleep', '-0.000000001', '-0.000000001'],
      ['rest', null, 'sleep', null, '0.0864'],
      ['leakage', null, 'divider', null, '0.01728'],
    ]);
    expect(ledger.totalC).toBe('0.103785987');
  });

  test('takes each double as its shortest decimal, so that 0.1 s three times are 0.3 s', () => {
    const node = buildNode(
      [buildPart('lamp', { off: 0, on: 0.1 })],
      [buildRoutine('r', [buildStep('s', 0.1, { lamp: 'on' }, 3)], { kind: 'every', periodS: 86_400 })],
    );
    expect(chargeLedger(node, conditions).totalC).toBe('0.03');
  });

  test('writes small charges without an exponent', () => {
    const node = buildNode([], [], { leakages: [{ id: 'l', name: 'L', current: { typical: 1e-18 } }] });
    expect(chargeLedger(node, conditions).totalC).toBe('0.0000000000000864');
  });

  test.each<[Schedule, string]>([
    [{ kind: 'every', periodS: 900 }, '0.96'],
    [{ kind: 'random', meanPerDay: 140, busiestPerDay: 300 }, '1.4'],
    [{ kind: 'window', fromHour: 22, toHour: 6, periodS: 3_600 }, '0.08'],
    [{ kind: 'always' }, '1728'],
    [{ kind: 'every', periodS: 900, when: { months: [1, 2, 12] } }, '0.24'],
    [{ kind: 'every', periodS: 900, when: { belowC: 25 } }, '0'],
    [{ kind: 'every', periodS: 900, when: { aboveC: 25 } }, '0.96'],
  ])('counts %o a mean day', (schedule, perDayC) => {
    expect(litCharge(schedule)).toEqual({ perCycleC: '0.01', perDayC });
  });

  test('shows the charge of once and counts none of it a mean day', () => {
    expect(litCharge({ kind: 'once', afterS: 60 })).toEqual({ perCycleC: '0.01', perDayC: '0' });
  });

  test.each([
    ['constant-current', '0.96'],
    ['constant-power', '1.92'],
    ['resistive', '0.48'],
  ] as const)('follows the law %s at half the reference voltage', (law, totalC) => {
    const part = buildPart('lamp', { off: 0, on: 0.02 }, { states: { on: { law } } });
    const node = buildNode(
      [part],
      [buildRoutine('r', [buildStep('s', 0.5, { lamp: 'on' })], { kind: 'every', periodS: 900 })],
    );
    expect(chargeLedger(node, { railVoltageV: 1.5, temperatureC: 25 }).totalC).toBe(totalC);
  });

  test('doubles rest and excess with the temperature', () => {
    const part = buildPart('lamp', { off: 1e-6 }, { states: { off: { doublingK: 10 } } });
    expect(chargeLedger(buildNode([part], []), { railVoltageV: 3, temperatureC: 45 }).totalC).toBe('0.3456');
  });

  test('throws the errors of the node', () => {
    const node = buildNode([lamp, lamp], []);
    expect(errorOf(EngineErrors, () => chargeLedger(node, conditions)).code).toBe('duplicate-id');
  });

  test.each([
    [{ railVoltageV: 0, temperatureC: 25 }, 'railVoltageV'],
    [{ railVoltageV: 3, temperatureC: -300 }, 'temperatureC'],
  ])('throws for %o', (wrong, field) => {
    const error = errorOf(OutOfRangeError, () => chargeLedger(buildNode([], []), wrong));
    expect(error).toMatchObject({ code: 'out-of-range', field });
  });
});
