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

type Payload = Proposal<'anchor'>['payload'];

/** A dated machine against the ranges that hold its number and the other dated machines of the series; only dates of the same meaning are compared. */
export async function anchorEvidence({ factId, payload }: Proposal<'anchor'>, knex: Knex): Promise<Findings> {
  const { seriesId, number, built, meaning } = payload;
  const ranges = await SerialRange.query(knex)
    .where({ seriesId, meaning })
    .whereRaw('numbers @> ?::bigint', [number])
    .orderBy(['numbers', 'id'])
    .withGraphFetched('account');
  const anchors = (await Anchor.query(knex).where({ seriesId, meaning }).orderBy(['number', 'id'])).filter(({ id }) => id !== factId);
  const subjectOf = await factSubjects([...ranges, ...anchors].map(({ id }) => id), knex);
  const told = (range: SerialRange): EvidenceItem => ({
    subject: subjectOf(range.id),
    mark: null,
    text: `${range.account?.title ?? 'An account'}: ${sayNumbers(range.numbers)}, ${sayOpenDays(range.built)}`,
  });
  const dated = (anchor: Anchor): EvidenceItem => ({ subject: subjectOf(anchor.id), mark: null, text: `${anchor.number}: ${sayOpenDays(anchor.built)}` });
  const agrees = (range: SerialRange): boolean => range.built.from <= built.to && built.from <= range.built.to;
  const inOrder = ranges.some((range) => range.inOrder);
  const against = anchors.filter((anchor) =>
    BigInt(anchor.number) < BigInt(number) ? anchor.built.from > built.to : BigInt(anchor.number) > BigInt(number) && anchor.built.to < built.from,
  );
  return {
    groups: [
      groupOf('ranges-agree', 'Serial ranges with the number that agree', ranges.filter(agrees).map(told), ranges.length),
      groupOf('ranges-disagree', 'Serial ranges with the number that don’t agree', ranges.filter((range) => !agrees(range)).map(told), ranges.length),
      groupOf('same-number', 'Dated machines with the same number', anchors.filter((anchor) => anchor.number === number).map(dated)),
      ...(inOrder ? [groupOf('out-of-order', 'Dated machines whose days run against their numbers beside it', against.map(dated), anchors.length)] : []),
      await machinesWithIt(payload, knex),
    ],
    figures: [],
  };
}

async function machinesWithIt({ seriesId, number }: Payload, knex: Knex): Promise<EvidenceGroup> {
  const { modelId, prefix } = await Series.query(knex).findById(seriesId).throwIfNotFound();
  const rows: unknown = await knex('machines').where({ modelId, prefix, number }).count({ count: '*' });
  const [{ count }] = z.tuple([z.object({ count: z.string() })]).parse(rows);
  return countOf('machines', 'Machines on record with the number', Number(count));
}
