import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { InconsistentInputError } from '#common/errors.ts';
import { errorOf } from '#test/support/build-node.ts';
import type { FrameFormat, LinkSettings } from '../scenario/scenario.types.ts';
import { frameLayout } from './frame-layout.ts';
import type { FrameSize } from './frame-layout.ts';
import { macHeader } from './mac-header.ts';
import { phyPresets } from './phy.table.ts';

const oqpsk = phyPresets['oqpsk-2450'];
const sumOf = (values: readonly number[]): number => values.reduce((sum, value) => sum + value, 0);
const told = (size: FrameSize, link: LinkSettings = {}) =>
  frameLayout(oqpsk, size, link).fields.map(({ id, octets }) => `${id} ${octets}`);

describe('frameLayout', () => {
  test('tells a frame with short addresses octet by octet', () => {
    expect(told({ payloadOctets: 24 })).toEqual([
      'preamble 4',
      'sfd 1',
      'phr 1',
      'frame-control 2',
      'sequence-number 1',
      'destination-pan 2',
      'destination 2',
      'source 2',
      'payload 24',
      'fcs 2',
    ]);
  });

  test('gives fields whose times add up to that of the frame', () => {
    const { fields, airtimeS } = frameLayout(oqpsk, { payloadOctets: 24 }, {});
    expect(sumOf(fields.map((field) => field.airtimeS))).toBeCloseTo(airtimeS, 12);
  });

  test('gives coded octets twice the time, but not the synchronisation header', () => {
    const link = { forwardErrorCorrection: true };
    const { fields, airtimeS } = frameLayout(phyPresets['sun-fsk-50'], { payloadOctets: 24 }, link);
    expect(fields.find(({ id }) => id === 'preamble')?.airtimeS).toBeCloseTo(4 * 160e-6, 12);
    expect(fields.find(({ id }) => id === 'payload')?.airtimeS).toBeCloseTo(2 * 24 * 160e-6, 12);
    expect(sumOf(fields.map((field) => field.airtimeS))).toBeCloseTo(airtimeS, 12);
  });

  test('puts security header and information elements before the payload, the integrity code after it', () => {
    const frame: FrameFormat = { frameVersion: '2015', securityLevel: 5, keyIdMode: 1, informationElementOctets: 4 };
    expect(told({ payloadOctets: 10 }, { frame }).slice(-6)).toEqual([
      'source 2',
      'security-header 6',
      'information-elements 4',
      'payload 10',
      'mic 4',
      'fcs 2',
    ]);
  });

  test('puts a command identifier before the payload', () => {
    const { fields, psduOctets } = frameLayout(oqpsk, { payloadOctets: 0, commandOctets: 1 }, {});
    expect(fields.map(({ id }) => id)).toContain('command');
    expect(psduOctets).toBe(12);
  });

  test('leaves a PSDU that was typed one field, without a largest payload', () => {
    const layout = frameLayout(oqpsk, { psduOctets: 40, payloadOctets: 3 }, {});
    expect(layout.fields.map(({ id }) => id)).toEqual(['preamble', 'sfd', 'phr', 'psdu']);
    expect(layout).toMatchObject({ psduOctets: 40, airOctets: 46, largestPayloadOctets: null });
  });

  test('lengthens the preamble where the link says so', () => {
    expect(frameLayout(phyPresets['sun-fsk-50'], { psduOctets: 20 }, { preambleOctets: 8 }).airOctets).toBe(
      8 + 2 + 2 + 20,
    );
  });

  test('has one field for the synchronisation header of a PHY of ones own', () => {
    const phy = { ...oqpsk, id: 'custom' as const, shrOctets: 3 };
    expect(frameLayout(phy, { psduOctets: 20 }, {}).fields.map(({ octets }) => octets)).toEqual([3, 1, 20]);
  });

  test('adds up to PSDU and airtime for every frame format', () => {
    const mode = fc.constantFrom('none', 'short', 'extended');
    const format = fc.record({
      frameVersion: fc.constantFrom('2003', '2006', '2015'),
      destination: mode,
      source: mode,
      panIdCompression: fc.boolean(),
    });
    fc.assert(
      fc.property(format, fc.nat({ max: 90 }), (frame, payloadOctets) => {
        const { fields, psduOctets, airOctets, airtimeS, largestPayloadOctets } = frameLayout(
          oqpsk,
          { payloadOctets },
          { frame },
        );
        const sum = sumOf(fields.map(({ octets }) => octets));
        expect(sum).toBe(airOctets);
        expect(psduOctets).toBe(macHeader({ ...frame, payloadOctets }).psduOctets);
        expect(airtimeS).toBeCloseTo(sum * 32e-6, 12);
        expect((largestPayloadOctets ?? 0) - payloadOctets).toBe(127 - psduOctets);
      }),
    );
  });

  test('names formula and source of each field', () => {
    for (const { formula, source } of frameLayout(oqpsk, { payloadOctets: 24 }, {}).fields) {
      expect(formula).not.toBe('');
      expect(source).not.toBe('');
    }
  });

  test('throws without a size', () => {
    expect(errorOf(InconsistentInputError, () => frameLayout(oqpsk, {}, {})).code).toBe('frame-size-missing');
  });
});
