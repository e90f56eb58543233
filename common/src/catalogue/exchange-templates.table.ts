import { networkPayloadOctets } from '#common/engine/link/chirp-airtime.ts';
import { advertisingPeriodS } from '#common/engine/link/advertising-event.ts';
import { windowOpenS } from '#common/engine/link/chirp-windows.ts';
import type { LinkSettings, Node, Part, Routine, Step } from '#common/engine/scenario/scenario.types.ts';
import { fromUnit } from '#common/units/unit-lookup.ts';
import { cataloguePart } from './catalogue.ts';
import { boardLeakage, fixed, orchard, plain, supply, target } from './template-pieces.ts';
import type { ScenarioTemplate } from './templates.ts';

/** What no template takes for granted: a channel without other traffic and frames that always arrive exist on the bench only. */
const losses = (): LinkSettings => ({
  busyProbability: plain(0.1),
  frameErrorRate: plain(0.05),
  ackErrorRate: plain(0.01),
});

/** Clocks of both ends, for guard times. */
const clocks = (): LinkSettings => ({ tolerancePpm: plain(20), peerTolerancePpm: plain(20) });

const sensing = (radio: string): Part[] => [
  cataloguePart('controller-low-power', 'controller'),
  cataloguePart(radio, 'radio'),
  cataloguePart('sensor-temperature-humidity', 'sensor'),
];

const measure = (): Step => ({
  id: 'measure',
  name: 'Measure',
  states: { controller: 'idle', sensor: 'measuring' },
  duration: fixed('10 … 15 … 20 ms'),
});

const prepare = (): Step => ({
  id: 'prepare',
  name: 'Prepare the frame',
  states: { controller: 'active' },
  duration: fixed('2 … 3 … 5 ms'),
});

/** The radio takes its states from the exchange; the controller waits with its core stopped. */
const exchange = (id: string, name: string, duration: Step['duration']): Step => ({
  id,
  name,
  states: { controller: 'idle' },
  duration,
});

interface Pieces {
  parts: Part[];
  link: LinkSettings;
  routines: Omit<Routine, 'enabled'>[];
}

const node = ({ parts, link, routines }: Pieces): Node => ({
  parts,
  leakages: [boardLeakage()],
  link,
  routines: routines.map((routine) => ({ ...routine, enabled: true })),
});

const acknowledgedReport = (): Node =>
  node({
    parts: sensing('transceiver-2450'),
    link: { phy: 'oqpsk-2450', ...losses() },
    routines: [
      {
        id: 'report',
        name: 'Measure and report',
        schedule: { kind: 'every', periodS: fromUnit(15, 'min') },
        steps: [
          measure(),
          prepare(),
          exchange('send', 'Send the report', {
            kind: 'exchange',
            pattern: 'acknowledged',
            payloadOctets: 24,
            loading: { partId: 'controller', stateId: 'active', clockHz: 4_000_000, overheadS: 0.000_02 },
          }),
        ],
      },
    ],
  });

const pollingChild = (): Node =>
  node({
    parts: sensing('transceiver-2450'),
    link: { phy: 'oqpsk-2450', ...losses() },
    routines: [
      {
        id: 'poll',
        name: 'Ask the parent for data',
        schedule: { kind: 'every', periodS: 10, keepAlive: { pollS: 10, supervisionS: 120, childTimeoutS: 240 } },
        steps: [
          exchange('ask', 'Ask for data', {
            kind: 'exchange',
            pattern: 'poll',
            pendingProbability: plain(0.02),
            responsePsduOctets: 60,
          }),
        ],
      },
      {
        id: 'report',
        name: 'Measure and report',
        schedule: { kind: 'every', periodS: fromUnit(15, 'min') },
        steps: [
          measure(),
          prepare(),
          exchange('send', 'Send the report', { kind: 'exchange', pattern: 'acknowledged', payloadOctets: 24 }),
        ],
      },
    ],
  });

/** A slotframe of 101 slots of 10 ms. */
const SLOTFRAME_S = 1.01;

const slottedNode = (): Node =>
  node({
    parts: sensing('transceiver-2450'),
    link: { phy: 'oqpsk-2450', ...losses(), ...clocks() },
    routines: [
      {
        id: 'shared-slot',
        name: 'Listen in the shared slot',
        schedule: { kind: 'every', periodS: SLOTFRAME_S },
        steps: [
          exchange('listen', 'Listen in the shared slot', {
            kind: 'exchange',
            pattern: 'slot',
            slotUse: 'idle-listen',
            shared: true,
          }),
        ],
      },
      {
        id: 'synchronise',
        name: 'Hear the time source',
        schedule: { kind: 'every', periodS: 30 * SLOTFRAME_S },
        steps: [
          exchange('hear', 'Receive in a slot', {
            kind: 'exchange',
            pattern: 'slot',
            slotUse: 'receive',
            psduOctets: 40,
          }),
        ],
      },
      {
        id: 'report',
        name: 'Measure and report',
        schedule: { kind: 'every', periodS: 300 },
        steps: [
          measure(),
          prepare(),
          exchange('send', 'Send in an own slot', {
            kind: 'exchange',
            pattern: 'slot',
            slotUse: 'transmit',
            psduOctets: 45,
          }),
        ],
      },
    ],
  });

/** 500 ms in units of ten symbols at 2.4 GHz. */
const SAMPLING_PERIOD_UNITS = 3_125;

const sampledListener = (): Node =>
  node({
    parts: [
      cataloguePart('controller-low-power', 'controller'),
      cataloguePart('transceiver-2450', 'radio'),
      cataloguePart('actuator-latching-valve', 'valve'),
    ],
    link: { phy: 'oqpsk-2450', ...losses(), ...clocks() },
    routines: [
      {
        id: 'sample',
        name: 'Sample the channel',
        schedule: { kind: 'every', periodS: 0.5 },
        steps: [
          {
            ...exchange('look', 'Look for a wake-up frame', {
              kind: 'exchange',
              pattern: 'sampled-listener',
              periodUnits: SAMPLING_PERIOD_UNITS,
              sampleS: 0.000_6,
            }),
            // Modern transceivers sample by themselves.
            states: {},
          },
        ],
      },
      {
        id: 'command',
        name: 'Command to the valve',
        schedule: { kind: 'random', meanPerDay: 6, busiestPerDay: 24 },
        steps: [
          exchange('receive', 'Receive the command', { kind: 'exchange', pattern: 'receive', payloadOctets: 16 }),
          {
            id: 'switch',
            name: 'Switch the valve',
            states: { controller: 'idle', valve: 'switching' },
            duration: fixed('30 … 50 … 80 ms'),
          },
          exchange('confirm', 'Confirm', { kind: 'exchange', pattern: 'acknowledged', payloadOctets: 12 }),
        ],
      },
    ],
  });

const advertiser = (): Node =>
  node({
    parts: sensing('transceiver-2450-connectionless'),
    link: { ...losses() },
    routines: [
      {
        id: 'advertise',
        name: 'Advertise',
        schedule: { kind: 'every', periodS: advertisingPeriodS(1).meanS },
        steps: [
          {
            ...exchange('send', 'Send on three channels', {
              kind: 'exchange',
              pattern: 'advertising',
              advertisingPhy: '1M',
              dataOctets: 24,
              channels: 3,
              scanResponse: true,
              scanRequestProbability: plain(0.05),
            }),
            states: { controller: 'idle' },
          },
        ],
      },
      { id: 'measure', name: 'Measure', schedule: { kind: 'every', periodS: 300 }, steps: [measure(), prepare()] },
    ],
  });

const SPREADING_FACTOR = 9;
const BANDWIDTH_HZ = 125_000;
/** The second window is opened at the slowest rate. */
const SLOWEST_SPREADING_FACTOR = 12;
const WINDOW_SYMBOLS = 8;

const longRangeUplink = (): Node =>
  node({
    parts: sensing('transceiver-chirp'),
    link: { dutyCycleBand: 'eu-868.0-868.6', frameErrorRate: plain(0.1) },
    routines: [
      {
        id: 'report',
        name: 'Measure and report',
        schedule: { kind: 'every', periodS: fromUnit(1, 'h') },
        steps: [
          measure(),
          prepare(),
          {
            id: 'send',
            name: 'Send the uplink',
            // The controller sleeps through airtime and windows; the radio wakes it.
            states: {},
            duration: {
              kind: 'exchange',
              pattern: 'chirp',
              spreadingFactor: SPREADING_FACTOR,
              bandwidthHz: BANDWIDTH_HZ,
              codingRate: 1,
              payloadOctets: networkPayloadOctets(20),
              receiveWindows: [
                { delayS: 1, openS: windowOpenS(SPREADING_FACTOR, BANDWIDTH_HZ, WINDOW_SYMBOLS) },
                { delayS: 2, openS: windowOpenS(SLOWEST_SPREADING_FACTOR, BANDWIDTH_HZ, WINDOW_SYMBOLS) },
              ],
            },
          },
        ],
      },
    ],
  });

interface Row {
  id: string;
  name: string;
  description: string;
  node: () => Node;
  cell: string;
  series: number;
  years: number;
}

const ROWS: readonly Row[] = [
  {
    id: 'acknowledged-report',
    name: 'Acknowledged report',
    description:
      'Measures every 15 min and sends 24 octets over 2.4 GHz IEEE 802.15.4: backoff, acknowledgement and retries; two LR6.',
    node: acknowledgedReport,
    cell: 'LR6',
    series: 2,
    years: 5,
  },
  {
    id: 'polling-child',
    name: 'Polling child',
    description:
      'Sleeps, asks its parent for data every 10 s and reports every 15 min over 2.4 GHz IEEE 802.15.4; two LR6.',
    node: pollingChild,
    cell: 'LR6',
    series: 2,
    years: 3,
  },
  {
    id: 'slotted-node',
    name: 'Slotted node',
    description:
      'Sends, receives and listens in slots of 10 ms of a hopping IEEE 802.15.4 network, 101 slots a frame; two LR6.',
    node: slottedNode,
    cell: 'LR6',
    series: 2,
    years: 3,
  },
  {
    id: 'sampled-listener',
    name: 'Sampled listener',
    description: 'Looks for wake-up frames twice a second, so that a valve can be reached at any time; two LR6.',
    node: sampledListener,
    cell: 'LR6',
    series: 2,
    years: 2,
  },
  {
    id: 'advertiser',
    name: 'Advertiser',
    description:
      'Sends its readings about once a second on three channels at 2.4 GHz, and answers scan requests; one CR2477.',
    node: advertiser,
    cell: 'CR2477',
    series: 1,
    years: 2,
  },
  {
    id: 'long-range-uplink',
    name: 'Long-range uplink',
    description:
      'Sends 20 octets every hour by chirp spread spectrum at 868 MHz and opens two receive windows; two FR6.',
    node: longRangeUplink,
    cell: 'FR6',
    series: 2,
    years: 5,
  },
];

/** Nodes whose times on the air all follow from the link. */
export const EXCHANGE_TEMPLATES: readonly ScenarioTemplate[] = ROWS.map(({ id, name, description, ...row }) => ({
  id,
  name,
  description,
  group: 'link',
  document: {
    schemaVersion: 1,
    name,
    node: row.node(),
    supply: supply(row.cell, row.series),
    climate: orchard(4),
    target: target(row.years),
  },
}));
