import { describe, expect, it } from 'vitest';
import { saySerial, saySerials } from '#client/lib/say-serials.ts';

describe('saySerial', () => {
  it('keeps prefix and number together', () => {
    expect(saySerial('3C', '1207')).toBe('3C\u00A01207');
  });
  it.each([null, ''])('is the bare number where the prefix is %j', (prefix) => {
    expect(saySerial(prefix, '1207')).toBe('1207');
  });
});

describe('saySerials', () => {
  it.each([
    [{ prefix: '3C', first: '1001', last: '4120' }, '3C\u00A01001–4120'],
    [{ prefix: '5C', first: '1', last: null }, '5C\u00A01 on'],
    [{ prefix: '3C', first: null, last: '1189' }, 'up to 3C\u00A01189'],
    [{ prefix: '3C', first: '1190', last: '1190' }, '3C\u00A01190'],
    [{ prefix: '3C', first: null, last: null }, 'every 3C'],
    [{ prefix: null, first: null, last: null }, 'every serial'],
    [{ prefix: '', first: '12', last: '9007199254740993' }, '12–9007199254740993'],
  ])('%j', (bounds, said) => {
    expect(saySerials(bounds)).toBe(said);
  });
});
