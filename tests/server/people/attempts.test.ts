import { describe, expect, test } from 'vitest';
import { Attempt } from '#db/models/attempt.ts';
import { accountKey, claimAttempt, forgiveAttempts } from '#server/services/people/attempts.ts';
import type { AttemptClaim } from '#server/services/people/attempts.ts';
import { ProblemError } from '#server/services/problem-error.ts';
import { usePeople } from '#tests/support/people.ts';

const people = usePeople();
let networks = 0;

function claim(more: Partial<AttemptClaim> = {}): AttemptClaim {
  networks += 1;
  return { kind: 'password', account: accountKey('somebody@bench.example'), network: `10.1.${networks >> 8}.${networks & 255}/32`, ...more };
}

/** Seconds to wait; 0 where the attempt was let through. */
async function waitFor(attempt: AttemptClaim): Promise<number> {
  try {
    await claimAttempt(attempt, people.knex);
    return 0;
  } catch (error) {
    if (!(error instanceof ProblemError) || error.kind !== 'too-many-requests') throw error;
    return error.retryAfter ?? Number.NaN;
  }
}

/** Lets time pass: everything on record happened that much earlier. */
async function pass(seconds: number): Promise<void> {
  await Attempt.query(people.knex).patch({ at: people.knex.raw('at - make_interval(secs => ?)', [seconds]) });
}

/** How many are let through in an hour by somebody who comes again the moment they may. */
async function letThroughInAnHour(attempt: () => AttemptClaim): Promise<number> {
  let through = 0;
  let passed = 0;
  while (passed < 3_600) {
    const wait = await waitFor(attempt());
    if (wait === 0) through += 1;
    else await pass(wait);
    passed += wait;
  }
  return through;
}

describe('attempts on one account', () => {
  test('are free at first, then each waits twice as long as the one before', async () => {
    const account = accountKey('doubling@bench.example');
    for (let round = 0; round < 5; round += 1) expect(await waitFor(claim({ account }))).toBe(0);
    const waits: number[] = [];
    for (let round = 0; round < 8; round += 1) {
      const wait = await waitFor(claim({ account }));
      waits.push(wait);
      await pass(wait);
      expect(await waitFor(claim({ account }))).toBe(0);
    }
    expect(waits).toEqual([1, 2, 4, 8, 16, 32, 60, 60]);
  });

  test('that are turned away are not counted', async () => {
    const account = accountKey('turned-away@bench.example');
    for (let round = 0; round < 5; round += 1) await waitFor(claim({ account }));
    for (let round = 0; round < 20; round += 1) expect(await waitFor(claim({ account }))).toBe(1);
    expect(await Attempt.query(people.knex).where({ account }).resultSize()).toBe(5);
  });

  // ASVS 4.0.3, 2.2.1: no more than a hundred failed attempts an hour on one account.
  test.each([
    ['password', 20, 100],
    ['second-factor', 10, 30],
    ['letter', 4, 15],
  ] as const)('of the kind %s stay between %i and %i an hour, wherever they come from', async (kind, least, most) => {
    const account = accountKey(`patient-${kind}@bench.example`);
    const through = await letThroughInAnHour(() => claim({ kind, account }));
    expect(through).toBeGreaterThanOrEqual(least);
    expect(through).toBeLessThanOrEqual(most);
  });

  test('are forgotten after an hour', async () => {
    const account = accountKey('hour@bench.example');
    for (let round = 0; round < 5; round += 1) await waitFor(claim({ account }));
    await pass(3_601);
    for (let round = 0; round < 5; round += 1) expect(await waitFor(claim({ account }))).toBe(0);
  });

  test('are forgiven by kind', async () => {
    const account = accountKey('forgiven@bench.example');
    for (const kind of ['password', 'second-factor'] as const) {
      for (let round = 0; round < 5; round += 1) await waitFor(claim({ kind, account }));
    }
    await people.knex.transaction((trx) => forgiveAttempts('password', account, trx));
    expect(await waitFor(claim({ account }))).toBe(0);
    expect(await waitFor(claim({ kind: 'second-factor', account }))).toBeGreaterThan(0);
  });

  test('made all at once are let through no more than one by one', async () => {
    const account = accountKey('at-once@bench.example');
    const waits = await Promise.all(Array.from({ length: 25 }, () => waitFor(claim({ account }))));
    expect(waits.filter((wait) => wait === 0)).toHaveLength(5);
  });
});

test('attempts from one network wait, whichever accounts they are on, and those from another do not', async () => {
  const waits: number[] = [];
  for (let round = 0; round < 35; round += 1) {
    waits.push(await waitFor(claim({ account: accountKey(`stranger-${round}@bench.example`), network: '10.9.9.9/32' })));
  }
  expect(waits.slice(0, 30).every((wait) => wait === 0)).toBe(true);
  expect(waits.slice(30).every((wait) => wait > 0)).toBe(true);
  expect(await waitFor(claim({ account: accountKey('stranger-99@bench.example'), network: '10.9.9.10/32' }))).toBe(0);
});

test('an address is not kept, and counts the same in any case', async () => {
  expect(accountKey('Sorrel@Bench.example')).toBe(accountKey('sorrel@bench.EXAMPLE'));
  expect(accountKey('sorrel@bench.example')).not.toBe(accountKey('sorrel2@bench.example'));
  await waitFor(claim({ account: accountKey('sorrel@bench.example') }));
  expect(JSON.stringify(await Attempt.query(people.knex))).not.toContain('sorrel');
});

test('attempts a day old are cleared away', async () => {
  const account = accountKey('old@bench.example');
  await waitFor(claim({ account }));
  await pass(86_401);
  await waitFor(claim({ account: accountKey('new@bench.example') }));
  expect(await Attempt.query(people.knex).where({ account }).resultSize()).toBe(0);
});
