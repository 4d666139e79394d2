import { expect, it } from 'vitest';
import { safeNext } from '#client/features/people/safe-next.ts';

it.each(['/account', '/castings?number=B44%3F6', '/account#sessions'])('goes on to %s', (address) => {
  expect(safeNext(address, '/decode')).toBe(address);
});

it.each([
  null,
  '',
  'account',
  'https://elsewhere.example/',
  '//elsewhere.example/',
  '/\\elsewhere.example/',
  '/\t/elsewhere.example/',
  'javascript:alert(1)',
  '/sign-in?next=/account',
])('does not go on to %j', (address) => {
  expect(safeNext(address, '/decode')).toBe('/decode');
});
