import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { OutOfRangeError } from '#common/errors.ts';
import { errorOf } from '#test/support/build-node.ts';
import { meanOf, seededRandom } from '#test/support/seeded-random.ts';
import { advertisingEvent, advertisingPacketS, advertisingPeriodS, scannableEvent } from './advertising-event.ts';

describe('advertisingEvent', () => {
  test('sends the same packet on each channel', () => {
    expect(advertisingEvent({ phy: '1M', dataOctets: 31, channels: 3 })).toEqual({
      packetS: 376e-6,
      transmitS: 1128e-6,
    });
  });

  test.each([
    ['dataOctets', 250],
    ['dataOctets', -1],
    ['channels', 0],
    ['channels', 4],
  ])('throws for %s of %i', (field, value) => {
    const error = errorOf(OutOfRangeError, () =>
      advertisingEvent({ phy: '1M', dataOctets: 0, channels: 3, [field]: value }),
    );
    expect(error).toMatchObject({ code: 'out-of-range', field });
  });
});

describe('advertisingPacketS', () => {
  test('takes 64 µs an octet at eight symbols a bit, 16 µs at two', () => {
    const perOctetS = (phy: 'coded-s8' | 'coded-s2') => advertisingPacketS(phy, 11) - advertisingPacketS(phy, 10);
    expect(perOctetS('coded-s8')).toBeCloseTo(64e-6, 12);
    expect(perOctetS('coded-s2')).toBeCloseTo(16e-6, 12);
  });
});

describe('scannableEvent', () => {
  const EVENT = { phy: '1M', dataOctets: 31, channels: 3, responseDataOctets: 31 } as const;

  test('listens 42 µs after a space on each channel where nobody asks', () => {
    const event = scannableEvent({ ...EVENT, scanRequestProbability: 0 });
    expect(event.listenS).toBeCloseTo(126e-6, 12);
    expect(event.spaceS).toBeCloseTo(450e-6, 12);
    expect(event).toMatchObject({ transmitS: 1128e-6, receiveS: 0 });
  });

  test('receives a request of 176 µs and answers with 376 µs on each channel where somebody always asks', () => {
    const event = scannableEvent({ ...EVENT, scanRequestProbability: 1 });
    expect(event).toMatchObject({ listenS: 0, requestS: 176e-6, responseS: 376e-6 });
    expect(event.transmitS).toBeCloseTo(2 * 1128e-6, 12);
    expect(event.receiveS).toBeCloseTo(528e-6, 12);
    expect(event.meanS).toBeCloseTo(event.worst.durationS, 12);
  });

  test('agrees with events played one by one', () => {
    const random = seededRandom(5);
    const channelS = () => (random() < 0.1 ? 376e-6 + 150e-6 + 176e-6 + 150e-6 + 376e-6 : 376e-6 + 150e-6 + 42e-6);
    const played = Array.from({ length: 20_000 }, () => channelS() + channelS() + channelS());
    const { mean, standardError } = meanOf(played);
    const { meanS } = scannableEvent({ ...EVENT, scanRequestProbability: 0.1 });
    expect(Math.abs(meanS - mean)).toBeLessThan(3 * standardError);
  });

  test('has a mean within the longest, growing with the share of channels with a request', () => {
    const share = fc.double({ min: 0, max: 1, noNaN: true });
    fc.assert(
      fc.property(share, share, (a, b) => {
        const at = (scanRequestProbability: number) => scannableEvent({ ...EVENT, scanRequestProbability });
        expect(at(Math.min(a, b)).meanS).toBeLessThanOrEqual(at(Math.max(a, b)).meanS + 1e-12);
        expect(at(a).meanS).toBeLessThanOrEqual(at(a).worst.durationS + 1e-12);
      }),
    );
  });

  test.each(['scanRequestProbability', 'responseDataOctets'])('throws for a negative %s', (field) => {
    const input = { ...EVENT, scanRequestProbability: 0, [field]: -1 };
    expect(errorOf(OutOfRangeError, () => scannableEvent(input)).field).toBe(field);
  });
});

describe('advertisingPeriodS', () => {
  test('adds 0 to 10 ms to the interval, 5 ms in the mean', () => {
    const { shortestS, meanS, longestS } = advertisingPeriodS(0.1);
    expect([shortestS, meanS, longestS]).toEqual([0.1, 0.1 + 0.005, 0.1 + 0.01]);
  });
});
