import { describe, expect, test } from 'vitest';
import { parseReading } from '#domain/marks/reading.ts';
import { countingReadings, settleReadings } from '#domain/marks/settle-readings.ts';
import type { MadeReading } from '#domain/marks/settle-readings.ts';

/** `hAB` is AB by the holder; `a`, `b` … are others. What follows: `!` not independent, `x` taken back. One a day. */
function made(...lines: readonly string[]): readonly MadeReading[] {
  return lines.map((line, place) => {
    const [, reader = '', text = '', marks = ''] = /^([a-z])([^!x]+)([!x]*)$/.exec(line) ?? [];
    const reading = parseReading(text);
    if (!reading.ok) throw new Error(line);
    return {
      id: String(place),
      reader,
      reading: reading.value,
      madeAt: `2026-01-${String(place + 1).padStart(2, '0')}T12:00:00.000Z`,
      independent: !marks.includes('!'),
      asHolder: reader === 'h',
      isTakenBack: marks.includes('x'),
    };
  });
}

const PUBLIC = { hasPhoto: true, isPublic: true };

describe('which readings count', () => {
  test.each<[string, readonly string[], readonly string[]]>([
    ['each reader’s latest', ['aAB', 'bAC', 'aAD'], ['1', '2']],
    ['of those not taken back', ['aAB', 'aADx', 'bACx'], ['0']],
    ['the independent one, though another came after looking', ['aAB', 'bAC', 'aAC!'], ['0', '1']],
    ['where none is independent, the latest of each', ['aAB!', 'bAC!', 'aAD!'], ['1', '2']],
    ['none', ['aABx'], []],
  ])('%s', (_, lines, ids) => {
    expect(countingReadings(made(...lines)).map(({ id }) => id)).toEqual(ids);
  });

  test('whatever order they come in', () => {
    const all = made('aAB', 'bAC', 'aAD');
    expect(countingReadings(all.toReversed())).toEqual(countingReadings(all));
  });
});

describe('the reading in force', () => {
  test('is of independent readers, made when the newest of them was', () => {
    expect(settleReadings(made('hAB', 'aAB', 'bAC', 'cAC!'), PUBLIC)).toMatchObject({ text: 'AB', readAt: '2026-01-03T12:00:00.000Z', inForce: { whole: { agree: 2, readers: 3 } } });
  });

  test('can’t tell how sure it is where nobody reads independently', () => {
    expect(settleReadings(made('aAB!'), PUBLIC)).toMatchObject({ text: 'AB', readAt: '2026-01-01T12:00:00.000Z', inForce: null });
  });

  test('is none while nobody has read it, or all took it back', () => {
    for (const all of [made(), made('aABx')]) expect(settleReadings(all, PUBLIC)).toMatchObject({ text: null, readAt: null, inForce: null });
  });
});

describe('evidence', () => {
  test.each<[string, readonly string[], boolean, string]>([
    ['nothing but a claim', ['hAB'], false, 'claimed'],
    ['nobody has read it', [], false, 'claimed'],
    ['a photo', ['hAB'], true, 'photographed'],
    ['a photo nobody has read', [], true, 'photographed'],
    ['one reader is no second', ['aAB'], true, 'photographed'],
    ['another who agrees', ['hAB', 'aAB'], true, 'confirmed'],
    ['two others who agree', ['aAB', 'bA-B'], true, 'confirmed'],
    ['another who agrees, without a photo', ['hAB', 'aAB'], false, 'claimed'],
    ['another who doesn’t', ['hAB', 'aAC'], true, 'photographed'],
    ['another who had looked', ['hAB', 'aAB!'], true, 'photographed'],
    ['another who took it back', ['hAB', 'aABx'], true, 'photographed'],
    ['two who held it, one after the other', ['hAB', 'hAB'], true, 'photographed'],
    ['two who agree, outvoted', ['hAB', 'aAB', 'bAC', 'cAC', 'dAC'], true, 'confirmed'],
    ['two who agree on what doesn’t stand', ['hAB', 'aAB', 'bAC', 'cAC'], true, 'photographed'],
  ])('%s', (_, lines, hasPhoto, evidence) => {
    expect(settleReadings(made(...lines), { hasPhoto, isPublic: true }).evidence).toBe(evidence);
  });
});

describe('another reading is wanted', () => {
  test.each<[string, readonly string[], boolean]>([
    ['of what nobody has read', [], true],
    ['until three agree', ['hAB', 'aAB'], true],
    ['not once three agree', ['hAB', 'aAB', 'bA-B'], false],
    ['until five have read what readers differ at', ['hAB', 'aAB', 'bAC', 'cAB'], true],
    ['not once five have', ['hAB', 'aAB', 'bAC', 'cAB', 'dAD'], false],
    ['whatever those say who had looked', ['hAB', 'aAB', 'bAB!'], true],
  ])('%s', (_, lines, wanted) => {
    expect(settleReadings(made(...lines), PUBLIC).wantsReading).toBe(wanted);
  });

  test('only with a photo, and of what is public', () => {
    for (const place of [{ hasPhoto: false, isPublic: true }, { hasPhoto: true, isPublic: false }]) {
      for (const all of [made(), made('hAB')]) expect(settleReadings(all, place).wantsReading).toBe(false);
    }
  });
});
