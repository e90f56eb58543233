import { describe, expect, it } from 'vitest';
import { scenarioTemplate } from '#common/catalogue/templates.ts';
import { chargeLedger, forecast } from '#common/engine/index.ts';
import type { Scenario } from '#common/engine/scenario/scenario.types.ts';
import { scenarioSchema } from '#common/schemas/scenario.schema.ts';
import { withNodeLink } from '../link/node-link.ts';
import { whatIfAxes, type Axis, type AxisId, type WhatIfTarget } from './what-if-axes.ts';
import { chartJobs, chartPlans, chartsOf, MOST_POINTS } from './what-if-charts.ts';
import { figuresOf, outcomeOf, type WhatIfFigures } from './what-if-outcome.ts';
import { whatIfRows } from './what-if-rows.ts';

const { document } = scenarioTemplate('acknowledged-report');
const REPORT: WhatIfTarget = { routineId: 'report', stepId: 'send' };

function axis(id: AxisId, of: Scenario = document, target = REPORT): Axis {
  const found = whatIfAxes(of, target).find((candidate) => candidate.id === id);
  if (!found) throw new Error(`No axis "${id}".`);
  return found;
}

const idsOf = (templateId: string, target: WhatIfTarget): AxisId[] =>
  whatIfAxes(scenarioTemplate(templateId).document, target).map(({ id }) => id);

function figures(of: Scenario, target = REPORT): WhatIfFigures {
  const outcome = figuresOf(of, target);
  if (outcome.kind === 'problem') throw new Error(outcome.message);
  return outcome.figures;
}

const figuresAlong = (id: AxisId): WhatIfFigures[] =>
  axis(id).alternatives.map(({ change }) => figures(change(document)));
const isRising = (values: readonly number[]): boolean =>
  values.every((value, index) => index === 0 || value > (values[index - 1] ?? Infinity));

describe('whatIfAxes', () => {
  it.each([
    ['acknowledged-report', REPORT, ['payload', 'busy', 'loss', 'retries', 'security', 'interval']],
    ['polling-child', { routineId: 'poll', stepId: 'ask' }, ['busy', 'loss', 'retries', 'security', 'interval']],
    ['advertiser', { routineId: 'advertise', stepId: 'send' }, ['payload', 'interval']],
    ['long-range-uplink', REPORT, ['payload', 'interval']],
  ] as const)('%s: asks what the exchange heeds', (templateId, target, ids) => {
    expect(idsOf(templateId, target)).toEqual(ids);
  });

  it('asks nothing about a step with a typed duration', () => {
    expect(whatIfAxes(document, { routineId: 'report', stepId: 'measure' })).toEqual([]);
  });

  it('asks nothing while the link gives no plan', () => {
    expect(
      whatIfAxes(
        withNodeLink(document, () => ({})),
        REPORT,
      ),
    ).toEqual([]);
  });

  it('has the present value among its neighbours', () => {
    const { alternatives } = axis('payload');
    expect(alternatives.map(({ value, isCurrent }) => (isCurrent ? `(${value})` : String(value)))).toEqual([
      '12',
      '16',
      '(24)',
      '32',
      '48',
    ]);
  });

  it.each(['payload', 'busy', 'loss', 'retries', 'security', 'interval'] as const)(
    '%s: each alternative is a document that may be saved',
    (id) => {
      const errors = axis(id).alternatives.map(({ change }) => scenarioSchema.safeParse(change(document)).error);
      expect(errors.filter((error) => error !== undefined)).toEqual([]);
    },
  );

  it('changes the step and leaves the node', () => {
    const changed = axis('busy').alternatives.at(-1)?.change(document);
    const step = changed?.node.routines[0]?.steps.at(-1);
    expect([changed?.node.link, step?.duration]).toMatchObject([
      document.node.link,
      { link: { busyProbability: { typical: 0.5 } } },
    ]);
  });

  it('leaves the document of the present value as it is', () => {
    expect(
      axis('retries')
        .alternatives.find(({ isCurrent }) => isCurrent)
        ?.change(document),
    ).toBe(document);
  });

  it('changes how often a day at random', () => {
    const target = { routineId: 'command', stepId: 'confirm' };
    const listener = scenarioTemplate('sampled-listener').document;
    const doubled = axis('interval', listener, target).alternatives.find(({ value }) => value === 12);
    const command = doubled?.change(listener).node.routines.find(({ id }) => id === 'command');
    expect(command?.schedule).toMatchObject({ kind: 'random', meanPerDay: 12 });
  });

  it('changes the period that counts of a polling child', () => {
    const child = scenarioTemplate('polling-child').document;
    const target = { routineId: 'poll', stepId: 'ask' };
    const slower = axis('interval', child, target).alternatives.find(({ value }) => value === 20);
    expect(slower?.change(child).node.routines[0]?.schedule).toMatchObject({ periodS: 20, keepAlive: { pollS: 20 } });
  });
});

describe('figuresOf', () => {
  it('gives the charge of a cycle as the ledger of the engine does', () => {
    const { entries } = chargeLedger(document.node, { railVoltageV: 3, temperatureC: 25 });
    const cycleC = entries.reduce((total, { chargePerCycleC }) => total + Number(chargePerCycleC ?? 0), 0);
    expect(figures(document).cycleC).toBeCloseTo(cycleC, 12);
  });

  it('counts of a cycle only what belongs to the step as its exchange', () => {
    const { exchangeC, cycleC } = figures(document);
    expect([exchangeC > 0, exchangeC < cycleC]).toEqual([true, true]);
  });

  it('divides by the exchanges of a step that repeats', () => {
    const repeated = axis('payload').alternatives[0]?.change(document) ?? document;
    const [routine] = repeated.node.routines;
    const steps = (routine?.steps ?? []).map((step) => (step.id === 'send' ? { ...step, repeats: 4 } : step));
    const four = { ...repeated, node: { ...repeated.node, routines: routine ? [{ ...routine, steps }] : [] } };
    expect(figures(four).exchangeC).toBeLessThan(1.01 * figures(repeated).exchangeC);
  });

  it.each([
    ['payload', 'meanS'],
    ['payload', 'exchangeC'],
    ['busy', 'meanS'],
    ['busy', 'exchangeC'],
    ['loss', 'exchangeC'],
    ['retries', 'deliveredProbability'],
    ['security', 'meanS'],
  ] as const)('more %s: more %s', (id, key) => {
    const values = figuresAlong(id).map((row) => row[key] ?? NaN);
    const distinct = id === 'security' ? values.filter((_, index) => [0, 1, 4].includes(index)) : values;
    expect(isRising(distinct)).toBe(true);
  });

  it('says why a frame that is too long gives none', () => {
    const long = { ...document, node: structuredClone(document.node) };
    const [step] = long.node.routines[0]?.steps.slice(-1) ?? [];
    if (step) step.duration = { kind: 'exchange', pattern: 'acknowledged', payloadOctets: 200 };
    expect(figuresOf(long, REPORT)).toMatchObject({ kind: 'problem', message: expect.stringContaining('octets') });
  });
});

describe('outcomeOf', () => {
  it('gives the life that the forecast gives', () => {
    const { lifeS } = forecast(document);
    expect(outcomeOf(document, REPORT)).toMatchObject({ life: { lifeS } });
  });
});

describe('whatIfRows', () => {
  const outcomes = axis('interval').alternatives.map(({ change }) => outcomeOf(change(document), REPORT));

  it('tells the present figures bare and the others as changes', () => {
    const rows = whatIfRows(outcomes, 2);
    const changes = rows.map(({ title, cells }) => [title, ...cells.map(({ change }) => change?.charAt(0) ?? null)]);
    expect(changes).toEqual([
      ['Mean duration', 's', 's', null, 's', 's'],
      ['Delivered', 's', 's', null, 's', 's'],
      ['Charge per cycle', 's', 's', null, 's', 's'],
      ['Charge a day', '+', '+', null, '\u2212', '\u2212'],
      ['Life', 's', 's', null, 's', 's'],
    ]);
  });

  it('tells a change with its sign and unit', () => {
    const rows = whatIfRows(
      axis('payload').alternatives.map(({ change }) => outcomeOf(change(document), REPORT)),
      2,
    );
    const changes = rows.find(({ title }) => title === 'Mean duration')?.cells.map(({ change }) => change ?? 'now');
    expect(changes?.map((text) => text.replace(/[\d.]+/, 'n'))).toEqual([
      '\u2212n\u00a0µs',
      '\u2212n\u00a0µs',
      'now',
      '+n\u00a0µs',
      '+n\u00a0µs',
    ]);
  });

  it('is empty where the present figures are missing', () => {
    expect(whatIfRows([{ kind: 'problem', message: 'none' }], 0)).toEqual([]);
  });
});

describe('chartPlans', () => {
  const plans = chartPlans(document, REPORT);
  const charts = chartsOf(
    plans,
    plans.flatMap((plan) => chartJobs(plan, REPORT)).map((job) => job()),
  );

  it('are two for an acknowledged report, with units on the axes', () => {
    expect(plans.map(({ xTitle, yTitle }) => [xTitle, yTitle])).toEqual([
      ['Payload, octets', 'µC per delivered octet'],
      ['Probability that the channel is busy, %', 'µC per exchange'],
    ]);
  });

  it('ask the engine a few times only', () => {
    expect(Math.max(...plans.map(({ xs }) => xs.length))).toBeLessThanOrEqual(MOST_POINTS);
  });

  it('mark the present value', () => {
    expect(charts.map(({ points, current }) => points[current]?.x)).toEqual([24, 0.1]);
  });

  it('agree with the figures at the present value', () => {
    const { exchangeC, deliveredProbability } = figures(document);
    const [payload, busy] = charts.map(({ points, current }) => points[current]?.y ?? NaN);
    expect(payload).toBeCloseTo((exchangeC * 1e6) / (24 * (deliveredProbability ?? 1)), 9);
    expect(busy).toBeCloseTo(exchangeC * 1e6, 9);
  });

  it('cost less an octet the more octets a frame has', () => {
    const falling = charts[0]?.points.map(({ y }) => -y) ?? [];
    expect(isRising(falling)).toBe(true);
  });

  it('cost more the busier the channel, until accesses are given up', () => {
    const points = charts[1]?.points ?? [];
    expect(isRising(points.filter(({ x }) => x <= 0.5).map(({ y }) => y))).toBe(true);
    expect(isRising(points.map(({ delivered }) => -(delivered ?? NaN)))).toBe(true);
  });

  it('speak of octets only where nobody tells whether they arrive', () => {
    const [plan] = chartPlans(scenarioTemplate('advertiser').document, { routineId: 'advertise', stepId: 'send' });
    expect(plan?.yTitle).toBe('µC per octet');
  });
});
