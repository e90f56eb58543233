import { patternOfRole, SLANTED, type Pattern } from '#frontend/lib/activity-patterns.ts';
import type { Block } from './lanes.ts';

/** Background that tells what a part is doing without colour; none for plain states. */
export function patternOf({ kind, role }: Pick<Block, 'kind' | 'role'>): Pattern {
  return kind === 'transition' ? SLANTED : patternOfRole(role);
}
