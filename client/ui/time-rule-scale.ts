import { civilOf, dayOf } from '#domain/dates/day.ts';
import type { Day, DaySpan } from '#domain/dates/day.ts';

/** The part of time a rule shows, and where its days fall. */
export type RuleScale = DaySpan & {
  /** Pixels from the rule's left end to the start of a day. Days outside fall outside. */
  readonly x: (day: Day) => number;
  readonly marks: readonly RuleMark[];
};

/** A line of the rule. Long ones carry a label. */
export type RuleMark = { readonly day: Day; readonly label: string | null };

type Step = { readonly months: number; readonly minor: number };

/** From fine to coarse: months between long marks, and between short ones. */
const STEPS: readonly Step[] = [
  { months: 1, minor: 1 },
  { months: 3, minor: 1 },
  { months: 6, minor: 1 },
  { months: 12, minor: 3 },
  { months: 24, minor: 12 },
  { months: 60, minor: 12 },
  { months: 120, minor: 24 },
  { months: 240, minor: 60 },
  { months: 600, minor: 120 },
  { months: 1200, minor: 240 },
];

const MONTH_NAMES = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'] as const;
/** Room between long marks so that `Jan 1941` and `1941` keep apart. */
const LABEL_ROOM = { month: 56, year: 54 } as const;
/** Air left and right of what matters, as a part of its length. */
const AIR = 0.14;
/** A rule is never shorter than this, or one day would fill it. */
const LEAST_DAYS = 120;

/**
 * Zooms to what matters: the shortest run of whole months that holds every span of `focus` with air around it.
 * `width` is the rule's length in pixels. With nothing to focus on there is no rule.
 */
export function ruleScale(focus: readonly DaySpan[], width: number): RuleScale | null {
  const [first, ...rest] = focus;
  if (first === undefined) return null;
  const held = rest.reduce((all, span) => ({ from: Math.min(all.from, span.from), to: Math.max(all.to, span.to) }), first);
  const length = held.to - held.from + 1;
  const air = Math.max(length * AIR, (LEAST_DAYS - length) / 2);
  const step = stepFor(length + 2 * air, width);
  const from = floorTo(Math.floor(held.from - air), step.minor);
  const to = nextAfter(Math.ceil(held.to + air), step.minor) - 1;
  const days = to - from + 1;
  const x = (day: Day) => ((day - from) / days) * width;
  return { from, to, x, marks: marksOf(from, to, step) };
}

function stepFor(days: number, width: number): Step {
  const fits = STEPS.find(({ months }) => {
    const room = (months * 30.44 * width) / days;
    return room >= (months < 12 ? LABEL_ROOM.month : LABEL_ROOM.year);
  });
  return fits ?? { months: 1200, minor: 240 };
}

function marksOf(from: Day, to: Day, { months, minor }: Step): RuleMark[] {
  const marks: RuleMark[] = [];
  let labelled = false;
  for (let day = from; day <= to + 1; day = nextAfter(day, minor)) {
    const { year, month } = civilOf(day);
    const long = (year * 12 + month - 1) % months === 0;
    marks.push({ day, label: long ? labelOf(year, month, months, !labelled) : null });
    labelled ||= long;
  }
  return marks;
}

/** Years stand alone; among months January goes by its year, and the first says its own. */
function labelOf(year: number, month: number, months: number, isFirst: boolean): string {
  if (months >= 12) return String(year);
  const name = MONTH_NAMES[month - 1] ?? '';
  if (month === 1) return String(year);
  return isFirst ? `${name} ${year}` : name;
}

/** The last first-of-a-month, on a whole number of months since year 0, at or before a day. */
function floorTo(day: Day, months: number): Day {
  const { year, month } = civilOf(day);
  return monthStart(Math.floor((year * 12 + month - 1) / months) * months);
}

function nextAfter(day: Day, months: number): Day {
  const { year, month } = civilOf(day);
  return monthStart((Math.floor((year * 12 + month - 1) / months) + 1) * months);
}

function monthStart(monthsSinceZero: number): Day {
  return dayOf(Math.floor(monthsSinceZero / 12), (monthsSinceZero % 12) + 1, 1);
}
