import { describe, expect, it } from 'vitest';
import type { Fitment } from '#contract/castings.ts';
import { dayOf } from '#domain/dates/day.ts';
import { castingRule, ciphersInUse, joinSpans } from '#client/features/castings/casting-rule.ts';
import { sayCasting, sayInterchange } from '#client/features/castings/say-casting.ts';

const MADE = { from: '1938-07-01', to: '1944-03-31' };
const NAMED = { slug: 'a', name: 'A' };

function fitment(verdict: Fitment['verdict'], built: Fitment['built']): Fitment {
  const provenance = { version: 1, enteredBy: 'Harrow Lane', enteredAt: '2026-03-04T10:00:00Z', sources: [] };
  return {
    id: '018d994d-f6c0-759e-9388-3e9cb54a1357',
    model: NAMED,
    position: NAMED,
    prefix: null,
    first: null,
    last: null,
    built,
    verdict,
    note: null,
    provenance,
  };
}

const cipher = (from: string | null, to: string | null) => ({ title: 'Key', used: { from, to } });

describe('castingRule', () => {
  it('shows the casting, the machines it was built into, and its cipher', () => {
    const rule = castingRule({ made: MADE, fitments: [fitment('as-built', { from: '1938-08-01', to: '1944-05-31' })] }, [
      cipher('1928-01-01', '1954-12-31'),
    ]);
    expect(rule?.lanes.map(({ name }) => name)).toEqual(['made', 'its machines built', 'cipher in use']);
  });
  it('zooms to the casting, not to the cipher’s long life', () => {
    const rule = castingRule({ made: MADE, fitments: [] }, [cipher('1928-01-01', null)]);
    expect(rule?.focus).toEqual([
      { from: dayOf(1938, 7, 1), to: dayOf(1938, 7, 1) },
      { from: dayOf(1944, 3, 31), to: dayOf(1944, 3, 31) },
    ]);
  });
  it('leaves out machines it only bolts on to', () => {
    expect(
      castingRule({ made: MADE, fitments: [fitment('later-fits', { from: '1950-01-01', to: '1951-01-01' })] }, [])?.lanes.map(
        ({ name }) => name,
      ),
    ).toEqual(['made']);
  });
  it('names several ciphers apart', () => {
    expect(
      castingRule({ made: null, fitments: [] }, [cipher('1928-01-01', null), cipher('1930-01-01', null)])?.lanes.map(
        ({ name }) => name,
      ),
    ).toEqual(['cipher 1 in use', 'cipher 2 in use']);
  });
  it('is not drawn where nothing is dated', () => {
    expect(
      castingRule({ made: { from: null, to: null }, fitments: [fitment('as-built', null)] }, [cipher(null, null)]),
    ).toBeNull();
  });
});

describe('ciphersInUse', () => {
  it('keeps those that share a day with the years it was made', () => {
    const [early, touching, open] = [
      cipher('1919-01-01', '1927-12-31'),
      cipher('1930-01-01', '1938-07-01'),
      cipher('1944-03-31', null),
    ];
    expect(ciphersInUse(MADE, [early, touching, open])).toEqual([touching, open]);
  });
  it('keeps all where the years are not on record', () => {
    expect(ciphersInUse(null, [cipher('1919-01-01', '1927-12-31')])).toHaveLength(1);
  });
});

describe('joinSpans', () => {
  it('runs together what overlaps and keeps apart what does not', () => {
    expect(
      joinSpans([
        { from: '1950-01-01', to: '1951-01-01' },
        { from: '1938-01-01', to: '1944-01-01' },
        { from: '1940-01-01', to: '1942-01-01' },
      ]),
    ).toEqual([
      { from: '1938-01-01', to: '1944-01-01' },
      { from: '1950-01-01', to: '1951-01-01' },
    ]);
  });
  it('lets an open end swallow what comes after', () => {
    expect(
      joinSpans([
        { from: '1938-01-01', to: null },
        { from: '1950-01-01', to: '1951-01-01' },
      ]),
    ).toEqual([{ from: '1938-01-01', to: null }]);
  });
});

describe('words', () => {
  it('tells castings of one number apart by their pattern', () => {
    expect(sayCasting({ number: 'B4406', pattern: 'first pattern' })).toBe('B4406, first pattern');
    expect(sayCasting({ number: 'B4406', pattern: null })).toBe('B4406');
  });
  it('says which way round one goes for the other', () => {
    expect(sayInterchange('both-ways', 'newer')).toBe('each goes in place of the other');
    expect(sayInterchange('new-for-old', 'newer')).toMatch(/^it goes in place of this one, but/);
    expect(sayInterchange('new-for-old', 'older')).toMatch(/^this one goes in place of it, but/);
  });
});
