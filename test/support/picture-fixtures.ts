import type { DekadPoint, Forecast, LedgerEntry, Scenario, State, Table } from '#common/engine/index.ts';
import { DAY_S, YEAR_S } from '#common/units/si.ts';

const state = (id: string, name: string, typical: number, role: State['role']): State => ({
  id,
  name,
  role,
  current: { typical },
});

const MONTHS_C = [-4, -3, 1, 6, 11, 15, 18, 17, 13, 8, 3, -2];

/** An invented frost post: radio, controller and leaf sensor, one report every 15 min, on a 1,000 mAh cell. */
export function pictureScenario(change: (scenario: Scenario) => void = () => undefined): Scenario {
  const scenario: Scenario = {
    schemaVersion: 1,
    name: 'Frost post',
    node: {
      parts: [
        {
          id: 'radio',
          name: 'Radio',
          kind: 'radio',
          states: [
            state('r-sleep', 'Sleep', 0.4e-6, 'sleep'),
            state('r-idle', 'Idle', 400e-6, 'idle'),
            state('r-rx', 'Receive', 12.8e-3, 'receive'),
            state('r-tx', 'Transmit', 14.2e-3, 'transmit'),
          ],
          restStateId: 'r-sleep',
          transitions: [
            {
              fromStateId: 'r-sleep',
              toStateId: 'r-idle',
              durationS: { typical: 1.2e-3 },
              current: { typical: 250e-6 },
            },
            { fromStateId: 'r-idle', toStateId: 'r-rx', durationS: { typical: 192e-6 }, current: { typical: 6.5e-3 } },
            { fromStateId: 'r-idle', toStateId: 'r-tx', durationS: { typical: 192e-6 }, current: { typical: 6.5e-3 } },
            { fromStateId: 'r-rx', toStateId: 'r-tx', durationS: { typical: 192e-6 }, current: { typical: 6.5e-3 } },
            { fromStateId: 'r-tx', toStateId: 'r-rx', durationS: { typical: 192e-6 }, current: { typical: 6.5e-3 } },
            { fromStateId: 'r-rx', toStateId: 'r-sleep', durationS: { typical: 10e-6 }, current: { typical: 400e-6 } },
          ],
          lowestVoltageV: { typical: 2.0 },
        },
        {
          id: 'mcu',
          name: 'Controller',
          kind: 'controller',
          states: [state('m-sleep', 'Sleep', 1.1e-6, 'sleep'), state('m-active', 'Active', 3.1e-3, 'active')],
          restStateId: 'm-sleep',
          transitions: [
            {
              fromStateId: 'm-sleep',
              toStateId: 'm-active',
              durationS: { typical: 1.1e-3 },
              current: { typical: 1.9e-3 },
            },
            {
              fromStateId: 'm-active',
              toStateId: 'm-sleep',
              durationS: { typical: 20e-6 },
              current: { typical: 1e-3 },
            },
          ],
          lowestVoltageV: { typical: 1.8 },
        },
        {
          id: 'leaf',
          name: 'Leaf sensor',
          kind: 'sensor',
          states: [state('l-off', 'Off', 0.1e-6, 'sleep'), state('l-convert', 'Convert', 650e-6, 'active')],
          restStateId: 'l-off',
          transitions: [],
          lowestVoltageV: { typical: 1.8 },
        },
      ],
      leakages: [{ id: 'divider', name: 'Voltage divider', current: { typical: 0.3e-6 } }],
      routines: [
        {
          id: 'report',
          name: 'Report',
          enabled: true,
          schedule: { kind: 'every', periodS: 900 },
          steps: [
            {
              id: 'sense',
              name: 'Sense',
              states: { mcu: 'm-active', leaf: 'l-convert' },
              duration: { kind: 'fixed', typical: 14e-3 },
            },
            {
              id: 'clear',
              name: 'Clear channel',
              states: { radio: 'r-rx' },
              duration: { kind: 'fixed', typical: 128e-6 },
            },
            {
              id: 'send',
              name: 'Transmit',
              states: { radio: 'r-tx', mcu: 'm-active' },
              duration: { kind: 'fixed', typical: 1.312e-3 },
            },
            {
              id: 'ack',
              name: 'Await acknowledgement',
              states: { radio: 'r-rx' },
              duration: { kind: 'fixed', typical: 544e-6 },
            },
          ],
        },
        {
          id: 'selftest',
          name: 'Self-test',
          enabled: true,
          schedule: { kind: 'window', fromHour: 2, toHour: 3, periodS: 3_600 },
          steps: [
            { id: 'test', name: 'Test memory', states: { mcu: 'm-active' }, duration: { kind: 'fixed', typical: 0.8 } },
          ],
        },
      ],
    },
    supply: {
      cell: {
        designation: 'CR2477',
        capacityC: { typical: 3_600, provenance: { kind: 'source', text: 'invented' } },
        openCircuitTableV: [
          [0, 3.1],
          [0.1, 2.95],
          [0.8, 2.8],
          [1, 2.2],
        ],
        resistanceOhm: [{ ohm: { typical: 18 } }],
        resistanceFactorByTemperature: [
          [-20, 5],
          [20, 1],
        ] satisfies Table,
        resistanceFactorByDepth: [
          [0, 1],
          [1, 4],
        ],
        selfDischarge: { lossPerYear: { typical: 0.01 }, referenceC: 20 },
      },
      series: 1,
      parallel: 1,
      regulator: { kind: 'none' },
      lowBattery: { thresholdV: 2.4, hysteresisV: 0.1, readAt: 'critical' },
    },
    climate: { months: MONTHS_C.map((meanC) => ({ meanC, amplitudeK: 4 })), startMonth: 10 },
    target: { lifeS: 5 * YEAR_S, confidence: 0.9 },
  };
  change(scenario);
  return scenario;
}

/** Dekads of a life of so many years whose headroom falls in a line and dips in the cold. */
export function pictureDekads(lifeS: number, startMonth = 10): DekadPoint[] {
  const dekadS = YEAR_S / 36;
  const count = Math.ceil(lifeS / dekadS - 1e-9);
  return Array.from({ length: count }, (_, i) => {
    const timeS = Math.min(lifeS, (i + 1) * dekadS);
    const dekadOfYear = ((startMonth - 1) * 3 + i) % 36;
    const meanC = 7 - 11 * Math.cos((2 * Math.PI * (dekadOfYear - 1.5)) / 36);
    const depth = timeS / lifeS;
    const coldestC = meanC - 4;
    const openCircuitV = 3.05 - 0.25 * depth;
    const loadedV = Math.max(2, openCircuitV - 0.12 - 0.25 * depth - Math.max(0, 2 - coldestC) * 0.035 * (0.4 + depth));
    return {
      timeS,
      month: Math.floor(dekadOfYear / 3) + 1,
      dekadOfYear,
      remainingC: 3_600 * (1 - 0.82 * depth),
      openCircuitV,
      loadedV,
      limitV: 2,
      headroomV: loadedV - 2,
      meanC,
      coldestC,
      currentA: 16e-6,
      selfDischargeA: 1.1e-6,
    };
  });
}

const line = (kind: LedgerEntry['kind'], chargeC: string, ids: Partial<LedgerEntry> = {}): LedgerEntry => ({
  kind,
  routineId: null,
  stepId: null,
  partId: null,
  stateId: null,
  fromStateId: null,
  leakageId: null,
  chargePerCycleC: null,
  chargeC,
  ...ids,
});

export const PICTURE_LEDGER_ENTRIES: LedgerEntry[] = [
  line('rest', '34.713360000000000000000000000001', { partId: 'mcu', stateId: 'm-sleep' }),
  line('rest', '12.62304', { partId: 'radio', stateId: 'r-sleep' }),
  line('rest', '3.15576', { partId: 'leaf', stateId: 'l-off' }),
  line('leakage', '9.46728', { leakageId: 'divider' }),
  line('step', '152.1', {
    routineId: 'report',
    stepId: 'sense',
    partId: 'mcu',
    stateId: 'm-active',
    chargePerCycleC: '0.0000434',
  }),
  line('step', '31.9', {
    routineId: 'report',
    stepId: 'sense',
    partId: 'leaf',
    stateId: 'l-convert',
    chargePerCycleC: '0.0000091',
  }),
  line('step', '65.3', {
    routineId: 'report',
    stepId: 'send',
    partId: 'radio',
    stateId: 'r-tx',
    chargePerCycleC: '0.0000186',
  }),
  line('step', '24.4', {
    routineId: 'report',
    stepId: 'ack',
    partId: 'radio',
    stateId: 'r-rx',
    chargePerCycleC: '0.0000070',
  }),
  line('step', '5.7', {
    routineId: 'report',
    stepId: 'clear',
    partId: 'radio',
    stateId: 'r-rx',
    chargePerCycleC: '0.0000016',
  }),
  line('transition', '73.1', {
    routineId: 'report',
    stepId: 'sense',
    partId: 'mcu',
    stateId: 'm-active',
    fromStateId: 'm-sleep',
    chargePerCycleC: '0.0000021',
  }),
  line('step', '0.9', {
    routineId: 'selftest',
    stepId: 'test',
    partId: 'mcu',
    stateId: 'm-active',
    chargePerCycleC: '0.00248',
  }),
  line('monitor', '0.02'),
  line('self-discharge', '34.7'),
];

/** A forecast made by hand, not computed: 6.3 years until undervoltage in February. */
export function pictureForecast(change: Partial<Forecast> = {}): Forecast {
  const lifeS = change.lifeS === undefined ? 6.35 * YEAR_S : change.lifeS;
  return {
    engineVersion: 'test',
    level: 'mean-current',
    outcome: 'undervoltage',
    lifeS,
    endMonth: 2,
    wintersSurvived: 6,
    criticalStepId: 'send',
    criticalIntervalId: 'report/send',
    failingPartId: 'radio',
    limitedBy: 'part',
    chargeLeftFraction: 0.18,
    startingChargeC: 3_600,
    outages: [],
    lastReportS: lifeS,
    meanCurrentA: 13.6e-6,
    chargePerDayC: 13.6e-6 * DAY_S,
    dutyCycles: [
      { partId: 'radio', stateId: 'r-sleep', fromStateId: null, share: 0.999996, meanCurrentA: 0.4e-6 },
      { partId: 'radio', stateId: 'r-tx', fromStateId: null, share: 1.46e-6, meanCurrentA: 2.07e-8 },
      { partId: 'mcu', stateId: 'm-sleep', fromStateId: null, share: 0.99998, meanCurrentA: 1.1e-6 },
      { partId: 'mcu', stateId: 'm-active', fromStateId: 'm-sleep', share: 1.2e-6, meanCurrentA: 2.3e-9 },
      { partId: 'mcu', stateId: 'm-active', fromStateId: null, share: 1.7e-5, meanCurrentA: 5.3e-8 },
      { partId: 'leaf', stateId: 'l-off', fromStateId: null, share: 0.99998, meanCurrentA: 1e-7 },
      { partId: 'leaf', stateId: 'l-convert', fromStateId: null, share: 1.6e-5, meanCurrentA: 1e-8 },
    ],
    peak: {
      currentA: 17.3e-3,
      intervalId: 'report/send',
      stepId: 'send',
      durationS: 1.312e-3,
      meeting: { currentA: 20.4e-3, perYear: 32, routineIds: ['report', 'selftest'] },
    },
    ledger: { side: 'cell', periodS: YEAR_S, entries: PICTURE_LEDGER_ENTRIES, totalC: sum(PICTURE_LEDGER_ENTRIES) },
    dekads: pictureDekads(lifeS ?? 40 * YEAR_S),
    warning:
      lifeS === null ? null : { timeS: lifeS - 41 * DAY_S, leadS: 41 * DAY_S, falseAlarmTimesS: [], thresholdV: 2.4 },
    cautions: [],
    ...change,
  };
}

/** Exact for the two lengths of fraction in use here. */
function sum(entries: LedgerEntry[]): string {
  const scale = 30;
  const total = entries.reduce((units, { chargeC }) => {
    const [whole = '0', fraction = ''] = chargeC.split('.');
    return units + BigInt(whole + fraction.padEnd(scale, '0'));
  }, 0n);
  const digits = total.toString().padStart(scale + 1, '0');
  return `${digits.slice(0, -scale)}.${digits.slice(-scale)}`;
}
