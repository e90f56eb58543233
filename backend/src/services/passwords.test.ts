import bcrypt from 'bcryptjs';
import { describe, expect, test } from 'vitest';
import { BusyError } from '#backend/domain/errors.ts';
import { Passwords } from './passwords.ts';

const passwords = new Passwords({ cost: 4, pepper: 'pepper' });

describe('Passwords', () => {
  test('verify: accepts the password behind the hash and no other', async () => {
    const hash = await passwords.hash('orchards under snow');
    expect(await passwords.verify('orchards under snow', hash)).toBe(true);
    expect(await passwords.verify('orchards under Snow', hash)).toBe(false);
  });

  test('verify: tells passwords apart that differ after byte 72', async () => {
    const hash = await passwords.hash(`${'a'.repeat(72)}b`);
    expect(await passwords.verify(`${'a'.repeat(72)}c`, hash)).toBe(false);
  });

  test('verify: refuses every password of an unknown account', async () => {
    expect(await passwords.verify('orchards under snow', null)).toBe(false);
  });

  test('hash: depends on the pepper, and never on the password alone', async () => {
    const hash = await passwords.hash('orchards under snow');
    expect(await new Passwords({ cost: 4, pepper: 'other' }).verify('orchards under snow', hash)).toBe(false);
    expect(await bcrypt.compare('orchards under snow', hash)).toBe(false);
  });

  test('hash: has the cost asked for', async () => {
    expect(bcrypt.getRounds(await passwords.hash('orchards under snow'))).toBe(4);
  });

  test('hash: refuses when as many run and wait as may, and works again afterwards', async () => {
    const narrow = new Passwords({ cost: 4, pepper: 'pepper', maxAtOnce: 1, maxWaiting: 2 });
    const results = await Promise.allSettled(['a', 'b', 'c', 'd', 'e'].map((password) => narrow.hash(password)));
    expect(results.map(({ status }) => status)).toEqual([
      'fulfilled',
      'fulfilled',
      'fulfilled',
      'rejected',
      'rejected',
    ]);
    expect(results[4]).toMatchObject({ reason: expect.any(BusyError) });
    expect(await narrow.hash('f')).toMatch(/^\$2/);
  });
});
