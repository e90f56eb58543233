import { describe, expect, it } from 'vitest';
import { forecast } from '#common/engine/index.ts';
import { scenarioTemplates } from '#common/catalogue/templates.ts';
import type { Forecast } from '#common/engine/forecast/forecast.types.ts';
import type { Scenario } from '#common/engine/scenario/scenario.types.ts';
import { DAY_S, YEAR_S } from '#common/units/si.ts';
import { demoWorkspace } from './demo-workspace.ts';

const JANUARY = 1;
const APRIL = 4;

/** The latest document of a demo scenario. */
function latest(projectName: string, scenarioName: string): Scenario {
  const documents = demoWorkspace.projects
    .filter(({ name }) => name === projectName)
    .flatMap(({ scenarios }) => scenarios.map(({ revisions }) => revisions[revisions.length - 1]?.document));
  const found = documents.find((document) => document?.name === scenarioName);
  if (!found) throw new Error(`The demo has no scenario "${scenarioName}" in "${projectName}".`);
  return found;
}

const yearsOf = ({ lifeS }: Forecast): number => (lifeS ?? Infinity) / YEAR_S;

interface DemoPromise {
  project: string;
  scenario: string;
  outcome: Forecast['outcome'];
  endMonth: number;
  winters: number;
}

const PROMISES: DemoPromise[] = [
  {
    project: 'Frost post',
    scenario: 'Two LR6, report every 15 min',
    outcome: 'undervoltage',
    endMonth: JANUARY,
    winters: 6,
  },
  { project: 'Frost post', scenario: 'One ER14505', outcome: 'undervoltage', endMonth: JANUARY, winters: 1 },
  {
    project: 'Soil probe',
    scenario: 'CR2477 behind a buck-boost regulator',
    outcome: 'undervoltage',
    endMonth: JANUARY,
    winters: 1,
  },
  {
    project: 'Soil probe',
    scenario: 'Two LR6 behind the same regulator',
    outcome: 'undervoltage',
    endMonth: JANUARY,
    winters: 4,
  },
  {
    project: 'Gate counter',
    scenario: 'One CR17345, 140 events a day',
    outcome: 'charge-exhausted',
    endMonth: JANUARY,
    // The guard that two crystals ask for before a beacon is shorter than the 60 ms once typed for it.
    winters: 7,
  },
  {
    project: 'Cold-store logger',
    scenario: 'Two FR6 at −20 °C',
    outcome: 'undervoltage',
    endMonth: APRIL,
    winters: 7,
  },
];

describe('forecast of the demo', () => {
  it.each(PROMISES)('$project, $scenario: $outcome in month $endMonth after $winters winters', (promise) => {
    const result = forecast(latest(promise.project, promise.scenario));
    expect({ outcome: result.outcome, endMonth: result.endMonth, winters: result.wintersSurvived }).toEqual({
      outcome: promise.outcome,
      endMonth: promise.endMonth,
      winters: promise.winters,
    });
  });

  it('the soil probe looks fine on paper: capacity over mean current reaches its target', () => {
    const scenario = latest('Soil probe', 'CR2477 behind a buck-boost regulator');
    const paperS = scenario.supply.cell.capacityC.typical / forecast(scenario).meanCurrentA;
    expect(paperS).toBeGreaterThan(scenario.target.lifeS);
  });

  it('the soil probe ends in its second January with more than half of its charge left', () => {
    const result = forecast(latest('Soil probe', 'CR2477 behind a buck-boost regulator'));
    expect([yearsOf(result) > 1.25 && yearsOf(result) < 1.34, result.chargeLeftFraction > 0.5]).toEqual([true, true]);
  });

  it('the frost post on two LR6 lives six to seven years', () => {
    const years = yearsOf(forecast(latest('Frost post', 'Two LR6, report every 15 min')));
    expect([years > 6, years < 7]).toEqual([true, true]);
  });

  it('the frost post warns weeks before its end, and falsely in colder nights of earlier winters', () => {
    const { warning } = forecast(latest('Frost post', 'Two LR6, report every 15 min'));
    const leadDays = (warning?.leadS ?? 0) / DAY_S;
    expect([leadDays > 30, leadDays < 60, warning?.falseAlarmTimesS.length]).toEqual([true, true, 3]);
  });

  it('the soil probe gives no warning', () => {
    expect(forecast(latest('Soil probe', 'CR2477 behind a buck-boost regulator')).warning).toBeNull();
  });

  it('the cold-store logger meets its target on two FR6, and misses it on two LR6', () => {
    const names = ['Two FR6 at −20 °C', 'Two LR6 at −20 °C'];
    expect(names.map((name) => yearsOf(forecast(latest('Cold-store logger', name))) >= 5)).toEqual([true, false]);
  });

  it.each(PROMISES)('$project, $scenario types no time on the air', ({ project, scenario }) => {
    const { parts, routines } = latest(project, scenario).node;
    const radioIds = parts.filter(({ kind }) => kind === 'radio').map(({ id }) => id);
    const steps = routines.flatMap((routine) => routine.steps);
    expect(
      steps.filter(({ states, duration }) => duration.kind === 'fixed' && radioIds.some((id) => id in states)),
    ).toEqual([]);
  });

  it.each(PROMISES)(
    '$project, $scenario lacks no state, way or figure that its link needs',
    ({ project, scenario }) => {
      const codes = forecast(latest(project, scenario)).cautions.map(({ code }) => code);
      expect(codes.filter((code) => /^(link-|role-|turnaround-|start-up-|radio-)/.test(code))).toEqual([]);
    },
  );

  it('every revision of every scenario has an answer', () => {
    const documents = demoWorkspace.projects.flatMap(({ scenarios }) =>
      scenarios.flatMap(({ revisions }) => revisions.map(({ document }) => document)),
    );
    expect(documents.map((document) => forecast(document).outcome)).not.toContain('never-starts');
  });
});

describe('forecast of a template', () => {
  it.each(scenarioTemplates())('$name has an answer other than never-starts', ({ document }) => {
    expect(forecast(document).outcome).not.toBe('never-starts');
  });
});
