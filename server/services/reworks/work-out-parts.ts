import type { Knex } from 'knex';
import { writeDay } from '#domain/dates/day.ts';
import type { Day, DaySpan } from '#domain/dates/day.ts';
import { judgeFit } from '#domain/fit/fit.ts';
import type { Fit } from '#domain/fit/fit.ts';
import { Casting } from '#db/models/casting.ts';
import { Fitment } from '#db/models/fitment.ts';
import type { MarkDecoding } from '#db/models/mark-decoding.ts';
import type { PartFit } from '#db/models/part-fit.ts';
import type { CipherCache } from '#server/services/cipher-cache.ts';
import { groupedBy } from '#server/services/grouped-by.ts';
import { inTurns } from '#server/services/in-turns.ts';
import { carriesCipher } from '#server/services/marks/carries-cipher.ts';
import type { Origin } from '#server/services/marks/carries-cipher.ts';
import { identifyingCastings } from '#server/services/marks/identify-casting.ts';
import { markDating, remembering } from '#server/services/marks/mark-dating.ts';
import type { MarkDating } from '#server/services/marks/mark-dating.ts';
import { placingMachines } from '#server/services/marks/place-machines.ts';
import type { MachinePlace } from '#server/services/marks/place-machines.ts';
import { storedCiphers } from '#server/services/stored-ciphers.ts';
import type { StoredCipher } from '#server/services/stored-ciphers.ts';
import type { DateMark, Fitting, PartAtHand, Stretch } from './parts-at-hand.ts';

export type Decoded = Pick<MarkDecoding, 'status' | 'cipherId' | 'cipherVersion' | 'total' | 'candidates'>;
export type Fitted = Pick<PartFit, 'verdict' | 'late' | 'inLead' | 'early' | 'markId' | 'built' | 'typeVerdict'>;

/** What came out for some parts, by the catalogue as it is. */
export type WorkedOut = {
  /** Part → casting. */
  readonly castings: ReadonlyMap<string, string | null>;
  /** Mark → what it means; `null`: nothing can be said, as nobody has read it or nobody knows whose part it is on. */
  readonly decodings: ReadonlyMap<string, Decoded | null>;
  /** Fitting → fit. */
  readonly fits: ReadonlyMap<string, Fitted>;
};

/** What a rework carries from one lot of parts to the next. Versions of ciphers never change, so what a text means under one holds. */
export type WorkOutMeans = {
  readonly ciphers: CipherCache;
  readonly asOf: Day;
  readonly datings: Map<string, (text: string) => Dated>;
};

/** What a text means under one version of a cipher, as days and as it is kept. */
type Dated = { readonly dating: MarkDating; readonly decoded: Decoded };

const NO_DATE: Dated = {
  dating: { status: 'none', total: 0, candidates: [], likelihood: 0, reason: null },
  decoded: { status: 'none', cipherId: null, cipherVersion: null, total: 0, candidates: [] },
};
const UNDATED = { verdict: null, late: null, inLead: null, early: null, markId: null } as const;

/**
 * Identifies parts by their numbers, decodes their date marks and judges how they fit where they are.
 *
 * A mark is decoded under every cipher in force that its part may carry; the one under which the reading is likeliest counts. A part goes
 * by its cast mark with the fewest dates, as what was stamped later says nothing of the pouring.
 */
export async function workOutParts({ parts, numbers, dates, fittings }: Stretch, means: WorkOutMeans, knex: Knex): Promise<WorkedOut> {
  const catalogue = await castingsFor(parts, knex);
  const numbersOf = groupedBy(numbers, ({ partId }) => partId);
  const datesOf = groupedBy(dates, ({ partId }) => partId);
  const fittingsOf = groupedBy(fittings, ({ partId }) => partId);

  const identify = identifyingCastings([...catalogue.values()]);
  const castings = new Map<string, string | null>();
  const origins = new Map<string, Origin>();
  await inTurns(parts, (part) => {
    const castingId = identify({ ...part, numbers: (numbersOf.get(part.id) ?? []).map(({ reading }) => reading) });
    const casting = castingId === null ? undefined : catalogue.get(castingId);
    castings.set(part.id, castingId);
    origins.set(part.id, casting === undefined ? { makerId: part.makerId, foundryId: null } : { makerId: casting.makerId, foundryId: casting.pouredById ?? casting.makerId });
  });

  const makers = new Set([...origins.values()].flatMap(({ makerId }) => makerId ?? []));
  const ciphers = await storedCiphers({ makerIds: [...makers] }, means.ciphers, knex);
  const place = await placingMachines(fittings.map(({ modelId }) => modelId), knex);
  const typeOf = await typesOf(fittings, castings, knex);

  const decodings = new Map<string, Decoded | null>();
  const fits = new Map<string, Fitted>();
  await inTurns(parts, ({ id }) => {
    const origin = origins.get(id);
    const able = origin === undefined ? [] : ciphers.filter((cipher) => carriesCipher(origin, cipher));
    const isKnown = origin !== undefined && origin.makerId !== null;
    const marks = (datesOf.get(id) ?? []).map((mark) => ({ ...mark, dated: mark.reading === null || !isKnown ? null : likeliest(mark.reading, able, means) }));
    for (const { id: markId, dated } of marks) decodings.set(markId, dated?.decoded ?? null);
    for (const fitting of fittingsOf.get(id) ?? []) {
      const placed = place(fitting);
      fits.set(fitting.id, { ...judged(fitting, datedBy(marks), placed.window), typeVerdict: typeOf(fitting, castings.get(id) ?? null, placed) });
    }
  });
  return { castings, decodings, fits };
}

/** Castings that the parts can be: those of their makers, of all makers where one is not known, and what they were identified as. */
async function castingsFor(parts: readonly PartAtHand[], knex: Knex): Promise<ReadonlyMap<string, Casting>> {
  const query = Casting.query(knex).select('id', 'makerId', 'pouredById', 'partTypeId', 'numberKey').orderBy('id');
  if (parts.every(({ makerId }) => makerId !== null)) {
    const makers = [...new Set(parts.flatMap(({ makerId }) => makerId ?? []))];
    const named = [...new Set(parts.flatMap(({ castingId }) => castingId ?? []))];
    void query.whereIn('makerId', makers).orWhereIn('id', named);
  }
  return new Map((await query).map((casting) => [casting.id, casting]));
}

function likeliest(text: string, ciphers: readonly StoredCipher[], means: WorkOutMeans): Dated {
  return ciphers
    .map((cipher) => datingUnder(cipher, means)(text))
    .reduce((best, dated) => (dated.dating.likelihood > best.dating.likelihood ? dated : best), NO_DATE);
}

function datingUnder(cipher: StoredCipher, { asOf, datings }: WorkOutMeans): (text: string) => Dated {
  const name = `${cipher.id}:${cipher.version}`;
  const known = datings.get(name);
  if (known !== undefined) return known;
  const date = markDating(cipher.compiled, asOf);
  const dating = remembering((text) => asKept(date(text), cipher));
  datings.set(name, dating);
  return dating;
}

function asKept(dating: MarkDating, { id, version }: StoredCipher): Dated {
  if (dating.status === 'none') return NO_DATE;
  const candidates = dating.candidates.map(({ from, to, share }) => ({ from: writeDay(from), to: writeDay(to), share }));
  return { dating, decoded: { status: dating.status, cipherId: id, cipherVersion: version, total: dating.total, candidates } };
}

type PartDate = { readonly markId: string; readonly dating: MarkDating };

/** Of the marks as they were dated. */
function datedBy(marks: readonly (DateMark & { readonly dated: Dated | null })[]): PartDate | null {
  let best: PartDate | null = null;
  for (const { id, technique, dated } of marks) {
    if (technique !== 'cast' || dated === null || dated.dating.status === 'none') continue;
    if (best === null || dated.dating.total < best.dating.total) best = { markId: id, dating: dated.dating };
  }
  return best;
}

function judged({ lead }: Fitting, date: PartDate | null, build: DaySpan | null): Omit<Fitted, 'typeVerdict'> {
  const built = build === null ? null : { from: writeDay(build.from), to: writeDay(build.to) };
  if (date === null || build === null) return { ...UNDATED, built };
  const { verdict, late, in: inLead, early } = fitOf(date.dating, build, lead);
  return { verdict, late: asShare(late), inLead: asShare(inLead), early: asShare(early), markId: date.markId, built };
}

function fitOf({ candidates }: MarkDating, build: DaySpan, lead: Fitting['lead']): Fit {
  const fit = judgeFit({ candidates, build, lead: lead === null ? undefined : { least: lead.from ?? 0, most: lead.to } });
  if (!fit.ok) throw new RangeError(`A date and a build window on record make no question: ${fit.fault.code}`);
  return fit.value;
}

/** A sum of shares may miss its bounds by rounding. */
function asShare(value: number): number {
  return Math.min(1, Math.max(0, value));
}

/** What the catalogue says of a casting at a position on a serial. */
async function typesOf(
  fittings: readonly Fitting[],
  castings: ReadonlyMap<string, string | null>,
  knex: Knex,
): Promise<(fitting: Fitting, castingId: string | null, place: MachinePlace) => Fitted['typeVerdict']> {
  const positions = [...new Set(fittings.map(({ positionId }) => positionId))];
  const named = [...new Set(fittings.flatMap(({ partId }) => castings.get(partId) ?? []))];
  const fitments = await Fitment.query(knex).whereIn('positionId', positions).whereIn('castingId', named);
  const byPlace = groupedBy(fitments, ({ positionId, castingId }) => `${positionId} ${castingId}`);
  return ({ positionId }, castingId, { seriesId, number }) =>
    byPlace
      .get(`${positionId} ${castingId ?? ''}`)
      ?.find((fitment) => fitment.seriesId === null || (fitment.seriesId === seriesId && number !== null && holds(fitment.numbers, number)))?.verdict ?? null;
}

function holds({ from, to }: Fitment['numbers'], number: bigint): boolean {
  return (from === null || BigInt(from) <= number) && (to === null || number <= BigInt(to));
}
