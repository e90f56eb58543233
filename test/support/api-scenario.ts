import type { Scenario } from '#common/engine/scenario/scenario.types.ts';
import { buildNode, buildPart, buildRoutine, buildStep, buildTransition } from './build-node.ts';

/** A small scenario that can be computed: a sensor read every 100 s on one lithium cell, in a mild climate. */
export function buildScenario(overrides: Partial<Scenario> = {}): Scenario {
  const sensor = buildPart(
    'sensor',
    { sleep: 1e-6, measure: 1e-3 },
    {
      kind: 'sensor',
      transitions: [buildTransition('sleep>measure', 0.001, 1e-4), buildTransition('measure>sleep', 0)],
    },
  );
  return {
    schemaVersion: 1,
    name: 'Soil sensor',
    node: buildNode([sensor], [buildRoutine('report', [buildStep('read', 0.05, { sensor: 'measure' })])]),
    supply: {
      series: 1,
      parallel: 1,
      regulator: { kind: 'none' },
      cell: {
        designation: 'invented',
        capacityC: { typical: 3_600 },
        openCircuitTableV: [
          [0, 3.6],
          [0.9, 3.4],
          [1, 2.2],
        ],
        resistanceOhm: [{ ohm: { typical: 10 } }],
        resistanceFactorByTemperature: [
          [-20, 3],
          [20, 1],
        ],
        resistanceFactorByDepth: [
          [0, 1],
          [1, 3],
        ],
        selfDischarge: { lossPerYear: { typical: 0.01 }, referenceC: 20 },
      },
    },
    climate: { startMonth: 1, months: Array.from({ length: 12 }, () => ({ meanC: 10, amplitudeK: 5 })) },
    target: { lifeS: 3 * 31_557_600, confidence: 0.9 },
    ...overrides,
  };
}

/** A document of valid shape whose routine needs a move that no transition offers. */
export function buildStuckScenario(): Scenario {
  const scenario = buildScenario({ name: 'Half done' });
  const radio = buildPart(
    'radio',
    { sleep: 1e-6, idle: 1e-3, send: 1e-2 },
    { transitions: [buildTransition('sleep>idle', 0.001), buildTransition('idle>sleep', 0.001)] },
  );
  const routine = buildRoutine('send', [buildStep('burst', 0.01, { radio: 'send' })]);
  return { ...scenario, node: buildNode([...scenario.node.parts, radio], [...scenario.node.routines, routine]) };
}
