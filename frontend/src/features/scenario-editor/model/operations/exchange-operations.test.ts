import { describe, expect, test } from 'vitest';
import type { Duration, Step } from '#common/engine/scenario/scenario.types.ts';
import { editorScenario } from '#test/support/editor-scenario.ts';
import { removePart } from './part-operations.ts';
import {
  exchangeOfPattern,
  isLedByLink,
  newExchange,
  newLoading,
  withExchangeValue,
  withLink,
} from './exchange-operations.ts';
import { updateStep } from './routine-operations.ts';

const STEP: Step = { id: 'send', name: 'Send', states: {}, duration: newExchange(undefined) };

describe('newExchange', () => {
  test('chooses a PHY only where the node has none', () => {
    expect(newExchange(undefined).link).toEqual({ phy: 'oqpsk-2450' });
    expect(newExchange({ phy: 'sun-fsk-50' }).link).toBeUndefined();
  });
});

describe('exchangeOfPattern', () => {
  test('keeps radio, link and the size of the frame', () => {
    const before = { ...withExchangeValue(newExchange(undefined), 'payloadOctets', 40), radioPartId: 'radio' };
    expect(exchangeOfPattern(before, 'forward')).toEqual({
      kind: 'exchange',
      pattern: 'forward',
      payloadOctets: 40,
      radioPartId: 'radio',
      link: { phy: 'oqpsk-2450' },
    });
  });
});

describe('withExchangeValue', () => {
  test('takes the payload away when the whole frame is given, and the other way round', () => {
    const whole = withExchangeValue(newExchange(undefined), 'psduOctets', 35);
    expect(whole).toMatchObject({ psduOctets: 35 });
    expect(whole).not.toHaveProperty('payloadOctets');
    expect(withExchangeValue(whole, 'payloadOctets', 24)).not.toHaveProperty('psduOctets');
  });
});

describe('isLedByLink', () => {
  test('is so of the only radio, unless the exchange is one frame alone', () => {
    const { parts } = editorScenario().node;
    const led = (duration: Duration) => parts.filter((part) => isLedByLink({ ...STEP, duration }, part, parts));
    expect(led(newExchange(undefined)).map(({ id }) => id)).toEqual(['radio']);
    expect(led({ ...newExchange(undefined), radioPartId: 'sensor' }).map(({ id }) => id)).toEqual(['sensor']);
    expect(led(exchangeOfPattern(newExchange(undefined), 'frame'))).toEqual([]);
  });
});

describe('withLink', () => {
  test('leaves no empty link behind', () => {
    expect(withLink(newExchange(undefined), () => ({}))).not.toHaveProperty('link');
  });
});

describe('removePart', () => {
  test('takes the loading of a frame with it when the part did that', () => {
    const scenario = editorScenario();
    const loading = newLoading(scenario.node.parts);
    expect(loading).toMatchObject({ partId: 'sensor', stateId: 'measure' });
    const loaded = updateStep(scenario, 'report', 'wait', (step) => ({
      ...step,
      duration: { ...newExchange(undefined), ...(loading && { loading }) },
    }));
    const duration = removePart(loaded, 'sensor').node.routines[0]?.steps[1]?.duration;
    expect(duration).toEqual(newExchange(undefined));
  });
});
