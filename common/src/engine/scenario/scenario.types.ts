/**
 * The scenario document, schema version 1: plain types, SI units, temperatures in °C.
 * `common/src/schemas/scenario.schema.ts` validates the same shape and is checked against these types.
 * Optional fields end in `?`; `null` never stands for zero. Typed times and periods are whole microseconds.
 */

/** Where a figure comes from. A quantity without provenance counts as assumed, and pages say so. */
export interface Provenance {
  kind: 'source' | 'measured' | 'typical' | 'assumed' | 'memory';
  text?: string;
  traceId?: string;
}

export type Distribution = 'triangular' | 'uniform' | 'normal' | 'lognormal' | 'fixed';

/** An uncertain figure: min ≤ typical ≤ max; a missing side equals typical. `deviation` is that of ln x for lognormal. */
export interface Quantity {
  min?: number;
  typical: number;
  max?: number;
  distribution?: Distribution;
  deviation?: number;
  sharedId?: string;
  scope?: 'common' | 'unit';
  provenance?: Provenance;
}

/** A table of pairs, first column strictly increasing, held constant beyond its ends. */
export type Table = [number, number][];

export type StateRole = 'sleep' | 'idle' | 'synthesiser' | 'listen' | 'receive' | 'transmit' | 'active';
export type LoadLaw = 'constant-current' | 'constant-power' | 'resistive';

export interface State {
  id: string;
  name: string;
  role?: StateRole;
  /** Current at the reference voltage and temperature, A. */
  current: Quantity;
  /** Default 'constant-current'. */
  law?: LoadLaw;
  /** Default: the regulator's output, 3.0 V without one. */
  referenceVoltageV?: number;
  /** Default 25 °C. */
  referenceTemperatureC?: number;
  /** Temperature rise that doubles the current, K; absent: no dependence. */
  doublingK?: number;
  /** Lowest rail voltage of this state, V; counts in rest states too. */
  lowestVoltageV?: Quantity;
  /** Another part that must be in one of these states meanwhile, for example a clock it gives. */
  needs?: { partId: string; stateIds: string[] };
}

export interface Transition {
  fromStateId: string;
  toStateId: string;
  durationS: Quantity;
  current: Quantity;
  /** A part kept in a state while this transition runs, for example to poll a status register. */
  busy?: { partId: string; stateId: string };
}

export type PartKind = 'radio' | 'controller' | 'sensor' | 'actuator' | 'other';

export interface Part {
  id: string;
  name: string;
  kind: PartKind;
  states: State[];
  restStateId: string;
  transitions: Transition[];
  /** Lowest rail voltage at which the part works in a state other than rest, V. */
  lowestVoltageV: Quantity;
}

export interface Leakage {
  id: string;
  name: string;
  current: Quantity;
}

export interface When {
  /** Calendar months, 1 to 12. */
  months?: number[];
  belowC?: number;
  aboveC?: number;
}

/** Periods of a child that must be heard from; the shortest of those given is the period that counts, and equals `periodS`. */
export interface KeepAlive {
  /** Longest latency that messages to the child may have, s. */
  pollS?: number;
  /** Supervision by the network: how often the child has to be heard, s. */
  supervisionS?: number;
  /** Time after which the parent drops a silent child, s. */
  childTimeoutS?: number;
}

export type Schedule = (
  | { kind: 'every'; periodS: number; keepAlive?: KeepAlive }
  | { kind: 'random'; meanPerDay: number; busiestPerDay?: number }
  | { kind: 'window'; fromHour: number; toHour: number; periodS: number }
  | { kind: 'once'; afterS: number }
  | { kind: 'always' }
) & { when?: When };

export type PhyId =
  | 'oqpsk-2450'
  | 'msk-2450'
  | 'oqpsk-915'
  | 'oqpsk-868'
  | 'bpsk-868'
  | 'bpsk-915'
  | 'sun-fsk-50'
  | 'sun-fsk-100'
  | 'sun-fsk-150'
  | 'sun-fsk-200';

/** A PHY that is none of the presets. */
export interface CustomPhy {
  bitRateBps: number;
  bitsPerSymbol: number;
  shrOctets: number;
  phrOctets: number;
  maxPsduOctets?: number;
}

/** Constants of the PHY in place of those of the preset, or where it has none; turnaround and waits in s. */
export interface PhyConstants {
  shrOctets?: number;
  phrOctets?: number;
  turnaroundS?: number;
  ccaS?: number;
  unitBackoffS?: number;
  /** Wait for an acknowledgement from the last bit of the frame, s. */
  ackWaitS?: number;
}

export type AddressMode = 'none' | 'short' | 'extended';

export interface FrameFormat {
  frameVersion?: '2003' | '2006' | '2015';
  destination?: AddressMode;
  source?: AddressMode;
  panIdCompression?: boolean;
  sequenceNumber?: boolean;
  securityLevel?: number;
  keyIdMode?: number;
  frameCounterSuppressed?: boolean;
  informationElementOctets?: number;
  fcsOctets?: 2 | 4;
}

/** How far a radio's crystal may be off, and how long it takes to start. Parts per million add up in the worst case. */
export interface Crystal {
  /** Start of the oscillator at each wake, s. */
  startUpS?: number;
  /** Make tolerance at 25 °C, ± ppm. */
  tolerancePpm?: number;
  /** Over the temperatures of the climate, ± ppm. */
  temperaturePpm?: number;
  /** Over the life, ± ppm. */
  ageingPpm?: number;
  /** Pulling by another load than the crystal was made for; all four together. */
  pulling?: {
    motionalCapacitanceF: number;
    shuntCapacitanceF: number;
    /** Load that the crystal was made for. */
    loadCapacitanceF: number;
    /** Load that the board gives it. */
    mountedCapacitanceF: number;
  };
}

/** Regional sub-bands with a limit on the share of time on air. */
export type DutyCycleBandId =
  'eu-863-865' | 'eu-865-868' | 'eu-868.0-868.6' | 'eu-868.7-869.2' | 'eu-869.4-869.65' | 'eu-869.7-870.0';

/** Timing template of a slotted network. */
export type SlotTemplateId = 'oqpsk-10-ms' | 'oqpsk-15-ms' | 'sun-fsk-50-40-ms';

/** Loading of the frame into the radio over a serial line before it is sent. */
export interface FrameLoading {
  /** Part that sends the octets, and its state meanwhile. */
  partId: string;
  stateId: string;
  clockHz: number;
  /** Default 8. */
  bitsPerOctet?: number;
  /** Default 0. */
  overheadPerOctetS?: number;
  /** Default 0. */
  overheadS?: number;
  /** Loading while the frame is already being sent; default false: before the exchange. */
  beside?: boolean;
}

/** Radio link settings; those of the node are the defaults of its exchange steps. */
export interface LinkSettings {
  phy?: PhyId | CustomPhy;
  phyConstants?: PhyConstants;
  preambleOctets?: number;
  forwardErrorCorrection?: boolean;
  frame?: FrameFormat;
  busyProbability?: Quantity;
  frameErrorRate?: Quantity;
  ackErrorRate?: Quantity;
  receivedLevelDbm?: Quantity;
  /** Steps in which the receiver tells its level, dB: the level counts rounded down to them. */
  receivedLevelStepDb?: number;
  /** Level at which the receiver loses 1 % of frames with a PSDU of 20 octets, dBm; stands for the noise where that is not given. */
  sensitivityDbm?: number;
  /** Noise and interference in the receiver's bandwidth, dBm. */
  noiseDbm?: number;
  macMinBE?: number;
  macMaxBE?: number;
  macMaxCSMABackoffs?: number;
  macMaxFrameRetries?: number;
  includeInterframeSpace?: boolean;
  backoffIn?: 'idle' | 'sleep';
  tolerancePpm?: Quantity;
  peerTolerancePpm?: Quantity;
  crystal?: Crystal;
  dutyCycleBand?: DutyCycleBandId;
}

/** What an exchange step does on the air. Frame sizes: `psduOctets` counts the FCS; otherwise it follows from payload and frame format. */
export type ExchangePattern =
  | { pattern: 'frame'; payloadOctets?: number; psduOctets?: number }
  | { pattern: 'acknowledged'; payloadOctets?: number; psduOctets?: number; ackPsduOctets?: number }
  | { pattern: 'unacknowledged'; payloadOctets?: number; psduOctets?: number }
  | {
      pattern: 'listen-before-talk';
      payloadOctets?: number;
      psduOctets?: number;
      ackPsduOctets?: number;
      channels: number;
      retuneS: number;
    }
  | {
      pattern: 'poll';
      dataRequestOctets?: number;
      pendingProbability: Quantity;
      responsePsduOctets?: number;
      responseDelayS?: number;
      waitS?: number;
    }
  | {
      pattern: 'beacon';
      beaconOrder: number;
      superframeOrder: number;
      beaconPsduOctets: number;
      missedBeaconProbability?: Quantity;
      /** Time the receiver stays on in the contention period after a beacon, s; default 0. */
      contentionS?: number;
    }
  | {
      pattern: 'slot';
      slotUse: 'transmit' | 'receive' | 'idle-listen';
      psduOctets?: number;
      ackPsduOctets?: number;
      shared?: boolean;
      /** Default: that of the PHY. */
      template?: SlotTemplateId;
    }
  | { pattern: 'sampled-listener'; periodUnits: number; sampleS: number }
  | { pattern: 'sampled-sender'; periodUnits: number; psduOctets: number; synchronised?: boolean }
  | { pattern: 'guard'; intervalS: number; jitterS?: number; psduOctets?: number }
  | {
      pattern: 'chirp';
      spreadingFactor: number;
      bandwidthHz: number;
      codingRate: number;
      preambleSymbols?: number;
      payloadOctets: number;
      implicitHeader?: boolean;
      crc?: boolean;
      lowDataRateOptimisation?: boolean;
      receiveWindows?: { delayS: number; openS: number }[];
    }
  | {
      pattern: 'advertising';
      advertisingPhy: '1M' | '2M' | 'coded-s8' | 'coded-s2';
      dataOctets: number;
      channels: number;
      scanResponse?: boolean;
      /** Share of channels on which somebody asks for the scan response; default: assumed. */
      scanRequestProbability?: Quantity;
    }
  | { pattern: 'receive'; payloadOctets?: number; psduOctets?: number; ackPsduOctets?: number; listenS?: number }
  | { pattern: 'forward'; payloadOctets?: number; psduOctets?: number; ackPsduOctets?: number }
  | { pattern: 'overhear'; payloadOctets?: number; psduOctets?: number; stopsAfterHeader?: boolean }
  | { pattern: 'scan'; channels: number; scanDuration: number; retuneS: number };

export type ExchangeDuration = {
  kind: 'exchange';
  /** Radio whose states the sub-steps take; default: the only part of kind `radio`. */
  radioPartId?: string;
  /** What differs from the link settings of the node. */
  link?: LinkSettings;
  loading?: FrameLoading;
} & ExchangePattern;

export interface SerialDuration {
  kind: 'serial';
  octets: number;
  clockHz: number;
  /** Default 8. */
  bitsPerOctet?: number;
  /** Default 0. */
  overheadPerOctetS?: number;
  /** Default 0. */
  overheadS?: number;
}

export type Duration = ({ kind: 'fixed' } & Quantity) | ExchangeDuration | SerialDuration;

export interface Step {
  id: string;
  name: string;
  /** State of each named part by part id; parts not named rest. */
  states: Record<string, string>;
  duration: Duration;
  /** Default 1. */
  repeats?: number;
}

export interface Routine {
  id: string;
  name: string;
  enabled: boolean;
  schedule: Schedule;
  steps: Step[];
}

export interface Node {
  parts: Part[];
  leakages: Leakage[];
  routines: Routine[];
  link?: LinkSettings;
}

export interface SelfDischarge {
  lossPerYear: Quantity;
  referenceC: number;
  q10?: number;
  activationEnergyJPerMol?: number;
}

export interface CellLimits {
  continuousA?: number;
  pulseA?: number;
  lowestC?: number;
  highestC?: number;
}

export interface Cell {
  designation: string;
  chemistry?: string;
  /** Charge of one cell, C. */
  capacityC: Quantity;
  /** Capacity against constant current: [A, C]. */
  rateTable?: Table;
  /** Open-circuit voltage at 20 °C: [depth 0 to 1, V]. */
  openCircuitTableV: Table;
  openCircuitTemperatureVPerK?: number;
  /** Fresh resistance at 20 °C, by pulse length where known. */
  resistanceOhm: { pulseS?: number; ohm: Quantity }[];
  /** [°C, factor], interpolated in the logarithm of the factor. */
  resistanceFactorByTemperature: Table;
  /** [depth, factor]. */
  resistanceFactorByDepth: Table;
  /** [°C, factor]; 1 where absent. */
  capacityFactorByTemperature?: Table;
  selfDischarge: SelfDischarge;
  kinetic?: { availableFraction: number; rateConstantPerS: number };
  shelfLifeS?: number;
  limits?: CellLimits;
  ratingEndV?: number;
  massKg?: number;
  volumeM3?: number;
  price?: number;
}

export type Regulator =
  | { kind: 'none' }
  | { kind: 'linear'; outputV: number; quiescentA: number; dropoutV: number; minimumInputV?: number }
  | {
      kind: 'switching';
      outputV: number;
      quiescentA: number;
      /** Constant efficiency 0 to 1, or a table [output A, efficiency]. */
      efficiency: number | Table;
      minimumInputV: number;
      maximumInputV?: number;
    };

export interface Capacitor {
  capacitanceF: Quantity;
  esrOhm: number;
  leakageA: Quantity;
}

export interface LowBattery {
  thresholdV: number;
  stepV?: number;
  hysteresisV: number;
  readAt: 'rest' | 'critical';
  chargePerReadingC?: number;
  /** Default 1. */
  readingsPerDay?: number;
}

export interface Harvest {
  /** Energy a day by calendar month, J, January first. */
  energyPerDayJ: number[];
  efficiency: number;
  noChargeBelowC?: number;
}

export interface Supply {
  cell: Cell;
  series: number;
  parallel: number;
  regulator: Regulator;
  capacitor?: Capacitor;
  lowBattery?: LowBattery;
  harvest?: Harvest;
  cutOffV?: number;
  /** Default 0. */
  reserveFraction?: number;
}

export interface ClimateMonth {
  meanC: number;
  amplitudeK: number;
}

export interface ClimateExtreme {
  temperatureC: number;
  month: number;
  /** Default 1. */
  returnYears?: number;
}

export interface Storage {
  durationS: number;
  temperatureC: number;
  currentA: number;
}

export interface Climate {
  /** Twelve months, January first. */
  months: ClimateMonth[];
  /** Calendar month in which life starts, 1 to 12. */
  startMonth: number;
  extremes?: { coldest?: ClimateExtreme; hottest?: ClimateExtreme };
  storage?: Storage;
}

export interface Target {
  lifeS: number;
  /** Share of nodes that must reach the life, 0 to 1. */
  confidence: number;
  /** Default 'none'. */
  outages?: 'none' | 'tolerated';
}

export interface Scenario {
  schemaVersion: 1;
  name: string;
  node: Node;
  supply: Supply;
  climate: Climate;
  target: Target;
}
