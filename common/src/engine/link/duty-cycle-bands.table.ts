import type { DutyCycleBandId } from '../scenario/scenario.types.ts';

/** A sub-band with a limit on the share of time on air. */
export interface DutyCycleBand {
  id: DutyCycleBandId;
  /** In words, with its letter in the regulation. */
  name: string;
  fromHz: number;
  toHz: number;
  /** Greatest share of time on air, 0 to 1. */
  dutyCycle: number;
  /** Time over which the share is observed, s. */
  observationS: number;
  regulation: string;
  source: string;
}

const REGULATION = 'ETSI EN 300 220-2 V3.2.1';
const QUOTED = `${REGULATION}, as quoted in LoRaMac-node pull request 750`;
const CODED = `${REGULATION}, as coded in ns-3 module signetlabdei/lorawan helper/lorawan-mac-helper.cc @82ea58a`;
const SECONDARY = `${REGULATION} after a secondary page; from memory`;

/**
 * Conflict: older text treats 863 to 870 MHz as one band of 0.1 % with 1 % inside 865 to 868 MHz; EN 300 220-2 V3.2.1 has the
 * separate bands below, which are taken. A module's manual still lists 866 to 867 MHz at 0.1 %. Listen before talk with
 * channel agility replaces the limit in places. Observation over one hour: common practice, no source of the clause.
 */
export const DUTY_CYCLE_CONFLICT =
  'older text treats 863 to 870 MHz as one band of 0.1 %; the separate bands of the present edition are taken. Listen before talk may replace the limit';

type Row = [id: DutyCycleBandId, letter: string, megahertz: [number, number], dutyCycle: number, source: string];

const ROWS: Row[] = [
  ['eu-863-865', 'K', [863, 865], 0.001, QUOTED],
  ['eu-865-868', 'L', [865, 868], 0.01, SECONDARY],
  ['eu-868.0-868.6', 'M', [868, 868.6], 0.01, CODED],
  ['eu-868.7-869.2', 'N', [868.7, 869.2], 0.001, `${QUOTED}; ${CODED}`],
  ['eu-869.4-869.65', 'P', [869.4, 869.65], 0.1, `${CODED}; 500 mW`],
  ['eu-869.7-870.0', 'Q', [869.7, 870], 0.01, SECONDARY],
];

/** The bands in the order of their frequencies. */
export const dutyCycleBands: readonly DutyCycleBand[] = ROWS.map(([id, letter, [from, to], dutyCycle, source]) => ({
  id,
  name: `${from} to ${to} MHz (band ${letter})`,
  fromHz: from * 1e6,
  toHz: to * 1e6,
  dutyCycle,
  observationS: 3600,
  regulation: REGULATION,
  source: `${source}. Conflict: ${DUTY_CYCLE_CONFLICT}`,
}));
