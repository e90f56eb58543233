import type { StateRole } from '#common/engine/scenario/scenario.types.ts';

const PATTERNS: readonly (readonly [StateRole, RegExp])[] = [
  ['sleep', /\b(deep[ -]?)?sleep|\boff\b|\bshut ?down\b|\bpower[ -]?down\b|\bhibernat|\bretention\b|\brest\b/],
  ['transmit', /\btransmit|\btx\b|\bsend|\buplink\b|\bpa\b/],
  ['listen', /\blisten|\bcca\b|\bassess|\bsniff|\bwait for ack/],
  ['receive', /\breceiv|\brx\b|\bdownlink\b/],
  ['synthesiser', /\bsynth|\bpll\b|\bcalibrat|\bturnaround\b/],
  ['idle', /\bidle\b|\bstand ?by\b|\bwait/],
  [
    'active',
    /\bactive\b|\brun\b|\brunning\b|\bmeasur|\bconvert|\bsampl|\bon\b|\bheat|\bprocess|\bcomput|\bread|\bwrite/,
  ],
];

/** The role that a state's name suggests, undefined where it suggests none. */
export function guessRole(name: string): StateRole | undefined {
  const text = name.toLowerCase();
  return PATTERNS.find(([, pattern]) => pattern.test(text))?.[0];
}
