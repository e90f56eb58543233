import type { StateRole } from '../scenario/scenario.types.ts';

/** What the radio is doing in a stretch of an exchange. The order of the list is the order in time. */
export type PhaseId =
  | 'crystal-start'
  | 'loading'
  | 'guard'
  | 'retune'
  | 'backoff'
  | 'assessment'
  | 'turnaround'
  | 'wake-up'
  | 'frame'
  | 'acknowledgement-wait'
  | 'acknowledgement'
  | 'response-wait'
  | 'response'
  | 'response-acknowledgement'
  | 'listen'
  | 'window-1'
  | 'window-2'
  | 'interframe-space';

/** Where a figure comes from: formula in symbols, and the source that gives it or `common practice, no source`. */
export interface Origin {
  formula: string;
  source: string;
}

/** One stretch of an exchange in which the radio does one thing, all attempts together. */
export interface ExchangePhase extends Origin {
  /** Unique in the plan. */
  id: PhaseId;
  /** In words, for lanes, pictures and tables, such as "wait for the acknowledgement". */
  name: string;
  /** Role of the state that the radio takes. */
  role: StateRole;
  /** Mean time over all outcomes, s, unrounded; 0 or more. */
  meanS: number;
  /** Longest time, s; at least the mean. */
  worstS: number;
  /** Longest uninterrupted stretch at the worst, s: what a cell has to bear at once. At most `worstS`. */
  longestS: number;
}

/** A figure of the link that stands on its own, such as the probability of delivery. */
export interface ExchangeFigure extends Origin {
  id: string;
  name: string;
  value: number;
  unit: 's' | 'octets' | 'probability' | 'count' | 'ppm' | 'dB' | 'dBm' | 'per-day';
}

/** A run of octets of one frame, in the order in which they are sent. */
export interface FrameField extends Origin {
  id:
    | 'preamble'
    | 'sfd'
    | 'phr'
    | 'frame-control'
    | 'sequence-number'
    | 'destination-pan'
    | 'destination'
    | 'source-pan'
    | 'source'
    | 'security-header'
    | 'information-elements'
    | 'command'
    | 'payload'
    | 'mic'
    | 'fcs'
    | 'psdu';
  name: string;
  octets: number;
  /** Time on air of these octets, s; all fields together make the airtime of the frame. */
  airtimeS: number;
}

/** A frame octet by octet. A PSDU typed as a whole is one field `psdu`. */
export interface FrameLayout {
  fields: FrameField[];
  psduOctets: number;
  /** SHR and PHR included. */
  airOctets: number;
  airtimeS: number;
  /** Payload that just fits; null where the PSDU was typed. */
  largestPayloadOctets: number | null;
}

/** What must be said of a plan; `field` is relative to the exchange's duration, link fields begin with `link.`. */
export interface PlanCaution {
  code: string;
  message: string;
  field: string;
}

/**
 * Everything that an exchange step comes to: what the radio does for how long, on average and at worst, with formulas and sources.
 * Time zero is the start of the first phase; moves of the radio into its states are transitions of the part and not in here.
 */
export interface ExchangePlan {
  /** In the order of time; phases without any time are left out. */
  phases: ExchangePhase[];
  /** Sum of the phases' means, s. */
  meanS: number;
  /** Longest duration, s. */
  worstS: number;
  /** Attempts of which the longest exchange consists; 1 where nothing is repeated. */
  worstAttempts: number;
  /** The frame sent, or received where none is sent; null where there is none. */
  frame: FrameLayout | null;
  figures: ExchangeFigure[];
  /** Probability that the receiver has the payload; null where no payload is sent. */
  deliveredProbability: number | null;
  payloadOctets: number | null;
  /** Time on air, s: what regional limits count. */
  onAirMeanS: number;
  onAirWorstS: number;
  cautions: PlanCaution[];
}
