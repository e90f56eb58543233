/** How the engine integrates: periodic routines as their mean, or every step of every cycle. */
export type ForecastLevel = 'mean-current' | 'exact';

export type Outcome =
  'charge-exhausted' | 'undervoltage' | 'shelf-life' | 'outlives-horizon' | 'never-starts' | 'oversubscribed';

export type LedgerEntryKind =
  'step' | 'transition' | 'rest' | 'leakage' | 'regulator' | 'capacitor' | 'monitor' | 'self-discharge';

/** A line of the charge ledger. Charges are decimal strings in coulomb, so that lines add up to the last digit. */
export interface LedgerEntry {
  kind: LedgerEntryKind;
  routineId: string | null;
  stepId: string | null;
  partId: string | null;
  /** State, or for a transition the state reached. */
  stateId: string | null;
  /** For a transition the state left, otherwise null. */
  fromStateId: string | null;
  leakageId: string | null;
  /** Charge per cycle in excess of rest, C; null for lines that belong to no routine. */
  chargePerCycleC: string | null;
  /** Charge per `Ledger.periodS`, C. May be negative: a step that draws less than rest. */
  chargeC: string;
}

/** Exact account of charge. `totalC` is the exact sum of `entries[].chargeC`. */
export interface Ledger {
  side: 'rail' | 'cell';
  /** Time that `chargeC` refers to: a day (86,400 s) or a mean year of life (31,557,600 s). */
  periodS: number;
  entries: LedgerEntry[];
  totalC: string;
}

/** Share of time that a part spends in a state, averaged over life; transitions have their own lines. */
export interface DutyCycle {
  partId: string;
  stateId: string;
  fromStateId: string | null;
  share: number;
  /** Rail current times share, A. */
  meanCurrentA: number;
}

/** State of the node at the end of a dekad (third of a month), or at the end of life inside its last dekad. */
export interface DekadPoint {
  /** Time since the beginning of life at the end of this dekad, s. */
  timeS: number;
  /** Calendar month 1 to 12, and dekad of the year 0 to 35. */
  month: number;
  dekadOfYear: number;
  remainingC: number;
  /** At the dekad's mean temperature, V, whole pack. */
  openCircuitV: number;
  /** In the critical step at the coldest hour, V. */
  loadedV: number;
  limitV: number;
  headroomV: number;
  meanC: number;
  coldestC: number;
  /** Mean current drawn from the cell, without self-discharge, A. */
  currentA: number;
  selfDischargeA: number;
}

export interface Outage {
  /** Winter of life counted from 1. */
  winter: number;
  startS: number;
  endS: number;
  hours: number;
}

export interface Warning {
  /** Onset of the warning that is not cleared before the end, s. */
  timeS: number;
  /** End minus warning, s. */
  leadS: number;
  /** Earlier onsets that were cleared again, s. */
  falseAlarmTimesS: number[];
  /** Threshold after quantising, V. */
  thresholdV: number;
}

export interface Peak {
  /** Highest current at the cell in one step, A. */
  currentA: number;
  intervalId: string;
  stepId: string;
  durationS: number;
  /** Highest sum when routines meet, A, and how often a year that is expected; null when there is one routine only. */
  meeting: { currentA: number; perYear: number; routineIds: string[] } | null;
}

export interface Caution {
  code: string;
  message: string;
  /** Path into the scenario that the caution is about, such as `supply.capacitor`; '' for the whole. */
  path: string;
}

export interface Forecast {
  engineVersion: string;
  level: ForecastLevel;
  outcome: Outcome;
  /** Time to the first failure, s; null only for 'outlives-horizon' and 'oversubscribed'. 0 for 'never-starts'. */
  lifeS: number | null;
  /** Calendar month 1 to 12 of the end; null without an end. */
  endMonth: number | null;
  wintersSurvived: number;
  /** Step id of the critical step at the end of life, 'rest' for rest; null for 'oversubscribed'. */
  criticalStepId: string | null;
  /** Interval of that step (a step may be cut into several), 'rest' for rest. */
  criticalIntervalId: string | null;
  /** Part whose limit is highest in the critical step; null where the regulator or the cut-off is the limit. */
  failingPartId: string | null;
  /** What sets the limit in the critical step. */
  limitedBy: 'part' | 'state' | 'regulator' | 'cut-off' | 'charge' | null;
  /** Remaining charge over starting charge at the end, 0 to 1. */
  chargeLeftFraction: number;
  startingChargeC: number;
  outages: Outage[];
  /** Last possible report if the node recovered each time, s; null without an end. */
  lastReportS: number | null;
  /** Mean cell-side current over life without self-discharge, A. */
  meanCurrentA: number;
  /** Mean cell-side charge a day over life without self-discharge, C. */
  chargePerDayC: number;
  dutyCycles: DutyCycle[];
  peak: Peak | null;
  /** Cell-side charge of a mean year of life; null when it was not asked for. */
  ledger: Ledger | null;
  dekads: DekadPoint[];
  warning: Warning | null;
  cautions: Caution[];
}

export interface ForecastOptions {
  /** Default 'mean-current' until the exact level exists. */
  level?: 'mean-current';
  /** Whether to make the charge ledger; default true. */
  withLedger?: boolean;
}
