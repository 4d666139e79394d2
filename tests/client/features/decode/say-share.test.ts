// @vitest-environment node
import { describe, expect, it } from 'vitest';
import { sayShare, sayShareAloud } from '#client/features/decode/say-share.ts';

describe('sayShare', () => {
  it.each([
    [1, '1'],
    [0, '0'],
    [1 / 2, '½'],
    [1 / 3, '⅓'],
    [0.1 + 0.2 - 0.05, '¼'],
    [3 / 8, '⅜'],
    [0.1, '10 %'],
    [1 / 27, '3.7 %'],
    [0.33, '33 %'],
    [0.95, '95 %'],
    [0.987, '98.7 %'],
    [0.0004, 'under 0.1 %'],
    [0.9999, 'over 99.9 %'],
  ])('%f is %s', (share, said) => {
    expect(sayShare(share)).toBe(said);
  });
  it('is said aloud in words', () => {
    expect(sayShareAloud(2 / 5)).toBe('2 in 5');
    expect(sayShareAloud(0.1)).toBe('10 %');
  });
});
