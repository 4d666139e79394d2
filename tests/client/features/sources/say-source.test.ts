import { describe, expect, it } from 'vitest';
import { FACT_KINDS } from '#domain/vocabulary.ts';
import { groupFacts, pathOfFact, sayFactKind } from '#client/features/sources/say-source.ts';

const fact = (kind: (typeof FACT_KINDS)[number], slug: string | null) => ({
  kind,
  slug,
  title: 'title',
  field: null,
  locator: null,
});

describe('pathOfFact', () => {
  it('leads to a page of the catalogue for every kind that has one', () => {
    expect(FACT_KINDS.map((kind) => pathOfFact(fact(kind, 'a'))).every((path) => path?.endsWith('/a'))).toBe(true);
    expect(pathOfFact(fact('serial-range', 'a'))).toBe('/serial-ranges/a');
  });
  it('leads nowhere for a fact without a page', () => {
    expect(pathOfFact(fact('anchor', null))).toBeNull();
  });
});

describe('groupFacts', () => {
  it('groups by kind in the order the kinds are met', () => {
    const groups = groupFacts([fact('casting', 'a'), fact('maker', 'b'), fact('casting', 'c')]);
    expect(groups.map(({ kind, facts }) => [kind, facts.map(({ slug }) => slug)])).toEqual([
      ['casting', ['a', 'c']],
      ['maker', ['b']],
    ]);
  });
  it('has no groups without facts', () => {
    expect(groupFacts([])).toEqual([]);
  });
});

it('says one or many', () => {
  expect([sayFactKind('casting', 1), sayFactKind('casting', 2)]).toEqual(['Casting', 'Castings']);
});
