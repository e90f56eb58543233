import { describe, expect, test } from 'vitest';
import { InconsistentInputError, OutOfRangeError } from '#common/errors.ts';
import { errorOf } from '#test/support/build-node.ts';
import { macHeader } from './mac-header.ts';
import type { MacHeaderInput } from './mac-header.ts';

const shortToShort: MacHeaderInput = {
  frameVersion: '2006',
  destination: 'short',
  source: 'short',
  panIdCompression: true,
};

describe('macHeader', () => {
  test('gives 9 octets and a payload of at most 116 for short addresses', () => {
    expect(macHeader(shortToShort)).toEqual({
      headerOctets: 9,
      securityHeaderOctets: 0,
      micOctets: 0,
      psduOctets: 11,
      largestPayloadOctets: 116,
    });
  });

  test.each([
    ['2006', 21],
    ['2015', 19],
  ] as const)('gives compressed extended addresses in version %s %i octets', (frameVersion, octets) => {
    const format: MacHeaderInput = { ...shortToShort, frameVersion, destination: 'extended', source: 'extended' };
    expect(macHeader(format).headerOctets).toBe(octets);
  });

  test.each([
    ['none', 'none', true, 5],
    ['short', 'none', false, 7],
    ['short', 'none', true, 5],
    ['none', 'short', false, 7],
    ['none', 'short', true, 5],
    ['extended', 'extended', false, 21],
    ['extended', 'short', false, 17],
    ['extended', 'short', true, 15],
  ] as const)(
    'follows Table 7-2 of 2015 for %s to %s, compression %s',
    (destination, source, panIdCompression, octets) => {
      const format: MacHeaderInput = { frameVersion: '2015', destination, source, panIdCompression };
      expect(macHeader(format).headerOctets).toBe(octets);
    },
  );

  test('adds security header and integrity code to the PSDU but not to the header', () => {
    const header = macHeader({ ...shortToShort, securityLevel: 5, keyIdMode: 1, payloadOctets: 20 });
    expect(header).toMatchObject({ headerOctets: 9, securityHeaderOctets: 6, micOctets: 4, psduOctets: 41 });
  });

  test('drops frame counter and sequence number where version 2015 suppresses them', () => {
    const format: MacHeaderInput = { ...shortToShort, frameVersion: '2015', securityLevel: 5 };
    const full = macHeader(format).psduOctets;
    expect(macHeader({ ...format, frameCounterSuppressed: true }).psduOctets).toBe(full - 4);
    expect(macHeader({ ...format, sequenceNumber: false }).psduOctets).toBe(full - 1);
  });

  test('takes the longest payload and throws one octet above, naming what fits', () => {
    expect(macHeader({ ...shortToShort, payloadOctets: 116 }).psduOctets).toBe(127);
    const error = errorOf(OutOfRangeError, () => macHeader({ ...shortToShort, payloadOctets: 117 }));
    expect(error).toMatchObject({ code: 'frame-too-long', field: 'payloadOctets', value: 117 });
    expect(error.message).toContain('at most 116 octets');
  });

  test('says so when the headers alone are too long', () => {
    const error = errorOf(OutOfRangeError, () => macHeader({ ...shortToShort, maxPsduOctets: 10 }));
    expect(error.expected).toContain('no payload fits');
  });

  test.each([
    [{ sequenceNumber: false }, 'sequenceNumber'],
    [{ informationElementOctets: 4 }, 'informationElementOctets'],
    [{ frameCounterSuppressed: true }, 'frameCounterSuppressed'],
    [{ frameVersion: '2003', securityLevel: 5 }, 'securityLevel'],
  ] as const)('throws for %o, which its frame version does not know', (wanting, field) => {
    const error = errorOf(InconsistentInputError, () => macHeader({ ...shortToShort, ...wanting }));
    expect(error).toMatchObject({ code: 'needs-frame-version', field });
  });

  test.each([
    [{ securityLevel: 8 }, 'securityLevel'],
    [{ securityLevel: 1, keyIdMode: 4 }, 'keyIdMode'],
    [{ payloadOctets: 0.5 }, 'payloadOctets'],
    [{ fcsOctets: -1 }, 'fcsOctets'],
  ] as const)('throws for %o', (wrong, field) => {
    const error = errorOf(OutOfRangeError, () => macHeader({ ...shortToShort, ...wrong }));
    expect(error).toMatchObject({ code: 'out-of-range', field });
  });
});
