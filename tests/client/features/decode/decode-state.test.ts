// @vitest-environment node
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { changeDecodeState, limitsOf, NOTHING_SAID, readDecodeState, writeDecodeState, yearFault, yearsFault } from '#client/features/decode/decode-state.ts';

const slug = fc.option(fc.stringMatching(/^[a-z0-9]{1,8}(-[a-z0-9]{1,8}){0,3}$/));
const state = fc.record({
  mark: fc.string({ maxLength: 40 }),
  maker: slug,
  cipher: slug,
  model: slug,
  position: slug,
  casting: slug,
  serial: fc.string({ maxLength: 40 }),
  lookAlikes: fc.boolean(),
  fromYear: fc.string({ maxLength: 4 }),
  toYear: fc.string({ maxLength: 4 }),
});

describe('the address', () => {
  it('holds everything that was said', () => {
    fc.assert(
      fc.property(state, (said) => {
        const address = new URL(`https://register.example/decode?${writeDecodeState(said).toString()}`);
        expect(readDecodeState(address.searchParams)).toEqual(said);
      }),
    );
  });
  it('is empty where nothing was said', () => {
    expect(writeDecodeState(NOTHING_SAID).toString()).toBe('');
    expect(readDecodeState(new URLSearchParams())).toEqual(NOTHING_SAID);
  });
  it('reads as a person would write it', () => {
    expect(writeDecodeState({ ...NOTHING_SAID, mark: 'B?[OD]CB', maker: 'brackwater-tractor-works', serial: '3C 1207', lookAlikes: true }).toString()).toBe(
      'mark=B%3F%5BOD%5DCB&maker=brackwater-tractor-works&lookAlikes=yes&serial=3C+1207',
    );
  });
  it('leaves out what is no slug, and cuts what is too long', () => {
    const read = readDecodeState(new URLSearchParams({ maker: '../x', cipher: 'A B', lookAlikes: 'perhaps', mark: 'B'.repeat(5000), from: '19345' }));
    expect(read).toMatchObject({ maker: null, cipher: null, lookAlikes: false, fromYear: '1934' });
    expect(read.mark.length).toBe(1300);
  });
});

describe('changeDecodeState', () => {
  const chosen = { ...NOTHING_SAID, maker: 'a', cipher: 'a-key', model: 'm', position: 'sump' };
  it('drops the cipher with its maker and the position with its model', () => {
    expect(changeDecodeState(chosen, { maker: 'b' }).cipher).toBeNull();
    expect(changeDecodeState(chosen, { model: 'n' }).position).toBeNull();
  });
  it('keeps them when they come with the change, or nothing they hang on changes', () => {
    expect(changeDecodeState(chosen, { maker: 'b', cipher: 'b-key' }).cipher).toBe('b-key');
    expect(changeDecodeState(chosen, { maker: 'a', mark: 'X' })).toEqual({ ...chosen, mark: 'X' });
  });
});

describe('limits', () => {
  it.each([
    ['', '', undefined],
    ['1934', '', { from: '1934-01-01' }],
    ['', '1949', { to: '1949-12-31' }],
    ['1934', '1949', { from: '1934-01-01', to: '1949-12-31' }],
    ['19', '1949', undefined],
    ['1949', '1934', undefined],
  ])('%j to %j', (fromYear, toYear, limits) => {
    expect(limitsOf({ ...NOTHING_SAID, fromYear, toYear })).toEqual(limits);
  });
  it('says what is wrong with a year', () => {
    expect(yearFault('1934')).toBeNull();
    expect(yearFault('193X')).toBe('A year has four figures');
    expect(yearsFault({ ...NOTHING_SAID, fromYear: '1949', toYear: '1934' })).toBe('The last year is before the first');
    expect(yearsFault({ ...NOTHING_SAID, fromYear: '19', toYear: '1934' })).toBeNull();
  });
});
