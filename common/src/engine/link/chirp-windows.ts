import { InconsistentInputError } from '#common/errors.ts';
import { requireNumber } from './checks.ts';

/** One receive window after a chirp uplink. */
export interface ReceiveWindow {
  /** From the end of the uplink to the window's opening, s. */
  delayS: number;
  /** How long the receiver is on where nothing comes, s. */
  openS: number;
}

/** An uplink and its receive windows. */
export interface ChirpWindowsInput {
  /** Airtime of the uplink, s: `chirpAirtimeS`. */
  uplinkS: number;
  /** In the order of time. */
  windows: readonly ReceiveWindow[];
  /** Probability that a window that is opened hears a frame; then no later window is opened. 0 to 1. */
  heardProbability: number;
  /** Receiver on in a window that hears a frame, s; default: as long as where nothing comes. */
  heardS?: number;
}

/** One window with the idle time before it; means over the outcomes, s. */
export interface ChirpWindow {
  /** Idle from the uplink's or the last window's end to the opening. */
  idleS: number;
  listenS: number;
  receiveS: number;
  worstIdleS: number;
  worstListenS: number;
  worstReceiveS: number;
}

/** Times of an uplink with its windows, s. */
export interface ChirpWindows {
  windows: ChirpWindow[];
  meanS: number;
  worstS: number;
}

/**
 * How long a receive window is open where nothing comes: a number of symbols.
 *
 * Source: common practice, no source; modems look for a preamble for a few symbols.
 *
 * @param spreadingFactor 7 to 12.
 * @param bandwidthHz Bandwidth, Hz, above 0.
 * @param symbols Number of symbols, 0 or more.
 * @returns Time, s.
 * @throws OutOfRangeError code `out-of-range` for a figure outside its range.
 * @example windowOpenS(7, 125_000, 8) // 0.008192
 */
export function windowOpenS(spreadingFactor: number, bandwidthHz: number, symbols: number): number {
  requireNumber(spreadingFactor, { field: 'spreadingFactor', min: 7, max: 12, whole: true });
  requireNumber(bandwidthHz, { field: 'bandwidthHz', min: Number.MIN_VALUE, unit: 'Hz' });
  requireNumber(symbols, { field: 'symbols', min: 0, unit: 'symbols' });
  return (symbols * 2 ** spreadingFactor) / bandwidthHz;
}

/**
 * Times of a chirp uplink with receive windows: idle until each window, which is opened only if none before it heard a frame.
 *
 * Source: windows counted from the end of the uplink, and the second left out after a frame in the first: LoRaWAN 1.0.x class A
 * (from memory); ns-3 module signetlabdei/lorawan class-a-end-device-lorawan-mac.cc @82ea58a does the same.
 *
 * @param input Airtime, windows, s; probability 0 to 1.
 * @returns Times of each window, and of the whole, s.
 * @throws OutOfRangeError code `out-of-range` for a figure outside its range.
 * @throws InconsistentInputError code `windows-overlap` when a window opens before the one before it has closed.
 * @example chirpWindows({ uplinkS: 0.06, windows: [{ delayS: 1, openS: 0.03 }], heardProbability: 0 }).meanS // 1.09
 */
export function chirpWindows(input: ChirpWindowsInput): ChirpWindows {
  const { uplinkS, heardProbability: heard, heardS } = input;
  requireNumber(uplinkS, { field: 'uplinkS', min: 0, unit: 's' });
  requireNumber(heard, { field: 'heardProbability', min: 0, max: 1 });
  if (heardS !== undefined) requireNumber(heardS, { field: 'heardS', min: 0, unit: 's' });
  let closedS = 0;
  let opened = 1;
  let worstS = uplinkS;
  const windows = input.windows.map(({ delayS, openS }, index): ChirpWindow => {
    requireNumber(delayS, { field: `receiveWindows[${index}].delayS`, min: 0, unit: 's' });
    requireNumber(openS, { field: `receiveWindows[${index}].openS`, min: 0, unit: 's' });
    if (delayS < closedS) throw overlap(index, delayS, closedS);
    const idleS = delayS - closedS;
    const receiveS = heardS ?? openS;
    const window = {
      idleS: opened * idleS,
      listenS: opened * (1 - heard) * openS,
      receiveS: opened * heard * receiveS,
      worstIdleS: idleS,
      worstListenS: openS,
      worstReceiveS: heard > 0 ? receiveS : 0,
    };
    // A frame ends the exchange, so the longest one hears it in one window and nothing in those before.
    worstS = Math.max(worstS, uplinkS + delayS + Math.max(openS, window.worstReceiveS));
    closedS = delayS + openS;
    opened *= 1 - heard;
    return window;
  });
  const meanS = windows.reduce((sum, { idleS, listenS, receiveS }) => sum + idleS + listenS + receiveS, uplinkS);
  return { windows, meanS, worstS };
}

function overlap(index: number, delayS: number, closedS: number): InconsistentInputError {
  return new InconsistentInputError(
    `Receive window ${index + 1} opens ${delayS} s after the uplink; the window before it closes at ${closedS} s.`,
    {
      code: 'windows-overlap',
      field: `receiveWindows[${index}].delayS`,
      value: delayS,
      unit: 's',
      expected: `${closedS} s or more`,
      relatedFields: [`receiveWindows[${index - 1}]`],
    },
  );
}
