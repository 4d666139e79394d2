import { expect, test } from 'vitest';
import { parseReading } from '#domain/marks/reading.ts';
import { canBe, isPlain } from '#server/services/marks/can-be.ts';

function reading(text: string) {
  const parsed = parseReading(text);
  if (!parsed.ok) throw new Error(parsed.fault.message);
  return parsed.value;
}

test.each<[string, string, boolean]>([
  ['B4406', 'B4406', true],
  ['B-44.06', 'B4406', true],
  ['B4406', 'B44061', false],
  ['B4406', 'B440', false],
  ['B4?06', 'B4406', true],
  ['B4?06', 'B446', false],
  ['B[48]406', 'B8406', true],
  ['B[48]406', 'B3406', false],
  ['B4*', 'B4406', true],
  ['B4*', 'B4', true],
  ['*06', 'B4406', true],
  ['*06', 'B4460', false],
  ['B*6', 'B6', true],
  ['B4*46', 'B46', false],
  ['*', '', true],
])('%s can be %s: %s', (text, number, wanted) => {
  expect(canBe(reading(text), number)).toBe(wanted);
});

test('plain is what has every glyph for certain', () => {
  expect(['B44-06', 'B4?06', 'B[48]06', 'B*'].map((text) => isPlain(reading(text)))).toEqual([true, false, false, false]);
});
