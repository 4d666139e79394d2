// @vitest-environment node
import { describe, expect, it } from 'vitest';
import { sayNumbers, sayStanding, saySubstitutions } from '#client/features/decode/build-words.ts';
import { build, neighbour } from './samples.ts';

const EMPTY = { window: null, likely: null, range: null } as const;

describe('sayStanding', () => {
  it('has nothing to say of a number a range holds', () => {
    expect(sayStanding(build())).toBeNull();
  });
  it('says both neighbours of a gap', () => {
    const gap = build({ ...EMPTY, standing: 'gap', neighbours: [neighbour('1001', '1200', '1938-08-01', '1940-12-31'), neighbour('1301', null, '1941-06-01', '1941-12-31')] });
    expect(sayStanding(gap)).toBe(
      '3C 1207 stands in a gap between the ranges on record. On either side: 1001–1200 built August 1938 – December 1940 and from 1301 built June – December 1941.',
    );
  });
  it('says the nearest range beyond the first and the last', () => {
    const before = build({ ...EMPTY, standing: 'before-first', neighbours: [neighbour('2001', '2200', '1939-01-01', '1939-12-31')] });
    expect(sayStanding(before)).toBe('3C 1207 comes before the first number on record. Nearest: 2001–2200 built 1939.');
    expect(sayStanding(build({ ...EMPTY, standing: 'after-last' }))).toContain('after the last number on record');
  });
  it('says which prefix is not known', () => {
    expect(sayStanding(build({ ...EMPTY, standing: 'unknown-prefix' }))).toContain('No series of this model has the prefix 3C');
    const bare = { asStamped: '1207', prefix: '', number: '1207', suffix: '', substitutions: [] };
    expect(sayStanding(build({ ...EMPTY, standing: 'unknown-prefix', serial: bare }))).toContain('without a prefix');
  });
  it('says that a range dates something other than building', () => {
    expect(sayStanding(build({ ...EMPTY, standing: 'in-range' }))).toContain('its dates are not those of building');
  });
});

describe('saySubstitutions', () => {
  it('says what was taken for what, once', () => {
    const serial = { asStamped: '3C I2O7', prefix: '3C', number: '1207', suffix: '', substitutions: [{ at: 3, seen: 'I', taken: '1' }, { at: 5, seen: 'O', taken: '0' }] };
    expect(saySubstitutions(build({ serial }))).toBe('Read I as 1 and O as 0.');
    expect(saySubstitutions(build())).toBeNull();
  });
});

describe('sayNumbers', () => {
  it('says a range by its ends', () => {
    expect(sayNumbers({ first: '1001', last: '1390' }, '3C')).toBe('3C 1001–1390');
    expect(sayNumbers({ first: '2000', last: null })).toBe('from 2000');
  });
});
