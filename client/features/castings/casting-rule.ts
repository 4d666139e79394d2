import type { CastingPage } from '#contract/castings.ts';
import type { CipherPage } from '#contract/ciphers.ts';
import type { OpenSpan } from '#contract/common.ts';
import type { DaySpan } from '#domain/dates/day.ts';
import { dayFrom, sayYears } from '../../lib/say-date.ts';
import type { Band, Lane } from '../../ui/time-rule-lanes.ts';

export type CastingRule = { readonly lanes: readonly Lane[]; readonly focus: readonly DaySpan[] };

/**
 * A casting on the rule: its years of production, the machines it was built into, and the ciphers its date may be in.
 * Zooms to the casting and its machines, so that a cipher's long life does not shrink them; null where nothing is dated.
 */
export function castingRule(
  casting: Pick<CastingPage, 'made' | 'fitments'>,
  ciphers: readonly Pick<CipherPage, 'title' | 'used'>[],
): CastingRule | null {
  const built = casting.fitments.flatMap(({ verdict, built: span }) =>
    verdict === 'as-built' && span !== null && hasAnEnd(span) ? [span] : [],
  );
  const made = casting.made !== null && hasAnEnd(casting.made) ? [casting.made] : [];
  const used = ciphers.filter((cipher) => hasAnEnd(cipher.used));
  const zoomed = [...made, ...built];
  const focus = (zoomed.length > 0 ? zoomed : used.map((cipher) => cipher.used)).flatMap(endsOf);
  if (focus.length === 0) return null;
  const lanes: Lane[] = [];
  if (made.length > 0) lanes.push({ kind: 'band', name: 'made', look: 'filled', bands: made.map(bandOf) });
  const joined = joinSpans(built);
  if (joined.length > 0) lanes.push({ kind: 'band', name: 'its machines built', look: 'hatched', bands: joined.map(bandOf) });
  for (const [place, cipher] of used.entries()) {
    const name = used.length === 1 ? 'cipher in use' : `cipher ${place + 1} in use`;
    lanes.push({
      kind: 'band',
      name,
      look: 'outline',
      bands: [{ ...bandOf(cipher.used), label: `${cipher.title}, ${sayYears(cipher.used)}` }],
    });
  }
  return { lanes, focus };
}

/** Ciphers that were in use at some time while the casting was made; all of them where its years are not on record. */
export function ciphersInUse<Cipher extends Pick<CipherPage, 'used'>>(
  made: OpenSpan | null,
  ciphers: readonly Cipher[],
): Cipher[] {
  return ciphers.filter(({ used }) => made === null || (comesBefore(used.from, made.to) && comesBefore(made.from, used.to)));
}

/** Whether a first day is no later than a last one; an open end never parts them. */
function comesBefore(first: string | null, last: string | null): boolean {
  return first === null || last === null || first <= last;
}

function hasAnEnd({ from, to }: OpenSpan): boolean {
  return from !== null || to !== null;
}

function bandOf({ from, to }: OpenSpan): Band {
  return { from: from === null ? null : dayFrom(from), to: to === null ? null : dayFrom(to) };
}

/** The ends that are known, each as a span of one day. */
function endsOf({ from, to }: OpenSpan): DaySpan[] {
  return [from, to].flatMap((iso) => (iso === null ? [] : [{ from: dayFrom(iso), to: dayFrom(iso) }]));
}

/** Spans that share days run together, in order, so that bands do not lie on each other. */
export function joinSpans(spans: readonly OpenSpan[]): OpenSpan[] {
  const sorted = spans.toSorted((one, other) => (one.from ?? '').localeCompare(other.from ?? ''));
  const joined: OpenSpan[] = [];
  for (const span of sorted) {
    const last = joined.at(-1);
    if (last === undefined || (last.to !== null && span.from !== null && span.from > last.to)) joined.push(span);
    else
      joined[joined.length - 1] = {
        from: last.from,
        to: last.to === null || span.to === null ? null : last.to > span.to ? last.to : span.to,
      };
  }
  return joined;
}
