import type { StateRole } from '#common/engine/scenario/scenario.types.ts';

/** The lanes tint by current; here, where no current is told, each role has the tint that it usually gets there. */
export const ROLE_TINTS: Record<StateRole, string> = {
  sleep: 'bg-tint-1 text-on-tint-1',
  idle: 'bg-tint-2 text-on-tint-2',
  synthesiser: 'bg-tint-3 text-on-tint-3',
  active: 'bg-tint-3 text-on-tint-3',
  listen: 'bg-tint-4 text-on-tint-4',
  receive: 'bg-tint-4 text-on-tint-4',
  transmit: 'bg-tint-5 text-on-tint-5',
};
