import type { Climate } from '../scenario/scenario.types.ts';
import { DEKADS } from './dekads.ts';

/**
 * First month of winter: of the three consecutive coldest months round the year; of equal ones the first from January on.
 *
 * @param months Twelve months, January first.
 * @returns Calendar month, 1 to 12.
 * @example winterStartMonth(climate.months) // 12
 */
export function winterStartMonth(months: Climate['months']): number {
  const meanC = (month: number): number => months[month % 12]?.meanC ?? 0;
  let coldest = 0;
  let coldestSum = Infinity;
  for (let month = 0; month < 12; month++) {
    const sum = meanC(month) + meanC(month + 1) + meanC(month + 2);
    // Roundings of sums over the turn of the year must not decide between equal winters.
    if (sum < coldestSum - 1e-9) {
      coldest = month;
      coldestSum = sum;
    }
  }
  return coldest + 1;
}

/**
 * Winters whose last dekad has passed after a number of dekads of life; a winter that life began in counts when it ends.
 *
 * @param startDekad Dekad of the year in which life starts, 0 to 35.
 * @param dekadsLived Whole dekads that have passed since then.
 * @param winterStart First month of winter, 1 to 12.
 * @returns Whole number of winters.
 * @example wintersPassed(0, 6, 12) // 1: a life from January to February
 */
export function wintersPassed(startDekad: number, dekadsLived: number, winterStart: number): number {
  const lastDekad = (3 * (winterStart - 1) + 8) % DEKADS;
  const untilFirst = ((lastDekad - startDekad + DEKADS) % DEKADS) + 1;
  return dekadsLived < untilFirst ? 0 : Math.floor((dekadsLived - untilFirst) / DEKADS) + 1;
}

/**
 * Winter of life that a dekad belongs to, counted from 1. The border between two winters is midsummer, half a year after the
 * middle of winter; before the first winter everything counts to it.
 *
 * @param startDekad Dekad of the year in which life starts, 0 to 35.
 * @param dekadOfLife Dekad of life, counted from 0.
 * @param winterStart First month of winter, 1 to 12.
 * @returns Winter, 1 or more.
 * @example winterOfLife(0, 0, 12) // 1
 */
export function winterOfLife(startDekad: number, dekadOfLife: number, winterStart: number): number {
  // Middle of winter: 4.5 dekads after its start; midsummer 18 later. Rounded to whole dekads.
  const midsummer = (3 * (winterStart - 1) + 23) % DEKADS;
  const untilFirst = (midsummer - startDekad + DEKADS) % DEKADS || DEKADS;
  const winterDekads = (3 * (winterStart - 1) - startDekad + DEKADS) % DEKADS;
  // Whether any dekad of a winter lies between the start of life and the first midsummer.
  const beginsWithWinter = winterDekads < untilFirst || winterDekads > DEKADS - 9 ? 1 : 0;
  const passed = dekadOfLife < untilFirst ? 0 : Math.floor((dekadOfLife - untilFirst) / DEKADS) + 1;
  return Math.max(1, passed + beginsWithWinter);
}
