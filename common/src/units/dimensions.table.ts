/** What a typed figure can be: a physical dimension, or one of the document's dimensionless kinds. */
export type Dimension =
  | 'current'
  | 'duration'
  | 'charge'
  | 'voltage'
  | 'voltage-per-kelvin'
  | 'resistance'
  | 'capacitance'
  | 'power'
  | 'energy'
  | 'molar-energy'
  | 'temperature'
  | 'temperature-difference'
  | 'share'
  | 'loss-per-year'
  | 'frequency'
  | 'bit-rate'
  | 'rate-per-second'
  | 'rate-per-day'
  | 'mass'
  | 'volume'
  | 'level'
  | 'tolerance'
  | 'octets'
  | 'number';

/** A unit and its spellings. Value in the document = typed number × `scale` + `offset`, both exact decimals. */
export interface UnitRow {
  /** The first is the one shown. */
  symbols: readonly string[];
  scale: string;
  offset?: string;
  /** Prefixes that may stand before it; none when absent. */
  prefixes?: string;
}

export interface DimensionRow {
  /** With its article, for messages. */
  name: string;
  /** A typed figure that this dimension accepts. */
  example: string;
  /** The first is the default of a field. */
  units: readonly UnitRow[];
}

/** Powers of ten of the SI prefixes that people type. `u` and both code points of the micro sign are read alike. */
export const PREFIX_EXPONENTS: Readonly<Record<string, number>> = {
  f: -15,
  p: -12,
  n: -9,
  µ: -6,
  m: -3,
  k: 3,
  M: 6,
  G: 9,
};

const SMALL = 'fpnµm';
const ALL = 'fpnµmkMG';

/**
 * Units by dimension. Scales to the document's unit: A, s, C, V, V/K, Ω, F, W, J, J/mol, °C, K, share of 1, share of 1 a year,
 * Hz, bit/s, 1/s, 1/day, kg, m³, dBm, ppm, octets. Source: the SI brochure (9th edition, BIPM 2019) for prefixes and for
 * minute, hour and day; a year is 365.25 days and a month its twelfth, by our own convention.
 */
export const DIMENSIONS: Readonly<Record<Dimension, DimensionRow>> = {
  current: { name: 'a current', example: '1.7 µA', units: [{ symbols: ['A'], scale: '1', prefixes: ALL }] },
  duration: {
    name: 'a time',
    example: '14 ms or 15 min',
    units: [
      { symbols: ['s', 'sec', 'second', 'seconds'], scale: '1', prefixes: 'pnµm' },
      { symbols: ['min', 'minute', 'minutes'], scale: '60' },
      { symbols: ['h', 'hr', 'hour', 'hours'], scale: '3600' },
      { symbols: ['d', 'day', 'days'], scale: '86400' },
      { symbols: ['week', 'weeks', 'wk'], scale: '604800' },
      { symbols: ['month', 'months'], scale: '2629800' },
      { symbols: ['y', 'yr', 'a', 'year', 'years'], scale: '31557600' },
    ],
  },
  charge: {
    name: 'a charge',
    example: '225 mAh',
    units: [
      { symbols: ['C', 'As'], scale: '1', prefixes: ALL },
      { symbols: ['Ah'], scale: '3600', prefixes: ALL },
    ],
  },
  voltage: { name: 'a voltage', example: '3.0 V', units: [{ symbols: ['V'], scale: '1', prefixes: ALL }] },
  'voltage-per-kelvin': {
    name: 'a voltage per kelvin',
    example: '−0.5 mV/K',
    units: [{ symbols: ['V/K', 'V/°C'], scale: '1', prefixes: ALL }],
  },
  resistance: {
    name: 'a resistance',
    example: '18 Ω',
    units: [{ symbols: ['Ω', 'ohm', 'ohms'], scale: '1', prefixes: ALL }],
  },
  capacitance: {
    name: 'a capacitance',
    example: '470 µF',
    units: [{ symbols: ['F'], scale: '1', prefixes: ALL }],
  },
  power: { name: 'a power', example: '12 mW', units: [{ symbols: ['W'], scale: '1', prefixes: ALL }] },
  energy: {
    name: 'an energy',
    example: '2.5 J',
    units: [
      { symbols: ['J', 'Ws'], scale: '1', prefixes: ALL },
      { symbols: ['Wh'], scale: '3600', prefixes: ALL },
    ],
  },
  'molar-energy': {
    name: 'an energy per mole',
    example: '50 kJ/mol',
    units: [{ symbols: ['J/mol'], scale: '1', prefixes: ALL }],
  },
  temperature: {
    name: 'a temperature',
    example: '−18 °C',
    units: [
      { symbols: ['°C', 'degC', '°', 'C'], scale: '1' },
      { symbols: ['K'], scale: '1', offset: '-273.15' },
    ],
  },
  'temperature-difference': {
    name: 'a temperature difference',
    example: '6 K',
    units: [{ symbols: ['K', '°C', 'degC', '°', 'C'], scale: '1' }],
  },
  share: {
    name: 'a share',
    example: '3 %',
    units: [
      { symbols: ['%'], scale: '0.01' },
      { symbols: ['‰'], scale: '0.001' },
      { symbols: ['ppm'], scale: '0.000001' },
    ],
  },
  'loss-per-year': {
    name: 'a loss per year',
    example: '2.5 %/year',
    units: [{ symbols: ['%/year', '%/y', '%/yr', '%/a', '%'], scale: '0.01' }],
  },
  frequency: { name: 'a frequency', example: '1 MHz', units: [{ symbols: ['Hz'], scale: '1', prefixes: ALL }] },
  'bit-rate': {
    name: 'a bit rate',
    example: '250 kbit/s',
    units: [{ symbols: ['bit/s', 'bps', 'b/s'], scale: '1', prefixes: 'kMG' }],
  },
  'rate-per-second': {
    name: 'a rate per second',
    example: '0.0003 /s',
    units: [{ symbols: ['/s', '1/s'], scale: '1', prefixes: '' }],
  },
  'rate-per-day': {
    name: 'a number a day',
    example: '140 /d',
    units: [
      { symbols: ['/d', '/day', 'a day', 'per day', '1/d'], scale: '1' },
      { symbols: ['/h', '/hour', 'an hour', 'per hour', '1/h'], scale: '24' },
    ],
  },
  mass: { name: 'a mass', example: '23.5 g', units: [{ symbols: ['g'], scale: '0.001', prefixes: 'nµmk' }] },
  volume: {
    name: 'a volume',
    example: '8.3 cm³',
    units: [
      { symbols: ['cm³', 'cm3', 'ml', 'mL'], scale: '0.000001' },
      { symbols: ['mm³', 'mm3'], scale: '0.000000001' },
      { symbols: ['l', 'L', 'dm³', 'dm3'], scale: '0.001' },
      { symbols: ['m³', 'm3'], scale: '1' },
    ],
  },
  level: { name: 'a radio level', example: '−97 dBm', units: [{ symbols: ['dBm'], scale: '1' }] },
  tolerance: { name: 'a tolerance', example: '20 ppm', units: [{ symbols: ['ppm'], scale: '1' }] },
  octets: {
    name: 'a number of octets',
    example: '24 octets',
    units: [{ symbols: ['octets', 'octet', 'bytes', 'byte', 'B'], scale: '1' }],
  },
  number: { name: 'a number', example: '1.5', units: [{ symbols: [''], scale: '1', prefixes: SMALL + 'kMG' }] },
};
