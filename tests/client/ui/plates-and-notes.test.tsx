import { render, screen } from '@testing-library/react';
import { MemoryRouter } from 'react-router-dom';
import { describe, expect, it } from 'vitest';
import type { FactSource, Provenance } from '#contract/common.ts';
import { parseReading } from '#domain/marks/reading.ts';
import { MarkPlate, readingOf } from '#client/ui/mark-plate.tsx';
import { Block } from '#client/ui/page-grid.tsx';
import { NoteRef } from '#client/ui/margin-notes.tsx';
import { provenanceNotes } from '#client/ui/provenance-notes.tsx';
import { TimeRule } from '#client/ui/time-rule.tsx';
import { dayOf } from '#domain/dates/day.ts';

describe('MarkPlate', () => {
  it('is read out glyph by glyph', () => {
    const parsed = parseReading('B?-[OD]*');
    if (!parsed.ok) throw new Error(parsed.fault.message);
    render(<MarkPlate reading={parsed.value} />);
    screen.getByRole('img', { name: 'Mark B, one that can’t be read, gap, O or D, some broken away' });
  });
  it('says each way to split it', () => {
    const groups = [
      { field: 'month', start: 0, end: 1, value: '1' },
      { field: 'day', start: 1, end: 3, value: '13' },
    ];
    render(<MarkPlate reading={readingOf('BBO')} divisions={[{ key: 'a', groups }]} />);
    expect(screen.getByRole('listitem').textContent).toContain('month 1, day 13');
  });
});

describe('readingOf', () => {
  it('takes plain text for sure glyphs and its breaks for gaps', () => {
    expect(readingOf('44-06')).toEqual({ glyphs: ['4', '4', '0', '6'].map((glyph) => ({ kind: 'sure', glyph })), breaks: [2] });
    expect(readingOf(' B- ').breaks).toEqual([]);
  });
});

const source = (slug: string, locator: string | null = null): FactSource => ({ field: null, source: { slug, kind: 'book', title: `Book ${slug}` }, locator, note: null });
const entered = (...sources: FactSource[]): Provenance => ({ version: 2, enteredBy: 'Two Valleys club', enteredAt: '2026-03-04T10:00:00Z', sources });

describe('provenanceNotes', () => {
  it('numbers each source once, however many facts it stands behind', () => {
    const { notes, numbersOf } = provenanceNotes(
      [
        { key: 'made', provenance: entered(source('a', 'page 3')) },
        { key: 'poured', provenance: entered(source('b'), source('a', 'page 3')) },
        { key: 'tell', provenance: entered(source('a', 'page 9')) },
      ],
      4,
    );
    expect(notes.map(({ number }) => number)).toEqual([4, 5, 6]);
    expect([numbersOf('made'), numbersOf('poured'), numbersOf('tell'), numbersOf('other')]).toEqual([[4], [5, 4], [6], []]);
  });
  it('stands in the margin with who entered it, and says where there is no source', () => {
    const { notes, numbersOf } = provenanceNotes([{ key: 'a', provenance: entered(source('a', 'page 3')) }, { key: 'b', provenance: entered() }]);
    render(
      <MemoryRouter>
        <Block heading="What it is" notes={notes}>
          Made 1938
          <NoteRef numbers={numbersOf('a')} />
        </Block>
      </MemoryRouter>,
    );
    expect(screen.getByRole('link', { name: 'Note 1' }).getAttribute('href')).toBe('#note-1');
    expect(document.getElementById('note-1')?.textContent).toContain('Book a, page 3.Entered by Two Valleys club, 4 Mar 2026. Version 2.');
    expect(document.getElementById('note-2')?.textContent).toContain('No source on record.');
  });
});

describe('TimeRule', () => {
  it('is a picture with a name and a table that says the same', () => {
    const day = dayOf(1941, 1, 13);
    render(
      <TimeRule title="When it was poured" focus={[{ from: day, to: day }]} lanes={[{ kind: 'ticks', name: 'poured', ticks: [{ key: 'a', from: day, to: day, share: 1, tone: null, label: '13 Jan 1941' }] }]} />,
    );
    screen.getByRole('img', { name: 'When it was poured' });
    expect(screen.getByRole('rowheader', { hidden: true }).textContent).toBe('poured');
  });
});
