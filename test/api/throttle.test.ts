import type { QueryRunner } from 'typeorm';
import { afterAll, afterEach, describe, expect, test } from 'vitest';
import { z } from 'zod';
import { ApiClient, PASSWORD } from '#test/support/api-client.ts';
import { startApi } from '#test/support/api-server.ts';
import { buildWorkspace, emailOf } from '#test/support/api-world.ts';
import { THROTTLE_LIMITS } from '#backend/services/sign-in-throttle.ts';

// One proxy in front: it says where a request comes from.
const api = await startApi('throttle', { throttle: THROTTLE_LIMITS, trustProxyHops: 1 });
await buildWorkspace(api, 'north');
const owner = emailOf('owner', 'north');

afterAll(() => api.stop());
afterEach(() => api.sql('DELETE FROM sign_in_attempts'));

async function attempt(address: string, email = owner, password = 'not the password') {
  const client = await new ApiClient(api).open();
  return client.post('/api/v1/session', { email, password }).set('X-Forwarded-For', address);
}

async function statuses(count: number, send: (index: number) => ReturnType<typeof attempt>): Promise<number[]> {
  const all: number[] = [];
  for (let index = 0; index < count; index += 1) all.push((await send(index)).status);
  return all;
}

async function countWaiting(runner: QueryRunner): Promise<unknown> {
  const rows: unknown = await runner.query(
    'SELECT count(*)::int AS n FROM pg_locks l JOIN pg_database d ON d.oid = l.database AND d.datname = current_database() WHERE NOT granted',
  );
  return z.tuple([z.object({ n: z.int() })]).parse(rows)[0].n;
}

const repeat = (status: number, count: number): number[] => Array.from({ length: count }, () => status);

describe('POST /session', () => {
  test('the 6th wrong password for an account from one address is refused with Retry-After', async () => {
    expect(await statuses(5, () => attempt('192.0.2.1'))).toEqual(repeat(401, 5));
    const response = await attempt('192.0.2.1');
    expect([response.status, response.body.code]).toEqual([429, 'too-many-attempts']);
    expect(Number(response.headers['retry-after'])).toBeGreaterThan(0);
    expect(Number(response.headers['retry-after'])).toBeLessThanOrEqual(300);
  });

  test('while refused, the right password is not looked at either', async () => {
    await statuses(5, () => attempt('192.0.2.1'));
    expect((await attempt('192.0.2.1', owner, PASSWORD)).status).toBe(429);
  });

  test('the right password works from another address meanwhile', async () => {
    await statuses(6, () => attempt('192.0.2.1'));
    expect((await attempt('192.0.2.2', owner, PASSWORD)).status).toBe(200);
  });

  test('an unknown account is refused in the same way', async () => {
    const answers = await statuses(6, () => attempt('192.0.2.1', 'nobody@north.example'));
    expect(answers).toEqual([...repeat(401, 5), 429]);
  });

  test('the 11th wrong password from one address is refused, whatever the account', async () => {
    const answers = await statuses(11, (index) => attempt('192.0.2.1', `person${index}@north.example`));
    expect(answers).toEqual([...repeat(401, 10), 429]);
  });

  test('a right password forgives the wrong ones before it', async () => {
    await statuses(4, () => attempt('192.0.2.1'));
    expect((await attempt('192.0.2.1', owner, PASSWORD)).status).toBe(200);
    expect(await statuses(5, () => attempt('192.0.2.1'))).toEqual(repeat(401, 5));
  });

  test('attempts sent at once are counted like attempts in a row', async () => {
    // Nobody can note an attempt before all have had the chance to count those before them.
    const blocker = api.dataSource.createQueryRunner();
    await blocker.startTransaction();
    await blocker.query('LOCK TABLE sign_in_attempts IN EXCLUSIVE MODE');
    const underWay = Promise.all(Array.from({ length: 10 }, () => attempt('192.0.2.1')));
    await expect.poll(() => countWaiting(blocker), { timeout: 20_000 }).toBeGreaterThanOrEqual(9);
    await blocker.commitTransaction();
    await blocker.release();
    const answers = await underWay;
    expect(answers.map(({ status }) => status).sort()).toEqual([...repeat(401, 5), ...repeat(429, 5)]);
  });

  test('guessing from many addresses is refused, but not where the owner was signed in lately', async () => {
    expect((await attempt('198.51.100.1', owner, PASSWORD)).status).toBe(200);
    await statuses(THROTTLE_LIMITS.perAccount, (index) => attempt(`203.0.113.${index}`));
    expect((await attempt('203.0.113.200')).status).toBe(429);
    expect((await attempt('198.51.100.1', owner, PASSWORD)).status).toBe(200);
  });

  test('old failures do not count', async () => {
    await statuses(6, () => attempt('192.0.2.1'));
    await api.sql("UPDATE sign_in_attempts SET at = at - interval '301 seconds'");
    expect((await attempt('192.0.2.1', owner, PASSWORD)).status).toBe(200);
  });

  test('an address made up by the client does not count as another one', async () => {
    const answers = await statuses(6, (index) => attempt(`198.51.100.${index}, 192.0.2.9`));
    expect(answers).toEqual([...repeat(401, 5), 429]);
  });
});

test('POST /session/password counts wrong current passwords in the same way', async () => {
  const client = new ApiClient(api);
  await client.signIn(owner);
  const wrong = { currentPassword: 'not the password', newPassword: 'a much better one' };
  const answers = await statuses(6, () =>
    Promise.resolve(client.post('/api/v1/session/password', wrong).set('X-Forwarded-For', '192.0.2.1')),
  );
  expect(answers).toEqual([...repeat(400, 5), 429]);
});
