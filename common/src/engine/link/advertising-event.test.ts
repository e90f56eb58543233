import { describe, expect, test } from 'vitest';
import { OutOfRangeError } from '#common/errors.ts';
import { errorOf } from '#test/support/build-node.ts';
import { advertisingEvent, advertisingPacketS } from './advertising-event.ts';

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
