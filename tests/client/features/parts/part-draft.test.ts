// @vitest-environment node
import { describe, expect, it } from 'vitest';
import { changedPartOf, changesBetween, draftOfPart, NEW_PART, newPartOf } from '#client/features/parts/part-draft.ts';
import { PART_LIMITS } from '#contract/parts.ts';
import { id } from '../moderation/samples.ts';
import { part } from './samples.ts';

describe('newPartOf', () => {
  it('asks for nothing: what is left open is null', () => {
    expect(newPartOf(NEW_PART)).toEqual({
      ok: true,
      body: { partTypeId: null, called: null, makerId: null, foundModelId: null, foundSerial: null, condition: null, note: null, visibility: 'private', photoIds: [], number: null },
    });
  });
  it('says what is wrong with the number and with what is too long, each at its field', () => {
    const checked = newPartOf({ ...NEW_PART, number: 'B[4', called: 'x'.repeat(PART_LIMITS.called + 1) });
    expect(checked.ok ? [] : checked.faults.map(({ path }) => path[0])).toEqual(['number', 'called']);
  });
  it('sends what is typed without the blanks around it', () => {
    const checked = newPartOf({ ...NEW_PART, number: ' B4406 ', foundSerial: '  ', condition: ' cracked ' });
    expect(checked).toMatchObject({ ok: true, body: { number: 'B4406', foundSerial: null, condition: 'cracked' } });
  });
});

describe('a part to be changed', () => {
  it('goes back as it came, with its revision', () => {
    expect(changedPartOf(draftOfPart(part()), 3)).toEqual({
      ok: true,
      body: {
        partTypeId: id(72),
        called: null,
        makerId: id(73),
        foundModelId: id(74),
        foundSerial: '3C 1204',
        condition: 'One ear cracked',
        note: 'Under the bench',
        visibility: 'private',
        photoIds: [id(1), id(2)],
        revision: 3,
      },
    });
  });
  it('is refused with a photo named twice', () => {
    expect(changedPartOf({ ...draftOfPart(part()), photoIds: [id(1), id(1)] }, 3)).toMatchObject({ ok: false, faults: [{ path: ['photoIds'] }] });
  });
});

describe('changesBetween', () => {
  it('names what is different now, and nothing else', () => {
    const before = draftOfPart(part());
    const now = draftOfPart(part({ condition: null, maker: { slug: 'skerry', name: 'Skerry Foundry' }, makerId: id(75), photos: [] }));
    expect(changesBetween(before, now)).toEqual([
      { label: 'Photos', now: '0 photos' },
      { label: 'Maker', now: 'Skerry Foundry' },
      { label: 'Condition', now: 'left open' },
    ]);
    expect(changesBetween(before, before)).toEqual([]);
  });
  it('counts another order of the photos as a change', () => {
    const before = draftOfPart(part());
    expect(changesBetween(before, { ...before, photoIds: before.photoIds.toReversed() })).toEqual([{ label: 'Photos', now: '2 photos' }]);
  });
});
