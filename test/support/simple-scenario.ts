import type { Climate, Node, Quantity, Scenario, Supply } from '#common/engine/index.ts';

const YEAR_S = 31_557_600;

export interface SimpleParts {
  node?: Partial<Node>;
  supply?: Partial<Omit<Supply, 'cell'>>;
  cell?: Partial<Supply['cell']>;
  climate?: Partial<Climate>;
  capacityC?: Quantity;
}

/** Twelve equal months. */
export const flatMonths = (meanC: number, amplitudeK = 0): Climate['months'] =>
  Array.from({ length: 12 }, () => ({ meanC, amplitudeK }));

/**
 * A leakage of 10 µA on a cell of 1,000 C without self-discharge, at 20 °C all the year: 1e8 s of life. The open-circuit voltage
 * falls from 3 V to 2 V in proportion to the charge, the resistance is 10 Ω at any depth.
 */
export function simpleScenario({ node, supply, cell, climate, capacityC }: SimpleParts = {}): Scenario {
  return {
    schemaVersion: 1,
    name: 'Simple',
    node: {
      parts: [],
      routines: [],
      leakages: [{ id: 'leak', name: 'Leak', current: { typical: 1e-5 } }],
      ...node,
    },
    supply: {
      series: 1,
      parallel: 1,
      regulator: { kind: 'none' },
      ...supply,
      cell: {
        designation: 'simple',
        capacityC: capacityC ?? { typical: 1_000 },
        openCircuitTableV: [
          [0, 3],
          [1, 2],
        ],
        resistanceOhm: [{ pulseS: 10, ohm: { typical: 10 } }],
        resistanceFactorByTemperature: [
          [-40, 1],
          [60, 1],
        ],
        resistanceFactorByDepth: [
          [0, 1],
          [1, 1],
        ],
        selfDischarge: { lossPerYear: { typical: 0 }, referenceC: 20 },
        ...cell,
      },
    },
    climate: { startMonth: 1, months: flatMonths(20), ...climate },
    target: { lifeS: YEAR_S, confidence: 0.9 },
  };
}

/** A part that draws 20 mA for 10 ms at every period, down to 1.8 V. */
export function pulsingNode(periodS: number, pulseA = 0.02, lowestV = 1.8): Partial<Node> {
  return {
    parts: [
      {
        id: 'radio',
        name: 'Radio',
        kind: 'radio',
        restStateId: 'off',
        lowestVoltageV: { typical: lowestV },
        transitions: [],
        states: [
          { id: 'off', name: 'Off', current: { typical: 1e-6 } },
          { id: 'send', name: 'Send', current: { typical: pulseA } },
        ],
      },
    ],
    routines: [
      {
        id: 'report',
        name: 'Report',
        enabled: true,
        schedule: { kind: 'every', periodS },
        steps: [{ id: 'send', name: 'Send', states: { radio: 'send' }, duration: { kind: 'fixed', typical: 0.01 } }],
      },
    ],
    leakages: [],
  };
}
