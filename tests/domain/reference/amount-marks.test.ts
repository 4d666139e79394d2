import { describe, expect, test } from 'vitest';
import { compileCipher } from '#domain/ciphers/compile.ts';
import type { FieldSpan } from '#domain/ciphers/decoding.ts';
import { keyWithALetterTwice, merchantAmountMarks } from '#fixtures/reference/merchant-cost-marks.ts';
import { BASIS_LABELS } from './basis-labels.ts';
import { decodeText } from './decoding-of-an-example.ts';

/** The figures of the fields side by side: a field holds the number's last digits, as many as it has glyphs. */
function amountIn(spans: readonly FieldSpan[]): string {
  return spans
    .map((span) =>
      String(span.value)
        .padStart(span.end - span.start, '0')
        .slice(span.start - span.end),
    )
    .join('');
}

describe(`${merchantAmountMarks.name}, amounts (${merchantAmountMarks.source.title})`, () => {
  test.each(merchantAmountMarks.examples.map((example) => ({ ...example, label: BASIS_LABELS[example.basis] })))(
    '$label: $code by $cipher is $expect ($note)',
    ({ code, cipher, expect: amount }) => {
      const definition = merchantAmountMarks.ciphers[cipher];
      if (definition === undefined) throw new Error(`there is no cipher ${cipher}`);
      const { candidates } = decodeText(code, definition);
      expect(candidates.map((candidate) => amountIn(candidate.spans))).toEqual(amount === 'invalid' ? [] : [amount]);
    },
  );

  test('a key word with a letter twice is refused for the digit that is left without a symbol', () => {
    const compiled = compileCipher(keyWithALetterTwice);
    expect(compiled.ok ? [] : compiled.fault.map((fault) => [fault.code, fault.path])).toEqual([
      ['missing-digit', ['fields', 0, 'symbols']],
    ]);
  });
});
