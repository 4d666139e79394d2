// @vitest-environment node
import { describe, expect, it } from 'vitest';
import { spreadKey, spreadRun } from '#client/features/workbench/key-word.ts';
import { KEY } from './samples.ts';

describe('spreadKey', () => {
  it.each(['BLOCKPRINT', 'blockprint', 'Block Print', 'BLOCK-PRINT'])('spreads %s over 1 to 9 and 0', (word) => {
    expect(spreadKey(word)).toEqual({ ok: true, value: KEY.symbols });
  });
  it('spreads what there is of a word over the first figures', () => {
    expect(spreadKey('BLO')).toEqual({ ok: true, value: { B: '1', L: '2', O: '3' } });
    expect(spreadKey('')).toEqual({ ok: true, value: {} });
  });
  it('takes figures as symbols too', () => {
    expect(spreadKey('1234567890')).toMatchObject({ ok: true, value: { 1: '1', 0: '0' } });
  });
  it.each([
    ['BLOCB', '“B” comes twice, first and fifth: a letter can stand for one of them only'],
    ['ｂB', '“B” comes twice, first and second: a letter can stand for one of them only'],
    ['BLOC?', '“?” is no letter A to Z and no figure'],
    ['BLOCKPRINTS', 'A key has ten letters, for 1 to 9 and 0; this has eleven'],
  ])('refuses %s, and says why', (word, fault) => {
    expect(spreadKey(word)).toEqual({ ok: false, fault });
  });
});

describe('spreadRun', () => {
  it('counts up from the first', () => {
    expect(spreadRun('ABC', 1911)).toEqual({ ok: true, value: { A: 1911, B: 1912, C: 1913 } });
  });
  it('refuses a letter that comes twice', () => {
    expect(spreadRun('ABA', 1)).toMatchObject({ ok: false });
  });
});
