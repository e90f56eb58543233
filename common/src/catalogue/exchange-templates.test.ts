import { describe, expect, it } from 'vitest';
import type { LinkSettings, Quantity, Scenario } from '#common/engine/index.ts';
import { exchangePlan, forecast, linkOf } from '#common/engine/index.ts';
import { scenarioTemplates, TEMPLATE_GROUPS } from './templates.ts';

const templates = scenarioTemplates().filter(({ group }) => group === 'link');
const cases = templates.map(({ id, document }) => ({ id, document }));

const exchangesOf = ({ node }: Scenario) =>
  node.routines.flatMap(({ steps }) =>
    steps.flatMap(({ duration }) => (duration.kind === 'exchange' ? [duration] : [])),
  );

const probabilitiesOf = ({ busyProbability, frameErrorRate, ackErrorRate }: LinkSettings): Quantity[] =>
  [busyProbability, frameErrorRate, ackErrorRate].filter((quantity) => quantity !== undefined);

describe('templates of exchanges', () => {
  it('are the common ones', () => {
    expect(templates.map(({ id }) => id)).toEqual([
      'acknowledged-report',
      'polling-child',
      'slotted-node',
      'sampled-listener',
      'advertiser',
      'long-range-uplink',
    ]);
  });

  it.each(cases)('$id can be forecast', ({ document }) => {
    expect(forecast(document).outcome).not.toBe('never-starts');
  });

  it.each(cases)('$id lacks no transition, state or figure of the link', ({ document }) => {
    const codes = forecast(document).cautions.map(({ code }) => code);
    const ofLink = codes.filter((code) => code.startsWith('link-') || code.startsWith('role-') || code === 'no-path');
    expect(ofLink).toEqual([]);
  });

  it.each(cases)('$id types no duration of a step on the air', ({ document: { node } }) => {
    const radios = new Map(
      node.parts.filter(({ kind }) => kind === 'radio').map((part) => [part.id, part.restStateId]),
    );
    const typed = node.routines
      .flatMap(({ steps }) => steps)
      .filter(({ duration }) => duration.kind === 'fixed')
      .filter(({ states }) => Object.entries(states).some(([id, state]) => radios.has(id) && radios.get(id) !== state));
    expect(typed).toEqual([]);
  });

  it.each(cases)('$id derives a step from the link', ({ document }) => {
    expect(exchangesOf(document).length).toBeGreaterThan(0);
  });

  it.each(cases)('$id takes neither busy channel nor loss for 0', ({ document }) => {
    const settings = exchangesOf(document).map(({ link }) => linkOf(document.node.link, link));
    const probabilities = settings.flatMap(probabilitiesOf).map(({ typical }) => typical);
    expect([probabilities.length > 0, Math.min(...probabilities) > 0]).toEqual([true, true]);
  });

  it.each(cases)('$id says where each figure of its link comes from', ({ document: { node } }) => {
    const without = probabilitiesOf(node.link ?? {}).filter(({ provenance }) => !provenance?.text);
    expect(without).toEqual([]);
  });

  it.each(cases)('$id sends, receives or listens in each exchange', ({ document }) => {
    const times = exchangesOf(document).map(
      (exchange) => exchangePlan(exchange, linkOf(document.node.link, exchange.link)).meanS,
    );
    expect(Math.min(...times)).toBeGreaterThan(0);
  });
});

describe('TEMPLATE_GROUPS', () => {
  it('leaves no group without a template', () => {
    const used = new Set(scenarioTemplates().map(({ group }) => group));
    expect(TEMPLATE_GROUPS.filter(({ id }) => !used.has(id))).toEqual([]);
  });
});
