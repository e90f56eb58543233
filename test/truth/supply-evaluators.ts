import { numberInput, textInput } from '#test/support/truth.ts';
import type { TruthEvaluator, TruthRow } from '#test/support/truth.ts';
import {
  capacityAtCurrentC,
  capacityTemperatureFactor,
  constantPowerA,
  forecast,
  meanCurrentA,
  packOf,
  regulatorInputA,
  selfDischargeLifeS,
  selfDischargeRatePerS,
  usableChargeC,
} from '#common/engine/index.ts';
import type { Quantity, Scenario, SelfDischargeRateInput, Table } from '#common/engine/index.ts';
import { loadedVoltageV } from '#common/engine/supply/cell-load.ts';
import { GAS_CONSTANT, HOUR_S, MAH_C, YEAR_S } from '#common/units/si.ts';

const DIRECT = { dropV: 0, ceilingV: Infinity };

const mA = (row: TruthRow, key: string): number => numberInput(row, key) / 1e3;
const mAh = (row: TruthRow, key: string): number => numberInput(row, key) * MAH_C;

function tableInput(row: TruthRow, key: string): Table {
  const table: unknown = row.inputs[key];
  if (!Array.isArray(table)) throw new Error(`${row.id} has no table "${key}".`);
  return table.map(([x, y]: [number, number]) => [x, y]);
}

/** Argument at which an increasing function reaches a value. */
function argumentWhere(isBelow: (x: number) => boolean, low: number, high: number): number {
  for (let halving = 0; halving < 200; halving++) {
    const middle = (low + high) / 2;
    if (isBelow(middle)) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}

const AT_20C = { referenceC: 20, temperatureC: 20 };

/** Rate of a row's yearly loss in its convention, 1/s. */
function rateOf(row: TruthRow): number {
  const lossPerYear = numberInput(row, 'loss_fraction_per_year');
  const convention = row.inputs['convention'];
  if (typeof convention === 'string' && convention.startsWith('k=s')) return lossPerYear / YEAR_S;
  return selfDischargeRatePerS({ lossPerYear, ...AT_20C });
}

function selfDischarge(row: TruthRow): number {
  if (row.id === 'sd-shelf-NiMH-std-0.25y') {
    // What is left after storage: without a load the charge falls to it in the time of storage.
    const capacityC = mAh(row, 'capacity_mAh');
    const storageS = numberInput(row, 'storage_year') * YEAR_S;
    const life = (reserveC: number): number =>
      selfDischargeLifeS({ capacityC, currentA: 0, ratePerS: rateOf(row), reserveC });
    return argumentWhere((reserveC) => life(reserveC) > storageS, 1e-9, capacityC);
  }
  const capacityC = mAh(row, 'capacity_mAh');
  const reserveC = row.inputs['reserve_mAh'] === undefined ? 0 : mAh(row, 'reserve_mAh');
  if (String(row.inputs['convention']).startsWith('linear')) {
    const parasiticA = (numberInput(row, 'loss_fraction_per_year') * capacityC) / YEAR_S;
    return selfDischargeLifeS({ capacityC, currentA: mA(row, 'load_mA') + parasiticA, ratePerS: 0 });
  }
  return selfDischargeLifeS({ capacityC, currentA: mA(row, 'load_mA'), ratePerS: rateOf(row), reserveC });
}

/** Rate at a temperature over the rate at 20 °C. */
function factorAt(temperatureC: number, law: Partial<SelfDischargeRateInput>): number {
  const rate = (atC: number): number =>
    selfDischargeRatePerS({ lossPerYear: 0.01, referenceC: 20, ...law, amplitudeK: 0, temperatureC: atC });
  return rate(temperatureC) / rate(20);
}

function averageFactor(row: TruthRow, activationEnergyJPerMol: number): number {
  const profile: unknown = row.inputs['profile'];
  if (!Array.isArray(profile)) throw new Error(`${row.id} has no profile.`);
  const shares: { temperature_C: number; share: number }[] = profile;
  return shares.reduce(
    (sum, { temperature_C, share }) => sum + share * factorAt(temperature_C, { activationEnergyJPerMol }),
    0,
  );
}

function arrheniusAverage(row: TruthRow): number {
  if (row.inputs['shape'] === 'sine') {
    const q10 = numberInput(row, 'Q10');
    const rate = selfDischargeRatePerS({
      lossPerYear: 0.01,
      referenceC: numberInput(row, 'reference_C'),
      q10,
      temperatureC: numberInput(row, 'mean_C'),
      amplitudeK: numberInput(row, 'amplitude_K'),
    });
    return rate / selfDischargeRatePerS({ lossPerYear: 0.01, ...AT_20C });
  }
  const activationEnergyJPerMol = numberInput(row, 'Ea_J_per_mol');
  const factor = averageFactor(row, activationEnergyJPerMol);
  if (row.expected.unit === 'degC') {
    return argumentWhere((atC) => factorAt(atC, { activationEnergyJPerMol }) < factor, -50, 100);
  }
  if (row.inputs['capacity_mAh'] === undefined) return factor;
  const lossPerYear = numberInput(row, 'loss_fraction_per_year_at_20C');
  const ratePerS = factor * selfDischargeRatePerS({ lossPerYear, ...AT_20C });
  return selfDischargeLifeS({ capacityC: mAh(row, 'capacity_mAh'), currentA: mA(row, 'load_mA'), ratePerS });
}

function q10(row: TruthRow): number {
  if (row.id !== 'q10-to-Ea') return factorAt(numberInput(row, 'temperature_C'), { q10: numberInput(row, 'Q10') });
  // ln of the Arrhenius factor is proportional to the activation energy.
  const perJoule =
    Math.log(factorAt(numberInput(row, 'T2_C'), { activationEnergyJPerMol: GAS_CONSTANT })) / GAS_CONSTANT;
  return Math.log(factorAt(30, { q10: numberInput(row, 'Q10') })) / perJoule;
}

function regulator(row: TruthRow): number | null {
  if (row.inputs['power_W'] !== undefined) {
    return constantPowerA({
      openCircuitV: numberInput(row, 'open_circuit_V'),
      resistanceOhm: numberInput(row, 'internal_ohm'),
      powerW: numberInput(row, 'power_W'),
    });
  }
  const isLinear = textInput(row, 'kind') === 'LDO';
  const inputV = numberInput(row, 'Vin_V');
  const outputV = numberInput(row, 'Vout_V');
  const outputA = numberInput(row, 'Iout_uA') / 1e6;
  const common = { inputV, outputV, outputA };
  const inputA = isLinear
    ? regulatorInputA({ kind: 'linear', ...common, quiescentA: numberInput(row, 'Iq_uA') / 1e6 })
    : regulatorInputA({
        kind: 'switching',
        ...common,
        quiescentA: numberInput(row, 'Iq_in_uA') / 1e6,
        efficiency: numberInput(row, 'efficiency'),
      });
  return row.expected.unit === '1' ? (outputV * outputA) / (inputV * inputA) : inputA;
}

/** Life of a constant power behind a switching regulator on a cell without resistance, from fresh to depth 1, s. */
function constantPowerLifeS(
  table: Table,
  capacityC: number,
  { powerW, efficiency }: { powerW: number; efficiency: number },
): number {
  const scenario: Scenario = {
    schemaVersion: 1,
    name: 'Constant power',
    node: { parts: [], routines: [], leakages: [{ id: 'load', name: 'Load', current: { typical: powerW } }] },
    supply: {
      series: 1,
      parallel: 1,
      regulator: { kind: 'switching', outputV: 1, quiescentA: 0, efficiency, minimumInputV: 0 },
      cell: {
        designation: 'table',
        capacityC: { typical: capacityC },
        openCircuitTableV: table,
        resistanceOhm: [{ ohm: { typical: 0 } }],
        resistanceFactorByTemperature: [[20, 1]],
        resistanceFactorByDepth: [[0, 1]],
        selfDischarge: { lossPerYear: { typical: 0 }, referenceC: 20 },
      },
    },
    climate: { startMonth: 1, months: Array.from({ length: 12 }, () => ({ meanC: 20, amplitudeK: 0 })) },
    target: { lifeS: YEAR_S, confidence: 0.5 },
  };
  return forecast(scenario, { withLedger: false }).lifeS ?? NaN;
}

function energyCharge(row: TruthRow): number {
  const table = tableInput(row, 'ocv_table_V');
  if (row.id.startsWith('cp-life')) {
    const load = { powerW: mA(row, 'load_mW'), efficiency: numberInput(row, 'efficiency') };
    return constantPowerLifeS(table, mAh(row, 'capacity_mAh'), load);
  }
  // Energy over charge.
  const meanV = (constantPowerLifeS(table, 1_000, { powerW: 1e-3, efficiency: 1 }) * 1e-3) / 1_000;
  return row.id.startsWith('nominal-err') ? numberInput(row, 'nominal_V') / meanV - 1 : meanV;
}

function pack(row: TruthRow): number {
  if (row.inputs['cell_ohm'] !== undefined) {
    const shape = { series: numberInput(row, 'series'), parallel: numberInput(row, 'parallel') };
    return numberInput(row, 'cell_ohm') * packOf({ capacityC: { typical: 1 } }, shape).resistanceFactor;
  }
  if (row.inputs['cell_mAh'] !== undefined) {
    const shape = { series: numberInput(row, 'series'), parallel: numberInput(row, 'parallel') };
    return mAh(row, 'cell_mAh') * packOf({ capacityC: { typical: 1 } }, shape).capacityFactor;
  }
  const mean = mAh(row, 'mean_mAh');
  const capacityC: Quantity = { typical: mean, distribution: 'normal', deviation: mAh(row, 'sigma_mAh') };
  if (row.inputs['series_cells'] !== undefined) {
    return mean * packOf({ capacityC }, { series: numberInput(row, 'series_cells'), parallel: 1 }).capacityFactor;
  }
  // The spread of a parallel group shows in what the weaker of two groups lacks.
  const parallel = numberInput(row, 'parallel_cells');
  const lack = (groups: number): number =>
    1 - packOf({ capacityC }, { series: 2, parallel: groups }).capacityFactor / groups;
  return (lack(parallel) / lack(1)) * (numberInput(row, 'sigma_mAh') / numberInput(row, 'mean_mAh'));
}

function peukert(row: TruthRow): number {
  if (row.id.startsWith('implied-sd')) {
    const capacityC = mAh(row, 'capacity_at_zero_loss_mAh');
    const currentA = mA(row, 'load_mA');
    const deliveredC = numberInput(row, 'delivered_Ah') * HOUR_S;
    const isBelow = (perYear: number): boolean =>
      currentA * selfDischargeLifeS({ capacityC, currentA, ratePerS: perYear / YEAR_S }) > deliveredC;
    return argumentWhere(isBelow, 0, 1);
  }
  const perRow = row.inputs['unit_of_table'] === 'mAh' ? MAH_C : HOUR_S;
  const table = tableInput(row, 'table_mA_Ah').map(([rowMa, charge]): [number, number] => [
    rowMa / 1e3,
    charge * perRow,
  ]);
  return capacityAtCurrentC({ table, currentA: mA(row, 'current_mA') });
}

/** Resistance at which a load pulls a source down to a voltage. */
function resistanceOhm(load: { constantA: number; conductanceS: number }, openCircuitV: number, toV: number): number {
  const whole = { powerW: 0, ...load };
  return argumentWhere((ohm) => loadedVoltageV(whole, DIRECT, openCircuitV, ohm) > toV, 0, 1e4);
}

function resistance(row: TruthRow): number {
  const openCircuitV = numberInput(row, 'open_circuit_V');
  const loadedV = numberInput(row, 'loaded_V');
  const load =
    row.inputs['load_ohm'] === undefined
      ? { constantA: mA(row, 'load_mA'), conductanceS: 0 }
      : { constantA: 0, conductanceS: 1 / numberInput(row, 'load_ohm') };
  return resistanceOhm(load, openCircuitV, loadedV);
}

function droop(row: TruthRow): number {
  const constantA = mA(row, 'base_mA') + mA(row, 'pulse_mA');
  const load = { constantA, powerW: 0, conductanceS: 0 };
  return loadedVoltageV(load, DIRECT, numberInput(row, 'open_circuit_V'), numberInput(row, 'internal_ohm'));
}

const publishedChecks: Readonly<Record<string, (row: TruthRow) => number>> = {
  'pub-ir-limit-sagged': (row) =>
    resistanceOhm(
      { constantA: mA(row, 'peak_mA'), conductanceS: 0 },
      numberInput(row, 'open_circuit_V'),
      numberInput(row, 'brown_out_V'),
    ),
  'pub-coin-60mA-fresh': (row) => {
    const openCircuitV = numberInput(row, 'open_circuit_V');
    const ohm = numberInput(row, 'internal_ohm');
    const isBelow = (constantA: number): boolean =>
      loadedVoltageV({ constantA, powerW: 0, conductanceS: 0 }, DIRECT, openCircuitV, ohm) >
      numberInput(row, 'brown_out_V');
    return argumentWhere(isBelow, 0, 1);
  },
  'pub-coin-721h': (row) => drawnC(row),
  'pub-cr2450-1500h': (row) => drawnC(row),
  'pub-duty-4pc': (row) =>
    meanCurrentA([
      { currentA: 1, durationS: numberInput(row, 'on_ms') },
      { currentA: 0, durationS: numberInput(row, 'period_ms') - numberInput(row, 'on_ms') },
    ]),
};

/** Charge that lasts for a time at a current. */
function drawnC(row: TruthRow): number {
  const timeS = numberInput(row, 'duration_h') * HOUR_S;
  const currentA = mA(row, 'current_mA');
  const isBelow = (capacityC: number): boolean => selfDischargeLifeS({ capacityC, currentA, ratePerS: 0 }) < timeS;
  return argumentWhere(isBelow, 0, 1e6);
}

function leakage(row: TruthRow): number {
  const currentA = (numberInput(row, 'node_uA') + numberInput(row, 'leakage_uA')) / 1e6;
  return selfDischargeLifeS({ capacityC: mAh(row, 'capacity_mAh'), currentA, ratePerS: rateOf(row) });
}

/** How the rows of the supply's groups are computed by the engine. */
export const supplyEvaluators: Readonly<Record<string, TruthEvaluator>> = {
  'self-discharge': selfDischarge,
  'self-discharge-convention': selfDischarge,
  arrhenius: (row) =>
    factorAt(numberInput(row, 'temperature_C'), { activationEnergyJPerMol: numberInput(row, 'Ea_J_per_mol') }),
  q10,
  'arrhenius-average': arrheniusAverage,
  regulator,
  'cut-off': (row) =>
    usableChargeC({
      capacityC: mAh(row, 'capacity_mAh'),
      openCircuitTableV: tableInput(row, 'ocv_table_V'),
      resistanceTableOhm: tableInput(row, 'resistance_table_ohm'),
      peakA: mA(row, 'peak_mA'),
      cutOffV: numberInput(row, 'cut_off_V'),
    }),
  'energy-charge': energyCharge,
  pack,
  peukert,
  'temperature-capacity': (row) =>
    capacityTemperatureFactor(tableInput(row, 'table_C_factor'), numberInput(row, 'temperature_C')),
  resistance,
  'pulse-droop': droop,
  'published-check': (row) => publishedChecks[row.id]?.(row) ?? null,
  'capacitor-leakage': leakage,
};
