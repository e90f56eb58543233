import { describe, expect, it } from 'vitest';
import { compileNode, cyclesPerDay, forecast } from '#common/engine/index.ts';
import type { Node, Routine, Scenario } from '#common/engine/index.ts';
import { scenarioSchema } from '#common/schemas/scenario.schema.ts';
import { BAD_DAYS, badDayRoutine, type BadDayId } from './bad-days.ts';
import { scenarioTemplate } from './templates.ts';

const { document } = scenarioTemplate('acknowledged-report');

function withDay(id: BadDayId, timesAYear: number, base: Scenario = document): Scenario {
  const { routine } = badDayRoutine(base.node, id, timesAYear);
  if (!routine) throw new Error(`The node lacks something for "${id}".`);
  return { ...base, node: { ...base.node, routines: [...base.node.routines, { ...routine, id: 'bad-day' }] } };
}

const dayOf = ({ node }: Scenario): Routine | undefined => node.routines.find(({ id }) => id === 'bad-day');
const missingOf = (node: Node, id: BadDayId = 'lost-parent'): string[] => badDayRoutine(node, id, 1).missing;

describe('badDayRoutine', () => {
  it.each(BAD_DAYS)('$id makes a routine that passes the schema', ({ id }) => {
    expect(scenarioSchema.safeParse(withDay(id, 3)).error).toBeUndefined();
  });

  it.each(BAD_DAYS)('$id lacks no transition, state or figure of the link', ({ id }) => {
    const codes = forecast(withDay(id, 3)).cautions.map(({ code }) => code);
    expect(codes.filter((code) => /^(link-|role-|no-path)/.test(code))).toEqual([]);
  });

  it.each(BAD_DAYS)('$id types no time of the radio', ({ id }) => {
    const steps = dayOf(withDay(id, 3))?.steps ?? [];
    expect(steps.filter(({ duration, states }) => duration.kind === 'fixed' && 'radio' in states)).toEqual([]);
  });

  it.each(['lost-parent', 'firmware-update'] as const)('%s happens as often a year as is said', (id) => {
    const schedule = dayOf(withDay(id, 12))?.schedule;
    expect(schedule && cyclesPerDay(schedule, 0) * 365.25).toBeCloseTo(12, 9);
  });

  it('install-day happens once, at the beginning', () => {
    expect(dayOf(withDay('install-day', 12))?.schedule).toEqual({ kind: 'once', afterS: 0 });
  });

  it('the more updates a year, the more current', () => {
    const currents = [0, 2, 12].map((times) => forecast(withDay('firmware-update', times)).meanCurrentA);
    expect([...currents].sort((a, b) => a - b)).toEqual(currents);
  });

  it('a lost parent keeps the receiver on for two whole scans', () => {
    const program = compileNode(withDay('lost-parent', 12).node, { defaultReferenceVoltageV: 3 });
    const day = program.routines.find(({ routineId }) => routineId === 'bad-day');
    // 16 channels of 960 · (2³ + 1) symbols of 16 µs, twice, and 30 s of rest.
    expect(day?.cycleS).toBeGreaterThan(2 * 16 * 0.13824 + 30);
  });

  it('scans the one channel of the 868 MHz PHY', () => {
    const link = { ...document.node.link, phy: 'bpsk-868' as const };
    const { routine } = badDayRoutine({ ...document.node, link }, 'install-day', 1);
    const scan = routine?.steps.find(({ id }) => id === 'scan')?.duration;
    expect(scan).toMatchObject({ pattern: 'scan', channels: 1 });
  });

  it('says what an empty node lacks', () => {
    expect(missingOf({ parts: [], leakages: [], routines: [] })).toEqual([
      'a part of kind radio',
      'a part of kind controller',
      'a PHY in the link settings of the node',
    ]);
  });

  it('says that a radio has no state to receive in', () => {
    const parts = document.node.parts.map((part) => ({
      ...part,
      states: part.states.filter(({ role }) => role !== 'listen' && role !== 'receive'),
    }));
    expect(missingOf({ ...document.node, parts })).toEqual([
      'a state of “Transceiver 2.4 GHz, IEEE 802.15.4” with the role “receive”',
    ]);
  });

  it('says which constant the PHY lacks for an acknowledged report', () => {
    const [problem] = missingOf({ ...document.node, link: { ...document.node.link, phy: 'sun-fsk-50' } });
    expect(problem).toContain('ackWaitS');
  });

  it('names the radio where there are two', () => {
    const [radio] = document.node.parts.filter(({ kind }) => kind === 'radio');
    const parts = [...document.node.parts, ...(radio ? [{ ...radio, id: 'second' }] : [])];
    const { routine } = badDayRoutine({ ...document.node, parts }, 'firmware-update', 1);
    expect(routine?.steps[0]?.duration).toMatchObject({ radioPartId: 'radio' });
  });
});
