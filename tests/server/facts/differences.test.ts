import { describe, expect, test } from 'vitest';
import { formOf } from '#contract/kinds.ts';
import type { FactKind } from '#domain/vocabulary.ts';
import { differencesOf } from '#server/services/facts/differences.ts';
import { TEST_CIPHER } from '#tests/support/factories/catalogue.ts';

type Payload = Readonly<Record<string, unknown>>;

const NAMES = new Map([
  ['m1', 'Brackwater Tractor Works'],
  ['m2', 'Skerry Foundry'],
  ['t1', 'Cylinder block'],
]);

function differences(kind: FactKind, before: Payload | null, after: Payload) {
  return differencesOf(formOf(kind), before, after, (id) => NAMES.get(id));
}

const CASTING = {
  makerId: 'm1',
  pouredById: null,
  partTypeId: 't1',
  number: 'B4406',
  pattern: null,
  made: { from: '1938-07-01', to: '1944-03-31' },
  note: null,
  tells: [
    { place: 'Rear face', tell: 'Two bosses.' },
    { place: 'Flange', tell: 'Six bolts.' },
  ],
  partNumbers: [{ number: '4406-1', note: null }],
};

describe('what a first version says', () => {
  test('is told field by field in the order of the form, blank ones left out', () => {
    expect(differences('casting', null, CASTING)).toEqual([
      { path: ['makerId'], label: 'Maker', before: null, after: 'Brackwater Tractor Works' },
      { path: ['partTypeId'], label: 'Part type', before: null, after: 'Cylinder block' },
      { path: ['number'], label: 'Casting number', before: null, after: 'B4406' },
      { path: ['made'], label: 'Poured', before: null, after: '1 Jul 1938 to 31 Mar 1944' },
      { path: ['tells', 0], label: 'Tells, 1', before: null, after: 'Rear face: Two bosses.' },
      { path: ['tells', 1], label: 'Tells, 2', before: null, after: 'Flange: Six bolts.' },
      { path: ['partNumbers', 0], label: 'Part numbers, 1', before: null, after: '4406-1' },
    ]);
  });
});

describe('what two versions say differently', () => {
  test('nothing, where they say the same in another order of keys', () => {
    expect(differences('casting', CASTING, Object.fromEntries(Object.entries(CASTING).toReversed()))).toEqual([]);
  });

  test('a row for each entry of a list that came, went or changed, wherever the others moved', () => {
    const after = { ...CASTING, tells: [{ place: 'Sump', tell: 'A drain.' }, ...CASTING.tells.slice(1), { place: 'Rear face', tell: 'Three bosses.' }] };
    expect(differences('casting', CASTING, after)).toEqual([
      { path: ['tells', 0], label: 'Tells, 1', before: 'Rear face: Two bosses.', after: 'Sump: A drain.' },
      { path: ['tells', 2], label: 'Tells, 3', before: null, after: 'Rear face: Three bosses.' },
    ]);
    expect(differences('casting', CASTING, { ...CASTING, tells: CASTING.tells.slice(1) })).toEqual([
      { path: ['tells', 0], label: 'Tells, 1', before: 'Rear face: Two bosses.', after: null },
    ]);
  });

  test.each<[string, FactKind, Payload, Payload, string | null, string | null]>([
    ['an id by its name', 'casting', { pouredById: null }, { pouredById: 'm2' }, null, 'Skerry Foundry'],
    ['an id of nothing as that', 'casting', { pouredById: 'm2' }, { pouredById: 'm9' }, 'Skerry Foundry', 'not in the catalogue'],
    ['a choice by its words', 'model', { machineKind: 'lathe' }, { machineKind: 'barn-machine' }, 'Lathe', 'Barn machine'],
    ['yes and no', 'maker', { poursIron: true }, { poursIron: false }, 'Yes', 'No'],
    ['an open span of days', 'model', { made: { from: '1949-01-01', to: null } }, { made: { from: null, to: '1949-01-01' } }, '1 Jan 1949 on', 'up to 1 Jan 1949'],
    ['one day', 'anchor', { built: { from: '1941-02-10', to: '1941-02-10' } }, { built: null }, '10 Feb 1941', null],
    ['every number', 'fitment', { numbers: { from: null, to: null } }, { numbers: { from: '1001', to: '1390' } }, 'every number', '1001 to 1390'],
    ['counts with their unit', 'position', { lead: { from: 0, to: 90 } }, { lead: { from: 10, to: null } }, '0 to 90 days', '10 on days'],
    ['a number', 'position', { weight: 1 }, { weight: 0.5 }, '1', '0.5'],
    ['HTML as it is written', 'maker', { note: '<b>1</b>' }, { note: '&lt;' }, '<b>1</b>', '&lt;'],
    ['what is no value of its field as it was sent', 'model', { machineKind: 'lathe' }, { machineKind: { odd: [1] } }, 'Lathe', '{"odd":[1]}'],
    ['rows that are none', 'casting', { tells: [] }, { tells: 'many' }, null, 'many'],
  ])('%s', (_what, kind, before, after, said, saysNow) => {
    expect(differences(kind, before, after)).toEqual([expect.objectContaining({ before: said, after: saysNow })]);
  });

  test('of a cipher its layout, each set of symbols, the days in use and each exception', () => {
    const before = { definition: TEST_CIPHER };
    const after = {
      definition: {
        ...TEST_CIPHER,
        fields: [{ field: 'literal', text: 'S' }, ...TEST_CIPHER.fields],
        symbolSets: { months: { kind: 'values', symbols: { A: 1, B: [2, 3] }, repeatsEvery: 2 } },
        usedTo: null,
        exceptions: [{ fields: { month: 'A' }, from: '1931-01-01', to: '1931-02-28', replaces: true }],
      },
    };
    expect(differences('cipher', before, after)).toEqual([
      {
        path: ['definition', 'fields'],
        label: 'Layout',
        before: 'month (1, months), year (2, numerals)',
        after: '“S”, month (1, months), year (2, numerals)',
      },
      {
        path: ['definition', 'symbolSets', 'months'],
        label: 'Symbols “months”',
        before: 'A = 1, B = 2, C = 3, D = 4, E = 5, F = 6, G = 7, H = 8, J = 9, K = 10, L = 11, M = 12',
        after: 'A = 1, B = 2 or 3, again every 2',
      },
      { path: ['definition', 'usedTo'], label: 'In use to', before: '31 Dec 1954', after: 'still in use' },
      {
        path: ['definition', 'exceptions', 0],
        label: 'Exception 1',
        before: null,
        after: 'month A stands for 1 Jan 1931 to 28 Feb 1931, and for nothing else',
      },
    ]);
  });
});
