import { describe, expect, test } from 'vitest';
import { OutOfRangeError } from '#common/errors.ts';
import { errorOf } from '#test/support/build-node.ts';
import { serialTransferS } from './serial-transfer.ts';

describe('serialTransferS', () => {
  test('is octets times eight bits over the clock', () => {
    expect(serialTransferS({ octets: 100, clockHz: 1_000_000 })).toBe(0.0008);
  });

  test('adds overheads per octet and per transfer', () => {
    const transfer = { octets: 10, clockHz: 9_600, bitsPerOctet: 10, overheadPerOctetS: 0.001, overheadS: 0.002 };
    expect(serialTransferS(transfer)).toBeCloseTo(100 / 9_600 + 0.01 + 0.002, 12);
  });

  test.each([
    ['clockHz', 0],
    ['octets', -1],
    ['bitsPerOctet', 0],
    ['overheadPerOctetS', -1],
    ['overheadS', Infinity],
  ])('throws for %s of %s', (field, value) => {
    const error = errorOf(OutOfRangeError, () => serialTransferS({ octets: 1, clockHz: 1, [field]: value }));
    expect(error).toMatchObject({ code: 'out-of-range', field });
  });
});
