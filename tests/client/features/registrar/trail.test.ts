import { describe, expect, it } from 'vitest';
import { AUDIT_ACTS } from '#contract/admin.ts';
import { ACT_WORDS, sayDetail } from '#client/features/registrar/audit-words.ts';
import { pathOfSubject } from '#client/features/registrar/subject-path.ts';
import { dayShown, endOfDay, startOfDay } from '#client/features/registrar/day-bounds.ts';

describe('days of the trail', () => {
  it('begin with a day’s first instant and end before the next one’s', () => {
    expect(startOfDay('2026-02-28')).toBe('2026-02-28T00:00:00Z');
    expect(endOfDay('2026-02-28')).toBe('2026-03-01T00:00:00Z');
    expect(endOfDay('2026-12-31')).toBe('2027-01-01T00:00:00Z');
  });
  it('are shown as they were typed', () => {
    expect(dayShown(startOfDay('2026-02-28'), 'since')).toBe('2026-02-28');
    expect(dayShown(endOfDay('2026-02-28'), 'until')).toBe('2026-02-28');
  });
  it('are those an address of another hand falls on', () => {
    expect(dayShown('2026-03-01T12:00:00Z', 'until')).toBe('2026-03-01');
    expect(dayShown('2026-03-01T00:30:00+02:00', 'since')).toBe('2026-02-28');
    expect(dayShown(undefined, 'since')).toBe('');
  });
});

describe('what an act was done to', () => {
  const id = '018d5bbd-2920-72c2-a4c4-26dc0063c791';
  it.each([
    ['member', `/registrar/members/${id}`],
    ['contribution', `/contributions/${id}`],
    ['cipher', `/facts/${id}/history`],
    ['wear-limit', `/facts/${id}/history`],
    ['flag', null],
    ['something new', null],
  ])('a %s stands at %s', (kind, path) => {
    expect(pathOfSubject({ kind, id })).toBe(path);
  });
});

describe('words of the trail', () => {
  it('say no two acts alike', () => {
    expect(new Set(AUDIT_ACTS.map((act) => ACT_WORDS[act])).size).toBe(AUDIT_ACTS.length);
  });
  it('say what was written down beside an act', () => {
    expect(sayDetail({ from: 'member', to: 'moderator', moderates: ['skerry-foundry', 'hesper-lathe-company'], otherSessionsEnded: 2 })).toEqual([
      'from: member',
      'to: moderator',
      'moderates: skerry-foundry, hesper-lathe-company',
      'other sessions ended: 2',
    ]);
    expect(sayDetail({ moderates: [], note: null })).toEqual(['moderates: none', 'note: none']);
    expect(sayDetail({})).toEqual([]);
  });
});
