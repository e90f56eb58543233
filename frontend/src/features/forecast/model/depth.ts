import { capacityTemperatureFactor, type Forecast, type Scenario } from '#common/engine/index.ts';

/** Depth of the cell at the end of life at the coldest hour: what is spent of what can be had at that temperature, 0 to 1. */
export function depthAtEnd(scenario: Scenario, forecast: Forecast): number {
  const coldestC = forecast.dekads.at(-1)?.coldestC ?? 20;
  const usable = capacityTemperatureFactor(scenario.supply.cell.capacityFactorByTemperature, coldestC);
  return Math.min(1, (1 - forecast.chargeLeftFraction) / usable);
}
