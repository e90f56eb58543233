import {
  formatCurrent,
  formatNumber,
  formatShare,
  formatTemperature,
  formatVoltage,
} from '#common/units/format-quantity.ts';
import type { Cell, Supply, Table } from '../scenario/scenario.types.ts';
import type { CompiledScenario } from './compile-scenario.ts';
import { lowestEfficiency } from './converter.ts';
import type { Caution, Peak } from './forecast.types.ts';

/** What a forecast found that cautions tell of. */
export interface Findings {
  peak: Peak | null;
  /** Mean current of the pack over life, A. */
  meanCurrentA: number;
  /** Mean current of one cell in the first year, A, where a rate table was read at it. */
  firstYearCellA: number | null;
  falseAlarms: number;
}

/**
 * Cautions of a forecast: what the node's compiler remarked, figures held constant beyond their tables, what the document holds
 * but the forecast leaves out, limits of the cell that are passed, and routines that meet.
 *
 * @param compiled The scenario.
 * @param findings What the forecast found.
 * @returns Cautions with code, words and path.
 * @example cautionsOf(compiled, { peak: null, meanCurrentA: 0, firstYearCellA: null, falseAlarms: 0 })
 */
export function cautionsOf(compiled: CompiledScenario, findings: Findings): Caution[] {
  const { supply } = compiled.scenario;
  return [
    ...compiled.program.remarks.map(({ code, message, path }) => ({ code, message, path })),
    ...notModelled(supply),
    ...undatedResistances(supply.cell),
    ...heldTables(compiled, findings.firstYearCellA),
    ...passedLimits(compiled, findings),
    ...regulatorCautions(compiled),
    ...meetingCaution(compiled, findings.peak),
    ...(findings.falseAlarms > 0 ? [falseAlarmCaution(findings.falseAlarms)] : []),
  ];
}

function notModelled({ cell, capacitor, harvest, regulator }: Supply): Caution[] {
  const code = 'not-modelled';
  const cautions: Caution[] = [];
  if (cell.kinetic) {
    const message = 'The two wells of the cell are not modelled yet: the charge counts as one, free at once.';
    cautions.push({ code, message, path: 'supply.cell.kinetic' });
  }
  if (capacitor) {
    const message = 'The capacitor is not modelled yet: pulses load the cell alone, and its leakage is left out.';
    cautions.push({ code, message, path: 'supply.capacitor' });
  }
  if (harvest) {
    const message = 'Harvested energy is not modelled yet: the cell counts alone.';
    cautions.push({ code, message, path: 'supply.harvest' });
  }
  if (regulator.kind === 'switching' && typeof regulator.efficiency !== 'number') {
    const lowest = formatShare(lowestEfficiency(regulator.efficiency));
    const message = `The table of efficiencies is not modelled yet: its lowest value, ${lowest}, counts at every current.`;
    cautions.push({ code, message, path: 'supply.regulator.efficiency' });
  }
  return cautions;
}

function undatedResistances({ resistanceOhm }: Cell): Caution[] {
  return resistanceOhm.flatMap(({ pulseS }, index) => {
    if (pulseS !== undefined) return [];
    const message = 'This resistance has no pulse length, so it serves for pulses of any length.';
    return [{ code: 'resistance-without-duration', message, path: `supply.cell.resistanceOhm[${index}]` }];
  });
}

function heldTables({ calendar, scenario }: CompiledScenario, firstYearCellA: number | null): Caution[] {
  const { cell } = scenario.supply;
  const coldestC = Math.min(...calendar.map((dekad) => dekad.coldestC));
  const mildestC = Math.max(...calendar.map((dekad) => dekad.coldestC));
  const beyond = (table: Table | undefined, name: string): Caution[] => {
    const firstC = table?.[0]?.[0];
    const lastC = table?.at(-1)?.[0];
    if (firstC === undefined || lastC === undefined || (coldestC >= firstC && mildestC <= lastC)) return [];
    const reach = `${formatTemperature(coldestC)} to ${formatTemperature(mildestC)}`;
    const given =
      firstC === lastC ? formatTemperature(firstC) : `${formatTemperature(firstC)} to ${formatTemperature(lastC)}`;
    const message = `The table is given for ${given}, the coldest hours of the year range from ${reach}; beyond its ends it is held constant.`;
    return [{ code: 'table-held-constant', message, path: `supply.cell.${name}` }];
  };
  const cautions = [
    ...beyond(cell.resistanceFactorByTemperature, 'resistanceFactorByTemperature'),
    ...beyond(cell.capacityFactorByTemperature, 'capacityFactorByTemperature'),
  ];
  const rates = cell.rateTable;
  const leastA = rates?.[0]?.[0] ?? 0;
  const mostA = rates?.at(-1)?.[0] ?? Infinity;
  if (rates && firstYearCellA !== null && (firstYearCellA < leastA || firstYearCellA > mostA)) {
    const message = `The capacity table runs from ${formatCurrent(leastA)} to ${formatCurrent(mostA)}; at the mean current of ${formatCurrent(firstYearCellA)} its end is used.`;
    cautions.push({ code: 'table-held-constant', message, path: 'supply.cell.rateTable' });
  }
  return cautions;
}

function passedLimits(
  { calendar, scenario }: CompiledScenario,
  { peak, meanCurrentA }: Pick<Findings, 'peak' | 'meanCurrentA'>,
): Caution[] {
  const { cell, parallel } = scenario.supply;
  const { lowestC = -Infinity, highestC = Infinity, pulseA = Infinity, continuousA = Infinity } = cell.limits ?? {};
  const coldestC = Math.min(...calendar.map((dekad) => dekad.coldestC));
  const hottestC = Math.max(...calendar.map((dekad) => dekad.hottestC));
  const cautions: Caution[] = [];
  const add = (code: string, path: string, message: string): void => {
    cautions.push({ code, message, path: `supply.cell.limits.${path}` });
  };
  if (coldestC < lowestC) {
    const limit = formatTemperature(lowestC);
    add(
      'colder-than-cell',
      'lowestC',
      `The climate reaches ${formatTemperature(coldestC)}; the cell is made for ${limit} and above.`,
    );
  }
  if (hottestC > highestC) {
    const limit = formatTemperature(highestC);
    add(
      'hotter-than-cell',
      'highestC',
      `The climate reaches ${formatTemperature(hottestC)}; the cell is made for ${limit} and below.`,
    );
  }
  const peakCellA = (peak?.currentA ?? 0) / parallel;
  if (peakCellA > pulseA) {
    const took = formatCurrent(peakCellA);
    add(
      'pulse-above-limit',
      'pulseA',
      `The heaviest step takes ${took} from a cell; its limit for pulses is ${formatCurrent(pulseA)}.`,
    );
  }
  const meanCellA = meanCurrentA / parallel;
  if (meanCellA > continuousA) {
    const took = formatCurrent(meanCellA);
    add(
      'mean-above-limit',
      'continuousA',
      `A cell gives ${took} on average; its limit is ${formatCurrent(continuousA)}.`,
    );
  }
  return cautions;
}

function regulatorCautions({ scenario, source, loads, converter }: CompiledScenario): Caution[] {
  const { regulator, lowBattery } = scenario.supply;
  const cautions: Caution[] = [];
  const freshV = source.openCircuitV[0] ?? 0;
  if (regulator.kind === 'switching' && freshV > (regulator.maximumInputV ?? Infinity)) {
    const limit = formatVoltage(regulator.maximumInputV ?? 0);
    const message = `The fresh pack has ${formatVoltage(freshV)}; the regulator takes at most ${limit}.`;
    cautions.push({ code: 'input-above-limit', message, path: 'supply.regulator.maximumInputV' });
  }
  if (regulator.kind === 'switching' && lowBattery) {
    const message = `The monitor reads the rail, which the regulator holds at ${formatVoltage(regulator.outputV)} until it fails, so it cannot warn.`;
    cautions.push({ code: 'monitor-reads-regulated-rail', message, path: 'supply.lowBattery' });
  }
  let highestV = Math.max(0, ...loads.restLimitsV);
  for (const { busy } of loads.intervals) highestV = Math.max(highestV, busy.railV);
  if (highestV > converter.highestRailV) {
    const output = formatVoltage(converter.highestRailV);
    const message = `A part needs ${formatVoltage(highestV)}, but the regulator gives only ${output}: that part never works.`;
    cautions.push({ code: 'limit-above-output', message, path: 'supply.regulator.outputV' });
  }
  return cautions;
}

function meetingCaution({ program }: CompiledScenario, peak: Peak | null): Caution[] {
  if (!peak?.meeting) return [];
  const { currentA, perYear, routineIds } = peak.meeting;
  const names = routineIds.map((id) => `"${program.routines.find(({ routineId }) => routineId === id)?.name ?? id}"`);
  const often = formatNumber(perYear, { significantDigits: 2 });
  const message = `When ${names.join(' and ')} meet, the cell gives up to ${formatCurrent(currentA)}; expected ${often} times a year. The forecast tests each routine alone.`;
  return [{ code: 'routines-meet', message, path: 'node.routines' }];
}

function falseAlarmCaution(count: number): Caution {
  const times = count === 1 ? 'once' : `${count} times`;
  const message = `The low-battery monitor warns ${times} and clears again before the end.`;
  return { code: 'false-alarms', message, path: 'supply.lowBattery' };
}
