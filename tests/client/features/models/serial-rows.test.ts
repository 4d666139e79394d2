import { describe, expect, it } from 'vitest';
import { dayOf } from '#domain/dates/day.ts';
import { accountsOf, saySeries, serialRows, serialRule } from '#client/features/models/serial-rows.ts';
import type { ModelRange, ModelSeries } from '#client/features/models/serial-rows.ts';

const SERIES = { id: '018d994d-f6c0-759e-9388-3e9cb54a1357', prefix: '3C', works: null, label: null };
const PROVENANCE = { version: 1, enteredBy: 'Harrow Lane', enteredAt: '2026-03-04T10:00:00Z', sources: [] };

function range(account: string, first: string, last: string | null, preferred = false): ModelRange {
  return {
    id: `${account} ${first}`,
    slug: `${account}-${first}`,
    model: { slug: 'model', name: 'Model' },
    series: SERIES,
    account: { id: account, title: `Account ${account}` },
    preferred,
    first,
    last,
    dates: { from: '1938-08-01', to: '1941-08-31' },
    precision: 'month',
    meaning: 'built',
    standing: 'solid',
    inOrder: true,
    provenance: PROVENANCE,
  };
}

function series(ranges: ModelRange[], anchors: ModelSeries['anchors'] = [], given: Partial<ModelSeries> = {}): ModelSeries {
  return { ...SERIES, provenance: PROVENANCE, ranges, anchors, ...given };
}

const rows = (...ranges: ModelRange[]) =>
  serialRows(ranges).map(({ first, last, ranges: held }) => [first, last, [...held.keys()].join()]);

describe('serialRows', () => {
  it('cuts the numbers where an account’s range begins or ends', () => {
    expect(rows(range('a', '1', '10'), range('b', '4', '6'))).toEqual([
      ['1', '3', 'a'],
      ['4', '6', 'a,b'],
      ['7', '10', 'a'],
    ]);
  });
  it('shows numbers that nobody holds, and an open end', () => {
    expect(rows(range('a', '1', '10'), range('a', '21', null))).toEqual([
      ['1', '10', 'a'],
      ['11', '20', ''],
      ['21', null, 'a'],
    ]);
  });
  it('runs on where one range follows the other without a gap', () => {
    expect(rows(range('a', '1', '10'), range('a', '11', '20'))).toEqual([
      ['1', '10', 'a'],
      ['11', '20', 'a'],
    ]);
  });
  it('keeps an open end open beyond a rival that stops', () => {
    expect(rows(range('a', '1', null), range('b', '5', '9')).at(-1)).toEqual(['10', null, 'a']);
  });
  it('sorts by number, not by text, and carries numbers larger than a double holds', () => {
    expect(rows(range('a', '9', '9'), range('a', '10', '9007199254740993')).map(([first]) => first)).toEqual(['9', '10']);
    expect(rows(range('a', '10', '9007199254740993'))[0]?.[1]).toBe('9007199254740993');
  });
  it('has no rows without ranges', () => {
    expect(rows()).toEqual([]);
  });
});

describe('accountsOf', () => {
  it('puts the register’s reading first, each account once', () => {
    const accounts = accountsOf(
      series([range('z', '1', '5'), range('b', '1', '9', true), range('b', '10', '19', true), range('a', '1', '5')]),
    );
    expect(accounts.map(({ id, preferred }) => [id, preferred])).toEqual([
      ['b', true],
      ['a', false],
      ['z', false],
    ]);
  });
});

describe('saySeries', () => {
  it.each([
    [{ prefix: '3C', label: null, works: null }, '3C'],
    [{ prefix: '', label: 'second run', works: 'Low Works' }, 'no prefix, second run, Low Works'],
  ])('%j', (given, said) => {
    expect(saySeries(given)).toBe(said);
  });
});

describe('serialRule', () => {
  it('gives each account a lane and the dated machines one', () => {
    const anchor = { id: SERIES.id, number: '3', built: { from: '1939-02-10', to: '1939-02-10' }, provenance: PROVENANCE };
    const rule = serialRule([series([range('a', '1', '9', true), range('b', '4', '6')], [anchor])]);
    expect(rule?.lanes.map(({ name, kind }) => [name, kind])).toEqual([
      ['our reading', 'band'],
      ['account 2', 'band'],
      ['dated machines', 'ticks'],
    ]);
    expect(rule?.focus).toContainEqual({ from: dayOf(1938, 8, 1), to: dayOf(1941, 8, 31) });
  });
  it('names lanes apart where there are several series, even of one prefix', () => {
    const run = (label: string) => series([range('a', '1', '9', true)], [], { label });
    expect(serialRule([run('first run'), run('second run')])?.lanes.map(({ name }) => name)).toEqual([
      'run 1 ranges',
      'run 2 ranges',
    ]);
    expect(
      serialRule([run('first run'), series([range('a', '1', '9')], [], { prefix: '5C' })])?.lanes.map(({ name }) => name),
    ).toEqual(['3C ranges', '5C ranges']);
  });
  it('is not drawn where nothing is dated', () => {
    expect(serialRule([series([])])).toBeNull();
  });
});
