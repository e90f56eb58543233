import { describe, expect, test } from 'vitest';
import { InconsistentInputError } from '#common/errors.ts';
import { errorOf } from '#test/support/build-node.ts';
import { interframeSpaceS } from './interframe-space.ts';
import { phyPresets } from './phy.table.ts';

describe('interframeSpaceS', () => {
  test('is short up to 18 octets and long above', () => {
    expect(interframeSpaceS(phyPresets['oqpsk-2450'], 18)).toBe(192e-6);
    expect(interframeSpaceS(phyPresets['oqpsk-2450'], 19)).toBe(640e-6);
  });

  test('throws and names the long space of SUN FSK, which no source gives', () => {
    const error = errorOf(InconsistentInputError, () => interframeSpaceS(phyPresets['sun-fsk-50'], 19));
    expect(error).toMatchObject({ code: 'constant-unknown', field: 'lifsS' });
  });
});
