import type { CatalogueClimateEntry } from './catalogue.types.ts';

type Year = readonly [
  jan: number,
  feb: number,
  mar: number,
  apr: number,
  may: number,
  jun: number,
  jul: number,
  aug: number,
  sep: number,
  oct: number,
  nov: number,
  dec: number,
];

const monthsOf = (meansC: Year, amplitudesK: Year): { meanC: number; amplitudeK: number }[] =>
  meansC.map((meanC, index) => ({ meanC, amplitudeK: amplitudesK[index] ?? 0 }));

const constant = (value: number): Year => [
  value,
  value,
  value,
  value,
  value,
  value,
  value,
  value,
  value,
  value,
  value,
  value,
];

const FROM_MEMORY = 'Months rounded from memory (±3 K), the climate of no particular place.';

/**
 * Five typical climates, air temperature in the shade. Monthly means in °C and half the daily range in K, January first.
 * None is cited: each is a rounded picture from memory, or a set temperature, and says so. Northern hemisphere.
 */
export const CATALOGUE_CLIMATES: readonly CatalogueClimateEntry[] = [
  {
    id: 'climate:oceanic-orchard',
    name: 'Oceanic orchard',
    note: `Mild winters, cool summers, near a western coast at about 50° north. ${FROM_MEMORY}`,
    climate: {
      months: monthsOf(
        [3.5, 4, 6.5, 9, 12.5, 15.5, 17.5, 17.5, 14.5, 10.5, 6.5, 4],
        [3, 3.5, 4.5, 5.5, 6, 6, 6, 6, 5.5, 4.5, 3.5, 3],
      ),
      extremes: {
        coldest: { temperatureC: -10, month: 1, returnYears: 5 },
        hottest: { temperatureC: 35, month: 7, returnYears: 5 },
      },
    },
  },
  {
    id: 'climate:continental-orchard',
    name: 'Continental orchard',
    note: `Cold winters, warm summers, an inland valley at about 48° north. ${FROM_MEMORY}`,
    climate: {
      months: monthsOf(
        [-3.5, -2, 3, 8.5, 13.5, 17, 19.5, 18.5, 14, 8.5, 3, -1.5],
        [4, 4.5, 5.5, 6.5, 7, 7, 7.5, 7.5, 7, 5.5, 4, 3.5],
      ),
      extremes: {
        coldest: { temperatureC: -18, month: 1, returnYears: 1 },
        hottest: { temperatureC: 36, month: 7, returnYears: 1 },
      },
    },
  },
  {
    id: 'climate:hot-desert',
    name: 'Hot desert',
    note: `Dry subtropical desert with large daily swings; a housing in the sun gets hotter than this. ${FROM_MEMORY}`,
    climate: {
      months: monthsOf(
        [14, 16.5, 21, 26, 31, 34, 36, 36, 33, 28, 20.5, 15.5],
        [7, 7.5, 8, 8, 8, 8, 7.5, 7.5, 8, 8, 7.5, 7],
      ),
      extremes: {
        coldest: { temperatureC: 0, month: 1, returnYears: 2 },
        hottest: { temperatureC: 48, month: 7, returnYears: 1 },
      },
    },
  },
  {
    id: 'climate:cold-store',
    name: 'Cold store',
    note: 'A freezer room held at −20 °C all year, swinging by 1 K with defrosting. A set temperature, from no measurement.',
    climate: { months: monthsOf(constant(-20), constant(1)) },
  },
  {
    id: 'climate:heated-room',
    name: 'Heated room',
    note: `Indoors at 20 to 24 °C with a small daily swing. ${FROM_MEMORY}`,
    climate: {
      months: monthsOf([20, 20, 20.5, 21, 21.5, 23, 24, 24, 22.5, 21, 20.5, 20], constant(2)),
    },
  },
];
