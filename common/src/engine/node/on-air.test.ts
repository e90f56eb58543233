import { describe, expect, test } from 'vitest';
import { buildNode, buildPart, buildRoutine } from '#test/support/build-node.ts';
import type { LinkSettings, Routine, Schedule } from '../scenario/scenario.types.ts';
import { compileNode } from './compile-node.ts';

const radio = buildPart(
  'radio',
  { sleep: 0, transmit: 0.03 },
  { kind: 'radio', states: { transmit: { role: 'transmit' } } },
);
const link: LinkSettings = { dutyCycleBand: 'eu-868.0-868.6' };

/** An uplink of 0.37 s: the 36 s an hour that the band allows hold 97 of them. */
function uplink(id: string, schedule: Schedule, own?: LinkSettings): Routine {
  const chirp = {
    pattern: 'chirp',
    spreadingFactor: 10,
    bandwidthHz: 125_000,
    codingRate: 1,
    payloadOctets: 24,
  } as const;
  const duration = { kind: 'exchange' as const, ...chirp, ...(own ? { link: own } : {}) };
  return buildRoutine(id, [{ id: 'up', name: 'Up', states: {}, duration }], schedule);
}

const exceeded = (routines: Routine[], settings: LinkSettings = link) =>
  compileNode(buildNode([radio], routines, { link: settings }), { defaultReferenceVoltageV: 3 }).remarks.filter(
    ({ code }) => code === 'duty-cycle-exceeded',
  );

describe('compileNode: share of time on air', () => {
  test('beyond the limit of the band is a caution that names the regulation', () => {
    const [caution, ...others] = exceeded([uplink('a', { kind: 'every', periodS: 30 })]);
    expect(others).toEqual([]);
    expect(caution?.path).toBe('node.link.dutyCycleBand');
    expect(caution?.message).toContain('EN 300 220-2');
  });

  test('within the limit is no caution', () => {
    expect(exceeded([uplink('a', { kind: 'every', periodS: 60 })])).toEqual([]);
  });

  test('adds up over the routines of a node', () => {
    const every = { kind: 'every', periodS: 60 } as const;
    expect(exceeded([uplink('a', every), uplink('b', every)])).toHaveLength(1);
  });

  test('does not add up routines that are never on together', () => {
    const every = { kind: 'every', periodS: 60 } as const;
    const frost = uplink('a', { ...every, when: { belowC: 2 } });
    const mild = uplink('b', { ...every, when: { aboveC: 2 } });
    expect(exceeded([frost, mild])).toEqual([]);
    const winter = uplink('c', { ...every, when: { months: [12, 1] } });
    const summer = uplink('d', { ...every, when: { months: [6, 7] } });
    expect(exceeded([winter, summer])).toEqual([]);
  });

  test('counts the busiest day of random events', () => {
    const quiet: Schedule = { kind: 'random', meanPerDay: 100 };
    expect(exceeded([uplink('a', quiet)])).toEqual([]);
    expect(exceeded([uplink('a', { ...quiet, busiestPerDay: 3000 })])).toHaveLength(1);
  });

  test('is told at the step that chooses the band', () => {
    const [caution] = exceeded([uplink('a', { kind: 'every', periodS: 30 }, link)], {});
    expect(caution?.path).toBe('node.routines[0].steps[0].duration.link.dutyCycleBand');
  });

  test('of a routine that is switched off does not count', () => {
    expect(exceeded([{ ...uplink('a', { kind: 'every', periodS: 30 }), enabled: false }])).toEqual([]);
  });
});
