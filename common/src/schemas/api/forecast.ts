import { z } from 'zod';
import type { Forecast } from '#common/engine/forecast/forecast.types.ts';

const ledgerSchema = z.strictObject({
  side: z.enum(['rail', 'cell']),
  periodS: z.number(),
  entries: z.array(
    z.strictObject({
      kind: z.enum(['step', 'transition', 'rest', 'leakage', 'regulator', 'capacitor', 'monitor', 'self-discharge']),
      routineId: z.string().nullable(),
      stepId: z.string().nullable(),
      partId: z.string().nullable(),
      stateId: z.string().nullable(),
      fromStateId: z.string().nullable(),
      leakageId: z.string().nullable(),
      chargePerCycleC: z.string().nullable(),
      chargeC: z.string(),
    }),
  ),
  totalC: z.string(),
});

/** The engine's Forecast as it goes over the wire; every number is finite. */
export const forecastSchema = z.strictObject({
  engineVersion: z.string(),
  level: z.enum(['mean-current', 'exact']),
  outcome: z.enum([
    'charge-exhausted',
    'undervoltage',
    'shelf-life',
    'outlives-horizon',
    'never-starts',
    'oversubscribed',
  ]),
  lifeS: z.number().nullable(),
  endMonth: z.int().nullable(),
  wintersSurvived: z.int(),
  criticalStepId: z.string().nullable(),
  criticalIntervalId: z.string().nullable(),
  failingPartId: z.string().nullable(),
  limitedBy: z.enum(['part', 'state', 'regulator', 'cut-off', 'charge']).nullable(),
  chargeLeftFraction: z.number(),
  startingChargeC: z.number(),
  outages: z.array(z.strictObject({ winter: z.int(), startS: z.number(), endS: z.number(), hours: z.number() })),
  lastReportS: z.number().nullable(),
  meanCurrentA: z.number(),
  chargePerDayC: z.number(),
  dutyCycles: z.array(
    z.strictObject({
      partId: z.string(),
      stateId: z.string(),
      fromStateId: z.string().nullable(),
      share: z.number(),
      meanCurrentA: z.number(),
    }),
  ),
  peak: z
    .strictObject({
      currentA: z.number(),
      intervalId: z.string(),
      stepId: z.string(),
      durationS: z.number(),
      meeting: z
        .strictObject({ currentA: z.number(), perYear: z.number(), routineIds: z.array(z.string()) })
        .nullable(),
    })
    .nullable(),
  ledger: ledgerSchema.nullable(),
  dekads: z.array(
    z.strictObject({
      timeS: z.number(),
      month: z.int(),
      dekadOfYear: z.int(),
      remainingC: z.number(),
      openCircuitV: z.number(),
      loadedV: z.number(),
      limitV: z.number(),
      headroomV: z.number(),
      meanC: z.number(),
      coldestC: z.number(),
      currentA: z.number(),
      selfDischargeA: z.number(),
    }),
  ),
  warning: z
    .strictObject({
      timeS: z.number(),
      leadS: z.number(),
      falseAlarmTimesS: z.array(z.number()),
      thresholdV: z.number(),
    })
    .nullable(),
  cautions: z.array(z.strictObject({ code: z.string(), message: z.string(), path: z.string() })),
}) satisfies z.ZodType<Forecast>;
