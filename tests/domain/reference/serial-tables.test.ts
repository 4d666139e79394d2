import { describe, expect, test } from 'vitest';
import { overlap } from '#domain/dates/day-span.ts';
import { dayOf, type DaySpan } from '#domain/dates/day.ts';
import { placeSerial, type Placement, type SerialPlace } from '#domain/serials/build-window.ts';
import { parseSerial } from '#domain/serials/serial.ts';
import type { SerialTable } from '#fixtures/reference/reference-table.ts';
import { SERIAL_TABLES } from '#fixtures/reference/tables.ts';
import { usPatentNumbers } from '#fixtures/reference/us-patent-numbers.ts';
import { BASIS_LABELS } from './basis-labels.ts';
import { readExpectation } from './expectation.ts';

const NO_PREFIX = '';

function placed(code: string, table: SerialTable): SerialPlace {
  const serial = parseSerial(code, [NO_PREFIX]);
  if (!serial.ok) throw new Error(`${code}: ${serial.fault.code}`);
  return placeSerial(serial.value, [{ id: 'numbers', prefix: NO_PREFIX, ranges: table.ranges }]);
}

function registersReading(code: string, table: SerialTable): Placement {
  const [first] = placed(code, table).placements;
  if (first === undefined) throw new Error(`${code} is nowhere`);
  return first;
}

/**
 * The numbers of these tables were issued in order: one in a gap is no older than the range below it and older than the one
 * above.
 */
function spanOfGap({ below, above }: Placement): DaySpan {
  if (below === null || above === null) throw new Error('no gap');
  return { from: below.built.from, to: above.built.from - 1 };
}

describe.each(SERIAL_TABLES)('$name ($source.title)', (table) => {
  const [earliest] = table.ranges;

  test.each(table.examples.map((example) => ({ ...example, label: BASIS_LABELS[example.basis] })))(
    '$label: $code is $expect, $standing ($note)',
    ({ code, expect: expected, standing }) => {
      const placement = registersReading(code, table);
      expect(placement.standing).toBe(standing);
      const expectation = readExpectation(expected);
      if (expectation.kind !== 'alternatives') {
        expect(standing).toBe('before-first');
        return;
      }
      const [only] = expectation.alternatives;
      if (only?.kind !== 'days' || earliest === undefined) throw new Error('an example of a serial table names days');
      if (standing === 'gap') {
        expect(spanOfGap(placement)).toEqual(only.span);
      } else if (standing === 'after-last') {
        expect(placement.below?.built.to).toBeLessThan(only.span.from);
      } else if (only.openEnded) {
        expect(placement.window?.from).toBe(only.span.from);
        expect(placement).toMatchObject({ likely: null, range: { last: null } });
      } else {
        expect(placement.window).toEqual(overlap(only.span, { from: earliest.built.from, to: only.span.to }));
        expect(placement.likely).not.toBeNull();
      }
    },
  );

  test('ranges of one account share no number', () => {
    for (const one of table.ranges) {
      const others = table.ranges.filter((other) => other !== one && other.accountId === one.accountId);
      expect(others.some((other) => other.first <= (one.last ?? other.first) && one.first <= (other.last ?? one.first))).toBe(
        false,
      );
    }
  });
});

describe('the disputed first number of 1927 (us_patent_numbers, conflicts)', () => {
  const year = (of: number): DaySpan => ({ from: dayOf(of, 1, 1), to: dayOf(of, 12, 31) });

  test('between the two accounts a number is of 1927 by the one and of 1926 by the other', () => {
    expect(placed('1612750', usPatentNumbers).placements.map((one) => [one.accountId, one.window])).toEqual([
      ['lists seen', year(1927)],
      ['memory', year(1926)],
    ]);
  });

  test('from 1612790 on they agree', () => {
    expect(placed('1612790', usPatentNumbers).placements.map((one) => one.window)).toEqual([year(1927), year(1927)]);
  });
});

describe('a small l for the digit 1 (us_patent_numbers, conflicts)', () => {
  test('is matched and reported', () => {
    const serial = parseSerial('l,787,424', [NO_PREFIX]);
    expect(serial).toMatchObject({ ok: true, value: { number: 1_787_424n, substitutions: [{ at: 0, seen: 'l', taken: '1' }] } });
  });
});
