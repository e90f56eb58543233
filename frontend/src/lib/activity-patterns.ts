import type { StateRole } from '#common/engine/scenario/scenario.types.ts';

/** Background that tells without colour what goes on; nothing for plain ground. */
export interface Pattern {
  backgroundImage?: string;
  backgroundSize?: string;
}

// In the colour of the text: slanted for being on the way, dotted for listening, upright for sending.
export const SLANTED: Pattern = {
  backgroundImage:
    'repeating-linear-gradient(-45deg, color-mix(in srgb, currentColor 30%, transparent) 0 1px, transparent 1px 5px)',
};
export const DOTTED: Pattern = {
  backgroundImage: 'radial-gradient(color-mix(in srgb, currentColor 45%, transparent) 0.7px, transparent 1px)',
  backgroundSize: '5px 5px',
};
export const UPRIGHT: Pattern = {
  backgroundImage:
    'repeating-linear-gradient(90deg, color-mix(in srgb, currentColor 22%, transparent) 0 1px, transparent 1px 5px)',
};

/** The pattern of what a part does in a state of this role. */
export function patternOfRole(role: StateRole | null | undefined): Pattern {
  if (role === 'listen' || role === 'receive') return DOTTED;
  return role === 'transmit' ? UPRIGHT : {};
}
