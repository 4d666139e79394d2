import type { CipherDefinition, DateField, WeekRule } from '#domain/ciphers/definition.ts';

/** The calendar a second time, on `Date` in UTC and by counting days, sharing nothing with the decoder's own. */

const MS_A_DAY = 86_400_000;

export function dayNumber(iso: string): number {
  return Date.parse(`${iso}T00:00:00Z`) / MS_A_DAY;
}

export function isoText(day: number): string {
  return new Date(day * MS_A_DAY).toISOString().slice(0, 10);
}

/** What a date field shows on a day. */
export function shownOn(field: DateField, day: number, definition: CipherDefinition): number {
  const date = new Date(day * MS_A_DAY);
  const [year, month] = [date.getUTCFullYear(), date.getUTCMonth() + 1];
  switch (field) {
    case 'month':
      return month;
    case 'day':
      return date.getUTCDate();
    case 'quarter':
      return Math.ceil(month / 3);
    case 'dayOfYear':
      return day - newYear(year) + 1;
    case 'week':
      return weekAndYear(day, weekRule(definition) ?? 'iso').week;
    case 'year': {
      if (definition.yearStart !== undefined) return isoText(day).slice(5) >= definition.yearStart ? year : year - 1;
      const rule = weekRule(definition);
      return rule === null ? year : weekAndYear(day, rule).year;
    }
  }
}

function weekRule(definition: CipherDefinition): WeekRule | null {
  for (const field of definition.fields) if (field.field === 'week') return field.week ?? 'iso';
  return null;
}

function weekAndYear(day: number, rule: WeekRule): { year: number; week: number } {
  const year = new Date(day * MS_A_DAY).getUTCFullYear();
  if (rule === 'simple') return { year, week: Math.ceil((day - newYear(year) + 1) / 7) };
  if (rule === 'first-full-sunday') {
    let sunday = day;
    while (new Date(sunday * MS_A_DAY).getUTCDay() !== 0) sunday -= 1;
    const owner = new Date(sunday * MS_A_DAY).getUTCFullYear();
    return { year: owner, week: Math.ceil((sunday - newYear(owner) + 1) / 7) };
  }
  let thursday = day - 3;
  while (new Date(thursday * MS_A_DAY).getUTCDay() !== 4) thursday += 1;
  const owner = new Date(thursday * MS_A_DAY).getUTCFullYear();
  return { year: owner, week: Math.ceil((thursday - newYear(owner) + 1) / 7) };
}

function newYear(year: number): number {
  return dayNumber(`${String(year).padStart(4, '0')}-01-01`);
}
