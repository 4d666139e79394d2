import type { FitAnswer } from '#contract/fit.ts';
import { sayCount } from '../../lib/say-number.ts';

type Days = { readonly least: number; readonly most: number };

const MONTH = 30.44;
const YEAR = 365.25;

/**
 * Where a casting date lies against the build, from the lead at the least and at the most, in days.
 *
 * | least | most | said |
 * | --- | --- | --- |
 * | 28 | 56 | 28–56 days before it was built |
 * | −294 | −266 | 9–10 months after it was built |
 * | 0 | 0 | on the day it was built |
 * | −20 | 8 | between 8 days before and 20 days after it was built |
 */
export function sayLeadDays({ least, most }: Days): string {
  if (least === 0 && most === 0) return 'on the day it was built';
  if (least >= 0) return `${sayRange(least, most)} before it was built`;
  if (most < 0) return `${sayRange(-most, -least)} after it was built`;
  if (most === 0) return `up to ${sayLength(-least)} after it was built`;
  return `between ${sayLength(most)} before and ${sayLength(-least)} after it was built`;
}

/** An accepted lead as the margin says it: `0–365 days`, `from 30 days, no upper end`. */
export function sayAcceptedLead({ least, most }: FitAnswer['lead']): string {
  return most === null ? `from ${sayDays(least)}, with no upper end` : `${least}–${most} days`;
}

/** One unit for both ends, the one the nearer end is best said in. */
function sayRange(least: number, most: number): string {
  const [unit, one, many] = unitFor(most);
  const from = Math.round(least / unit);
  const to = Math.round(most / unit);
  if (from === to) return `${unit === 1 ? '' : 'about '}${sayWith(from, one, many)}`;
  return `${from}–${sayWith(to, one, many)}`;
}

function sayLength(days: number): string {
  const [unit, one, many] = unitFor(days);
  return sayWith(Math.round(days / unit), one, many);
}

function sayDays(days: number): string {
  return sayWith(days, 'day', 'days');
}

function sayWith(count: number, one: string, many: string): string {
  return count === 1 ? `${sayCount(1)} ${one}` : `${count} ${many}`;
}

function unitFor(days: number): readonly [unit: number, one: string, many: string] {
  if (days < 100) return [1, 'day', 'days'];
  if (days < 2 * YEAR) return [MONTH, 'month', 'months'];
  return [YEAR, 'year', 'years'];
}
