import type { Block } from './lanes.ts';

// In the colour of the text: slanted for being on the way, dotted for listening, upright for sending.
const HATCH =
  'repeating-linear-gradient(-45deg, color-mix(in srgb, currentColor 30%, transparent) 0 1px, transparent 1px 5px)';
const DOTS = 'radial-gradient(color-mix(in srgb, currentColor 45%, transparent) 0.7px, transparent 1px)';
const UPRIGHT =
  'repeating-linear-gradient(90deg, color-mix(in srgb, currentColor 22%, transparent) 0 1px, transparent 1px 5px)';

/** Background that tells what a part is doing without colour; none for plain states. */
export function patternOf({ kind, role }: Pick<Block, 'kind' | 'role'>): {
  backgroundImage?: string;
  backgroundSize?: string;
} {
  if (kind === 'transition') return { backgroundImage: HATCH };
  if (role === 'listen' || role === 'receive') return { backgroundImage: DOTS, backgroundSize: '5px 5px' };
  return role === 'transmit' ? { backgroundImage: UPRIGHT } : {};
}
