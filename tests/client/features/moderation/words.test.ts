// @vitest-environment node
import { describe, expect, it } from 'vitest';
import { sayDates, sayMarkKind } from '#client/features/marks/mark-words.ts';
import { sayOpenWith, sayWait } from '#client/features/moderation/queue-words.ts';
import { sayOutcome, sayProgress } from '#client/features/moderation/rework-words.ts';

const NOW = Date.parse('2026-12-01T12:00:00Z');

describe('words of the queue', () => {
  it.each([
    ['2026-12-01T12:00:00Z', 'just now'],
    ['2026-12-01T11:59:01Z', 'just now'],
    ['2026-12-01T11:59:00Z', 'one minute'],
    ['2026-12-01T11:00:00Z', 'one hour'],
    ['2026-11-30T12:00:01Z', '23 hours'],
    ['2026-11-30T12:00:00Z', 'one day'],
    ['2026-11-11T14:00:00+02:00', '20 days'],
    ['2026-12-01T12:05:00Z', 'just now'],
  ])('what waits since %s has waited %s', (since, said) => {
    expect(sayWait(since, NOW)).toBe(said);
  });
  it('name who has it open', () => {
    const people = ['Una Kettlemere', 'Harrow Lane'].map((displayName) => ({ id: '018d5bbd-2920-72c2-a4c4-26dc0063c791', displayName }));
    expect(sayOpenWith(people)).toBe('Open with Una Kettlemere and Harrow Lane');
  });
});

describe('words of a run', () => {
  it.each([
    [{ state: 'waiting', done: 0, total: null }, 'waiting for its turn'],
    [{ state: 'running', done: 1200, total: null }, '1,200 looked at so far'],
    [{ state: 'running', done: 1200, total: 4300 }, '1,200 of 4,300 looked at'],
    [{ state: 'failed', done: 12, total: 4300 }, '12 of 4,300 looked at'],
    [{ state: 'done', done: 4300, total: 4300 }, '4,300 looked at'],
  ] as const)('%j: %s', (run, said) => {
    expect(sayProgress(run)).toBe(said);
  });
  it.each([
    [{ changed: 0, machinesChanged: 0 }, 'nothing came out otherwise'],
    [{ changed: 3, machinesChanged: 0 }, '3 came out otherwise'],
    [{ changed: 3, machinesChanged: 1 }, '3 came out otherwise, on 1 machine'],
    [{ changed: 3000, machinesChanged: 40 }, '3,000 came out otherwise, on 40 machines'],
  ])('%j: %s', (run, said) => {
    expect(sayOutcome(run)).toBe(said);
  });
});

describe('words of a mark', () => {
  it('say what it is, and never merge cast and stamped', () => {
    expect(sayMarkKind({ kind: 'date-code', technique: 'cast' })).toBe('Date mark, cast when poured');
    expect(sayMarkKind({ kind: 'serial', technique: 'stamped' })).toBe('Serial, stamped after machining');
  });
  it('say what it can mean', () => {
    expect(sayDates({ status: 'dated', total: 1 })).toBe('It can mean one date.');
    expect(sayDates({ status: 'several', total: 27 })).toBe('It can mean 27 dates.');
    expect(sayDates({ status: 'none', total: 0 })).toBe('No cipher on record can date it.');
  });
});
