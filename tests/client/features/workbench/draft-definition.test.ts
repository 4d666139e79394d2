// @vitest-environment node
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { BLANK, readDraft } from '#client/features/workbench/draft-definition.ts';
import { compileCipher } from '#domain/ciphers/compile.ts';
import { CIPHER_TABLES } from '#fixtures/reference/tables.ts';
import { TEN } from './samples.ts';

const DEFINITIONS = CIPHER_TABLES.flatMap(({ name, ciphers }) => Object.entries(ciphers).map(([cipher, definition]) => [`${name} ${cipher}`, definition] as const));

describe('readDraft', () => {
  it.each(DEFINITIONS)('takes %s as it is', (_, definition) => {
    expect(readDraft(JSON.parse(JSON.stringify(definition)))).toEqual(definition);
  });
  it.each([null, undefined, {}, [], 7, 'cipher'])('begins blank from %j', (value) => {
    expect(readDraft(value)).toEqual(BLANK);
  });
  it('keeps what is half said, and only leaves out what is no part of a definition', () => {
    const half = {
      fields: [{ field: 'month' }, { field: 'literal' }, { field: 'phase' }, 3, { field: 'day', symbols: 'key', width: 99 }],
      symbolSets: { key: { kind: 'digits', symbols: { B: '' } }, odd: { kind: 'riddle' } },
      usedFrom: '19',
      usedTo: null,
      exceptions: [{ fields: { month: 'B' }, from: '' }],
      colour: 'red',
    };
    expect(readDraft(half)).toEqual({
      fields: [
        { field: 'month', symbols: 'numerals', width: 1 },
        { field: 'literal', text: '' },
        { field: 'day', symbols: 'key', width: 99 },
      ],
      symbolSets: { key: { kind: 'digits', symbols: { B: '' } } },
      usedFrom: '19',
      usedTo: null,
      exceptions: [{ fields: { month: 'B' }, from: '', to: '' }],
    });
  });
  it('makes something that can be checked of any JSON, and reads that as itself again', () => {
    fc.assert(
      fc.property(fc.oneof(fc.jsonValue(), fc.record({ fields: fc.jsonValue(), symbolSets: fc.jsonValue(), exceptions: fc.jsonValue() })), (value) => {
        const draft = readDraft(value);
        compileCipher(draft);
        expect(readDraft(draft)).toEqual(draft);
      }),
    );
  });
  it('keeps a whole definition whole', () => {
    expect(readDraft(TEN)).toEqual(TEN);
  });
});
