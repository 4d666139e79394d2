import { describe, expect, test } from 'vitest';
import { parseReading } from '#domain/marks/reading.ts';
import { numberPattern } from '#server/services/number-pattern.ts';

function patternOf(text: string): string {
  const reading = parseReading(text);
  if (!reading.ok) throw new Error(reading.fault.message);
  return numberPattern(reading.value);
}

describe('a reading as a pattern', () => {
  test.each([
    ['4?B3*', '^4.B3.*$'],
    ['b4-406', '^B4406$'],
    ['[OD]4', '^[OD]4$'],
    ['*', '^.*$'],
    ['????', '^....$'],
  ])('%s is %s', (reading, pattern) => {
    expect(patternOf(reading)).toBe(pattern);
  });

  test('is of glyphs alone, whatever made the reading', () => {
    expect(() => numberPattern({ glyphs: [{ kind: 'sure', glyph: '.*' }], breaks: [] })).toThrow(RangeError);
    expect(() => numberPattern({ glyphs: [{ kind: 'oneOf', glyphs: ['A', ']'] }], breaks: [] })).toThrow(RangeError);
  });
});
