// @vitest-environment node
import { describe, expect, it } from 'vitest';
import { keyTyped, symbolsOfDigit, withDigitSymbols, withRepeater } from '#client/features/workbench/digit-symbols.ts';
import { isNumbers, nextNumber, runOf, symbolsOfRows, valueRowsOf } from '#client/features/workbench/value-rows.ts';
import type { DigitsSet, ValuesSet } from '#domain/ciphers/definition.ts';
import { KEY } from './samples.ts';

const EMPTY: DigitsSet = { kind: 'digits', symbols: {} };

describe('a key by figures', () => {
  it('shows the symbols of each figure and takes others', () => {
    const set = withDigitSymbols(KEY, '1', 'bx');
    expect(symbolsOfDigit(set, '1')).toBe('BX');
    expect(symbolsOfDigit(withDigitSymbols(set, '1', ''), '1')).toBe('');
    expect(symbolsOfDigit(set, '2')).toBe('L');
  });
  it('keeps a letter that already stands for another figure, and lets go of it once that one is freed', () => {
    const twice = withDigitSymbols(KEY, '2', 'B');
    expect(symbolsOfDigit(twice, '1')).toBe('B');
    expect(symbolsOfDigit(twice, '2')).toBe('B');
    expect(withDigitSymbols(twice, '1', '').symbols).toMatchObject({ B: '2' });
  });
  it('knows the key word as far as it was typed', () => {
    expect(keyTyped(KEY)).toBe('BLOCKPRINT');
    expect(keyTyped({ kind: 'digits', symbols: { B: '1', L: '2' } })).toBe('BL');
    expect(keyTyped(EMPTY)).toBe('');
  });
  it('is no key word where a figure is left out between, or has two letters', () => {
    expect(keyTyped({ kind: 'digits', symbols: { B: '1', O: '3' } })).toBeNull();
    expect(keyTyped(withDigitSymbols(KEY, '1', 'BX'))).toBeNull();
  });
  it('has a repeater or none', () => {
    expect(withRepeater(EMPTY, ' z')).toEqual({ ...EMPTY, repeater: 'Z' });
    expect(withRepeater({ ...EMPTY, repeater: 'Z' }, '')).toEqual(EMPTY);
  });
});

describe('letters by numbers', () => {
  const YEARS: ValuesSet = { kind: 'values', symbols: { B: 1912, A: 1911, 7: [1913, 1915] }, repeatsEvery: 20 };

  it('stand in the order of what they mean', () => {
    expect(valueRowsOf(YEARS)).toEqual([
      { symbol: 'A', means: '1911' },
      { symbol: 'B', means: '1912' },
      { symbol: '7', means: '1913, 1915' },
    ]);
  });
  it('come out of the rows as they went in', () => {
    expect(symbolsOfRows(valueRowsOf(YEARS)).symbols).toEqual(YEARS.symbols);
  });
  it('say nothing where no number is typed yet, and keep both rows of one letter', () => {
    const rows = [
      { symbol: 'A', means: '' },
      { symbol: 'a', means: 'soon' },
    ];
    expect(symbolsOfRows(rows)).toEqual({ symbols: { A: [], a: [] }, keys: ['A', 'a'] });
  });
  it.each([
    ['1911', true],
    ['1, 13', true],
    ['1 or 13', true],
    ['', false],
    ['1,', false],
    ['-3', false],
    ['1.5', false],
  ])('%j is numbers: %s', (means, is) => {
    expect(isNumbers(means)).toBe(is);
  });
  it('go on after the last number', () => {
    expect(nextNumber([])).toBe('1');
    expect(nextNumber([{ symbol: 'A', means: '3, 9' }, { symbol: 'B', means: '' }])).toBe('10');
  });
  it('are a run where one follows the other', () => {
    expect(runOf({ kind: 'values', symbols: { A: 1911, B: 1912 } })).toEqual({ letters: 'AB', first: 1911 });
    expect(runOf(YEARS)).toBeNull();
    expect(runOf({ kind: 'values', symbols: { A: 1911, B: 1913 } })).toBeNull();
    expect(runOf({ kind: 'values', symbols: { JAN: 1 } })).toBeNull();
    expect(runOf({ kind: 'values', symbols: {} })).toBeNull();
  });
});
