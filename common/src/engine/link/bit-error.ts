import { InconsistentInputError } from '#common/errors.ts';
import { requireNumber } from './checks.ts';
import { phyConstant } from './phy-constant.ts';
import { phyPresets } from './phy.table.ts';
import type { Phy } from './phy.types.ts';

/** PSDU with which a receiver's sensitivity is stated, octets, and the loss at it. */
const SENSITIVITY_PSDU_OCTETS = 20;
const SENSITIVITY_LOSS = 0.01;
/** Binomial coefficients of 16 over k, k from 0. */
const SIXTEEN_OVER = [1, 16, 120, 560, 1820, 4368, 8008, 11_440, 12_870, 11_440, 8008, 4368, 1820, 560, 120, 16, 1];
/** Halvings of the searched interval; the last ones are below the distance of two numbers. */
const HALVINGS = 60;
/** Share of a step by which a level may lie below it and still count as on it: rounding of decimal steps. */
const STEP_ROUNDING = 1e-9;

/**
 * Bit error rate of the 2450 MHz O-QPSK PHY in white noise: `8/15 · 1/16 · Σ_{k=2..16} (−1)^k · C(16, k) · e^{20·SINR·(1/k − 1)}`.
 *
 * Source: IEEE 802.15.4-2006 Annex E, E.4.1.7, as coded in ns-3 src/lr-wpan/model/lr-wpan-error-model.cc.
 *
 * @param sinr Ratio of signal power to noise and interference power, not in dB; 0 or more.
 * @returns Bit error rate, 0 to 0.5.
 * @throws OutOfRangeError code `out-of-range` for a ratio below 0.
 * @example bitErrorRate(0) // 0.5
 */
export function bitErrorRate(sinr: number): number {
  requireNumber(sinr, { field: 'sinr', min: 0 });
  let sum = 0;
  for (let k = 16; k >= 2; k -= 1) {
    sum += (k % 2 === 0 ? 1 : -1) * (SIXTEEN_OVER[k] ?? 0) * Math.exp(20 * sinr * (1 / k - 1));
  }
  return Math.min(0.5, Math.max(0, (8 / 15) * (1 / 16) * sum));
}

export interface FrameLossInput {
  /** PSDU of the frame, FCS counted; whole, 0 or more. */
  psduOctets: number;
  receivedLevelDbm: number;
  /** Steps in which the receiver tells its level, dB, above 0; the level counts rounded down to them. */
  receivedLevelStepDb?: number;
  /** Noise and interference in the receiver's bandwidth, dBm. */
  noiseDbm?: number;
  /** Level at which 1 % of frames with a PSDU of 20 octets are lost, dBm; stands for the noise where that is absent. */
  sensitivityDbm?: number;
}

export interface FrameLoss {
  frameErrorRate: number;
  bitErrorRate: number;
  /** Level that counts, rounded down to the receiver's steps, dBm. */
  levelDbm: number;
  /** Noise given or derived from the sensitivity, dBm. */
  noiseDbm: number;
  sinrDb: number;
}

/**
 * Frame loss from received level and noise: `1 − (1 − BER)^bits` over all bits on the air, SHR and PHR counted with the PSDU.
 * Where only the sensitivity is known, the noise is the one at which it loses 1 % of frames with a PSDU of 20 octets
 * (26 octets on the air).
 *
 * Source: bit errors as `bitErrorRate`; sensitivity as defined in IEEE 802.15.4-2006 6.1.7 (PSDU of 20 octets, loss below 1 %).
 * Valid for: 2450 MHz O-QPSK, white noise, no fading; a bit error anywhere loses the frame.
 *
 * @param phy The 2450 MHz O-QPSK preset.
 * @param input Frame, received level, its steps, noise or sensitivity.
 * @returns Frame loss and what it follows from.
 * @throws InconsistentInputError code `no-bit-error-formula` for another PHY; code `noise-missing` without noise and sensitivity.
 * @throws OutOfRangeError code `out-of-range` for a figure outside its range.
 * @example frameLoss(phy, { psduOctets: 20, receivedLevelDbm: -95, sensitivityDbm: -95 }).frameErrorRate // 0.01
 */
export function frameLoss(phy: Phy, input: FrameLossInput): FrameLoss {
  requireFormula(phy);
  const { psduOctets, receivedLevelDbm, receivedLevelStepDb } = input;
  const max = phyConstant(phy, 'maxPsduOctets');
  requireNumber(psduOctets, { field: 'psduOctets', min: 0, max, whole: true, unit: 'octets' });
  const noiseDbm = noiseOf(input);
  const levelDbm = steppedLevelDbm(receivedLevelDbm, receivedLevelStepDb);
  const sinrDb = levelDbm - noiseDbm;
  const rate = bitErrorRate(10 ** (sinrDb / 10));
  return { frameErrorRate: lossOf(rate, airBits(phy, psduOctets)), bitErrorRate: rate, levelDbm, noiseDbm, sinrDb };
}

/**
 * A received level as the receiver tells it: rounded down to its steps.
 *
 * Source: common practice, no source; down is the cautious side.
 *
 * @param levelDbm Level, dBm.
 * @param stepDb Step, dB, above 0; absent: not rounded.
 * @returns Level, dBm.
 * @throws OutOfRangeError code `out-of-range` for a level that is not finite or a step that is not above 0.
 * @example steppedLevelDbm(-85, 3) // -87
 */
export function steppedLevelDbm(levelDbm: number, stepDb?: number): number {
  requireNumber(levelDbm, { field: 'receivedLevelDbm', min: -Number.MAX_VALUE, unit: 'dBm' });
  if (stepDb === undefined) return levelDbm;
  requireNumber(stepDb, { field: 'receivedLevelStepDb', min: Number.MIN_VALUE, unit: 'dB' });
  return Math.floor(levelDbm / stepDb + STEP_ROUNDING) * stepDb;
}

function noiseOf({ noiseDbm, sensitivityDbm }: FrameLossInput): number {
  const level = { min: -Number.MAX_VALUE, unit: 'dBm' };
  if (noiseDbm !== undefined) return requireNumber(noiseDbm, { field: 'noiseDbm', ...level });
  if (sensitivityDbm !== undefined) {
    return requireNumber(sensitivityDbm, { field: 'sensitivityDbm', ...level }) - SENSITIVITY_SINR_DB;
  }
  throw new InconsistentInputError('A received level gives a loss only together with noise or sensitivity; give one.', {
    code: 'noise-missing',
    field: 'noiseDbm',
    unit: 'dBm',
    expected: 'noiseDbm or sensitivityDbm',
    relatedFields: ['sensitivityDbm'],
  });
}

function requireFormula(phy: Phy): void {
  if (phy.id === 'oqpsk-2450') return;
  throw new InconsistentInputError(`No bit-error formula is here for the PHY "${phy.id}"; give the loss itself.`, {
    code: 'no-bit-error-formula',
    field: 'phy',
    value: phy.id,
    expected: 'oqpsk-2450',
    relatedFields: ['frameErrorRate'],
  });
}

function airBits(phy: Phy, psduOctets: number): number {
  return 8 * ((phy.shrOctets ?? 0) + (phy.phrOctets ?? 0) + psduOctets);
}

/** `1 − (1 − rate)^bits`, exact where the rate is far below the distance of two numbers next to 1. */
function lossOf(rate: number, bits: number): number {
  return -Math.expm1(bits * Math.log1p(-rate));
}

/** Found by halving, as the loss falls with the ratio. */
function sensitivitySinrDb(): number {
  const bits = airBits(phyPresets['oqpsk-2450'], SENSITIVITY_PSDU_OCTETS);
  let [lowDb, highDb] = [-40, 40];
  for (let halving = 0; halving < HALVINGS; halving += 1) {
    const middleDb = (lowDb + highDb) / 2;
    if (lossOf(bitErrorRate(10 ** (middleDb / 10)), bits) > SENSITIVITY_LOSS) lowDb = middleDb;
    else highDb = middleDb;
  }
  return highDb;
}

/**
 * Ratio of signal to noise at the sensitivity, dB: where 1 % of frames with a PSDU of 20 octets are lost, SHR and PHR counted.
 * Worked out once, because every frame needs the same one.
 */
export const SENSITIVITY_SINR_DB = sensitivitySinrDb();
