import { describe, expect, test } from 'vitest';
import { linkOf } from './link-of.ts';

describe('linkOf', () => {
  test('is the link of the node where the step gives none', () => {
    expect(linkOf({ phy: 'oqpsk-2450' })).toEqual({ phy: 'oqpsk-2450' });
  });

  test('lets the step override the node field by field', () => {
    expect(linkOf({ phy: 'oqpsk-2450', macMaxFrameRetries: 3 }, { macMaxFrameRetries: 0 })).toEqual({
      phy: 'oqpsk-2450',
      macMaxFrameRetries: 0,
    });
  });

  test('merges the frame format field by field', () => {
    const { frame } = linkOf({ frame: { securityLevel: 5, source: 'extended' } }, { frame: { source: 'short' } });
    expect(frame).toEqual({ securityLevel: 5, source: 'short' });
  });

  test('keeps what the node says of frame format and crystal where a step changes one figure of them', () => {
    const node = { frame: { securityLevel: 5 }, crystal: { startUpS: 0.001 } };
    expect(linkOf(node, { frame: { keyIdMode: 1 }, crystal: { tolerancePpm: 20 } })).toEqual({
      frame: { securityLevel: 5, keyIdMode: 1 },
      crystal: { startUpS: 0.001, tolerancePpm: 20 },
    });
  });

  test('changes neither', () => {
    const node = { frame: { securityLevel: 5 } };
    linkOf(node, { frame: { securityLevel: 0 } });
    expect(node).toEqual({ frame: { securityLevel: 5 } });
  });
});
