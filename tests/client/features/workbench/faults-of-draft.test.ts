// @vitest-environment node
import { describe, expect, it } from 'vitest';
import { BLANK } from '#client/features/workbench/draft-definition.ts';
import { withDigitSymbols } from '#client/features/workbench/digit-symbols.ts';
import { withExceptionAdded } from '#client/features/workbench/edit-exceptions.ts';
import { withFieldAdded } from '#client/features/workbench/edit-layout.ts';
import { checkDraft, mergedFaults } from '#client/features/workbench/faults-of-draft.ts';
import { placesOf } from '#client/features/workbench/places.ts';
import { sayWhere } from '#client/features/workbench/say-where.ts';
import type { CipherDefinition } from '#domain/ciphers/definition.ts';
import { CIPHER_TABLES } from '#fixtures/reference/tables.ts';
import { KEY, TEN } from './samples.ts';

/** Each fault as the bench lists it, with the id of its control. */
function listed(definition: CipherDefinition): string[] {
  const { placed } = placesOf('d', definition, checkDraft(definition).faults);
  return placed.map((fault) => `${sayWhere(fault, definition)}: ${fault.message} #${fault.controlId}`);
}

describe('checkDraft', () => {
  it.each(CIPHER_TABLES.flatMap(({ name, ciphers }) => Object.entries(ciphers).map(([cipher, definition]) => [name, cipher, definition] as const)))(
    'finds nothing in %s %s',
    (_name, _cipher, definition) => {
      const checked = checkDraft(definition);
      expect(checked.faults).toEqual([]);
      expect(checked.compiled).not.toBeNull();
    },
  );
  it('says of a blank one what is to be said first', () => {
    expect(listed(BLANK)).toEqual([
      'First day in use: Say the first day #d-usedFrom',
      'Last day in use: Say the last day #d-usedTo',
      'Layout: A cipher has one field at least #d-fields',
    ]);
  });
  it('puts a letter that is there twice at its figure', () => {
    const { symbols } = withDigitSymbols(KEY, '5', 'KB');
    expect(listed({ ...TEN, symbolSets: { key: { kind: 'digits', symbols } } })).toEqual(['“key”: “B” is there twice #d-symbolSets-key-digit-5']);
  });
  it('puts a missing figure at the fields that need it', () => {
    expect(listed({ ...TEN, symbolSets: { key: withDigitSymbols(KEY, '0', '') } })).toEqual([
      'First field: The month needs a symbol for 0 #d-fields-0-symbols',
      'Second field: The day needs a symbol for 0 #d-fields-1-symbols',
      'Third field: The year needs a symbol for 0 #d-fields-2-symbols',
    ]);
  });
  it('puts a second claim on the month at the field that makes it', () => {
    expect(listed(withFieldAdded(TEN, 'month'))).toEqual(['Fourth field: Two fields claim the month #d-fields-3']);
  });
  it('tells the limits of the form once the meaning is sound', () => {
    const fields = [...TEN.fields, { field: 'other', symbols: 'numerals', width: 1, name: 'x'.repeat(40) } as const];
    expect(checkDraft({ ...TEN, fields }).faults).toEqual([]);
    const sets = Object.fromEntries(Array.from({ length: 13 }, (_, place) => [`set ${place}`, KEY]));
    const checked = checkDraft({ ...TEN, symbolSets: { ...sets, key: KEY } });
    expect(checked.compiled).toBeNull();
    expect(checked.faults).toEqual([{ path: ['symbolSets'], message: 'At most 12 symbol sets' }]);
  });
  it('finds what an exception has not said yet', () => {
    expect(listed(withExceptionAdded(TEN))).toEqual([
      'First exception: Say the first day #d-exceptions-0-from',
      'First exception: Say the last day #d-exceptions-0-to',
      'First exception: An exception names the symbols of one field at least #d-exceptions-0',
    ]);
  });
});

describe('mergedFaults', () => {
  const own = [{ path: ['usedFrom'], message: 'Say the first day' }];
  it('adds what only the register found, and says nothing twice', () => {
    const told = [
      { path: ['usedFrom'], message: 'not a day' },
      { path: ['fields', 0, 'name'], message: 'Too long' },
    ];
    expect(mergedFaults(own, told)).toEqual([...own, told[1]]);
  });
  it('forgets what the register said once nothing is wrong any more', () => {
    expect(mergedFaults([], [{ path: ['usedFrom'], message: 'not a day' }])).toEqual([]);
  });
});

describe('placesOf', () => {
  const at = (...path: (string | number)[]) => placesOf('d', TEN, [{ path, message: 'Wrong' }]).placed[0]?.controlId;
  it.each([
    [['fields', 1, 'width'], 'd-fields-1-width'],
    [['fields', 1, 'width', 0], 'd-fields-1-width'],
    [['symbolSets', 'key', 'symbols', 'R'], 'd-symbolSets-key-digit-7'],
    [['symbolSets', 'key', 'symbols'], 'd-symbolSets-key'],
    [['symbolSets', 'key', 'repeater'], 'd-symbolSets-key-repeater'],
    [['symbolSets', 'gone', 'symbols', 'R'], 'd-fields'],
    [['exceptions', 3, 'fields', 'month'], 'd-exceptions-3-fields-month'],
    [['yearStart'], 'd-yearStart'],
    [['something'], 'd-fields'],
    [[], 'd-fields'],
  ])('shows a fault at %j with %s', (path, id) => {
    expect(at(...path)).toBe(id);
  });
  it('gives the fault back to the control it belongs to, and to no other', () => {
    const { places } = placesOf('d', TEN, [{ path: ['symbolSets', 'key', 'symbols', 'R'], message: 'Wrong' }]);
    expect(places.fault('symbolSets', 'key', 'digit', '7')).toBe('Wrong');
    expect(places.fault('symbolSets', 'key', 'digit', '8')).toBeNull();
  });
});
