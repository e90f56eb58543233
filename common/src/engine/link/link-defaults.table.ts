import type { LinkSettings } from '../scenario/scenario.types.ts';

/** A figure of the link that counts where none is given. It is a reading, not a fact: forecasts that use it say so. */
export interface LinkDefault {
  value: number;
  /** In words, for cautions: what it is the probability of. */
  words: string;
  source: string;
}

const NO_SOURCE = 'common practice, no source';

/**
 * Assumed figures of the link. Busy channels and lost frames never default to 0: a link without either exists on the bench only.
 */
export const linkDefaults = {
  busyProbability: { value: 0.1, words: 'that an assessment finds the channel busy', source: NO_SOURCE },
  frameErrorRate: { value: 0.05, words: 'that a frame is lost', source: NO_SOURCE },
  ackErrorRate: { value: 0.01, words: 'that an acknowledgement is lost', source: NO_SOURCE },
  pendingProbability: { value: 0.1, words: 'that data is pending', source: NO_SOURCE },
  missedBeaconProbability: { value: 0.02, words: 'that a beacon is not heard', source: NO_SOURCE },
  scanRequestProbability: { value: 0.1, words: 'that somebody asks for the scan response', source: NO_SOURCE },
} as const satisfies Record<string, LinkDefault>;

export type LinkDefaultId = keyof typeof linkDefaults;

/** Defaults of link settings that come from the standard and not from a reading. */
export const standardFrame = {
  frameVersion: '2006',
  destination: 'short',
  source: 'short',
  panIdCompression: true,
} as const satisfies LinkSettings['frame'];

/** Source of the standard frame's choice. */
export const STANDARD_FRAME_SOURCE = 'common practice: version 2006, short addresses, PAN compression';

/** Tolerance of a clock that none is given for, ± ppm. */
export const assumedTolerancePpm = 40;
/** Source of that tolerance. */
export const ASSUMED_TOLERANCE_SOURCE =
  'the most that IEEE 802.15.4-2006 6.5.3 and 6.9 allow; that it is used up: common practice, no source';

/** Time since a sampling listener was last heard, where a sender knows its phase, s. */
export const assumedSinceHeardS = 60;
