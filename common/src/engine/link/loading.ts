import { InconsistentInputError } from '#common/errors.ts';
import type { FrameLoading } from '../scenario/scenario.types.ts';
import { frameAirtimeS, type FrameAirtimeOptions } from './frame-airtime.ts';
import type { Phy } from './phy.types.ts';
import { serialTransferS } from './serial-transfer.ts';

/** Times of loading a frame into the radio, s. */
export interface LoadingTimes {
  /** The whole transfer. */
  loadS: number;
  /** Part of it before the exchange begins. */
  beforeS: number;
  /** Part of it while the frame is on the air. */
  besideS: number;
  /** One octet over the line and on the air. */
  lineOctetS: number;
  airOctetS: number;
}

/**
 * Times of loading a frame over a serial line before it is sent, or beside sending. Beside sending, the line only needs a start
 * where its overhead and first octet take longer than the headers that the radio sends meanwhile.
 *
 * Source: definition; `serialTransferS` and `frameAirtimeS`.
 *
 * @param phy A preset or a PHY of one's own.
 * @param octets Octets loaded, whole, 0 or more: the PSDU, with a length octet where the radio wants one.
 * @param loading Clock, Hz, bits per octet, overheads, s; whether it runs beside sending.
 * @param options Headers and coding on the air.
 * @returns Times, s.
 * @throws InconsistentInputError code `loading-too-slow` beside sending when an octet takes longer over the line than on the
 *   air; what `frameAirtimeS` throws.
 * @throws OutOfRangeError what `serialTransferS` throws.
 * @example frameLoading(phyPresets['oqpsk-2450'], 127, { clockHz: 1_000_000 }).loadS // 0.001016
 */
export function frameLoading(
  phy: Phy,
  octets: number,
  loading: Omit<FrameLoading, 'partId' | 'stateId'>,
  options: FrameAirtimeOptions = {},
): LoadingTimes {
  const { beside = false, ...line } = loading;
  const loadS = serialTransferS({ ...line, octets });
  const lineOctetS = serialTransferS({ ...line, octets: 1, overheadS: 0 });
  const airOctetS = ((options.forwardErrorCorrection === true ? 2 : 1) * 8) / phy.bitRateBps;
  if (!beside) return { loadS, beforeS: loadS, besideS: 0, lineOctetS, airOctetS };
  if (lineOctetS > airOctetS * (1 + 1e-9)) throw tooSlow(lineOctetS, airOctetS);
  const leadS = Math.max(0, serialTransferS({ ...line, octets: Math.min(1, octets) }) - frameAirtimeS(phy, 0, options));
  return { loadS, beforeS: leadS, besideS: loadS - leadS, lineOctetS, airOctetS };
}

function tooSlow(lineOctetS: number, airOctetS: number): InconsistentInputError {
  const us = (timeS: number): string => `${Number((timeS * 1e6).toPrecision(4))} µs`;
  return new InconsistentInputError(
    `An octet takes ${us(lineOctetS)} over the serial line and ${us(airOctetS)} on the air: loading beside sending cannot keep up.`,
    {
      code: 'loading-too-slow',
      field: 'loading.clockHz',
      value: lineOctetS,
      unit: 's',
      expected: `at most ${us(airOctetS)} an octet over the line, or loading before sending`,
      relatedFields: ['loading.beside', 'link.phy'],
    },
  );
}
