import { InconsistentInputError } from '#common/errors.ts';
import type { DutyCycleBandId } from '../scenario/scenario.types.ts';
import { requireNumber } from './checks.ts';
import { dutyCycleBands, type DutyCycleBand } from './duty-cycle-bands.table.ts';
import type { PlanCaution } from './exchange-plan.types.ts';

/** Airtime against a limit on the share of time on air. */
export interface DutyCycleInput {
  /** Time on air of one exchange, retries and acknowledgements that are sent included, s. */
  airtimeS: number;
  /** Greatest share, above 0, at most 1. */
  dutyCycle: number;
  observationS: number;
}

/** What a limit on the share of time on air leaves. */
export interface DutyCycleLimit {
  /** Time on air within one observation, s. */
  budgetS: number;
  /** Shortest mean period between starts, s. */
  shortestPeriodS: number;
  /** Whole frames within one observation. */
  frames: number;
  /** Silence after each frame where the limit is kept frame by frame, s. */
  silenceS: number;
}

/**
 * What a limit on the share of time on air leaves: `budget = d · observation`, `shortest period = airtime / d`,
 * `frames = ⌊budget / airtime⌋`, `silence = airtime · (1/d − 1)`.
 *
 * Source: definition; the silence is the off-time rule of LoRaWAN, from memory.
 *
 * @param input Airtime, s, above 0; share, above 0 to 1; observation, s, above 0.
 * @returns Budget, s, shortest period, s, frames, silence, s.
 * @throws OutOfRangeError code `out-of-range` for a figure outside its range.
 * @example dutyCycleLimit({ airtimeS: 0.061696, dutyCycle: 0.01, observationS: 3600 }).frames // 583
 */
export function dutyCycleLimit({ airtimeS, dutyCycle, observationS }: DutyCycleInput): DutyCycleLimit {
  requireNumber(airtimeS, { field: 'airtimeS', min: Number.MIN_VALUE, unit: 's' });
  requireNumber(dutyCycle, { field: 'dutyCycle', min: Number.MIN_VALUE, max: 1 });
  requireNumber(observationS, { field: 'observationS', min: Number.MIN_VALUE, unit: 's' });
  const budgetS = dutyCycle * observationS;
  const frames = budgetS / airtimeS;
  return {
    budgetS,
    shortestPeriodS: airtimeS / dutyCycle,
    // A budget that is a whole number of frames but for rounding holds them all.
    frames: Math.floor(frames * (1 + 1e-12)),
    silenceS: airtimeS / dutyCycle - airtimeS,
  };
}

/**
 * A sub-band by its id.
 *
 * @param id Id of the band.
 * @returns The band with limit, regulation and source.
 * @throws InconsistentInputError code `unknown-band` for an id that no band has.
 * @example dutyCycleBandOf('eu-863-865').dutyCycle // 0.001
 */
export function dutyCycleBandOf(id: DutyCycleBandId): DutyCycleBand {
  const band = dutyCycleBands.find((candidate) => candidate.id === id);
  if (band !== undefined) return band;
  throw new InconsistentInputError(`There is no sub-band "${id}".`, {
    code: 'unknown-band',
    field: 'link.dutyCycleBand',
    value: id,
    expected: dutyCycleBands.map((candidate) => candidate.id).join(', '),
  });
}

/**
 * Whether the time on air within the busiest observation keeps a band's limit, as a caution where it does not.
 *
 * Source: `dutyCycleBands`.
 *
 * @param bandId The band.
 * @param onAirS Time on air within one observation of the band (one hour), s, 0 or more.
 * @returns Caution code `duty-cycle-exceeded` on `link.dutyCycleBand` naming the regulation, or null within the limit.
 * @throws OutOfRangeError code `out-of-range` for a negative time.
 * @example dutyCycleCaution('eu-863-865', 4)?.code // 'duty-cycle-exceeded'
 */
export function dutyCycleCaution(bandId: DutyCycleBandId, onAirS: number): PlanCaution | null {
  requireNumber(onAirS, { field: 'onAirS', min: 0, unit: 's' });
  const { name, dutyCycle, observationS, regulation } = dutyCycleBandOf(bandId);
  const budgetS = dutyCycle * observationS;
  if (onAirS <= budgetS * (1 + 1e-12)) return null;
  const message = `The node is on the air for ${onAirS.toPrecision(3)} s in one hour; ${name} allows ${Number((dutyCycle * 100).toPrecision(3))} %, ${Number(budgetS.toPrecision(3))} s (${regulation}). Listen before talk may replace the limit.`;
  return { code: 'duty-cycle-exceeded', message, field: 'link.dutyCycleBand' };
}
