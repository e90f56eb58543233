import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { InconsistentInputError, OutOfRangeError } from '#common/errors.ts';
import { errorOf } from '#test/support/build-node.ts';
import { phyPresets } from './phy.table.ts';
import { slotTemplates } from './slot-templates.table.ts';
import { slot, slotTemplateOf, type SlotInput } from './slot.ts';

const PHY = phyPresets['oqpsk-2450'];
const CLEAN = { frameErrorRate: 0, ackErrorRate: 0 };
const octetsS = (octets: number) => (octets + 6) * 32e-6;

describe('slot', () => {
  test('listens the whole window where nothing is sent to it', () => {
    const { mean, worst } = slot(PHY, { use: 'idle-listen' });
    expect(mean).toMatchObject({ transmitS: 0, listenS: 2200e-6, receiveS: 0 });
    expect(mean.idleS).toBeCloseTo(7800e-6, 12);
    expect(worst).toEqual(mean);
  });

  test('sends the frame, listens 200 µs ahead of the acknowledgement and receives it', () => {
    const { mean } = slot(PHY, { use: 'transmit', psduOctets: 50, ackPsduOctets: 19, ...CLEAN });
    expect(mean.transmitS).toBeCloseTo(octetsS(50), 12);
    expect(mean.listenS).toBeCloseTo(200e-6, 12);
    expect(mean.receiveS).toBeCloseTo(octetsS(19), 12);
  });

  test('waits 400 µs for an acknowledgement that never comes', () => {
    const { mean } = slot(PHY, {
      use: 'transmit',
      psduOctets: 50,
      ackPsduOctets: 19,
      frameErrorRate: 1,
      ackErrorRate: 0,
    });
    expect(mean).toMatchObject({ listenS: 400e-6, receiveS: 0 });
  });

  test('neither listens nor receives after a frame that nobody acknowledges', () => {
    const { mean, worst } = slot(PHY, { use: 'transmit', psduOctets: 50, ackPsduOctets: null, ...CLEAN });
    expect(mean).toMatchObject({ listenS: 0, receiveS: 0 });
    expect(worst).toEqual(mean);
  });

  test('adds the assessment where the sender assesses the channel', () => {
    const { mean } = slot(PHY, { use: 'transmit', psduOctets: 50, ackPsduOctets: null, assesses: true, ...CLEAN });
    expect(mean.listenS).toBeCloseTo(128e-6, 12);
  });

  test('receives on average in the middle of the window, at worst at its end, and acknowledges', () => {
    const { mean, worst } = slot(PHY, { use: 'receive', psduOctets: 50, ackPsduOctets: 19, frameErrorRate: 0 });
    expect(mean.listenS).toBeCloseTo(1100e-6, 12);
    expect(mean.receiveS).toBeCloseTo(octetsS(50), 12);
    expect(mean.transmitS).toBeCloseTo(octetsS(19), 12);
    expect(worst.listenS).toBeCloseTo(2200e-6, 12);
  });

  test('does not acknowledge a frame that was lost', () => {
    const { mean, worst } = slot(PHY, { use: 'receive', psduOctets: 50, ackPsduOctets: 19, frameErrorRate: 1 });
    expect(mean.transmitS).toBe(0);
    expect(worst.transmitS).toBeCloseTo(octetsS(19), 12);
  });

  test('takes the template that is asked for', () => {
    const { slotS, templateId } = slot(phyPresets['oqpsk-868'], { use: 'idle-listen', template: 'oqpsk-15-ms' });
    expect([slotS, templateId]).toEqual([0.015, 'oqpsk-15-ms']);
  });

  test('fills the slot, means within the longest, for any losses', () => {
    const chance = fc.double({ min: 0, max: 1, noNaN: true });
    const octets = fc.integer({ min: 5, max: 127 });
    const inputs: fc.Arbitrary<SlotInput> = fc.oneof(
      fc.record({
        use: fc.constant('transmit' as const),
        psduOctets: octets,
        ackPsduOctets: fc.integer({ min: 5, max: 69 }),
        frameErrorRate: chance,
        ackErrorRate: chance,
      }),
      fc.record({
        use: fc.constant('receive' as const),
        psduOctets: octets,
        ackPsduOctets: fc.constant(null),
        frameErrorRate: chance,
      }),
    );
    fc.assert(
      fc.property(inputs, (input) => {
        const { mean, worst, slotS } = slot(PHY, input);
        expect(mean.transmitS + mean.listenS + mean.receiveS + mean.idleS).toBeCloseTo(slotS, 12);
        expect(mean.listenS).toBeLessThanOrEqual(worst.listenS + 1e-12);
        expect(mean.receiveS).toBeLessThanOrEqual(worst.receiveS);
        expect(mean.transmitS).toBeLessThanOrEqual(worst.transmitS);
      }),
    );
  });

  test('throws for an acknowledgement that the template does not hold', () => {
    const error = errorOf(OutOfRangeError, () =>
      slot(PHY, { use: 'transmit', psduOctets: 50, ackPsduOctets: 70, ...CLEAN }),
    );
    expect(error).toMatchObject({ code: 'frame-too-long-for-slot', field: 'ackPsduOctets' });
  });

  test('throws for a frame of 128 octets at 50 kbit/s, and takes one of 127', () => {
    const frame = { use: 'transmit' as const, ackPsduOctets: null, ...CLEAN };
    expect(slot(phyPresets['sun-fsk-50'], { ...frame, psduOctets: 127 }).mean.transmitS).toBeCloseTo(0.0216, 12);
    const error = errorOf(OutOfRangeError, () => slot(phyPresets['sun-fsk-50'], { ...frame, psduOctets: 128 }));
    expect(error).toMatchObject({ code: 'frame-too-long-for-slot', field: 'psduOctets' });
  });

  test('throws for a PHY without a template of its own', () => {
    const error = errorOf(InconsistentInputError, () => slotTemplateOf(phyPresets['bpsk-868']));
    expect(error).toMatchObject({ code: 'no-slot-template', field: 'template' });
  });
});

describe('slotTemplates', () => {
  test.each(Object.values(slotTemplates).map((template) => [template.id, template] as const))(
    '%s centres its window on the frame and holds frame and acknowledgement',
    (_id, template) => {
      expect(template.rxOffsetS + template.rxWaitS / 2).toBeCloseTo(template.txOffsetS, 12);
      const { txOffsetS, maxTxS, txAckDelayS, maxAckS, slotS } = template;
      expect(txOffsetS + maxTxS + txAckDelayS + maxAckS).toBeLessThanOrEqual(slotS);
      expect(template.source).toContain('1120');
    },
  );
});
