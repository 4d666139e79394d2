import { render, screen } from '@testing-library/react';
import { MemoryRouter } from 'react-router-dom';
import { describe, expect, it } from 'vitest';
import type { FactSource } from '#contract/common.ts';
import { parseReading } from '#domain/marks/reading.ts';
import { MarkPlate, readingOf } from '#client/ui/mark-plate.tsx';
import { Block } from '#client/ui/page-grid.tsx';
import { NoteRef } from '#client/ui/margin-notes.tsx';
import { SourceLine } from '#client/ui/source-line.tsx';
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

const source = (note: string | null): FactSource => ({ field: null, source: { slug: 'a', kind: 'book', title: 'Book a' }, locator: 'page 3', note });

describe('SourceLine', () => {
  it('names the source, where in it, and the remark', () => {
    render(<SourceLine source={source('Seen as a photo.')} />, { wrapper: MemoryRouter });
    expect(screen.getByRole('link', { name: 'Book a' }).getAttribute('href')).toBe('/sources/a');
    expect(document.body.textContent).toContain('Book a, page 3. Seen as a photo.');
  });
  it('says where there is no source', () => {
    render(<SourceLine source={null} />, { wrapper: MemoryRouter });
    expect(document.body.textContent).toContain('No source on record.');
  });
});

describe('Block', () => {
  it('puts numbered notes beside what they stand behind', () => {
    render(
      <MemoryRouter>
        <Block heading="What it is" notes={[{ number: 4, body: 'Book a, page 3.' }]}>
          Made 1938
          <NoteRef numbers={[4]} />
        </Block>
      </MemoryRouter>,
    );
    expect(screen.getByRole('link', { name: 'Note 4' }).getAttribute('href')).toBe('#note-4');
    expect(document.getElementById('note-4')?.textContent).toContain('Book a, page 3.');
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
