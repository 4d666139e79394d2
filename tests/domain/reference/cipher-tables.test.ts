import { describe, expect, test } from 'vitest';
import type { Candidate } from '#domain/ciphers/decoding.ts';
import { civilOf, writeDay, type DaySpan } from '#domain/dates/day.ts';
import type { CipherExample, CipherTable } from '#fixtures/reference/reference-table.ts';
import { CIPHER_TABLES } from '#fixtures/reference/tables.ts';
import { BASIS_LABELS } from './basis-labels.ts';
import { decodeText } from './decoding-of-an-example.ts';
import { expectedDays, readExpectation } from './expectation.ts';

/** The answers of every cipher the example may be written in, put together. */
function candidatesOf(table: CipherTable, example: CipherExample): readonly Candidate[] {
  return (example.ciphers ?? Object.keys(table.ciphers)).flatMap((name) => {
    const definition = table.ciphers[name];
    if (definition === undefined) throw new Error(`${table.name} has no cipher ${name}`);
    const decoding = decodeText(example.reading ?? example.code, definition, example);
    expect(decoding.total).toBe(decoding.candidates.length);
    return decoding.candidates;
  });
}

function valueOf(candidate: Candidate, field: string): number | null {
  return candidate.spans.find((span) => span.field === field)?.value ?? null;
}

function written(spans: readonly DaySpan[]): readonly string[] {
  return spans.map((span) => `${writeDay(span.from)}/${writeDay(span.to)}`).toSorted();
}

/** Spans that overlap or meet run together. */
function joined(spans: readonly DaySpan[]): readonly DaySpan[] {
  return spans
    .toSorted((one, other) => one.from - other.from)
    .reduce<readonly DaySpan[]>((whole, span) => {
      const last = whole.at(-1);
      if (last === undefined || span.from > last.to + 1) return [...whole, { from: span.from, to: span.to }];
      return [...whole.slice(0, -1), { from: last.from, to: Math.max(last.to, span.to) }];
    }, []);
}

/** The weekday comes back as a detail: its day is that many days into the week, Monday being the first. */
function onWeekday(candidate: Candidate): DaySpan {
  const day = candidate.from + Number(candidate.details['weekday']) - 1;
  return { from: day, to: day };
}

describe.each(CIPHER_TABLES)('$name ($source.title)', (table) => {
  test.each(
    table.examples.map((example) => ({ ...example, label: BASIS_LABELS[example.basis], given: example.given ?? 'nothing else' })),
  )('$label: $code is $expect, given $given ($note)', (example) => {
    const candidates = candidatesOf(table, example);
    const expectation = readExpectation(example.expect);

    if (expectation.kind === 'invalid') {
      expect(candidates).toEqual([]);
    } else if (expectation.kind === 'unresolved-year') {
      const days = candidates.map((candidate) => civilOf(candidate.from));
      expect(new Set(days.map((day) => day.year)).size).toBeGreaterThan(1);
      expect(new Set(days.map((day) => `${String(day.month)}-${String(day.day)}`)).size).toBe(1);
    } else if (expectation.alternatives.some((one) => one.kind === 'week')) {
      const weeks = candidates.map((candidate) => ({
        kind: 'week',
        year: valueOf(candidate, 'year'),
        week: valueOf(candidate, 'week'),
      }));
      expect(weeks).toHaveLength(expectation.alternatives.length);
      expect(weeks).toEqual(expect.arrayContaining([...expectation.alternatives]));
      expect(candidates.every((candidate) => candidate.precision === 'week')).toBe(true);
    } else if (example.compare === 'days-covered') {
      expect(written(joined(candidates))).toEqual(written(expectedDays(example.expect)));
    } else {
      const found = example.compare === 'weekday-added' ? candidates.map(onWeekday) : candidates;
      expect(written(found)).toEqual(written(expectedDays(example.expect)));
    }
  });

  test('every cipher of the table is used by an example', () => {
    const used = new Set(table.examples.flatMap((example) => example.ciphers ?? Object.keys(table.ciphers)));
    expect([...used].toSorted()).toEqual(Object.keys(table.ciphers).toSorted());
  });
});

describe('week 1 has two meanings (the reference’s rules worth a test of their own)', () => {
  const firstDay = (text: string, table: string, cipher: string): string => {
    const definition = CIPHER_TABLES.find((one) => one.name === table)?.ciphers[cipher];
    if (definition === undefined) throw new Error(`${table} has no cipher ${cipher}`);
    return decodeText(text, definition)
      .candidates.map((candidate) => writeDay(candidate.from))
      .join();
  };

  test('in 2009: 4 January by the full Sunday-to-Saturday week, 29 December by the first Thursday', () => {
    expect(firstDay('0109', 'us_tyre_date_code', 'fourSymbols')).toBe('2009-01-04');
    expect(firstDay('2009-W01', 'iso_8601_week_ordinal', 'week')).toBe('2008-12-29');
  });
});
