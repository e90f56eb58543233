import type { Forecast, Provenance, Quantity, Scenario } from '#common/engine/index.ts';
import { findPart } from './names.ts';

/** How finely a life may be told. */
export type Precision = 'figures' | 'half-years';

/** Currents that together make this share of the mean current drive the life. */
const DRIVING_SHARE = 0.8;

/**
 * Half years when everything that drives the life is a figure from memory: capacity, resistance where voltage ends it, and
 * the currents that make up four fifths of the mean.
 */
export function lifePrecision(scenario: Scenario, forecast: Forecast): Precision {
  const { cell } = scenario.supply;
  const quantities: Quantity[] = [cell.capacityC, ...drivingCurrents(scenario, forecast)];
  if (forecast.outcome === 'undervoltage') quantities.push(...cell.resistanceOhm.map(({ ohm }) => ohm));
  return quantities.every(({ provenance }) => kindOf(provenance) === 'memory') ? 'half-years' : 'figures';
}

function kindOf(provenance: Provenance | undefined): Provenance['kind'] {
  return provenance?.kind ?? 'assumed';
}

function drivingCurrents(scenario: Scenario, forecast: Forecast): Quantity[] {
  const bySize = [...forecast.dutyCycles].sort((a, b) => b.meanCurrentA - a.meanCurrentA);
  const total = bySize.reduce((sum, line) => sum + line.meanCurrentA, 0);
  const driving: Quantity[] = [];
  let told = 0;
  for (const line of bySize) {
    if (total <= 0 || told >= DRIVING_SHARE * total) break;
    told += line.meanCurrentA;
    const part = findPart(scenario, line.partId);
    const source =
      line.fromStateId === null
        ? part?.states.find((state) => state.id === line.stateId)
        : part?.transitions.find((move) => move.fromStateId === line.fromStateId && move.toStateId === line.stateId);
    if (source) driving.push(source.current);
  }
  return driving;
}
