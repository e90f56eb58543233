import { describe, expect, test } from 'vitest';
import { linkOf } from './link-of.ts';

describe('linkOf', () => {
  test('keeps what the node says of frame format and crystal where a step changes one figure of them', () => {
    const node = { frame: { securityLevel: 5 }, crystal: { startUpS: 0.001 } };
    expect(linkOf(node, { frame: { keyIdMode: 1 }, crystal: { tolerancePpm: 20 } })).toEqual({
      frame: { securityLevel: 5, keyIdMode: 1 },
      crystal: { startUpS: 0.001, tolerancePpm: 20 },
    });
  });
});
