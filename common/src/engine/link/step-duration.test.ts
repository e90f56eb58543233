import { describe, expect, test } from 'vitest';
import { InconsistentInputError, OutOfRangeError } from '#common/errors.ts';
import { everyPattern } from '#test/support/arbitrary-exchange.ts';
import { errorOf } from '#test/support/build-node.ts';
import type { Duration, ExchangePattern, LinkSettings, Step } from '../scenario/scenario.types.ts';
import { exchangePlan } from './exchange-plan.ts';
import { stepDuration } from './step-duration.ts';

const step = (duration: Duration, repeats?: number): Step => ({
  id: 'send',
  name: 'Send',
  states: {},
  duration,
  ...(repeats === undefined ? {} : { repeats }),
});
const exchange = (pattern: ExchangePattern, link?: LinkSettings): Step =>
  step({ kind: 'exchange', ...pattern, ...(link ? { link } : {}) });
const nodeLink: LinkSettings = { phy: 'oqpsk-2450' };
const path = 'node.routines[0].steps[1]';

describe('stepDuration: typed and serial', () => {
  test('is exact for repeats of whole microseconds', () => {
    expect(stepDuration(step({ kind: 'fixed', typical: 0.1 }, 3))).toEqual({ meanS: 0.3, termsS: [0.3], remarks: [] });
  });

  test('multiplies a serial transfer by the repeats', () => {
    expect(stepDuration(step({ kind: 'serial', octets: 100, clockHz: 1e6 }, 2)).meanS).toBe(0.0016);
  });

  test.each([
    [step({ kind: 'fixed', typical: -1 }), `${path}.duration.typical`],
    [step({ kind: 'fixed', typical: NaN }), `${path}.duration.typical`],
    [step({ kind: 'fixed', typical: 1 }, 0), `${path}.repeats`],
    [step({ kind: 'serial', octets: 1, clockHz: 0 }), `${path}.duration.clockHz`],
  ])('throws at the path of the figure that is out of range (%#)', (wrong, field) => {
    const error = errorOf(OutOfRangeError, () => stepDuration(wrong, {}, path));
    expect(error).toMatchObject({ code: 'out-of-range', field });
  });
});

describe('stepDuration: exchange', () => {
  test('is the airtime of the frame, unrounded', () => {
    const { meanS, remarks } = stepDuration(exchange({ pattern: 'frame', psduOctets: 5 }, { phy: 'sun-fsk-150' }));
    expect(meanS).toBe((8 * 13) / 150_000);
    expect(remarks).toEqual([]);
  });

  test('sizes the frame from payload and format, short addresses and an FCS of 2 by default', () => {
    expect(stepDuration(exchange({ pattern: 'frame', payloadOctets: 20 }), nodeLink).meanS).toBe((6 + 31) * 32e-6);
  });

  test('takes an FCS of 4 octets on SUN FSK unless the format says otherwise', () => {
    const sun: LinkSettings = { phy: 'sun-fsk-50' };
    const octetsS = (octets: number) => (8 * octets) / 50_000;
    expect(stepDuration(exchange({ pattern: 'frame', payloadOctets: 0 }), sun).meanS).toBe(octetsS(8 + 9 + 4));
    const short: LinkSettings = { ...sun, frame: { fcsOctets: 2 } };
    expect(stepDuration(exchange({ pattern: 'frame', payloadOctets: 0 }), short).meanS).toBe(octetsS(8 + 9 + 2));
  });

  test('lets the link of the step override that of the node field by field', () => {
    const secured: LinkSettings = { ...nodeLink, frame: { securityLevel: 5, source: 'extended' } };
    const own: LinkSettings = { frame: { source: 'short' } };
    const { meanS } = stepDuration(exchange({ pattern: 'frame', payloadOctets: 20 }, own), secured);
    expect(meanS).toBe((6 + 9 + 5 + 20 + 4 + 2) * 32e-6);
  });

  test.each(everyPattern)(
    'is the mean of the plan times the repeats, cautions at their paths (%#, $pattern)',
    (pattern) => {
      const { meanS, cautions } = exchangePlan({ kind: 'exchange', ...pattern }, nodeLink);
      const duration = stepDuration({ ...exchange(pattern), repeats: 3 }, nodeLink, path);
      expect(duration.meanS).toBe(meanS * 3);
      expect(duration.remarks.map(({ code }) => code)).toEqual(cautions.map(({ code }) => code));
    },
  );

  test('cautions what neither step nor node gives at the node, what the step gives at the step', () => {
    const own: LinkSettings = { ...nodeLink, crystal: { tolerancePpm: 60 } };
    const { remarks } = stepDuration(exchange({ pattern: 'unacknowledged', psduOctets: 50 }, own), {}, path);
    expect(remarks.map(({ code, path: at }) => `${code} ${at}`)).toEqual([
      'link-assumed node.link.busyProbability',
      'link-assumed node.link.frameErrorRate',
      `crystal-beyond-phy ${path}.duration.link.crystal`,
    ]);
  });

  test('throws without a PHY at the link that would have to give it', () => {
    const frame: ExchangePattern = { pattern: 'frame', psduOctets: 5 };
    const ofNode = errorOf(InconsistentInputError, () => stepDuration(exchange(frame), {}, path));
    expect(ofNode).toMatchObject({ code: 'phy-missing', field: 'node.link.phy' });
    const ofStep = errorOf(InconsistentInputError, () => stepDuration(exchange(frame, {}), {}, path));
    expect(ofStep.field).toBe(`${path}.duration.link.phy`);
  });

  test('throws without a frame size', () => {
    const error = errorOf(InconsistentInputError, () => stepDuration(exchange({ pattern: 'frame' }), nodeLink, path));
    expect(error).toMatchObject({ code: 'frame-size-missing', field: `${path}.duration.payloadOctets` });
  });

  test('throws at the payload of a frame that is too long', () => {
    const tooLong = exchange({ pattern: 'frame', payloadOctets: 200 });
    const error = errorOf(OutOfRangeError, () => stepDuration(tooLong, nodeLink, path));
    expect(error).toMatchObject({ code: 'frame-too-long', field: `${path}.duration.payloadOctets` });
  });

  test('throws at the frame format for what its version does not know', () => {
    const link: LinkSettings = { ...nodeLink, frame: { sequenceNumber: false } };
    const run = () => stepDuration(exchange({ pattern: 'frame', payloadOctets: 1 }), link, path);
    expect(errorOf(InconsistentInputError, run).field).toBe('node.link.frame.sequenceNumber');
  });

  test('throws for MSK, whose synchronisation header no source gives', () => {
    const run = () => stepDuration(exchange({ pattern: 'frame', psduOctets: 5 }), { phy: 'msk-2450' }, path);
    expect(errorOf(InconsistentInputError, run)).toMatchObject({
      code: 'constant-unknown',
      field: 'node.link.phyConstants.shrOctets',
    });
  });

  test('takes constants of the PHY from the link where the preset has none', () => {
    const link: LinkSettings = { phy: 'msk-2450', phyConstants: { shrOctets: 5, phrOctets: 1 } };
    expect(stepDuration(exchange({ pattern: 'frame', psduOctets: 127 }), link, path).meanS).toBeCloseTo(0.004256, 12);
  });

  test('sends an acknowledged frame on SUN FSK once the acknowledgement wait is typed', () => {
    const acknowledged = exchange({ pattern: 'acknowledged', payloadOctets: 24 });
    const without = () => stepDuration(acknowledged, { phy: 'sun-fsk-50' }, path);
    expect(errorOf(InconsistentInputError, without).field).toBe('node.link.phyConstants.ackWaitS');
    const link: LinkSettings = { phy: 'sun-fsk-50', phyConstants: { ackWaitS: 0.01 } };
    expect(stepDuration(acknowledged, link, path).meanS).toBeGreaterThan(0.01);
  });
});
