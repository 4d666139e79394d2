import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { parseSerial, plainPrefix, SERIAL_LIMITS, writeSerial, type ParsedSerial } from '#domain/serials/serial.ts';

function parsed(text: string, prefixes: readonly string[]): ParsedSerial {
  const result = parseSerial(text, prefixes);
  if (!result.ok) throw new Error(`refused: ${result.fault.code} at ${String(result.fault.at)}`);
  return result.value;
}

describe('a serial with a known prefix', () => {
  test.each([
    '3C1207',
    '3c1207',
    '3C 1207',
    '3C-1207',
    '3C.1207',
    ' 3 c 1 2 0 7 ',
    '3C-0001207',
    '3C‑1207',
    '3C1,207',
    '３Ｃ１２０７',
  ])('%s', (text) => {
    expect(parsed(text, ['3C'])).toMatchObject({ asStamped: text, prefix: '3C', number: 1207n, suffix: '', substitutions: [] });
  });

  test('keeps the text and the leading zeros as read', () => {
    expect(parsed('3c-0012a', ['3C'])).toEqual({
      asStamped: '3c-0012a',
      prefix: '3C',
      number: 12n,
      digits: '0012',
      suffix: 'A',
      substitutions: [],
    });
  });

  test('the longest prefix that matches is meant', () => {
    expect(parsed('BO12', ['B', 'BO'])).toMatchObject({ prefix: 'BO', number: 12n, substitutions: [] });
    expect(parsed('B12', ['B', 'BO'])).toMatchObject({ prefix: 'B', number: 12n });
  });

  test('a glyph as typed goes before its look-alike', () => {
    expect(parsed('B012', ['B', 'BO'])).toMatchObject({ prefix: 'B', digits: '012', substitutions: [] });
    expect(parsed('B012', ['BO'])).toMatchObject({
      prefix: 'BO',
      number: 12n,
      substitutions: [{ at: 1, seen: '0', taken: 'O' }],
    });
  });

  test('prefixes may be given in any spelling', () => {
    expect(parsed('3C1207', ['3c-']).prefix).toBe('3C');
    expect(plainPrefix(' n. o-')).toBe('NO');
  });

  test('a series of bare numbers has the empty prefix', () => {
    expect(parsed('0042', [''])).toMatchObject({ prefix: '', number: 42n, digits: '0042' });
    expect(parsed('42b', ['', '3C'])).toMatchObject({ prefix: '', number: 42n, suffix: 'B' });
  });
});

describe('look-alikes', () => {
  test.each([
    { text: '3C12O7', number: 1207n, substitutions: [{ at: 4, seen: 'O', taken: '0' }] },
    { text: '3C-i207', number: 1207n, substitutions: [{ at: 3, seen: 'i', taken: '1' }] },
    {
      text: '3C l2O7',
      number: 1207n,
      substitutions: [
        { at: 3, seen: 'l', taken: '1' },
        { at: 5, seen: 'O', taken: '0' },
      ],
    },
    {
      text: '3C II',
      number: 11n,
      substitutions: [
        { at: 3, seen: 'I', taken: '1' },
        { at: 4, seen: 'I', taken: '1' },
      ],
    },
  ])('$text is $number, and says what was taken for what', ({ text, number, substitutions }) => {
    expect(parsed(text, ['3C'])).toMatchObject({ prefix: '3C', number, suffix: '', substitutions });
  });

  test('a capital L and a small l at the end are a suffix', () => {
    expect(parsed('3C12L', ['3C'])).toMatchObject({ number: 12n, suffix: 'L', substitutions: [] });
    expect(parsed('3c12l', ['3C'])).toMatchObject({ number: 12n, suffix: 'L', substitutions: [] });
  });

  test('letters alone are no number', () => {
    expect(parseSerial('OI', [''])).toEqual({ ok: false, fault: { code: 'no-digits', at: 0 } });
  });
});

describe('a prefix nobody knows', () => {
  test.each([
    { text: 'K44', prefix: 'K', digits: '44', suffix: '' },
    { text: 'BO123', prefix: 'BO', digits: '123', suffix: '' },
    { text: 'A12B3', prefix: 'A12B', digits: '3', suffix: '' },
    { text: 'AB12CO', prefix: 'AB', digits: '12', suffix: 'CO' },
    { text: 'K4O4', prefix: 'K', digits: '404', suffix: '' },
    { text: '1207', prefix: '', digits: '1207', suffix: '' },
  ])('$text splits at its last number', ({ text, prefix, digits, suffix }) => {
    expect(parsed(text, ['3C'])).toMatchObject({ prefix, digits, suffix });
  });
});

describe('what it refuses', () => {
  test.each([
    { text: '', fault: { code: 'no-digits', at: 0 } },
    { text: ' - . ', fault: { code: 'no-digits', at: 0 } },
    { text: 'ABC', fault: { code: 'no-digits', at: 0 } },
    { text: '3C🚜1207', fault: { code: 'not-a-glyph', at: 2 } },
    { text: '🚜🚜1', fault: { code: 'not-a-glyph', at: 0 } },
    { text: '3C1207?', fault: { code: 'not-a-glyph', at: 6 } },
    { text: '3C/1207', fault: { code: 'not-a-glyph', at: 2 } },
    { text: '３Ｃ１２０７é', fault: { code: 'not-a-glyph', at: 6 } },
    { text: '3Cß1', fault: { code: 'not-a-glyph', at: 2 } },
    { text: '3C٣', fault: { code: 'not-a-glyph', at: 2 } },
    { text: '1'.repeat(41), fault: { code: 'too-long', at: 40 } },
    { text: '1'.repeat(100_000), fault: { code: 'too-long', at: 40 } },
  ])('$fault.code at $fault.at', ({ text, fault }) => {
    expect(parseSerial(text, ['3C', ''])).toEqual({ ok: false, fault });
  });

  test('a number that no range could end at', () => {
    expect(parsed(String(SERIAL_LIMITS.number), ['']).number).toBe(9_223_372_036_854_775_806n);
    expect(parseSerial(`A-${String(SERIAL_LIMITS.number + 1n)}`, ['A'])).toEqual({
      ok: false,
      fault: { code: 'number-too-large', at: 2 },
    });
    expect(parsed('0'.repeat(38) + '12', ['']).number).toBe(12n);
  });
});

describe('laws', () => {
  const glyphs = (from: string, most: number): fc.Arbitrary<string> =>
    fc.string({ unit: fc.constantFrom(...from), maxLength: most });
  const prefixes = fc.array(glyphs('ABOIL013', 3), { maxLength: 4 });
  const text = glyphs('ABOILoil0123- ', 10);

  test('writing what was read and reading it again is the same serial', () => {
    fc.assert(
      fc.property(text, prefixes, (typed, known) => {
        const first = parseSerial(typed, known);
        if (!first.ok) return;
        const { prefix, number, digits, suffix } = first.value;
        expect(parsed(writeSerial(first.value), known)).toMatchObject({ prefix, number, digits, suffix, substitutions: [] });
      }),
      { numRuns: 3000 },
    );
  });

  test('separators and case change nothing but the places', () => {
    fc.assert(
      fc.property(
        glyphs('AB0123', 8),
        prefixes,
        fc.array(fc.constantFrom('', ' ', '-', '.'), { minLength: 8, maxLength: 8 }),
        (typed, known, gaps) => {
          const spaced = Array.from(typed, (glyph, place) => glyph.toLowerCase() + (gaps[place] ?? '')).join('');
          const plain = parseSerial(typed, known);
          const other = parseSerial(spaced, known);
          expect(other.ok).toBe(plain.ok);
          if (plain.ok && other.ok) expect(writeSerial(other.value)).toBe(writeSerial(plain.value));
        },
      ),
    );
  });

  test('any text is answered', () => {
    fc.assert(
      fc.property(
        fc.string({ unit: 'binary', maxLength: 60 }),
        prefixes,
        (typed, known) => typeof parseSerial(typed, known).ok === 'boolean',
      ),
    );
  });
});
