import type { CastingPage } from '#contract/castings.ts';
import type { DecodeResult } from '#contract/decode.ts';
import type { FitAnswer } from '#contract/fit.ts';
import type { BuildAnswer } from '#contract/models.ts';
import type { DaySpan } from '#domain/dates/day.ts';
import { formatDay } from '#domain/dates/format-day.ts';
import { dayFrom, saySpan, sayYears } from '../../lib/say-date.ts';
import type { Lane, Tick } from '../../ui/time-rule-lanes.ts';
import { VERDICTS } from '../../ui/verdict.tsx';
import { sayAcceptedLead } from './say-lead.ts';
import { sayShare } from './say-share.ts';

export type DecodeRule = { readonly lanes: readonly Lane[]; readonly focus: readonly DaySpan[] };

/** An accepted lead is zoomed to where it takes up to three years or so of the rule; a longer one runs off. */
const LEAD_ZOOMED = 1096;
/** Candidates below this share have no say in the zoom. */
const LEAST_SHARE = 0.01;

/** Everything known about one mark and one machine, on one rule. */
export function ruleOfDecode(known: {
  readonly result: DecodeResult;
  readonly casting: CastingPage | null;
  readonly build: BuildAnswer | null;
  readonly fit: FitAnswer | null;
}): DecodeRule {
  const { result, casting, build, fit } = known;
  const window = build?.window ?? null;
  const poured = result.candidates.map((candidate, place): Tick => {
    const verdict = fit?.candidates[place]?.verdict;
    const span = { from: dayFrom(candidate.from), to: dayFrom(candidate.to) };
    return {
      ...span,
      key: `${candidate.from} ${candidate.to} ${place}`,
      share: candidate.share,
      tone: verdict === undefined ? null : VERDICTS[verdict].tone,
      label: saySpan(candidate),
      note: [`share ${sayShare(candidate.share)}`, ...(verdict === undefined ? [] : [VERDICTS[verdict].word.toLowerCase()])].join(', '),
    };
  });
  const accepted = window !== null && fit !== null ? acceptedDays(window, fit.lead) : null;
  const made = casting === null ? null : casting.made;
  const lanes: Lane[] = [
    {
      kind: 'band',
      name: 'cipher in use',
      look: 'outline',
      bands: [{ from: dayFrom(result.used.from), to: result.used.to === null ? null : dayFrom(result.used.to), label: sayYears(result.used) }],
    },
    ...(made === null
      ? []
      : [
          {
            kind: 'band' as const,
            name: 'casting made',
            look: 'filled' as const,
            bands: [{ from: orNull(made.from), to: orNull(made.to), label: sayYears(made) }],
          },
        ]),
    { kind: 'ticks', name: 'poured', ticks: poured },
    ...(accepted === null || fit === null
      ? []
      : [{ kind: 'band' as const, name: fit.leadOnRecord ? 'accepted lead' : 'before the build', look: 'hatched' as const, bands: [{ ...accepted, label: sayAcceptedLead(fit.lead) }] }]),
    ...(window === null || build === null
      ? []
      : [
          {
            kind: 'window' as const,
            name: `${build.serial.asStamped} built`,
            span: { from: dayFrom(window.from), to: dayFrom(window.to) },
            label: saySpan(window),
            ...(build.likely === null ? {} : { likely: dayFrom(build.likely.day) }),
          },
        ]),
  ];
  return { lanes, focus: focusOf(result, window, accepted) };
}

/** One sentence that says what the rule draws. */
export function sayRule({ lanes }: DecodeRule): string {
  const names = lanes.map(({ name }) => name);
  return `Time ruler: ${names.join(', ')}`;
}

/** Days on which a casting can have been poured to be accepted for some build day of the window. */
function acceptedDays(window: { readonly from: string; readonly to: string }, lead: FitAnswer['lead']): { readonly from: number | null; readonly to: number } {
  return { from: lead.most === null ? null : dayFrom(window.from) - lead.most, to: dayFrom(window.to) - lead.least };
}

function focusOf(
  result: DecodeResult,
  window: { readonly from: string; readonly to: string } | null,
  accepted: { readonly from: number | null; readonly to: number } | null,
): DaySpan[] {
  const likely = result.candidates.filter(({ share }) => share >= LEAST_SHARE);
  const spans: DaySpan[] = (likely.length > 0 ? likely : result.candidates).map(({ from, to }) => ({ from: dayFrom(from), to: dayFrom(to) }));
  if (window !== null) spans.push({ from: dayFrom(window.from), to: dayFrom(window.to) });
  if (accepted !== null && accepted.from !== null && accepted.to - accepted.from <= LEAD_ZOOMED) spans.push({ from: accepted.from, to: accepted.to });
  return spans;
}

function orNull(iso: string | null): number | null {
  return iso === null ? null : dayFrom(iso);
}

/** Most likely day of building, said with its window; never alone. */
export function sayBuild(build: Pick<BuildAnswer, 'window' | 'likely'>): string | null {
  if (build.window === null) return null;
  const likely = build.likely === null ? '' : `, most likely about ${formatDay(dayFrom(build.likely.day))}`;
  return `${saySpan(build.window)}${likely}`;
}
