import { describe, expect, test } from 'vitest';
import type { ExchangeDuration, LinkSettings } from '#common/engine/scenario/scenario.types.ts';
import { durationSchema, linkSettingsSchema } from '#common/schemas/scenario.schema.ts';
import { exchangeOfPattern, newExchange, withExchangeValue } from '../operations/exchange-operations.ts';
import { EXCHANGES, type PatternId } from './exchange-fields.table.ts';
import { describedText, type FieldDescriptor } from './field-descriptor.ts';
import { LINK_SECTIONS, NEW_PULLING, PULLING_FIELDS } from './link-fields.table.ts';
import { valueAt, withValueAt } from './link-values.ts';
import { CUSTOM_PHY_FIELDS, PHY_CHOICES, phyOfChoice } from './phy-choice.ts';
import { planOf } from './plan-of.ts';

const isPattern = (id: string): id is PatternId => id in EXCHANGES;
const PATTERNS = Object.keys(EXCHANGES).filter(isPattern);
const LINK: LinkSettings = { phy: 'oqpsk-2450' };

/** Values that a field takes: the ends of its range, or every choice. */
function samples(descriptor: FieldDescriptor): unknown[] {
  if (descriptor.type === 'choice') return descriptor.choices.map(({ value }) => value);
  const { min, max, above, whole } = descriptor.options;
  const low = min ?? (above === undefined ? 0 : above + (whole === true ? 1 : 0.001));
  const values = [low, max ?? low + 1];
  return descriptor.type === 'figure' ? values : values.map((typical) => ({ typical }));
}

describe('EXCHANGES', () => {
  test.each(PATTERNS)('begins a %s with figures that a document may hold and a plan can be made of', (pattern) => {
    const exchange = exchangeOfPattern(newExchange(LINK), pattern);
    expect(durationSchema.parse(exchange)).toEqual(exchange);
    expect(planOf(exchange, LINK)).toMatchObject({ kind: 'plan' });
  });

  test.each(PATTERNS)(
    'holds fields of a %s that a document takes at the ends of their ranges, and empty',
    (pattern) => {
      const exchange: ExchangeDuration = { kind: 'exchange', ...EXCHANGES[pattern].start };
      for (const descriptor of EXCHANGES[pattern].fields) {
        for (const value of samples(descriptor)) {
          const changed = withExchangeValue(exchange, descriptor.key, value);
          expect(durationSchema.safeParse(changed).error?.issues ?? []).toEqual([]);
          expect(describedText(descriptor, valueAt(changed, descriptor.key))).not.toBeNull();
        }
        const canBeEmpty = descriptor.type === 'choice' ? descriptor.absent !== undefined : descriptor.isOptional;
        const without = withExchangeValue(exchange, descriptor.key, undefined);
        if (canBeEmpty) expect(durationSchema.safeParse(without).success).toBe(true);
      }
    },
  );
});

describe('LINK_SECTIONS', () => {
  const fields = LINK_SECTIONS.flatMap((section) => section.fields);

  test('hold fields that a document takes at the ends of their ranges', () => {
    for (const descriptor of fields) {
      for (const value of samples(descriptor)) {
        const link = withValueAt<LinkSettings>(LINK, descriptor.key, value);
        expect(linkSettingsSchema.safeParse(link).error?.issues ?? []).toEqual([]);
      }
    }
  });

  test('tell what is assumed where nothing is set, and what is set where it is', () => {
    const wordsOf = (link: LinkSettings): string =>
      LINK_SECTIONS.flatMap(({ summary }) => summary(link).filter((words) => words !== undefined)).join(' ');
    expect(wordsOf(LINK)).toContain('busy 10\u00a0% assumed');
    expect(wordsOf({ ...LINK, busyProbability: { typical: 0.5 } })).toContain('busy 50 %');
  });

  test('begin the load on a crystal with all its figures', () => {
    expect(PULLING_FIELDS.every(({ key }) => valueAt({ crystal: { pulling: NEW_PULLING } }, key) !== undefined)).toBe(
      true,
    );
  });
});

describe('phyOfChoice', () => {
  test('begins a PHY of one’s own with the figures of the preset before it', () => {
    const phy = phyOfChoice('custom', 'sun-fsk-50');
    expect(phy).toMatchObject({ bitRateBps: 50_000, shrOctets: 6, phrOctets: 2 });
    expect(CUSTOM_PHY_FIELDS.every(({ key }) => valueAt({ phy }, key) !== undefined)).toBe(true);
  });

  test('gives every preset as it is named', () => {
    const presets = PHY_CHOICES.filter(({ value }) => value !== 'custom');
    expect(presets.map(({ value }) => phyOfChoice(value, undefined))).toEqual(presets.map(({ value }) => value));
  });
});
