import type { LoadLaw, Part, Routine, Scenario, State } from '#common/engine/index.ts';

export interface BenchChoice {
  law: LoadLaw;
  regulator: Scenario['supply']['regulator'];
  doublingK?: number;
}

/** Six parts, ten routines of ten steps, and a cell that lasts for about twenty years. Invented figures. */
export function benchScenario({ law, regulator, doublingK }: BenchChoice): Scenario {
  const parts = Array.from({ length: 6 }, (_, index) => part(index, law, doublingK));
  return {
    schemaVersion: 1,
    name: 'Bench',
    node: {
      parts,
      leakages: [{ id: 'board', name: 'Board', current: { typical: 2e-7 } }],
      routines: Array.from({ length: 10 }, (_, index) => routine(index, parts)),
    },
    supply: {
      series: 1,
      parallel: 1,
      regulator,
      cutOffV: 1.9,
      cell: {
        designation: 'invented',
        capacityC: { typical: 2_000 * 3.6 },
        openCircuitTableV: [
          [0, 3.3],
          [0.1, 3.1],
          [0.4, 3],
          [0.7, 2.9],
          [0.9, 2.7],
          [0.96, 2.5],
          [1, 2],
        ],
        openCircuitTemperatureVPerK: 0.0005,
        resistanceOhm: [
          { pulseS: 0.01, ohm: { typical: 4 } },
          { pulseS: 1, ohm: { typical: 6 } },
        ],
        resistanceFactorByTemperature: [
          [-30, 4],
          [20, 1],
          [60, 0.8],
        ],
        resistanceFactorByDepth: [
          [0, 1],
          [0.5, 1.2],
          [0.9, 2.5],
          [1, 6],
        ],
        capacityFactorByTemperature: [
          [-20, 0.8],
          [20, 1],
        ],
        selfDischarge: { lossPerYear: { typical: 0.01 }, referenceC: 20 },
      },
    },
    climate: {
      startMonth: 5,
      months: Array.from({ length: 12 }, (_, month) => ({
        meanC: 9 - 10 * Math.cos((2 * Math.PI * month) / 12),
        amplitudeK: 5,
      })),
      extremes: { coldest: { temperatureC: -22, month: 1 } },
    },
    target: { lifeS: 10 * 31_557_600, confidence: 0.9 },
  };
}

function part(index: number, law: LoadLaw, doublingK: number | undefined): Part {
  const state = (id: string, currentA: number): State => ({
    id,
    name: id,
    current: { typical: currentA },
    law,
    ...(doublingK === undefined ? {} : { doublingK }),
  });
  const move = (fromStateId: string, toStateId: string): Part['transitions'][number] => ({
    fromStateId,
    toStateId,
    durationS: { typical: 0.0002 },
    current: { typical: 0.0005 },
  });
  return {
    id: `part${index}`,
    name: `Part ${index}`,
    kind: 'other',
    restStateId: 'sleep',
    lowestVoltageV: { typical: 1.6 + index / 20 },
    states: [state('sleep', 3e-7 * (index + 1)), state('idle', 1e-4), state('active', 0.002 * (index + 1))],
    transitions: [
      move('sleep', 'idle'),
      move('idle', 'active'),
      move('active', 'idle'),
      move('idle', 'sleep'),
      move('active', 'sleep'),
    ],
  };
}

function routine(index: number, parts: readonly Part[]): Routine {
  return {
    id: `routine${index}`,
    name: `Routine ${index}`,
    enabled: true,
    schedule: { kind: 'every', periodS: 600 * (index + 1) },
    steps: Array.from({ length: 10 }, (_, step) => ({
      id: `step${step}`,
      name: `Step ${step}`,
      states: {
        [parts[(index + step) % parts.length]?.id ?? '']: 'active',
        [parts[(index + step + 1) % parts.length]?.id ?? '']: 'idle',
      },
      duration: { kind: 'fixed', typical: 0.0005 * (step + 1) },
    })),
  };
}

/** The same cell and climate under a node of three parts and four routines, of whose steps twenty are acknowledged exchanges. */
export function linkScenario(): Scenario {
  const base = benchScenario({ law: 'constant-current', regulator: { kind: 'none' } });
  const [sensor, controller] = base.node.parts;
  const parts = [radio(), ...(controller ? [controller] : []), ...(sensor ? [sensor] : [])];
  const link = {
    phy: 'oqpsk-2450' as const,
    busyProbability: { typical: 0.1 },
    receivedLevelDbm: { typical: -92 },
    sensitivityDbm: -96,
  };
  const routines = Array.from({ length: 4 }, (_, index): Routine => ({
    id: `report${index}`,
    name: `Report ${index}`,
    enabled: true,
    schedule: { kind: 'every', periodS: 60 * (index + 1) },
    steps: Array.from({ length: 5 }, (_, step) => ({
      id: `send${step}`,
      name: `Send ${step}`,
      states: { [controller?.id ?? '']: 'idle' },
      duration: { kind: 'exchange', pattern: 'acknowledged', payloadOctets: 10 + 4 * step },
    })),
  }));
  return { ...base, name: 'Bench of the link', node: { ...base.node, parts, routines, link } };
}

function radio(): Part {
  const state = (id: NonNullable<State['role']>, currentA: number): State => ({
    id,
    name: id,
    role: id,
    current: { typical: currentA },
  });
  const move = (fromStateId: string, toStateId: string, durationS = 0): Part['transitions'][number] => ({
    fromStateId,
    toStateId,
    durationS: { typical: durationS },
    current: { typical: 0.003 },
  });
  const air = ['listen', 'receive', 'transmit'];
  return {
    id: 'radio',
    name: 'Radio',
    kind: 'radio',
    restStateId: 'sleep',
    lowestVoltageV: { typical: 1.8 },
    states: [
      state('sleep', 2e-7),
      state('idle', 4e-4),
      state('synthesiser', 0.006),
      state('listen', 0.012),
      state('receive', 0.013),
      state('transmit', 0.014),
    ],
    transitions: [
      move('sleep', 'idle', 0.0005),
      move('idle', 'synthesiser', 0.00011),
      move('idle', 'sleep'),
      ...air.flatMap((from) => [
        move('synthesiser', from),
        move(from, 'synthesiser'),
        move(from, 'idle'),
        move(from, 'sleep'),
        ...air.filter((to) => to !== from).map((to) => move(from, to)),
      ]),
    ],
  };
}
