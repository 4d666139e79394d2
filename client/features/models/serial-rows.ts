import type { ModelPage } from '#contract/models.ts';
import type { DaySpan } from '#domain/dates/day.ts';
import { dayFrom } from '../../lib/say-date.ts';
import { saySerials } from '../../lib/say-serials.ts';
import type { Band, Lane } from '../../ui/time-rule-lanes.ts';

export type ModelSeries = ModelPage['series'][number];
export type ModelRange = ModelSeries['ranges'][number];
export type Account = ModelRange['account'] & { readonly preferred: boolean };

/** Numbers of which every account says one thing, from one end to the other. */
export type SerialRow = {
  readonly first: string;
  readonly last: string | null;
  /** Account id → the range of that account that holds these numbers; an account that says nothing of them is not in it. */
  readonly ranges: ReadonlyMap<string, ModelRange>;
};

/** The accounts of a series, the register's own reading first. */
export function accountsOf({ ranges }: Pick<ModelSeries, 'ranges'>): Account[] {
  const accounts = new Map(ranges.map(({ account, preferred }) => [account.id, { ...account, preferred }]));
  return [...accounts.values()].toSorted(
    (one, other) => Number(other.preferred) - Number(one.preferred) || one.title.localeCompare(other.title),
  );
}

/**
 * The numbers of a series cut wherever an account's range begins or ends, so that rival accounts stand side by side, row by row.
 * Numbers between two ranges that no account holds make a row of their own, without ranges.
 *
 * | ranges | rows |
 * | --- | --- |
 * | A 1–10, B 4–6 | 1–3 A · 4–6 A B · 7–10 A |
 * | A 1–10, A 21 on | 1–10 A · 11–20 nobody · 21 on A |
 */
export function serialRows(ranges: readonly ModelRange[]): SerialRow[] {
  const starts = new Set<bigint>();
  for (const { first, last } of ranges) {
    starts.add(BigInt(first));
    if (last !== null) starts.add(BigInt(last) + 1n);
  }
  const isOpen = ranges.some(({ last }) => last === null);
  const cuts = [...starts].sort((one, other) => (one < other ? -1 : 1));
  return cuts.flatMap((first, place): SerialRow[] => {
    const next = cuts[place + 1];
    if (next === undefined && !isOpen) return [];
    const held = ranges.filter((range) => BigInt(range.first) <= first && (range.last === null || first <= BigInt(range.last)));
    return [
      {
        first: String(first),
        last: next === undefined ? null : String(next - 1n),
        ranges: new Map(held.map((range) => [range.account.id, range])),
      },
    ];
  });
}

/** What a series is called: its prefix, what tells its run from another, its works. */
export function saySeries({ prefix, label, works }: Pick<ModelSeries, 'prefix' | 'label' | 'works'>): string {
  return [prefix === '' ? 'no prefix' : prefix, label, works].filter((part) => part !== null && part !== '').join(', ');
}

export type SerialRule = { readonly lanes: readonly Lane[]; readonly focus: readonly DaySpan[] };

/** The ranges of every series and account on one rule, and the dated machines below; null where nothing is dated. */
export function serialRule(series: readonly ModelSeries[]): SerialRule | null {
  const lanes = series.flatMap((one, place): Lane[] => {
    const run = sayRun(series, place);
    return [...accountLanes(one, run), ...anchorLane(one, run)];
  });
  const focus = series.flatMap(({ ranges }) => ranges.map(({ dates }) => ({ from: dayFrom(dates.from), to: dayFrom(dates.to) })));
  return focus.length === 0 ? null : { lanes, focus };
}

/** What tells the lanes of one series from those of another, in little room: nothing, its prefix, or its place where prefixes are shared. */
function sayRun(series: readonly ModelSeries[], place: number): string {
  const prefixes = series.map(({ prefix }) => prefix);
  if (series.length === 1) return '';
  return prefixes.includes('') || new Set(prefixes).size < prefixes.length ? `run ${place + 1} ` : `${prefixes[place] ?? ''} `;
}

function accountLanes(series: ModelSeries, run: string): Lane[] {
  return accountsOf(series).map(({ id, preferred }, place, { length }) => ({
    kind: 'band',
    name: `${run}${length === 1 ? 'ranges' : preferred ? 'our reading' : `account ${place + 1}`}`,
    look: preferred || length === 1 ? 'filled' : 'hatched',
    bands: series.ranges.filter(({ account }) => account.id === id).map(bandOf),
  }));
}

function bandOf({ first, last, dates }: ModelRange): Band {
  return { from: dayFrom(dates.from), to: dayFrom(dates.to), label: saySerials({ prefix: null, first, last }) };
}

function anchorLane({ anchors }: ModelSeries, run: string): Lane[] {
  if (anchors.length === 0) return [];
  const ticks = anchors.map(({ number, built }) => ({
    key: number,
    from: dayFrom(built.from),
    to: dayFrom(built.to),
    share: 1,
    tone: null,
    label: number,
    note: `serial ${number}`,
  }));
  return [{ kind: 'ticks', name: `${run}dated machines`, ticks }];
}
