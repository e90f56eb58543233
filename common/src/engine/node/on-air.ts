import { dutyCycleCaution } from '../link/duty-cycle-limit.ts';
import type { DutyCycleBandId, Schedule, When } from '../scenario/scenario.types.ts';
import type { NodeReport } from './node-report.ts';
import { isOnAt, isOnInMonth, windowCyclesPerDay } from './schedule-rate.ts';

/** Time on air of an exchange step in a band with a limit. */
export interface OnAir {
  bandId: DutyCycleBandId;
  /** At the worst, all repeats, s. */
  onAirS: number;
  /** Where the band stands in the input. */
  path: string;
}

/** The same of a whole routine's step within the busiest hour. */
interface HourOnAir extends OnAir {
  when: When | undefined;
}

const HOUR_S = 3600;
const HOURS_PER_DAY = 24;
const MONTHS = Array.from({ length: 12 }, (_, index) => index + 1);
/** Distance below a temperature at which a routine "below" it is on, K. */
const JUST_BELOW_K = 1e-6;

/** Collects what a node is on the air, routine by routine, against the limits of its bands. */
export class OnAirAccount {
  private readonly entries: HourOnAir[] = [];

  /**
   * Adds a routine: what its steps are on the air in one cycle counts as often as cycles begin in its busiest hour.
   *
   * @param schedule Schedule of the routine.
   * @param cycleS Length of its cycle, s.
   * @param steps Time on air of its steps.
   */
  add(schedule: Schedule, cycleS: number, steps: readonly OnAir[]): void {
    if (steps.length === 0) return;
    const cycles = cyclesInBusiestHour(schedule, cycleS);
    for (const { onAirS, ...step } of steps) {
      this.entries.push({ ...step, onAirS: onAirS * cycles, when: schedule.when });
    }
  }

  /**
   * Cautions each band whose limit the node passes in its busiest hour: the routines that are on in the same month and at the same
   * temperature, each exchange at its worst.
   *
   * @param report Gets the cautions `duty-cycle-exceeded`.
   */
  caution(report: NodeReport): void {
    for (const bandId of new Set(this.entries.map((entry) => entry.bandId))) {
      const own = this.entries.filter((entry) => entry.bandId === bandId);
      const caution = dutyCycleCaution(bandId, busiestS(own));
      if (caution) report.remark({ code: caution.code, message: caution.message, path: own[0]?.path ?? 'node.link' });
    }
  }
}

function cyclesInBusiestHour(schedule: Schedule, cycleS: number): number {
  switch (schedule.kind) {
    case 'every':
      return Math.ceil(HOUR_S / schedule.periodS - 1e-9);
    case 'window':
      return Math.min(windowCyclesPerDay(schedule), Math.ceil(HOUR_S / schedule.periodS - 1e-9));
    case 'random': {
      const perDay = Math.max(schedule.meanPerDay, schedule.busiestPerDay ?? 0);
      return perDay > 0 ? Math.max(1, perDay / HOURS_PER_DAY) : 0;
    }
    case 'once':
      return 1;
    case 'always':
      return cycleS > 0 ? HOUR_S / cycleS : 0;
  }
}

/** Most that entries which are on together add up to, s. */
function busiestS(entries: readonly HourOnAir[]): number {
  const temperaturesC = new Set(entries.flatMap(({ when }) => [when?.aboveC ?? 0, (when?.belowC ?? 0) - JUST_BELOW_K]));
  let mostS = 0;
  for (const month of MONTHS) {
    for (const temperatureC of temperaturesC) {
      let sumS = 0;
      for (const { when, onAirS } of entries) {
        if (isOnInMonth(when, month) && isOnAt(when, temperatureC)) sumS += onAirS;
      }
      mostS = Math.max(mostS, sumS);
    }
  }
  return mostS;
}
