import { describe, expect, test } from 'vitest';
import { EXAMPLE_COUNTS } from '#fixtures/reference/example-counts.ts';
import { merchantAmountMarks } from '#fixtures/reference/merchant-cost-marks.ts';
import { NOT_EXPRESSIBLE } from '#fixtures/reference/not-expressible.ts';
import { BASES, type Basis } from '#fixtures/reference/reference-table.ts';
import { CIPHER_TABLES, SERIAL_TABLES } from '#fixtures/reference/tables.ts';

const covered = [...CIPHER_TABLES, ...SERIAL_TABLES, merchantAmountMarks];
const setAside = NOT_EXPRESSIBLE.map((one) => ({ name: one.table, ...one }));

describe('every example of the reference is a test or is set aside with a reason', () => {
  test.each(Object.entries(EXAMPLE_COUNTS))('%s', (name, counts) => {
    const examples = [...covered, ...setAside].filter((table) => table.name === name).flatMap((table) => [...table.examples]);
    const found = Object.fromEntries(BASES.map((basis) => [basis, examples.filter((example) => example.basis === basis).length]));
    expect(found).toEqual(counts);
  });

  test('no table is here that the reference does not hold', () => {
    expect([...covered, ...setAside].filter((table) => !(table.name in EXAMPLE_COUNTS))).toEqual([]);
  });

  test('every reason is said', () => {
    expect(NOT_EXPRESSIBLE.filter((one) => one.reason.trim() === '' || one.examples.length === 0)).toEqual([]);
  });

  test('how many stand on which side', () => {
    const countOf = (
      tables: readonly { readonly examples: readonly { readonly basis: Basis }[] }[],
    ): Readonly<Record<string, number>> => {
      const examples = tables.flatMap((table) => [...table.examples]);
      return { all: examples.length, published: examples.filter((example) => example.basis === 'published').length };
    };
    expect(countOf(covered)).toEqual({ all: 198, published: 53 });
    expect(countOf(setAside)).toEqual({ all: 29, published: 4 });
  });
});
