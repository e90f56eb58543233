import type { Scenario } from '#common/engine/scenario/scenario.types.ts';

/** A small valid scenario with a radio that has transitions, a sensor that has none, and two routines. */
export function editorScenario(): Scenario {
  return {
    schemaVersion: 1,
    name: 'Frost post',
    node: {
      parts: [
        {
          id: 'radio',
          name: 'Radio',
          kind: 'radio',
          restStateId: 'sleep',
          lowestVoltageV: { typical: 1.8 },
          states: [
            { id: 'sleep', name: 'Sleep', role: 'sleep', current: { typical: 1e-6, max: 2e-6 } },
            { id: 'idle', name: 'Idle', role: 'idle', current: { typical: 400e-6 } },
            {
              id: 'transmit',
              name: 'Transmit',
              role: 'transmit',
              current: { min: 0.013, typical: 0.0142, max: 0.016, provenance: { kind: 'source', text: 'Table 4' } },
            },
          ],
          transitions: [
            { fromStateId: 'sleep', toStateId: 'idle', durationS: { typical: 0.001 }, current: { typical: 0.0004 } },
            { fromStateId: 'idle', toStateId: 'sleep', durationS: { typical: 0 }, current: { typical: 0 } },
            { fromStateId: 'transmit', toStateId: 'sleep', durationS: { typical: 0 }, current: { typical: 0 } },
          ],
        },
        {
          id: 'sensor',
          name: 'Sensor',
          kind: 'sensor',
          restStateId: 'off',
          lowestVoltageV: { typical: 2 },
          states: [
            { id: 'off', name: 'Off', role: 'sleep', current: { typical: 0 } },
            { id: 'measure', name: 'Measure', role: 'active', current: { typical: 650e-6, max: 0.001 } },
          ],
          transitions: [],
        },
      ],
      leakages: [{ id: 'divider', name: 'Divider', current: { typical: 2e-7 } }],
      routines: [
        {
          id: 'report',
          name: 'Report',
          enabled: true,
          schedule: { kind: 'every', periodS: 900 },
          steps: [
            { id: 'sense', name: 'Sense', states: { sensor: 'measure' }, duration: { kind: 'fixed', typical: 0.014 } },
            { id: 'wait', name: 'Wait', states: { radio: 'idle' }, duration: { kind: 'fixed', typical: 0.002 } },
          ],
        },
        { id: 'test', name: 'Self-test', enabled: true, schedule: { kind: 'once', afterS: 0 }, steps: [] },
      ],
    },
    supply: {
      series: 1,
      parallel: 1,
      regulator: { kind: 'none' },
      cell: {
        designation: 'invented',
        capacityC: { typical: 810 },
        openCircuitTableV: [
          [0, 3.2],
          [1, 2],
        ],
        resistanceOhm: [{ ohm: { typical: 20 } }],
        resistanceFactorByTemperature: [[20, 1]],
        resistanceFactorByDepth: [[0, 1]],
        selfDischarge: { lossPerYear: { typical: 0.02 }, referenceC: 20 },
      },
    },
    climate: { startMonth: 10, months: Array.from({ length: 12 }, () => ({ meanC: 8, amplitudeK: 5 })) },
    target: { lifeS: 157_788_000, confidence: 0.9 },
  };
}
