// @vitest-environment node
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  fieldsIn,
  widthStepped,
  withField,
  withFieldAdded,
  withFieldMoved,
  withKind,
  withNewSet,
  withoutField,
  withoutSet,
} from '#client/features/workbench/edit-layout.ts';
import { CIPHER_LIMITS, FIELD_KINDS } from '#domain/ciphers/definition.ts';
import { TEN } from './samples.ts';

const kinds = (definition: typeof TEN) => definition.fields.map(({ field }) => field);

describe('edits of a layout', () => {
  it('put a field in at the end and take one out', () => {
    expect(kinds(withFieldAdded(TEN, 'other'))).toEqual(['month', 'day', 'year', 'other']);
    expect(kinds(withoutField(TEN, 1))).toEqual(['month', 'year']);
  });
  it('move a field by one place, and at either end not at all', () => {
    expect(kinds(withFieldMoved(TEN, 0, 1))).toEqual(['day', 'month', 'year']);
    expect(kinds(withFieldMoved(TEN, 2, -1))).toEqual(['month', 'year', 'day']);
    expect(withFieldMoved(TEN, 0, -1)).toBe(TEN);
    expect(withFieldMoved(TEN, 2, 1)).toBe(TEN);
  });
  it('undo a move by the move back', () => {
    fc.assert(
      fc.property(fc.integer({ min: 0, max: 1 }), (place) => {
        expect(withFieldMoved(withFieldMoved(TEN, place, 1), place + 1, -1)).toEqual(TEN);
      }),
    );
  });
  it('keep what a field is written in when it says something else', () => {
    expect(withKind(TEN, 0, 'quarter').fields[0]).toEqual({ field: 'quarter', symbols: 'key', width: [1, 2] });
    expect(withKind(TEN, 0, 'literal').fields[0]).toEqual({ field: 'literal', text: '' });
    expect(withKind(TEN, 0, 'month')).toBe(TEN);
  });
  it('make a set for one field, under a name that is free', () => {
    const once = withNewSet(TEN, 1, 'digits');
    expect(once.fields[1]).toEqual({ field: 'day', symbols: 'key 2', width: [1, 2] });
    expect(once.symbolSets['key 2']).toEqual({ kind: 'digits', symbols: {} });
    const twice = withNewSet(once, 0, 'values');
    expect(twice.fields[0]).toEqual({ field: 'month', symbols: 'months', width: 1 });
    expect(fieldsIn(twice, 'key').map(({ field }) => field)).toEqual(['year']);
  });
  it('take away a set and nothing else', () => {
    expect(withoutSet(withNewSet(TEN, 0, 'values'), 'months').symbolSets).toEqual(TEN.symbolSets);
  });
  it('leave the old definition as it was', () => {
    const before = JSON.stringify(TEN);
    for (const kind of FIELD_KINDS) withFieldAdded(withKind(TEN, 1, kind), kind);
    withField(TEN, 0, { field: 'literal', text: 'S' });
    expect(JSON.stringify(TEN)).toBe(before);
  });
});

describe('widthStepped', () => {
  it.each([
    [2, 'least', -1, [1, 2]],
    [2, 'most', 1, [2, 3]],
    [2, 'least', 1, 3],
    [2, 'most', -1, 1],
    [[1, 2], 'least', 1, 2],
    [[1, 2], 'most', -1, 1],
    [1, 'least', -1, 1],
    [8, 'most', 1, 8],
  ] as const)('%j with %s by %i is %j', (width, end, by, stepped) => {
    expect(widthStepped(width, end, by)).toEqual(stepped);
  });
  it('never leaves what a field can have', () => {
    const steps = fc.array(fc.tuple(fc.constantFrom('least' as const, 'most' as const), fc.constantFrom(-1 as const, 1 as const)));
    fc.assert(
      fc.property(steps, (taken) => {
        const width = taken.reduce<ReturnType<typeof widthStepped>>((now, [end, by]) => widthStepped(now, end, by), 2);
        const [least, most] = typeof width === 'number' ? [width, width] : width;
        expect(least).toBeGreaterThanOrEqual(1);
        expect(most).toBeGreaterThanOrEqual(least);
        expect(most).toBeLessThanOrEqual(CIPHER_LIMITS.fieldWidth);
      }),
    );
  });
});
