import { expect, test } from 'vitest';
import { decode } from '#domain/ciphers/decode.ts';
import { dayOf } from '#domain/dates/day.ts';
import { compiled, FEN, HES, parsed, TEN } from './worked-ciphers.ts';

const AS_OF = dayOf(2026, 12, 1);

test.each([
  [TEN, 'RLKON'],
  [TEN, 'BBOCB'],
  [TEN, '?BLOI'],
  [TEN, 'BLT*'],
  [HES, 'H?18'],
  [FEN, 'A53'],
])('dates alone are those of the whole answer (%#)', (definition, mark) => {
  const whole = decode(parsed(mark), compiled(definition), { asOf: AS_OF });
  const alone = decode(parsed(mark), compiled(definition), { asOf: AS_OF, datesOnly: true });
  expect(alone).toEqual({ ...whole, reasons: [], settle: [], splits: [], steps: alone.steps });
  expect(alone.steps).toBeLessThanOrEqual(whole.steps);
});

test('where there is none, why is told all the same', () => {
  const whole = decode(parsed('TKKOI'), compiled(TEN), { asOf: AS_OF });
  expect(decode(parsed('TKKOI'), compiled(TEN), { asOf: AS_OF, datesOnly: true })).toEqual(whole);
  expect(whole.reasons.length).toBeGreaterThan(0);
});
