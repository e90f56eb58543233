import { cyclesPerDay } from '#common/engine/index.ts';
import type { Routine, Schedule } from '#common/engine/index.ts';

export interface DayStrip {
  /** How the cycles are shown: each as a mark, as a density, without pause, or not on an ordinary day. */
  kind: 'marks' | 'density' | 'solid' | 'none';
  /** Hours of marks, or the stretches [from, to] of a density. */
  marksH: number[];
  stretchesH: [number, number][];
  perDay: number;
  isRandom: boolean;
}

/** More marks than this read as a density. */
const MOST_MARKS = 100;
const DAY_S = 86_400;

/** A routine on the 24 hours of its first day. */
export function dayStrip({ schedule }: Routine, cycleS: number): DayStrip {
  const perDay = cyclesPerDay(schedule, cycleS);
  const stretchesH = stretches(schedule);
  const isRandom = schedule.kind === 'random';
  const common = { perDay, isRandom, stretchesH };
  if (schedule.kind === 'once' || perDay === 0) return { kind: 'none', marksH: [], ...common, stretchesH: [] };
  if (schedule.kind === 'always') return { kind: 'solid', marksH: [], ...common };
  if (perDay > MOST_MARKS) return { kind: 'density', marksH: [], ...common };
  return { kind: 'marks', marksH: marks(schedule, perDay), ...common };
}

function stretches(schedule: Schedule): [number, number][] {
  if (schedule.kind !== 'window') return [[0, 24]];
  const { fromHour, toHour } = schedule;
  return fromHour <= toHour
    ? [[fromHour, toHour]]
    : [
        [0, toHour],
        [fromHour, 24],
      ];
}

function marks(schedule: Schedule, perDay: number): number[] {
  switch (schedule.kind) {
    case 'every': {
      const count = Math.max(1, Math.ceil(DAY_S / schedule.periodS - 1e-9));
      return Array.from({ length: count }, (_, i) => (i * schedule.periodS) / 3_600);
    }
    case 'window':
      return Array.from({ length: perDay }, (_, i) => (schedule.fromHour + (i * schedule.periodS) / 3_600) % 24);
    case 'random':
      // Evenly uneven: the golden section scatters marks without a clock in them, and alike on every paint.
      return Array.from({ length: Math.round(perDay) }, (_, i) => ((i + 0.5) * 0.618_033_988_75 * 24) % 24);
    default:
      return [];
  }
}
