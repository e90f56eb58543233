import { advertisingEvent, scannableEvent } from './advertising-event.ts';
import { assemblePlan, phaseOf } from './assemble-plan.ts';
import { chirpAirtimeS, isLowDataRate } from './chirp-airtime.ts';
import { chirpWindows } from './chirp-windows.ts';
import type { ChirpWindow } from './chirp-windows.ts';
import type { ExchangePhase, ExchangePlan } from './exchange-plan.types.ts';
import { addFigure, probabilityOf } from './plan-context.ts';
import type { PlanOf } from './plan-context.ts';

/** Preamble of a chirp frame where the step gives none, symbols: that of the common public network protocol. */
const CHIRP_PREAMBLE_SYMBOLS = 8;
const CHIRP = {
  formula:
    'T = (n_pre + 4.25) · Ts + Ts · (8 + max(⌈(8PL − 4SF + 28 + 16CRC − 20IH)/(4(SF − 2DE))⌉ · (CR + 4), 0)), Ts = 2^SF/BW',
  source: 'ns-3 module signetlabdei/lorawan model/lora-phy.cc @82ea58a',
};
const WINDOWS = {
  formula: 'windows counted from the end of the uplink',
  source: 'LoRaWAN 1.0.x class A (from memory); ns-3 module signetlabdei/lorawan @82ea58a does the same',
};
const ADVERTISING_SOURCE = 'Zephyr ll_sw/pdu.h @01006be (cites Bluetooth Core 5.1 Vol 6 Part B 2.1, 2.2)';
/** Address and header beside the advertising data, octets. */
const ADVERTISING_OVERHEAD_OCTETS = 8;

/**
 * A chirp-spread-spectrum uplink with its receive windows; nothing is expected in them.
 *
 * @param context Of the plan.
 * @returns The plan; windows beyond the second count with the second.
 * @throws What `chirpAirtimeS` and `chirpWindows` throw.
 * @example planChirp(context).onAirMeanS
 */
export function planChirp(context: PlanOf<'chirp'>): ExchangePlan {
  const { exchange } = context;
  const { spreadingFactor, bandwidthHz, codingRate, payloadOctets, receiveWindows = [] } = exchange;
  const airtimeS = chirpAirtimeS({
    spreadingFactor,
    bandwidthHz,
    codingRate,
    payloadOctets,
    preambleSymbols: exchange.preambleSymbols ?? CHIRP_PREAMBLE_SYMBOLS,
    implicitHeader: exchange.implicitHeader ?? false,
    crc: exchange.crc ?? true,
    lowDataRateOptimisation: exchange.lowDataRateOptimisation ?? isLowDataRate(spreadingFactor, bandwidthHz),
  });
  addFigure(context, {
    id: 'symbol',
    name: 'Symbol',
    value: 2 ** spreadingFactor / bandwidthHz,
    unit: 's',
    formula: 'Ts = 2^SF/BW',
    source: CHIRP.source,
  });
  const { windows, worstS } = chirpWindows({ uplinkS: airtimeS, windows: receiveWindows, heardProbability: 0 });
  const [first, ...others] = windows;
  return assemblePlan(context, {
    phases: [
      phaseOf('frame', { meanS: airtimeS, worstS: airtimeS }, CHIRP),
      ...windowPhases(first ? [first] : [], 'first'),
      ...windowPhases(others, 'second'),
    ],
    worstS,
    frame: null,
    loadedOctets: payloadOctets,
    payloadOctets,
    onAirMeanS: airtimeS,
    onAirWorstS: airtimeS,
  });
}

/** The wait for a window, asleep, and the window. */
function windowPhases(windows: readonly ChirpWindow[], which: 'first' | 'second'): ExchangePhase[] {
  const sum = (of: (window: ChirpWindow) => number): number => windows.reduce((total, window) => total + of(window), 0);
  const longest = (of: (window: ChirpWindow) => number): number => Math.max(0, ...windows.map(of));
  const isFirst = which === 'first';
  return [
    phaseOf(
      isFirst ? 'response-wait' : 'interframe-space',
      {
        meanS: sum(({ idleS }) => idleS),
        worstS: sum(({ worstIdleS }) => worstIdleS),
        longestS: longest(({ worstIdleS }) => worstIdleS),
        role: 'sleep',
        name: `wait for the ${which} receive window`,
      },
      WINDOWS,
    ),
    phaseOf(
      isFirst ? 'window-1' : 'window-2',
      {
        meanS: sum(({ listenS }) => listenS),
        worstS: sum(({ worstListenS }) => worstListenS),
        longestS: longest(({ worstListenS }) => worstListenS),
      },
      { formula: 'as given', source: 'given in the step' },
    ),
  ];
}

/**
 * A connectionless advertising event, with or without scan responses.
 *
 * @param context Of the plan.
 * @returns The plan; a scan response is taken to be as long as the advertising data.
 * @throws What `advertisingEvent` and `scannableEvent` throw.
 * @example planAdvertising(context).onAirMeanS // 0.001128
 */
export function planAdvertising(context: PlanOf<'advertising'>): ExchangePlan {
  const { advertisingPhy: phy, dataOctets, channels, scanResponse = false } = context.exchange;
  const packets = { phy, dataOctets, channels };
  const { packetS, transmitS } = advertisingEvent(packets);
  const origin = { formula: 'channels · packet', source: ADVERTISING_SOURCE };
  addFigure(context, {
    id: 'packet',
    name: 'Packet',
    value: packetS,
    unit: 's',
    formula: '8 µs an octet on 1M',
    source: ADVERTISING_SOURCE,
  });
  const frame = phaseOf(
    'frame',
    { meanS: transmitS, worstS: transmitS, longestS: packetS, name: 'advertising packets' },
    origin,
  );
  const base = { frame: null, loadedOctets: ADVERTISING_OVERHEAD_OCTETS + dataOctets, payloadOctets: dataOctets };
  if (!scanResponse) {
    return assemblePlan(context, { ...base, phases: [frame], onAirMeanS: transmitS, onAirWorstS: transmitS });
  }
  const quantity = context.exchange.scanRequestProbability;
  const field = 'scanRequestProbability';
  const scanRequestProbability = probabilityOf(context, field, { quantity, field });
  const event = scannableEvent({ ...packets, responseDataOctets: dataOctets, scanRequestProbability });
  return assemblePlan(context, {
    ...base,
    phases: [frame, ...scanPhases(event, { channels, transmitS })],
    worstS: event.worst.durationS,
    onAirMeanS: event.transmitS,
    onAirWorstS: event.worst.transmitS,
  });
}

function scanPhases(
  event: ReturnType<typeof scannableEvent>,
  { channels, transmitS }: { channels: number; transmitS: number },
): ExchangePhase[] {
  const { worst, requestS, responseS } = event;
  const origin = (formula: string) => ({ formula, source: ADVERTISING_SOURCE });
  return [
    phaseOf(
      'interframe-space',
      {
        meanS: event.spaceS,
        worstS: worst.spaceS,
        longestS: worst.spaceS / (2 * channels),
        role: 'synthesiser',
        name: 'spaces between packets',
      },
      origin('channels · (1 + p) · 150 µs'),
    ),
    phaseOf(
      'listen',
      {
        meanS: event.listenS,
        worstS: worst.listenS,
        longestS: worst.listenS / channels,
        name: 'listening for scan requests',
      },
      origin('channels · (1 − p) · (preamble, access address + 2 µs)'),
    ),
    phaseOf(
      'response',
      { meanS: event.receiveS, worstS: worst.receiveS, longestS: requestS, name: 'scan requests' },
      origin('channels · p · request'),
    ),
    phaseOf(
      'response-acknowledgement',
      {
        meanS: event.transmitS - transmitS,
        worstS: worst.transmitS - transmitS,
        longestS: responseS,
        name: 'scan responses',
      },
      origin('channels · p · response'),
    ),
  ];
}
