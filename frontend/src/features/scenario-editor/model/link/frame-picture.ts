import type { FrameField, FrameLayout } from '#common/engine/link/exchange-plan.types.ts';

/** What the octets of a field are for; told by a pattern. */
export type OctetUse = 'synchronise' | 'address' | 'secure' | 'carry' | 'check';

const USES: Record<FrameField['id'], OctetUse> = {
  preamble: 'synchronise',
  sfd: 'synchronise',
  phr: 'synchronise',
  'frame-control': 'address',
  'sequence-number': 'address',
  'destination-pan': 'address',
  destination: 'address',
  'source-pan': 'address',
  source: 'address',
  'security-header': 'secure',
  'information-elements': 'address',
  command: 'carry',
  payload: 'carry',
  mic: 'secure',
  fcs: 'check',
  psdu: 'carry',
};

export interface DrawnField {
  field: FrameField;
  use: OctetUse;
  /** Places of its first and last octet on air, counted from 1. */
  first: number;
  last: number;
  /** Octets that are drawn; the rest is told in words. */
  drawn: number;
}

/** Octets of one field that are drawn one by one. */
export const MOST_OCTETS_DRAWN = 128;

/** The fields that have octets, with their places on air. */
export function drawnFields({ fields }: FrameLayout): DrawnField[] {
  let at = 0;
  return fields
    .filter(({ octets }) => octets > 0)
    .map((field) => {
      const first = at + 1;
      at += field.octets;
      return {
        field,
        use: USES[field.id],
        first,
        last: at,
        drawn: Math.min(Math.ceil(field.octets), MOST_OCTETS_DRAWN),
      };
    });
}
