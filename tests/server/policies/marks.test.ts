import { describe, expect, test } from 'vitest';
import { isHidden, mayReadMark, readsBlind, readsIndependently } from '#server/policies/marks.ts';
import type { Acquaintance, MarkStanding } from '#server/policies/marks.ts';
import { VISITOR } from '#server/policies/viewer.ts';
import type { Viewer } from '#server/policies/viewer.ts';

function member(id: string): Viewer {
  return {
    kind: 'member', id, displayName: id, role: 'member', moderates: [], sessionId: 's', strength: 'password', confirmedAt: '2026-01-01T00:00:00Z',
    confirmedRecently: true, hasSecondFactor: false, secondFactorOwed: false,
  };
}

const BEN = member('ben');

/** Ben, who never met a mark that wants a reading and that others have read. */
const STRANGER: Acquaintance = { isHolder: false, wantsReading: true, readByOthers: true, readByViewer: false, hasLooked: false };

describe('what is kept from whom, and whose reading is independent', () => {
  test.each<[string, Partial<Acquaintance>, { readonly hidden: boolean; readonly independent: boolean; readonly blind: boolean }]>([
    ['a stranger', {}, { hidden: true, independent: true, blind: true }],
    ['who has looked', { hasLooked: true }, { hidden: false, independent: false, blind: false }],
    ['who has read it', { readByViewer: true }, { hidden: false, independent: false, blind: false }],
    ['its holder', { isHolder: true }, { hidden: false, independent: false, blind: false }],
    ['anybody, once no more readings are wanted', { wantsReading: false }, { hidden: false, independent: false, blind: false }],
    ['whoever reads first', { readByOthers: false }, { hidden: false, independent: true, blind: true }],
    ['whoever reads first, of a mark without a photo', { readByOthers: false, wantsReading: false }, { hidden: false, independent: true, blind: true }],
    ['whoever reads again what nobody else has read', { readByOthers: false, readByViewer: true }, { hidden: false, independent: true, blind: false }],
    ['the holder who reads first', { isHolder: true, readByOthers: false }, { hidden: false, independent: true, blind: false }],
    ['whoever looked before anybody read it', { hasLooked: true, readByOthers: false }, { hidden: false, independent: false, blind: false }],
  ])('%s', (_, given, wanted) => {
    const acquaintance = { ...STRANGER, ...given };
    expect({ hidden: isHidden(BEN, acquaintance), independent: readsIndependently(acquaintance), blind: readsBlind(acquaintance) }).toEqual(wanted);
    expect(isHidden(VISITOR, acquaintance)).toBe(false);
  });
});

describe('who may see a mark', () => {
  const onPart = (visibility: 'private' | 'by-link' | 'public'): MarkStanding => ({ kind: 'plate', part: { holderId: 'ann', visibility } });
  const onMachine = (kind: MarkStanding['kind'], serialShown: boolean, visibility: 'private' | 'public' = 'public'): MarkStanding => ({
    kind, machine: { ownerId: 'ann', visibility, serialShown },
  });

  test.each<[string, MarkStanding, everybody: boolean]>([
    ['on a public part', onPart('public'), true],
    ['on a private part', onPart('private'), false],
    ['on a part by link', onPart('by-link'), false],
    ['a serial its owner doesn’t show', onMachine('serial', false), false],
    ['a plate its owner doesn’t show', onMachine('plate', false), false],
    ['a serial its owner shows', onMachine('serial', true), true],
    ['any other mark of a public machine', onMachine('other', false), true],
    ['a mark of a private machine', onMachine('other', true, 'private'), false],
  ])('%s', (_, mark, everybody) => {
    expect(mayReadMark(VISITOR, mark)).toBe(everybody);
    expect(mayReadMark(BEN, mark)).toBe(everybody);
    expect(mayReadMark(member('ann'), mark)).toBe(true);
  });
});
