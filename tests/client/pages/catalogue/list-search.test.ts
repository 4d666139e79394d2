import { describe, expect, it } from 'vitest';
import { listCastings } from '#contract/castings.ts';
import { changeSearch, isNarrowed, readSearch } from '#client/pages/catalogue/list-search.ts';

const read = (search: string) => readSearch(listCastings.query, new URLSearchParams(search));

describe('readSearch', () => {
  it('takes what the list knows and gives the rest its own defaults', () => {
    expect(read('number=4?B3*&maker=hesper-lathe-company&sort=-made')).toEqual({
      query: { number: '4?B3*', maker: 'hesper-lathe-company', sort: '-made', limit: 25 },
      refused: {},
    });
  });
  it('passes over names it does not know and values that are empty', () => {
    expect(read('colour=red&q=&maker= ').query).toEqual({ sort: 'number', limit: 25 });
  });
  it('leaves out what the list would refuse, and says why', () => {
    const { query, refused } = read('number=B[4&maker=hesper-lathe-company');
    expect(query).toEqual({ maker: 'hesper-lathe-company', sort: 'number', limit: 25 });
    expect(Object.keys(refused)).toEqual(['number']);
    expect(refused['number']).toMatch(/bracket is never closed/);
  });
  it('tells every part that is wrong', () => {
    expect(Object.keys(read('sort=colour&limit=9000&maker=Not A Slug').refused).toSorted()).toEqual(['limit', 'maker', 'sort']);
  });
});

describe('changeSearch', () => {
  const now = new URLSearchParams('maker=a&after=cursor&q=gear');
  it('sets and takes away, and starts the list from its beginning again', () => {
    expect(changeSearch(now, { maker: 'b', q: null }).toString()).toBe('maker=b');
  });
  it('keeps the filters when only the place in the list changes', () => {
    expect(changeSearch(now, { after: 'next' }).get('after')).toBe('next');
    expect(changeSearch(now, { after: 'next' }).get('maker')).toBe('a');
  });
  it('writes nothing for a box that was emptied, and leaves its argument alone', () => {
    expect(changeSearch(now, { q: '  ' }).has('q')).toBe(false);
    expect(now.toString()).toBe('maker=a&after=cursor&q=gear');
  });
});

describe('isNarrowed', () => {
  it('is said of filters', () => {
    expect(isNarrowed({ sort: 'number', limit: 25, q: 'gear' })).toBe(true);
  });
  it('is not said of order and place', () => {
    expect(isNarrowed({ sort: '-made', limit: 25, after: 'cursor', q: undefined })).toBe(false);
  });
});
