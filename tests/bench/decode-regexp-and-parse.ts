import { isValid, parse } from 'date-fns';
import type { CipherDefinition, FieldDefinition, SymbolSet } from '#domain/ciphers/definition.ts';

/**
 * What one would write without a decoder, for ciphers of month, day and year: a regular expression for each way to divide the
 * mark, and a date parser for what it captures. Reads sure glyphs and `?`; knows no shares, weeks, exceptions or repeaters.
 */
export function regexpAndParse(definition: CipherDefinition): (mark: string) => readonly Date[] {
  const patterns = widthsOf(definition.fields).map((widths) => {
    const groups = widths.map((width) => `([A-Z0-9?]{${width}})`).join('');
    // eslint-disable-next-line no-restricted-syntax -- the parts are this bench's own widths, and such patterns are what is measured
    return new RegExp(`^${groups}$`);
  });
  const firstYear = Number(definition.usedFrom.slice(0, 4));
  const lastYear = Number(definition.usedTo?.slice(0, 4));
  return (mark) =>
    patterns.flatMap((pattern) => {
      const captured = pattern.exec(mark);
      if (captured === null) return [];
      const values = definition.fields.map((field, index) => valuesOf(field, captured[index + 1]!, definition, firstYear, lastYear));
      return combined(values).flatMap((numbers) => {
        const shown = Object.fromEntries(definition.fields.map(({ field }, index) => [field, numbers[index]!]));
        const date = parse(`${shown['year']} ${shown['month']} ${shown['day']}`, 'yyyy M d', new Date(0));
        return isValid(date) ? [date] : [];
      });
    });
}

function widthsOf(fields: readonly FieldDefinition[]): number[][] {
  return fields.reduce<number[][]>(
    (all, field) => {
      const width = field.field === 'literal' ? field.text.length : field.width;
      const [least, most] = typeof width === 'number' ? [width, width] : width;
      return all.flatMap((widths) => Array.from({ length: most - least + 1 }, (_, index) => [...widths, least + index]));
    },
    [[]],
  );
}

function valuesOf(field: FieldDefinition, text: string, definition: CipherDefinition, firstYear: number, lastYear: number): string[] {
  if (field.field === 'literal') return [text];
  const texts = combined([...text].map((glyph) => numbersOf(glyph, definition.symbolSets[field.symbols]))).map((parts) => parts.join(''));
  if (field.field !== 'year') return texts.filter((number) => !number.startsWith('0'));
  return texts.flatMap((ending) => {
    const years = Array.from({ length: lastYear - firstYear + 1 }, (_, index) => String(firstYear + index));
    return years.filter((year) => year.endsWith(ending));
  });
}

function numbersOf(glyph: string, set: SymbolSet | undefined): string[] {
  if (set === undefined) return glyph === '?' ? [...'0123456789'] : /\d/.test(glyph) ? [glyph] : [];
  return Object.entries(set.symbols)
    .filter(([symbol]) => glyph === '?' || symbol === glyph)
    .map(([, value]) => String(value));
}

function combined(lists: readonly (readonly string[])[]): string[][] {
  return lists.reduce<string[][]>((all, list) => all.flatMap((start) => list.map((item) => [...start, item])), [[]]);
}
