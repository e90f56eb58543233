import { formatDuration } from '#common/units/format-duration.ts';
import {
  formatChargeMah,
  formatCurrent,
  formatQuantity,
  formatShare,
  formatTemperature,
  formatVoltage,
} from '#common/units/format-quantity.ts';

// How fine each kind of figure is told in a forecast: no finer than data sheets are.

export const volts = (voltageV: number): string => formatVoltage(voltageV, { significantDigits: 2 });
/** For comparing voltages with each other: in steps of 10 mV from 1 V, of 1 mV below. */
export const fineVolts = (voltageV: number): string =>
  formatVoltage(Math.round(voltageV * 1e3) / 1e3, { significantDigits: 3, keepZeros: Math.abs(voltageV) >= 1 });
export const amps = (currentA: number): string => formatCurrent(currentA);
export const seconds = (durationS: number): string => formatDuration(durationS);
export const charge = (chargeC: number): string => formatChargeMah(chargeC, { significantDigits: 3 });
export const ohms = (resistanceOhm: number): string =>
  formatQuantity(resistanceOhm, 'resistance', { significantDigits: 2 });
export const celsius = (temperatureC: number): string => formatTemperature(temperatureC, 0);

/** A share in whole per cent; what is there but smaller says so. */
export function percent(share: number): string {
  if (share > 0 && share < 0.005) return `under ${formatShare(0.01)}`;
  return formatShare(Math.round(share * 100) / 100, { significantDigits: 4 });
}
