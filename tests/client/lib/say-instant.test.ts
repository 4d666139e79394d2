import { expect, it } from 'vitest';
import { sayInstant } from '#client/lib/say-instant.ts';

it.each([
  ['2026-03-04T10:07:31Z', '4 Mar 2026, 10:07 UTC'],
  ['2026-03-04T23:59:59.999+00:00', '4 Mar 2026, 23:59 UTC'],
  ['2026-03-04T23:30:00-01:00', '5 Mar 2026, 00:30 UTC'],
])('%s', (timestamp, said) => {
  expect(sayInstant(timestamp)).toBe(said);
});

it('refuses what is no instant', () => {
  expect(() => sayInstant('yesterday')).toThrow(RangeError);
});
