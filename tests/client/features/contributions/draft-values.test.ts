// @vitest-environment node
import { expect, it } from 'vitest';
import { isBlank, isSame, isSameDraft, rowsOf, textOf } from '#client/features/contributions/draft-values.ts';

it('takes values for the same whatever the order of their names', () => {
  expect(isSame({ from: '1', to: [null, { a: 1 }] }, { to: [null, { a: 1 }], from: '1' })).toBe(true);
  expect(isSame({ from: '1' }, { from: '1', to: null })).toBe(false);
  expect(isSame([1, 2], [2, 1])).toBe(false);
  expect(isSame('1', 1)).toBe(false);
});

it('tells drafts apart by payload, sources and word', () => {
  const draft = { payload: { name: 'a' }, citations: [{ sourceId: 'b' }], note: null };
  expect(isSameDraft(draft, structuredClone(draft))).toBe(true);
  expect(isSameDraft(draft, { ...draft, note: 'c' })).toBe(false);
  expect(isSameDraft(draft, { ...draft, citations: [] })).toBe(false);
});

it('knows what says nothing', () => {
  expect([null, undefined, '', [], { from: null, to: '' }].map(isBlank)).toEqual([true, true, true, true, true]);
  expect([0, false, 'a', [null], { from: null, to: '1' }].map(isBlank)).toEqual([false, false, false, false, false]);
});

it('reads text and rows of whatever a draft holds', () => {
  expect([textOf('a'), textOf(1.5), textOf(null), textOf({})]).toEqual(['a', '1.5', '', '']);
  expect([rowsOf([{ a: 1 }, 'no row']), rowsOf(null)]).toEqual([[{ a: 1 }, {}], []]);
});
