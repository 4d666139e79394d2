import { describe, expect, it } from 'vitest';
import { payloadDifference, payloadLines, sayFieldName } from '#client/pages/catalogue/payload-difference.ts';

describe('payloadDifference', () => {
  it('says nothing of what stayed', () => {
    expect(
      payloadDifference(
        { name: 'a', made: { from: '1938-07-01', to: null } },
        { made: { from: '1938-07-01', to: null }, name: 'a' },
      ),
    ).toEqual([]);
  });
  it('says a range as one thing, days in words', () => {
    expect(
      payloadDifference({ made: { from: '1938-07-01', to: null } }, { made: { from: '1938-07-01', to: '1944-03-31' } }),
    ).toEqual([{ path: 'made', field: 'made', before: 'from 1 Jul 1938', after: 'July 1938 – March 1944' }]);
  });
  it('says numbers first to last', () => {
    expect(
      payloadDifference({ numbers: { from: '1001', to: null } }, { numbers: { from: '1001', to: '1390' } })[0],
    ).toMatchObject({ before: '1001 on', after: '1001–1390' });
  });
  it('tells an entry added to a list by its place', () => {
    const tell = { ordinal: 1, place: 'Rear web', tell: 'three ribs' };
    expect(
      payloadDifference({ tells: [tell] }, { tells: [tell, { ordinal: 2, place: 'Foundry mark', tell: 'reading down' }] }),
    ).toEqual([{ path: 'tells.2', field: 'tells, 2', before: null, after: 'Foundry mark: reading down' }]);
  });
  it('goes down to the single value of a cipher', () => {
    const cipher = (symbol: string) => ({
      symbolSets: { key: { kind: 'digits', symbols: { B: '1', [symbol]: '2' } } },
      usedTo: null,
    });
    expect(payloadDifference(cipher('L'), cipher('M')).map(({ field, before, after }) => [field, before, after])).toEqual([
      ['symbol sets, key, symbols, L', '2', null],
      ['symbol sets, key, symbols, M', null, '2'],
    ]);
  });
  it('takes nothing, null and empty text for the same', () => {
    expect(payloadDifference({ note: null }, {})).toEqual([]);
    expect(payloadDifference({ note: null }, { note: '' }).map(({ before, after }) => [before, after])).toEqual([[null, null]]);
  });
  it('does not take other texts for days or entries', () => {
    expect(payloadDifference({ note: '1938-13-01' }, { note: '1938' })[0]).toMatchObject({ before: '1938-13-01', after: '1938' });
  });
});

describe('payloadLines', () => {
  it('says all that is said, and leaves out numbers that only the register can read', () => {
    const lines = payloadLines({
      makerId: '018d5bbd-2920-72c2-a4c4-26dc0063c791',
      number: 'B4406',
      note: null,
      poursIron: false,
      partNumbers: [{ number: '4409', note: 'less studs' }],
    });
    expect(lines).toEqual([
      { path: 'number', field: 'number', value: 'B4406' },
      { path: 'partNumbers', field: 'part numbers', value: '4409: less studs' },
      { path: 'poursIron', field: 'pours iron', value: 'no' },
    ]);
  });
  it('has no lines for an empty payload', () => {
    expect(payloadLines({})).toEqual([]);
  });
});

describe('sayFieldName', () => {
  it.each([
    ['partNumbers.2', 'part numbers, 2'],
    ['makerId', 'maker'],
    ['slug', 'address'],
    ['symbolSets.key.symbols.B', 'symbol sets, key, symbols, B'],
  ])('%s', (path, said) => {
    expect(sayFieldName(path)).toBe(said);
  });
});
