import { flagInput, numberInput, textInput } from '#test/support/truth.ts';
import type { TruthEvaluator, TruthRow } from '#test/support/truth.ts';
import {
  acknowledgedExchange,
  ADVERTISING_INTERVAL_UNIT_S,
  ADVERTISING_SPACE_S,
  advertisingEvent,
  advertisingPacketS,
  advertisingPeriodS,
  chirpAirtimeS,
  frameAirtimeS,
  guardWindow,
  interframeSpaceS,
  isLowDataRate,
  macHeader,
  networkPayloadOctets,
  phyLimitPpm,
  phyPresets,
  scannableEvent,
  unacknowledgedExchange,
} from '#common/engine/index.ts';
import type { AddressMode, AdvertisingPhy, MacHeaderInput, Phy } from '#common/engine/index.ts';
import { announcedWait, linkExchangeEvaluators } from './link-exchange-evaluators.ts';
import { linkTimingEvaluators } from './link-timing-evaluators.ts';

function presetOf(row: TruthRow): Phy {
  if (row.id.startsWith('phy-msk')) return phyPresets['msk-2450'];
  const id = textInput(row, 'phy');
  if (id.startsWith('SUN FSK')) return phyPresets['sun-fsk-50'];
  const phy = Object.values(phyPresets).find((preset) => preset.id === id);
  if (!phy) throw new Error(`${row.id}: no preset "${id}".`);
  return phy;
}

const phyValues: [string, (phy: Phy) => number | null][] = [
  ['phy-bit-', (phy) => phy.bitS],
  ['phy-msk-2450-250k-bit', (phy) => phy.bitS],
  ['phy-octet-', (phy) => 8 * phy.bitS],
  ['phy-symbols-per-octet-', (phy) => phy.symbolsPerOctet],
  ['phy-symbol-', (phy) => phy.symbolS],
  ['phy-shr-symbols-', (phy) => (phy.shrOctets === null ? null : phy.shrOctets * phy.symbolsPerOctet)],
  ['phy-max-frame-symbols-', (phy) => frameAirtimeS(phy, phy.maxPsduOctets ?? 0) / phy.symbolS],
  ['phy-sunfsk-mac-symbol', (phy) => phy.macSymbolS],
  ['phy-limit-', (phy) => (phy.id === 'custom' ? null : phyLimitPpm(phy.id))],
];

const macValues: [string, (phy: Phy, row: TruthRow) => number | null][] = [
  ['mac-turnaround-', (phy) => phy.turnaroundS],
  ['mac-cca-', (phy) => phy.ccaS],
  ['mac-unitbackoff-', (phy) => phy.unitBackoffS],
  ['mac-ackwait-symbols-', (phy) => (phy.ackWaitS === null ? null : phy.ackWaitS / phy.macSymbolS)],
  ['mac-ackwait-', (phy) => phy.ackWaitS],
  ['mac-sifs-', (phy) => phy.sifsS],
  ['mac-lifs-', (phy) => phy.lifsS],
  ['mac-maxframetotalwait-', announcedWait],
  ['mac-maxframeresponsetime-', (phy, row) => numberInput(row, 'symbols') * phy.macSymbolS],
  ['mac-ifs-select-', (phy, row) => interframeSpaceS(phy, numberInput(row, 'mpduOctets'))],
];

function byPrefix<T>(row: TruthRow, table: readonly (readonly [string, T])[]): T {
  const entry = table.find(([prefix]) => row.id.startsWith(prefix));
  if (!entry) throw new Error(`${row.id}: no way to compute it.`);
  return entry[1];
}

const airtime: TruthEvaluator = (row) =>
  frameAirtimeS(presetOf(row), numberInput(row, 'psduOctets'), {
    forwardErrorCorrection: flagInput(row, 'fec'),
    ...(row.inputs['preambleOctets'] === undefined ? {} : { preambleOctets: numberInput(row, 'preambleOctets') }),
  });

const ADDRESS_MODES: Readonly<Record<string, AddressMode>> = { none: 'none', short: 'short', ext: 'extended' };

function frameOf(row: TruthRow): MacHeaderInput {
  const { inputs } = row;
  const number = (key: string, absent: number): number => (inputs[key] === undefined ? absent : numberInput(row, key));
  const address = (key: string): AddressMode =>
    inputs[key] === undefined ? 'none' : (ADDRESS_MODES[textInput(row, key)] ?? 'none');
  const version = inputs['frameVersion'];
  return {
    frameVersion: version === '2015' || row.id.startsWith('ack-enh') ? '2015' : '2006',
    destination: row.id === 'ack-enh-timecorr-dstext' ? 'extended' : address('dstAddr'),
    source: row.id === 'beacon-min' ? 'short' : address('srcAddr'),
    panIdCompression: flagInput(row, 'panIdCompression'),
    sequenceNumber: flagInput(row, 'seqNumber', true),
    securityLevel: number('securityLevel', 0),
    keyIdMode: number('keyIdMode', 0),
    frameCounterSuppressed: flagInput(row, 'frameCounterSuppressed'),
    informationElementOctets: number('headerIeOctets', number('ieOctets', 0)),
    payloadOctets:
      number('payloadOctets', 0) +
      number('commandIdOctets', 0) +
      number('superframeSpec', 0) +
      number('gtsSpec', 0) +
      number('pendAddrSpec', 0),
  };
}

const mhr: TruthEvaluator = (row) => {
  if (row.id === 'const-aMaxMACPayloadSize') {
    // The least overhead, 9 octets, is that of one short address.
    const least = { frameVersion: '2006', destination: 'short', source: 'none', panIdCompression: false } as const;
    return macHeader(least).largestPayloadOctets;
  }
  const header = macHeader(frameOf(row));
  if (row.id.startsWith('mhr-')) return header.headerOctets;
  if (row.id.startsWith('sec-mic-')) return header.micOctets;
  if (row.id.startsWith('sec-auxhdr-')) return header.securityHeaderOctets;
  return row.id.startsWith('payload-max-') ? header.largestPayloadOctets : header.psduOctets;
};

const lora: TruthEvaluator = (row) => {
  if (row.id === 'lorawan-overhead') return networkPayloadOctets(0, numberInput(row, 'fopts'));
  const spreadingFactor = numberInput(row, 'sf');
  const bandwidthHz = numberInput(row, 'bandwidthHz');
  if (row.id.startsWith('lora-ldro-')) return isLowDataRate(spreadingFactor, bandwidthHz) ? 1 : 0;
  return chirpAirtimeS({
    spreadingFactor,
    bandwidthHz,
    codingRate: numberInput(row, 'cr'),
    preambleSymbols: numberInput(row, 'preambleSymbols'),
    payloadOctets: numberInput(row, 'payloadOctets'),
    implicitHeader: flagInput(row, 'implicitHeader'),
    crc: flagInput(row, 'crc'),
    lowDataRateOptimisation: flagInput(row, 'lowDataRateOptimisation'),
  });
};

const ADVERTISING_PHYS: Readonly<Record<string, AdvertisingPhy>> = {
  '1M': '1M',
  '2M': '2M',
  'coded S=8': 'coded-s8',
  'coded S=2': 'coded-s2',
};

/** Rows of advertising that are no airtime of a packet. */
const bleValues: Readonly<Record<string, (row: TruthRow) => number>> = {
  'ble-ifs': () => ADVERTISING_SPACE_S,
  'ble-adv-period-20ms': (row) => advertisingPeriodS(numberInput(row, 'advIntervalUs') / 1e6).meanS,
  'ble-adv-period-10240ms': (row) => advertisingPeriodS(numberInput(row, 'advIntervalUs') / 1e6).meanS,
  'ble-adv-interval-unit': (row) => numberInput(row, 'units') * ADVERTISING_INTERVAL_UNIT_S,
  'ble-connectable-event-rx-min': (row) =>
    scannableEvent({
      phy: '1M',
      dataOctets: 0,
      channels: numberInput(row, 'channels'),
      responseDataOctets: 0,
      scanRequestProbability: 0,
    }).listenS,
  'ble-window-widening': (row) =>
    guardWindow({
      intervalS: numberInput(row, 'sinceAnchorUs') / 1e6,
      tolerancePpmA: numberInput(row, 'ppmCentral'),
      tolerancePpmB: numberInput(row, 'ppmPeripheral'),
    }).halfS,
};

const ble: TruthEvaluator = (row) => {
  const compute = bleValues[row.id];
  if (compute) return compute(row);
  const phy = row.inputs['phy'] === undefined ? '1M' : ADVERTISING_PHYS[textInput(row, 'phy')];
  if (!phy) return null;
  if (row.inputs['advDataOctets'] === undefined) {
    const mic = row.inputs['mic'] === undefined ? 0 : numberInput(row, 'mic');
    return advertisingPacketS(phy, numberInput(row, 'payloadOctets'), mic);
  }
  const dataOctets = numberInput(row, 'advDataOctets');
  if (row.inputs['channels'] === undefined) return advertisingEvent({ phy, dataOctets, channels: 1 }).packetS;
  const { transmitS } = advertisingEvent({ phy, dataOctets, channels: numberInput(row, 'channels') });
  // The interval is lengthened by a random delay of 0 to 10 ms, 5 ms in the mean.
  return row.id.startsWith('ble-adv-tx-duty')
    ? transmitS / (numberInput(row, 'advIntervalUs') / 1e6 + 0.005)
    : transmitS;
};

/** Time of an exchange on an idle channel; the model of the 2006 paper counts the backoff alone before the frame. */
function exchangeS(row: TruthRow, phy: Phy, psduOctets: number): number {
  const input = { psduOctets, busyProbability: 0, frameErrorRate: 0, includeInterframeSpace: true };
  const exchange = flagInput(row, 'ack')
    ? acknowledgedExchange(phy, { ...input, ackErrorRate: 0 })
    : unacknowledgedExchange(phy, input);
  const { meanDurationS, assessmentS, turnaroundS } = exchange;
  return textInput(row, 'accessModel') === 'backoffOnly' ? meanDurationS - assessmentS - turnaroundS : meanDurationS;
}

const throughput: TruthEvaluator = (row) => {
  const phy = presetOf(row);
  if (row.inputs['psduOctets'] !== undefined) return exchangeS(row, phy, numberInput(row, 'psduOctets'));
  const payloadOctets = numberInput(row, 'payloadOctets');
  const { headerOctets } = macHeader({
    frameVersion: '2006',
    destination: 'none',
    source: 'none',
    panIdCompression: false,
  });
  const delayS = exchangeS(row, phy, headerOctets + numberInput(row, 'addressOctets') + payloadOctets + 2);
  if (row.id.startsWith('latre-delay')) return delayS;
  const rateBps = (8 * payloadOctets) / delayS;
  return row.id.startsWith('latre-rate') ? rateBps : rateBps / phy.bitRateBps;
};

/** How the rows of the link's groups are computed by the engine. */
export const linkEvaluators: Readonly<Record<string, TruthEvaluator>> = {
  ...linkExchangeEvaluators,
  ...linkTimingEvaluators,
  phy: (row) =>
    row.id.startsWith('phy-centre-frequency-')
      ? (phyLimitPpm('oqpsk-2450') ?? NaN) * numberInput(row, 'frequencyMHz') // ppm of MHz are Hz
      : byPrefix(row, phyValues)(row.id === 'phy-sunfsk-mac-symbol' ? phyPresets['sun-fsk-200'] : presetOf(row)),
  mac: (row) => byPrefix(row, macValues)(presetOf(row), row),
  airtime,
  mhr,
  lora,
  ble,
  throughput,
};
