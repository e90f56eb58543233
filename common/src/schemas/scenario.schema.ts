import { z } from 'zod';
import type {
  Cell,
  Climate,
  Duration,
  LinkSettings,
  Node,
  Part,
  Quantity,
  Regulator,
  Routine,
  Scenario,
  Schedule,
  Step,
  Supply,
  Target,
} from '#common/engine/scenario/scenario.types.ts';
import { LIMITS, SCHEMA_VERSION } from './limits.ts';
import {
  checkKeepAlive,
  checkNodeReferences,
  checkQuantityOrder,
  isIncreasing,
  isWholeMicroseconds,
} from './scenario-rules.ts';

const name = z.string().trim().min(1, 'Give it a name.').max(LIMITS.nameLength);
/** Ids become keys and parts of paths, hence the narrow alphabet; the three names are those of object internals. */
export const idSchema = z
  .string()
  .min(1)
  .max(LIMITS.idLength)
  .regex(
    /^[A-Za-z0-9][A-Za-z0-9_-]*$/,
    'Ids use letters, digits, hyphen and underscore, and begin with a letter or digit.',
  )
  .refine((id) => !['__proto__', 'constructor', 'prototype'].includes(id), 'This id is reserved.');

const finite = z.number();
const nonNegative = finite.min(0, 'Must be 0 or more.');
const positive = finite.gt(0, 'Must be more than 0.');
const probability = finite.min(0, 'A probability lies between 0 and 1.').max(1, 'A probability lies between 0 and 1.');
const temperatureC = finite
  .min(-100, 'Temperatures from −100 to 200 °C.')
  .max(200, 'Temperatures from −100 to 200 °C.');
const month = z.int().min(1, 'Months count from 1 to 12.').max(12, 'Months count from 1 to 12.');
const wholeMicroseconds = 'Times are whole microseconds.';
const durationS = nonNegative.refine(isWholeMicroseconds, wholeMicroseconds);
const periodS = positive.refine(isWholeMicroseconds, wholeMicroseconds);

export const provenanceSchema = z.strictObject({
  kind: z.enum(['source', 'measured', 'typical', 'assumed', 'memory']),
  text: z.string().max(LIMITS.provenanceLength).optional(),
  traceId: z.string().max(LIMITS.idLength).optional(),
});

type NumberSchema = z.ZodType<number, number>;
const distribution = z.enum(['triangular', 'uniform', 'normal', 'lognormal', 'fixed']);

function quantityFields(value: NumberSchema) {
  return {
    min: value.optional(),
    typical: value,
    max: value.optional(),
    distribution: distribution.optional(),
    deviation: nonNegative.optional(),
    sharedId: idSchema.optional(),
    scope: z.enum(['common', 'unit']).optional(),
    provenance: provenanceSchema.optional(),
  };
}

function quantityOf(value: NumberSchema) {
  return z.strictObject(quantityFields(value)).superRefine(checkQuantityOrder);
}

export const quantitySchema = quantityOf(finite) satisfies z.ZodType<Quantity>;
const currentQuantity = quantityOf(nonNegative);
const positiveQuantity = quantityOf(positive);
const probabilityQuantity = quantityOf(probability);
const durationQuantity = quantityOf(durationS);

/** A table of pairs with a strictly increasing first column. */
function tableOf(first: NumberSchema, second: NumberSchema, minRows = 1) {
  return z
    .array(z.tuple([first, second]))
    .min(minRows, `Needs at least ${minRows} row${minRows === 1 ? '' : 's'}.`)
    .max(LIMITS.tableRows)
    .refine(isIncreasing, 'The first column must increase from row to row.');
}

const stateSchema = z.strictObject({
  id: idSchema,
  name,
  role: z.enum(['sleep', 'idle', 'synthesiser', 'listen', 'receive', 'transmit', 'active']).optional(),
  current: currentQuantity,
  law: z.enum(['constant-current', 'constant-power', 'resistive']).optional(),
  referenceVoltageV: positive.optional(),
  referenceTemperatureC: temperatureC.optional(),
  doublingK: positive.optional(),
  lowestVoltageV: currentQuantity.optional(),
  needs: z.strictObject({ partId: idSchema, stateIds: z.array(idSchema).min(1).max(LIMITS.statesPerPart) }).optional(),
});

const transitionSchema = z.strictObject({
  fromStateId: idSchema,
  toStateId: idSchema,
  durationS: durationQuantity,
  current: currentQuantity,
  busy: z.strictObject({ partId: idSchema, stateId: idSchema }).optional(),
});

export const partSchema = z.strictObject({
  id: idSchema,
  name,
  kind: z.enum(['radio', 'controller', 'sensor', 'actuator', 'other']),
  states: z.array(stateSchema).min(1, 'A part needs at least one state.').max(LIMITS.statesPerPart),
  restStateId: idSchema,
  transitions: z.array(transitionSchema).max(LIMITS.transitionsPerPart),
  lowestVoltageV: currentQuantity,
}) satisfies z.ZodType<Part>;

const leakageSchema = z.strictObject({ id: idSchema, name, current: currentQuantity });

const whenSchema = z.strictObject({
  months: z.array(month).min(1).max(12).optional(),
  belowC: temperatureC.optional(),
  aboveC: temperatureC.optional(),
});
const when = { when: whenSchema.optional() };
const hour = finite.min(0, 'Hours from 0 to 24.').max(24, 'Hours from 0 to 24.');

const keepAliveSchema = z.strictObject({
  pollS: periodS.optional(),
  supervisionS: periodS.optional(),
  childTimeoutS: periodS.optional(),
});

export const scheduleSchema = z.discriminatedUnion('kind', [
  z
    .strictObject({ kind: z.literal('every'), periodS, keepAlive: keepAliveSchema.optional(), ...when })
    .superRefine(checkKeepAlive),
  z.strictObject({
    kind: z.literal('random'),
    meanPerDay: nonNegative,
    busiestPerDay: nonNegative.optional(),
    ...when,
  }),
  z.strictObject({ kind: z.literal('window'), fromHour: hour, toHour: hour, periodS, ...when }),
  z.strictObject({ kind: z.literal('once'), afterS: durationS, ...when }),
  z.strictObject({ kind: z.literal('always'), ...when }),
]) satisfies z.ZodType<Schedule>;

export const phyIdSchema = z.enum([
  'oqpsk-2450',
  'msk-2450',
  'oqpsk-915',
  'oqpsk-868',
  'bpsk-868',
  'bpsk-915',
  'sun-fsk-50',
  'sun-fsk-100',
  'sun-fsk-150',
  'sun-fsk-200',
]);

const octets = z.int().min(0, 'Octets: 0 or more.').max(65_535);
const customPhySchema = z.strictObject({
  bitRateBps: positive,
  bitsPerSymbol: positive,
  shrOctets: nonNegative,
  phrOctets: nonNegative,
  maxPsduOctets: octets.optional(),
});
const addressMode = z.enum(['none', 'short', 'extended']);

const crystalSchema = z.strictObject({
  startUpS: durationS.optional(),
  tolerancePpm: nonNegative.optional(),
  temperaturePpm: nonNegative.optional(),
  ageingPpm: nonNegative.optional(),
  pulling: z
    .strictObject({
      motionalCapacitanceF: positive,
      shuntCapacitanceF: nonNegative,
      loadCapacitanceF: positive,
      mountedCapacitanceF: positive,
    })
    .optional(),
});

export const dutyCycleBandSchema = z.enum([
  'eu-863-865',
  'eu-865-868',
  'eu-868.0-868.6',
  'eu-868.7-869.2',
  'eu-869.4-869.65',
  'eu-869.7-870.0',
]);

export const linkSettingsSchema = z.strictObject({
  phy: z.union([phyIdSchema, customPhySchema]).optional(),
  phyConstants: z
    .strictObject({
      shrOctets: octets.optional(),
      phrOctets: octets.optional(),
      turnaroundS: durationS.optional(),
      ccaS: durationS.optional(),
      unitBackoffS: durationS.optional(),
      ackWaitS: durationS.optional(),
    })
    .optional(),
  preambleOctets: octets.optional(),
  forwardErrorCorrection: z.boolean().optional(),
  frame: z
    .strictObject({
      frameVersion: z.enum(['2003', '2006', '2015']).optional(),
      destination: addressMode.optional(),
      source: addressMode.optional(),
      panIdCompression: z.boolean().optional(),
      sequenceNumber: z.boolean().optional(),
      securityLevel: z.int().min(0).max(7).optional(),
      keyIdMode: z.int().min(0).max(3).optional(),
      frameCounterSuppressed: z.boolean().optional(),
      informationElementOctets: octets.optional(),
      fcsOctets: z.union([z.literal(2), z.literal(4)]).optional(),
    })
    .optional(),
  busyProbability: probabilityQuantity.optional(),
  frameErrorRate: probabilityQuantity.optional(),
  ackErrorRate: probabilityQuantity.optional(),
  receivedLevelDbm: quantitySchema.optional(),
  receivedLevelStepDb: nonNegative.optional(),
  sensitivityDbm: finite.optional(),
  noiseDbm: finite.optional(),
  macMinBE: z.int().min(0).max(8).optional(),
  macMaxBE: z.int().min(3).max(8).optional(),
  macMaxCSMABackoffs: z.int().min(0).max(5).optional(),
  macMaxFrameRetries: z.int().min(0).max(15).optional(),
  includeInterframeSpace: z.boolean().optional(),
  backoffIn: z.enum(['idle', 'sleep']).optional(),
  tolerancePpm: currentQuantity.optional(),
  peerTolerancePpm: currentQuantity.optional(),
  crystal: crystalSchema.optional(),
  dutyCycleBand: dutyCycleBandSchema.optional(),
}) satisfies z.ZodType<LinkSettings>;

const exchange = {
  kind: z.literal('exchange'),
  radioPartId: idSchema.optional(),
  link: linkSettingsSchema.optional(),
  loading: z
    .strictObject({
      partId: idSchema,
      stateId: idSchema,
      clockHz: positive,
      bitsPerOctet: positive.optional(),
      overheadPerOctetS: durationS.optional(),
      overheadS: durationS.optional(),
      beside: z.boolean().optional(),
    })
    .optional(),
};
const frameOctets = { payloadOctets: octets.optional(), psduOctets: octets.optional() };
const order = z.int().min(0).max(14);

const exchangeSchema = z.discriminatedUnion('pattern', [
  z.strictObject({ ...exchange, pattern: z.literal('frame'), ...frameOctets }),
  z.strictObject({ ...exchange, pattern: z.literal('acknowledged'), ...frameOctets, ackPsduOctets: octets.optional() }),
  z.strictObject({ ...exchange, pattern: z.literal('unacknowledged'), ...frameOctets }),
  z.strictObject({
    ...exchange,
    pattern: z.literal('listen-before-talk'),
    ...frameOctets,
    ackPsduOctets: octets.optional(),
    channels: z.int().min(1).max(1_024),
    retuneS: durationS,
  }),
  z.strictObject({
    ...exchange,
    pattern: z.literal('poll'),
    dataRequestOctets: octets.optional(),
    pendingProbability: probabilityQuantity,
    responsePsduOctets: octets.optional(),
    responseDelayS: durationS.optional(),
    waitS: durationS.optional(),
  }),
  z.strictObject({
    ...exchange,
    pattern: z.literal('beacon'),
    beaconOrder: order,
    superframeOrder: order,
    beaconPsduOctets: octets,
    missedBeaconProbability: probabilityQuantity.optional(),
    contentionS: durationS.optional(),
  }),
  z.strictObject({
    ...exchange,
    pattern: z.literal('slot'),
    slotUse: z.enum(['transmit', 'receive', 'idle-listen']),
    psduOctets: octets.optional(),
    ackPsduOctets: octets.optional(),
    shared: z.boolean().optional(),
    template: z.enum(['oqpsk-10-ms', 'oqpsk-15-ms', 'sun-fsk-50-40-ms']).optional(),
  }),
  z.strictObject({
    ...exchange,
    pattern: z.literal('sampled-listener'),
    periodUnits: z.int().min(1).max(65_535),
    sampleS: durationS,
  }),
  z.strictObject({
    ...exchange,
    pattern: z.literal('sampled-sender'),
    periodUnits: z.int().min(1).max(65_535),
    psduOctets: octets,
    synchronised: z.boolean().optional(),
  }),
  z.strictObject({
    ...exchange,
    pattern: z.literal('guard'),
    intervalS: periodS,
    jitterS: durationS.optional(),
    psduOctets: octets.optional(),
  }),
  z.strictObject({
    ...exchange,
    pattern: z.literal('chirp'),
    spreadingFactor: z.int().min(7).max(12),
    bandwidthHz: positive,
    codingRate: z.int().min(1).max(4),
    preambleSymbols: z.int().min(0).max(65_535).optional(),
    payloadOctets: octets,
    implicitHeader: z.boolean().optional(),
    crc: z.boolean().optional(),
    lowDataRateOptimisation: z.boolean().optional(),
    receiveWindows: z
      .array(z.strictObject({ delayS: durationS, openS: durationS }))
      .max(4)
      .optional(),
  }),
  z.strictObject({
    ...exchange,
    pattern: z.literal('advertising'),
    advertisingPhy: z.enum(['1M', '2M', 'coded-s8', 'coded-s2']),
    dataOctets: octets,
    channels: z.int().min(1).max(3),
    scanResponse: z.boolean().optional(),
    scanRequestProbability: probabilityQuantity.optional(),
  }),
  z.strictObject({
    ...exchange,
    pattern: z.literal('receive'),
    ...frameOctets,
    ackPsduOctets: octets.optional(),
    listenS: durationS.optional(),
  }),
  z.strictObject({ ...exchange, pattern: z.literal('forward'), ...frameOctets, ackPsduOctets: octets.optional() }),
  z.strictObject({
    ...exchange,
    pattern: z.literal('overhear'),
    ...frameOctets,
    stopsAfterHeader: z.boolean().optional(),
  }),
  z.strictObject({
    ...exchange,
    pattern: z.literal('scan'),
    channels: z.int().min(1).max(1_024),
    scanDuration: order,
    retuneS: durationS,
  }),
]);

const fixedDurationSchema = z
  .strictObject({ kind: z.literal('fixed'), ...quantityFields(durationS) })
  .superRefine(checkQuantityOrder);

const serialSchema = z.strictObject({
  kind: z.literal('serial'),
  octets,
  clockHz: positive,
  bitsPerOctet: positive.optional(),
  overheadPerOctetS: durationS.optional(),
  overheadS: durationS.optional(),
});

export const durationSchema = z.discriminatedUnion('kind', [
  fixedDurationSchema,
  serialSchema,
  exchangeSchema,
]) satisfies z.ZodType<Duration>;

export const stepSchema = z.strictObject({
  id: idSchema,
  name,
  states: z.record(idSchema, idSchema),
  duration: durationSchema,
  repeats: z.int().min(1, 'Repeat at least once.').max(1_000_000).optional(),
}) satisfies z.ZodType<Step>;

export const routineSchema = z.strictObject({
  id: idSchema,
  name,
  enabled: z.boolean(),
  schedule: scheduleSchema,
  steps: z.array(stepSchema).max(LIMITS.stepsPerRoutine),
}) satisfies z.ZodType<Routine>;

export const nodeSchema = z
  .strictObject({
    parts: z.array(partSchema).max(LIMITS.parts),
    leakages: z.array(leakageSchema).max(LIMITS.leakages),
    routines: z.array(routineSchema).max(LIMITS.routines),
    link: linkSettingsSchema.optional(),
  })
  .superRefine(checkNodeReferences) satisfies z.ZodType<Node>;

const depth = finite.min(0, 'Depth runs from 0 to 1.').max(1, 'Depth runs from 0 to 1.');
const lossPerYear = finite.min(0, 'A loss lies between 0 and 1.').lt(1, 'A loss lies below 1.');

export const cellSchema = z.strictObject({
  designation: name,
  chemistry: z.string().max(LIMITS.nameLength).optional(),
  capacityC: positiveQuantity,
  rateTable: tableOf(positive, positive, 2).optional(),
  openCircuitTableV: tableOf(depth, positive, 2),
  openCircuitTemperatureVPerK: finite.optional(),
  resistanceOhm: z
    .array(z.strictObject({ pulseS: positive.optional(), ohm: currentQuantity }))
    .min(1, 'Give at least one resistance.')
    .max(LIMITS.tableRows),
  resistanceFactorByTemperature: tableOf(temperatureC, positive),
  resistanceFactorByDepth: tableOf(depth, nonNegative),
  capacityFactorByTemperature: tableOf(
    temperatureC,
    finite.gt(0, 'A factor lies above 0.').max(1, 'The capacity factor is at most 1.'),
  ).optional(),
  selfDischarge: z
    .strictObject({
      lossPerYear: quantityOf(lossPerYear),
      referenceC: temperatureC,
      q10: positive.optional(),
      activationEnergyJPerMol: nonNegative.optional(),
    })
    .refine((loss) => loss.q10 === undefined || loss.activationEnergyJPerMol === undefined, {
      message: 'Give Q10 or an activation energy, not both.',
      path: ['q10'],
    }),
  kinetic: z.strictObject({ availableFraction: finite.gt(0).max(1), rateConstantPerS: nonNegative }).optional(),
  shelfLifeS: positive.optional(),
  limits: z
    .strictObject({
      continuousA: positive.optional(),
      pulseA: positive.optional(),
      lowestC: temperatureC.optional(),
      highestC: temperatureC.optional(),
    })
    .optional(),
  ratingEndV: positive.optional(),
  massKg: positive.optional(),
  volumeM3: positive.optional(),
  price: nonNegative.optional(),
}) satisfies z.ZodType<Cell>;

const efficiency = finite.gt(0, 'Efficiency lies between 0 and 1.').max(1, 'Efficiency lies between 0 and 1.');

export const regulatorSchema = z.discriminatedUnion('kind', [
  z.strictObject({ kind: z.literal('none') }),
  z.strictObject({
    kind: z.literal('linear'),
    outputV: positive,
    quiescentA: nonNegative,
    dropoutV: nonNegative,
    minimumInputV: nonNegative.optional(),
  }),
  z.strictObject({
    kind: z.literal('switching'),
    outputV: positive,
    quiescentA: nonNegative,
    efficiency: z.union([efficiency, tableOf(nonNegative, efficiency)]),
    minimumInputV: nonNegative,
    maximumInputV: positive.optional(),
  }),
]) satisfies z.ZodType<Regulator>;

export const supplySchema = z.strictObject({
  cell: cellSchema,
  series: z.int().min(1, 'At least one cell.').max(100),
  parallel: z.int().min(1, 'At least one cell.').max(100),
  regulator: regulatorSchema,
  capacitor: z
    .strictObject({ capacitanceF: positiveQuantity, esrOhm: nonNegative, leakageA: currentQuantity })
    .optional(),
  lowBattery: z
    .strictObject({
      thresholdV: positive,
      stepV: positive.optional(),
      hysteresisV: nonNegative,
      readAt: z.enum(['rest', 'critical']),
      chargePerReadingC: nonNegative.optional(),
      readingsPerDay: nonNegative.optional(),
    })
    .optional(),
  harvest: z
    .strictObject({
      energyPerDayJ: z.array(nonNegative).length(12, 'Twelve months, January first.'),
      efficiency,
      noChargeBelowC: temperatureC.optional(),
    })
    .optional(),
  cutOffV: nonNegative.optional(),
  reserveFraction: finite.min(0, 'A share between 0 and 1.').lt(1, 'The reserve must leave some charge.').optional(),
}) satisfies z.ZodType<Supply>;

const extremeSchema = z.strictObject({ temperatureC, month, returnYears: finite.min(1).optional() });

export const climateSchema = z.strictObject({
  months: z
    .array(z.strictObject({ meanC: temperatureC, amplitudeK: nonNegative.max(100) }))
    .length(12, 'Twelve months, January first.'),
  startMonth: month,
  extremes: z.strictObject({ coldest: extremeSchema.optional(), hottest: extremeSchema.optional() }).optional(),
  storage: z.strictObject({ durationS: nonNegative, temperatureC, currentA: nonNegative }).optional(),
}) satisfies z.ZodType<Climate>;

export const targetSchema = z.strictObject({
  lifeS: positive,
  confidence: finite.gt(0, 'Between 0 and 1.').lt(1, 'Between 0 and 1.'),
  outages: z.enum(['none', 'tolerated']).optional(),
}) satisfies z.ZodType<Target>;

/** The whole scenario document. Structure and references only; whether a node can run its routines is the engine's to say. */
export const scenarioSchema = z.strictObject({
  schemaVersion: z.literal(SCHEMA_VERSION),
  name,
  node: nodeSchema,
  supply: supplySchema,
  climate: climateSchema,
  target: targetSchema,
}) satisfies z.ZodType<Scenario>;
