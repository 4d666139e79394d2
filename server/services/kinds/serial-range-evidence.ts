import type { Knex } from 'knex';
import { z } from 'zod';
import type { EvidenceGroup, EvidenceItem, Findings } from '#contract/evidence.ts';
import { Anchor } from '#db/models/anchor.ts';
import { SerialRange } from '#db/models/serial-range.ts';
import { Series } from '#db/models/series.ts';
import { countOf, groupOf } from '#server/services/evidence/evidence-group.ts';
import { factSubjects } from '#server/services/evidence/name-facts.ts';
import { sayNumbers, sayOpenDays } from '#server/services/evidence/say-dates.ts';
import type { Proposal } from './kind-module.ts';

type Payload = Proposal<'serial-range'>['payload'];
type Numbers = Payload['numbers'];

/**
 * A serial range against the others of its series: numbers it shares with its own account, numbers left out on either side, rival accounts,
 * dated machines that agree or not, and how many machines on record have a number in it. Only dates of the same meaning are compared.
 */
export async function serialRangeEvidence({ factId, payload }: Proposal<'serial-range'>, knex: Knex): Promise<Findings> {
  const { seriesId, accountId, numbers, meaning } = payload;
  const ranges = (await SerialRange.query(knex).where({ seriesId, meaning }).orderBy(['numbers', 'id']).withGraphFetched('account')).filter(({ id }) => id !== factId);
  const anchors = (await Anchor.query(knex).where({ seriesId, meaning }).orderBy(['number', 'id'])).filter(({ number }) => holds(numbers, number));
  const subjectOf = await factSubjects([...ranges, ...anchors].map(({ id }) => id), knex);

  const own = ranges.filter((range) => range.accountId === accountId);
  const rivals = ranges.filter((range) => range.accountId !== accountId && meet(range.numbers, numbers));
  const told = (range: SerialRange): EvidenceItem => ({
    subject: subjectOf(range.id),
    mark: null,
    text: `${range.account?.title ?? 'Another account'}: ${sayNumbers(range.numbers)}, ${sayOpenDays(range.built)}`,
  });
  const dated = (anchor: Anchor): EvidenceItem => ({ subject: subjectOf(anchor.id), mark: null, text: `${anchor.number}: ${sayOpenDays(anchor.built)}` });
  const agreeing = anchors.filter(({ built }) => built.from <= payload.built.to && payload.built.from <= built.to);

  return {
    groups: [
      groupOf('overlaps', 'Ranges of the same account that share numbers with it', own.filter((range) => meet(range.numbers, numbers)).map(told)),
      groupOf('gaps', 'Numbers left out before or after it by the same account', gapsBeside(numbers, own, subjectOf)),
      groupOf('rivals', 'What other accounts say of these numbers', rivals.map(told)),
      groupOf('anchors-agree', 'Dated machines that agree', agreeing.map(dated), anchors.length),
      groupOf('anchors-disagree', 'Dated machines that don’t agree', anchors.filter((anchor) => !agreeing.includes(anchor)).map(dated), anchors.length),
      ...(payload.inOrder ? [groupOf('anchors-out-of-order', 'Dated machines whose days run against their numbers', againstOrder(anchors).map(dated), anchors.length)] : []),
      await machinesInIt(payload, knex),
    ],
    figures: [],
  };
}

/** The stretch between the range and its nearest neighbour on either side, where there is one. */
function gapsBeside(numbers: Numbers, own: readonly SerialRange[], subjectOf: (id: string) => EvidenceItem['subject']): EvidenceItem[] {
  const first = BigInt(numbers.from);
  const last = numbers.to === null ? null : BigInt(numbers.to);
  const below = own.filter(({ numbers: { to } }) => to !== null && BigInt(to) < first).toSorted((one, other) => compare(BigInt(other.numbers.to ?? 0), BigInt(one.numbers.to ?? 0)))[0];
  const above = last === null ? undefined : own.filter(({ numbers: { from } }) => BigInt(from) > last).toSorted((one, other) => compare(BigInt(one.numbers.from), BigInt(other.numbers.from)))[0];
  return [
    ...(below === undefined ? [] : gap(BigInt(below.numbers.to ?? 0) + 1n, first - 1n, subjectOf(below.id))),
    ...(above === undefined || last === null ? [] : gap(last + 1n, BigInt(above.numbers.from) - 1n, subjectOf(above.id))),
  ];
}

function gap(from: bigint, to: bigint, subject: EvidenceItem['subject']): EvidenceItem[] {
  return from > to ? [] : [{ subject, mark: null, text: `${sayNumbers({ from: String(from), to: String(to) })} left out` }];
}

/** Dated machines that were surely earlier than one of a smaller number. `anchors` ascend. */
function againstOrder(anchors: readonly Anchor[]): readonly Anchor[] {
  return anchors.filter((anchor, place) => anchors.slice(0, place).some((smaller) => smaller.built.from > anchor.built.to));
}

async function machinesInIt({ seriesId, numbers }: Payload, knex: Knex): Promise<EvidenceGroup> {
  const { modelId, prefix } = await Series.query(knex).findById(seriesId).throwIfNotFound();
  const query = knex('machines').where({ modelId, prefix }).where('number', '>=', numbers.from).count({ count: '*' });
  if (numbers.to !== null) void query.where('number', '<=', numbers.to);
  const [{ count }] = z.tuple([z.object({ count: z.string() })]).parse(await query);
  return countOf('machines', 'Machines on record with these numbers', Number(count));
}

function meet(one: Numbers, other: Numbers): boolean {
  return (one.to === null || BigInt(other.from) <= BigInt(one.to)) && (other.to === null || BigInt(one.from) <= BigInt(other.to));
}

function holds({ from, to }: Numbers, number: string): boolean {
  return BigInt(from) <= BigInt(number) && (to === null || BigInt(number) <= BigInt(to));
}

function compare(one: bigint, other: bigint): number {
  return one < other ? -1 : one > other ? 1 : 0;
}
