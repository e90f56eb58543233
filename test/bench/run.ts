/**
 * Times the engine: `npm run bench`. Prints a table and judges nothing; times depend on the machine and what else it does. Shown are
 * the least and the median time of a call, warm, in one process and on one thread.
 */
import { compileNode, forecast } from '#common/engine/index.ts';
import type { Scenario } from '#common/engine/index.ts';
import { compileScenario } from '#common/engine/forecast/compile-scenario.ts';
import { runMeanCurrent } from '#common/engine/forecast/run-mean-current.ts';
import { referenceLife } from '#test/support/ode-reference.ts';
import { benchScenario, linkScenario } from './bench-scenario.ts';

const YEAR_S = 31_557_600;

interface Timing {
  leastMs: number;
  medianMs: number;
}

function time(call: () => unknown, { warmUp, rounds }: { warmUp: number; rounds: number }): Timing {
  for (let round = 0; round < warmUp; round++) call();
  const timesMs: number[] = [];
  for (let round = 0; round < rounds; round++) {
    const startMs = performance.now();
    call();
    timesMs.push(performance.now() - startMs);
  }
  timesMs.sort((a, b) => a - b);
  return { leastMs: timesMs[0] ?? NaN, medianMs: timesMs[Math.floor(rounds / 2)] ?? NaN };
}

const FAST = { warmUp: 300, rounds: 500 };
const SLOW = { warmUp: 0, rounds: 3 };
const ms = (value: number): string => value.toFixed(value < 10 ? 3 : 1);

function rowOf(name: string, { leastMs, medianMs }: Timing): Record<string, string> {
  return { what: name, 'least ms': ms(leastMs), 'median ms': ms(medianMs) };
}

function benchOne(name: string, scenario: Scenario): void {
  const { lifeS, outcome, dekads, lastReportS } = forecast(scenario, { withLedger: false });
  const years = lifeS === null ? '40+' : (lifeS / YEAR_S).toFixed(1);
  const last = lastReportS === null ? '' : `, last report after ${(lastReportS / YEAR_S).toFixed(1)} years`;
  console.log(`\n${name}: ${outcome} after ${years} years${last}, ${dekads.length} dekads`);
  const defaultReferenceVoltageV = scenario.supply.regulator.kind === 'none' ? 3 : scenario.supply.regulator.outputV;
  const compiled = compileScenario(scenario);
  const withoutLedger = time(() => forecast(scenario, { withLedger: false }), FAST);
  const reference = time(() => referenceLife(scenario), SLOW);
  console.table([
    rowOf('forecast without ledger', withoutLedger),
    rowOf(
      'forecast with ledger',
      time(() => forecast(scenario), FAST),
    ),
    rowOf(
      'compileNode alone',
      time(() => compileNode(scenario.node, { defaultReferenceVoltageV }), FAST),
    ),
    rowOf(
      'compileScenario alone',
      time(() => compileScenario(scenario), FAST),
    ),
    rowOf(
      'life of a compiled scenario',
      time(() => runMeanCurrent(compiled), FAST),
    ),
    rowOf('odex reference', reference),
  ]);
  const ratio = reference.leastMs / withoutLedger.leastMs;
  const error = Math.abs((lifeS ?? NaN) / (referenceLife(scenario).lifeS ?? NaN) - 1);
  console.log(`the reference takes ${ratio.toFixed(0)} times as long; lives differ by ${error.toExponential(1)}`);
}

console.log(`6 parts, 10 routines, 100 steps; Node ${process.version}`);
benchOne('constant current, no regulator', benchScenario({ law: 'constant-current', regulator: { kind: 'none' } }));
benchOne(
  'constant current that doubles every 30 K',
  benchScenario({ law: 'constant-current', regulator: { kind: 'none' }, doublingK: 30 }),
);
benchOne('resistive, no regulator', benchScenario({ law: 'resistive', regulator: { kind: 'none' } }));
benchOne(
  'linear regulator',
  benchScenario({
    law: 'constant-current',
    regulator: { kind: 'linear', outputV: 1.95, quiescentA: 1e-6, dropoutV: 0.1 },
  }),
);
benchOne(
  'switching regulator',
  benchScenario({
    law: 'constant-current',
    regulator: { kind: 'switching', outputV: 1.95, quiescentA: 1e-6, efficiency: 0.9, minimumInputV: 1.8 },
  }),
);
benchOne('20 link steps', linkScenario());
