/**
 * Carrier sense and exchanges played step by step with a seeded generator, as the algorithms read. Nothing here knows a closed
 * form, so that the engine's expectations have something to be wrong against.
 */

/** Random numbers, 0 included, 1 excluded. */
export type Draw = () => number;

/** A small generator with 32 bits of state; the same seed gives the same numbers. */
export function seededDraw(seed: number): Draw {
  let state = seed | 0;
  return () => {
    state = (state + 0x6d2b79f5) | 0;
    let mixed = Math.imul(state ^ (state >>> 15), 1 | state);
    mixed = (mixed + Math.imul(mixed ^ (mixed >>> 7), 61 | mixed)) ^ mixed;
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 2 ** 32;
  };
}

export interface PlayedCsmaInput {
  busyProbability: number;
  /** Slotted mode: that the second assessment is busy after an idle first one. */
  secondBusyProbability?: number;
  macMinBE: number;
  macMaxBE: number;
  macMaxCSMABackoffs: number;
}

export interface PlayedCsma {
  units: number;
  assessments: number;
  success: boolean;
}

/** One channel access by carrier sense with random backoff. */
export function playCsma(draw: Draw, input: PlayedCsmaInput): PlayedCsma {
  const { busyProbability, secondBusyProbability, macMinBE, macMaxBE, macMaxCSMABackoffs } = input;
  let exponent = macMinBE;
  let units = 0;
  let assessments = 0;
  for (let backoffs = 0; backoffs <= macMaxCSMABackoffs; backoffs += 1) {
    units += Math.floor(draw() * 2 ** exponent);
    assessments += 1;
    let busy = draw() < busyProbability;
    if (!busy && secondBusyProbability !== undefined) {
      assessments += 1;
      busy = draw() < secondBusyProbability;
    }
    if (!busy) return { units, assessments, success: true };
    exponent = Math.min(exponent + 1, macMaxBE);
  }
  return { units, assessments, success: false };
}

export interface PlayedExchangeInput extends PlayedCsmaInput {
  frameErrorRate: number;
  ackErrorRate: number;
  macMaxFrameRetries: number;
  /** Times of the 2450 MHz O-QPSK PHY or another one, s. */
  unitS: number;
  ccaS: number;
  turnaroundS: number;
  frameS: number;
  ackS: number;
  ackWaitS: number;
  /** Channels tried one after the other, each with the access above; default 1. */
  channels?: number;
  retuneS?: number;
}

export interface PlayedExchange {
  accesses: number;
  transmissions: number;
  /** Copies at the receiver. */
  copies: number;
  acknowledged: boolean;
  accessFailed: boolean;
  backoffS: number;
  assessmentS: number;
  retuneS: number;
  turnaroundS: number;
  transmitS: number;
  acknowledgementWaitS: number;
  acknowledgementS: number;
}

/** One acknowledged exchange with retries. */
export function playExchange(draw: Draw, input: PlayedExchangeInput): PlayedExchange {
  const played: PlayedExchange = {
    accesses: 0,
    transmissions: 0,
    copies: 0,
    acknowledged: false,
    accessFailed: false,
    backoffS: 0,
    assessmentS: 0,
    retuneS: 0,
    turnaroundS: 0,
    transmitS: 0,
    acknowledgementWaitS: 0,
    acknowledgementS: 0,
  };
  for (let retries = 0; retries <= input.macMaxFrameRetries; retries += 1) {
    played.accesses += 1;
    if (!playAccess(draw, input, played)) return { ...played, accessFailed: true };
    if (playTransmission(draw, input, played)) return { ...played, acknowledged: true };
  }
  return played;
}

/** Tries the channels in turn; whether one was free. */
function playAccess(draw: Draw, input: PlayedExchangeInput, played: PlayedExchange): boolean {
  const { channels = 1, retuneS = 0 } = input;
  for (let channel = 0; channel < channels; channel += 1) {
    if (channel > 0) played.retuneS += retuneS;
    const { units, assessments, success } = playCsma(draw, input);
    played.backoffS += units * input.unitS;
    played.assessmentS += assessments * input.ccaS;
    if (success) return true;
  }
  return false;
}

/** Sends the frame and waits; whether the acknowledgement came. */
function playTransmission(draw: Draw, input: PlayedExchangeInput, played: PlayedExchange): boolean {
  played.turnaroundS += input.turnaroundS;
  played.transmitS += input.frameS;
  played.transmissions += 1;
  const arrived = draw() >= input.frameErrorRate;
  if (arrived) played.copies += 1;
  if (!arrived || draw() < input.ackErrorRate) {
    played.acknowledgementWaitS += input.ackWaitS;
    return false;
  }
  played.acknowledgementWaitS += input.turnaroundS;
  played.acknowledgementS += input.ackS;
  return true;
}

/** Mean of what was played, and its standard error. */
export interface Sample {
  mean: number;
  standardError: number;
  count: number;
}

/** Mean and standard error of numbers, at least two. */
export function sampleOf(values: readonly number[]): Sample {
  const count = values.length;
  const mean = values.reduce((total, value) => total + value, 0) / count;
  const squares = values.reduce((total, value) => total + (value - mean) ** 2, 0);
  return { mean, standardError: Math.sqrt(squares / (count - 1) / count), count };
}
