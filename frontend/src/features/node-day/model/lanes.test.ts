import { describe, expect, it } from 'vitest';
import { pictureScenario } from '#test/support/picture-fixtures.ts';
import { compileAlone } from './compiled-routine.ts';
import { cyclePicture, tintOf, type CyclePicture } from './lanes.ts';

function picture(change?: Parameters<typeof pictureScenario>[0]): CyclePicture {
  const scenario = pictureScenario(change);
  const [routine] = scenario.node.routines;
  const compiled = routine ? compileAlone(scenario, routine) : null;
  if (compiled?.kind !== 'laid-out') throw new Error('The fixture does not compile.');
  return cyclePicture(scenario, compiled.routine, compiled.parts);
}

describe('cyclePicture', () => {
  it('cyclePicture: lays columns side by side over the whole width', () => {
    const { columns } = picture();
    expect(columns[0]?.from).toBe(0);
    expect(columns.at(-1)?.to).toBeCloseTo(1, 9);
    columns.slice(1).forEach((column, i) => expect(column.from).toBeCloseTo(columns[i]?.to ?? -1, 9));
  });

  it('cyclePicture: gives a longer interval a wider column, and equal ones the same', () => {
    const busy = picture().columns.filter((column) => column.kind !== 'rest');
    for (const a of busy) {
      for (const b of busy) {
        if (a.durationS > b.durationS) expect(a.to - a.from).toBeGreaterThan(b.to - b.from);
        if (a.durationS === b.durationS) expect(a.to - a.from).toBeCloseTo(b.to - b.from, 9);
      }
    }
  });

  it('cyclePicture: shows 128 µs and 15 min both', () => {
    const { columns } = picture();
    const total = 1;
    const shortest = columns.reduce((least, { from, to }) => Math.min(least, to - from), total);
    expect(shortest).toBeGreaterThan(0.02);
    expect(columns.at(-1)).toMatchObject({ kind: 'rest', intervalId: 'rest' });
    expect(columns.at(-1)?.durationS).toBeCloseTo(900, 1);
  });

  it('cyclePicture: names each step once, in the order of the routine', () => {
    const steps = picture().steps.filter((step) => step.kind === 'step');
    expect(steps.map((step) => step.stepId)).toEqual(['sense', 'clear', 'send', 'ack']);
    expect(steps[0]?.durationS).toBeCloseTo(14e-3, 9);
  });

  it('cyclePicture: has a lane for each part with its rest', () => {
    expect(picture().lanes.map(({ name, restName }) => [name, restName])).toEqual([
      ['Radio', 'Sleep'],
      ['Controller', 'Sleep'],
      ['Leaf sensor', 'Off'],
    ]);
  });

  it('cyclePicture: keeps blocks of a lane in order and apart', () => {
    for (const { blocks } of picture().lanes) {
      for (const block of blocks) expect(block.to).toBeGreaterThan(block.from);
      blocks.slice(1).forEach((block, i) => expect(block.from).toBeGreaterThanOrEqual((blocks[i]?.to ?? 0) - 1e-9));
    }
  });

  it('cyclePicture: tells transitions from states and names where they lead', () => {
    const radio = picture().lanes[0]?.blocks ?? [];
    expect(radio.filter((block) => block.kind === 'transition').map((block) => block.name)).toContain('→ Transmit');
    expect(radio.find((block) => block.name === 'Transmit')).toMatchObject({
      kind: 'state',
      currentA: 14.2e-3,
      tint: 5,
    });
  });

  it('cyclePicture: has no rest column when cycles follow each other', () => {
    const { columns } = picture((s) => s.node.routines.forEach((routine) => (routine.schedule = { kind: 'always' })));
    expect(columns.some((column) => column.kind === 'rest')).toBe(false);
    expect(columns.at(-1)?.to).toBeCloseTo(1, 9);
  });
});

describe('tintOf', () => {
  it('tintOf: grows a step with each tenfold current', () => {
    expect([1e-6, 10e-6, 99e-6, 100e-6, 1e-3, 10e-3, 1].map(tintOf)).toEqual([1, 2, 2, 3, 4, 5, 5]);
  });
});
