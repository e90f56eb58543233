import { describe, expect, test } from 'vitest';
import { OutOfRangeError } from '#common/errors.ts';
import { errorOf } from '#test/support/build-node.ts';
import { chirpAirtimeS, isLowDataRate, networkPayloadOctets } from './chirp-airtime.ts';

const frame = {
  spreadingFactor: 7,
  bandwidthHz: 125_000,
  codingRate: 1,
  preambleSymbols: 8,
  payloadOctets: 10,
  implicitHeader: false,
  crc: true,
  lowDataRateOptimisation: false,
};

describe('chirpAirtimeS', () => {
  test('is 41.216 ms for 10 octets at SF7', () => {
    expect(chirpAirtimeS(frame)).toBe(0.041216);
  });

  test('never sends fewer than 8 payload symbols', () => {
    const shortest = { ...frame, spreadingFactor: 12, payloadOctets: 0, implicitHeader: true, crc: false };
    expect(chirpAirtimeS(shortest)).toBeCloseTo((8 + 4.25 + 8) * (4096 / 125_000), 12);
  });

  test.each([
    ['spreadingFactor', 6],
    ['spreadingFactor', 13],
    ['codingRate', 0],
    ['codingRate', 5],
    ['bandwidthHz', 0],
    ['payloadOctets', -1],
    ['preambleSymbols', 1.5],
  ])('throws for a %s of %s', (field, value) => {
    const error = errorOf(OutOfRangeError, () => chirpAirtimeS({ ...frame, [field]: value }));
    expect(error).toMatchObject({ code: 'out-of-range', field });
  });
});

describe('isLowDataRate', () => {
  test('is on from a symbol time of 16 ms', () => {
    expect([isLowDataRate(10, 125_000), isLowDataRate(11, 125_000), isLowDataRate(12, 500_000)]).toEqual([
      false,
      true,
      false,
    ]);
  });
});

describe('networkPayloadOctets', () => {
  test('adds 13 octets and the options to the payload of the application', () => {
    expect([networkPayloadOctets(24), networkPayloadOctets(24, 3)]).toEqual([37, 40]);
  });

  test('throws for more than 15 octets of options', () => {
    expect(errorOf(OutOfRangeError, () => networkPayloadOctets(0, 16)).field).toBe('optionOctets');
  });
});
