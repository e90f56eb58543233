import { numberInput } from '#test/support/truth.ts';
import type { TruthEvaluator, TruthRow } from '#test/support/truth.ts';
import { chargeLedger, drawAt, meanCurrentA } from '#common/engine/index.ts';
import type { Draw, Node } from '#common/engine/index.ts';
import { selfDischargeLifeS } from '#common/engine/supply/self-discharge-life.ts';
import { selfDischargeRatePerS } from '#common/engine/supply/self-discharge-rate.ts';
import { DAY_S, HOUR_S, MAH_C, YEAR_S } from '#common/units/si.ts';

interface Phase {
  currentA: number;
  durationS: number;
}

/** Phases of a row; `share` serves as duration where a row gives shares of time. */
function phasesOf(row: TruthRow): Phase[] {
  const phases: unknown = row.inputs['phases'];
  if (!Array.isArray(phases)) throw new Error(`${row.id} has no phases.`);
  return phases.map((phase: Record<string, number>) => ({
    currentA: (phase['current_mA'] ?? NaN) / 1e3,
    durationS: phase['duration_s'] ?? phase['share'] ?? NaN,
  }));
}

/** Groups shares that follow each other into parts whose shares add up to 1, and adds the parts' mean currents. */
function parallelPartsA(phases: readonly Phase[]): number {
  let totalA = 0;
  let part: Phase[] = [];
  for (const phase of phases) {
    part.push(phase);
    if (part.reduce((sum, { durationS }) => sum + durationS, 0) < 1 - 1e-9) continue;
    totalA += meanCurrentA(part);
    part = [];
  }
  return totalA;
}

function constantPowerAt(powerW: number, voltageV: number): number {
  const draw: Draw = {
    currentA: powerW,
    law: 'constant-power',
    referenceVoltageV: 1,
    referenceTemperatureC: 25,
    doublingK: null,
  };
  return drawAt(draw, { voltageV, temperatureC: 25 });
}

/** Life of a charge under a constant current, without self-discharge. */
const lifeS = (capacityMah: number, currentA: number, ratePerS = 0): number | null =>
  selfDischargeLifeS({ capacityC: capacityMah * MAH_C, currentA, ratePerS });

/** A transmitter on repeats of a message, beside a sleep current that the source counts for the whole day. */
function messagesPerDayA(row: TruthRow): number {
  const node: Node = {
    parts: [
      {
        id: 'radio',
        name: 'Radio',
        kind: 'radio',
        restStateId: 'off',
        lowestVoltageV: { typical: 0 },
        transitions: [],
        states: [
          { id: 'off', name: 'Off', current: { typical: 0 } },
          { id: 'transmit', name: 'Transmit', current: { typical: numberInput(row, 'transmit_mA') / 1e3 } },
        ],
      },
    ],
    leakages: [{ id: 'sleep', name: 'Sleep', current: { typical: numberInput(row, 'sleep_uA') / 1e6 } }],
    routines: [
      {
        id: 'messages',
        name: 'Messages',
        enabled: true,
        schedule: { kind: 'random', meanPerDay: numberInput(row, 'messages_per_day') },
        steps: [
          {
            id: 'send',
            name: 'Send',
            states: { radio: 'transmit' },
            duration: { kind: 'fixed', typical: numberInput(row, 'repeat_s') },
            repeats: numberInput(row, 'repeats'),
          },
        ],
      },
    ],
  };
  return Number(chargeLedger(node, { railVoltageV: 3, temperatureC: 25 }).totalC) / DAY_S;
}

const dutyRows: Readonly<Record<string, (row: TruthRow) => number | null>> = {
  'duty-mote-avg': (row) => parallelPartsA(phasesOf(row)),
  // The row's own month, since the unit has no fixed length.
  'duty-mote-1000': (row) => months(row, lifeS(numberInput(row, 'capacity_mAh'), numberInput(row, 'average_mA') / 1e3)),
  'duty-blog-life-h': (row) => lifeS(numberInput(row, 'capacity_mAh'), meanCurrentA(phasesOf(row))),
  'duty-blog-life-mo': (row) => months(row, lifeS(numberInput(row, 'capacity_mAh'), meanCurrentA(phasesOf(row)))),
  'duty-habitat-I': (row) => constantPowerAt(numberInput(row, 'average_power_uW') / 1e6, numberInput(row, 'battery_V')),
  'duty-habitat-days': (row) =>
    lifeS(
      numberInput(row, 'capacity_mAh'),
      constantPowerAt(numberInput(row, 'average_power_uW') / 1e6, numberInput(row, 'battery_V')),
    ),
  // Energy over power, taken at 1 V, where milliwatt-hours and milliampere-hours are the same number.
  'duty-exercise-1': (row) => lifeS(numberInput(row, 'energy_mWh'), numberInput(row, 'power_mW') / 1e3),
  'duty-exercise-2': (row) => {
    const share = numberInput(row, 'share_on');
    const meanA = meanCurrentA([
      { currentA: numberInput(row, 'power_on_mW') / 1e3, durationS: share },
      { currentA: numberInput(row, 'power_sleep_mW') / 1e3, durationS: 1 - share },
    ]);
    return lifeS(numberInput(row, 'energy_mWh'), meanA);
  },
  'duty-exercise-3': (row) => lifeS(numberInput(row, 'capacity_mAh'), numberInput(row, 'transmit_mA') / 1e3),
  'duty-ble-life': (row) => {
    const lossPerYear = numberInput(row, 'loss_fraction_per_year');
    const ratePerS = selfDischargeRatePerS({ lossPerYear, referenceC: 20, temperatureC: 20 });
    return lifeS(numberInput(row, 'capacity_mAh'), numberInput(row, 'average_uA') / 1e6, ratePerS);
  },
  'duty-tank-day': messagesPerDayA,
  'duty-tank-life': (row) => lifeS(numberInput(row, 'capacity_mAh'), (numberInput(row, 'mAh_per_day') * MAH_C) / DAY_S),
  'duty-tank-10msg': (row) =>
    lifeS(numberInput(row, 'capacity_mAh'), (numberInput(row, 'mAh_per_day') * MAH_C) / DAY_S),
  'duty-own-subghz': (row) => meanCurrentA(phasesOf(row)),
  'duty-own-poll': (row) => meanCurrentA(phasesOf(row)),
};

function months(row: TruthRow, timeS: number | null): number | null {
  return timeS === null ? null : timeS / HOUR_S / numberInput(row, 'hours_per_month');
}

const unitRows: Readonly<Record<string, (row: TruthRow) => number>> = {
  'unit-Wh-J': (row) => numberInput(row, 'Wh') * HOUR_S,
  'unit-uAyr-mAh': (row) => (numberInput(row, 'current_uA') / 1e6) * numberInput(row, 'years') * YEAR_S,
  'unit-pkt-uC': (row) => (numberInput(row, 'current_mA') / 1e3) * (numberInput(row, 'duration_ms') / 1e3),
  'unit-A-min-mAh': (row) => numberInput(row, 'A_min') * (HOUR_S / 60),
  'unit-mA-min-mAh': (row) => (numberInput(row, 'mA_min') / 1e3) * (HOUR_S / 60),
  'unit-uW-uA': (row) => constantPowerAt(numberInput(row, 'power_uW') / 1e6, numberInput(row, 'V')),
  'unit-ppm-duty': (row) => {
    const duty = numberInput(row, 'duty');
    return meanCurrentA([
      { currentA: numberInput(row, 'on_mA') / 1e3, durationS: duty },
      { currentA: numberInput(row, 'sleep_uA') / 1e6, durationS: 1 - duty },
    ]);
  },
};

/** How the rows of the node's groups are computed by the engine. */
export const nodeEvaluators: Readonly<Record<string, TruthEvaluator>> = {
  'duty-cycle': (row) => dutyRows[row.id]?.(row) ?? null,
  units: (row) => unitRows[row.id]?.(row) ?? null,
};
