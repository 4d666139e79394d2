import type { Knex } from 'knex';
import type { EvidenceItem } from '#contract/evidence.ts';
import { compileCipher } from '#domain/ciphers/compile.ts';
import type { CipherDefinition } from '#domain/ciphers/definition.ts';
import { CipherVersion } from '#db/models/cipher-version.ts';
import { Maker } from '#db/models/maker.ts';
import { signedIn } from '#server/policies/viewer.ts';
import type { Viewer } from '#server/policies/viewer.ts';
import { dateMarksOnRecord, subjectOfMark } from '#server/services/evidence/date-marks-on-record.ts';
import { sameDating, sayDating } from '#server/services/evidence/say-dating.ts';
import { inTurns } from '#server/services/in-turns.ts';
import { whereCarriesCipher } from '#server/services/marks/carries-cipher.ts';
import { markDating } from '#server/services/marks/mark-dating.ts';
import type { MarkDating } from '#server/services/marks/mark-dating.ts';
import { ProblemError } from '#server/services/problem-error.ts';
import { today } from '#server/services/today.ts';

export type CipherToTry = {
  readonly makerId: string;
  readonly foundryId: string | null;
  readonly definition: CipherDefinition;
  /** The cipher it would change; `null`: a new one. */
  readonly subjectId: string | null;
};

export type TriedCipher = {
  readonly marks: number;
  readonly draft: ReadingsCounted;
  readonly inForce: ReadingsCounted | null;
  readonly changed: number;
  readonly rows: readonly TriedMark[];
  readonly unlisted: number;
};

type ReadingsCounted = { readonly decoded: number; readonly ambiguous: number; readonly impossible: number };
type TriedMark = { readonly item: EvidenceItem; readonly draft: MarkDating; readonly inForce: MarkDating | null };

/** Marks looked at, the first put on record first: a draft is tried at every pause in typing. Evidence looks at all. */
const MOST_MARKS = 20_000;
/** Rows of one sort that are listed. */
const MOST_OF_A_SORT = 25;

/** Listed in this order: what somebody who mends a draft looks for comes first. */
const SORTS = ['changed', 'impossible', 'ambiguous', 'decoded'] as const;

/**
 * How a draft of a cipher reads the date marks of a maker on record, against the version in force of the cipher it would change.
 *
 * @throws ProblemError `not-signed-in`; `invalid` at `makerId` for a maker that is not on record.
 */
export async function tryCipher(viewer: Viewer, { makerId, foundryId, definition, subjectId }: CipherToTry, knex: Knex): Promise<TriedCipher> {
  signedIn(viewer);
  if (!(await Maker.query(knex).findById(makerId))) {
    throw new ProblemError('invalid', 'See which, and why, under errors.', { errors: [{ path: ['makerId'], message: 'No maker has this id' }] });
  }
  const asOf = await today(knex);
  const draft = datingUnder(definition, asOf);
  const version = subjectId === null ? undefined : await CipherVersion.query(knex).modify('inForce').findOne({ cipherId: subjectId });
  const inForce = version === undefined ? null : datingUnder(version.definition, asOf);

  const draftCounts = counter();
  const inForceCounts = counter();
  const rows = new Map<(typeof SORTS)[number], TriedMark[]>(SORTS.map((sort) => [sort, []]));
  let marks = 0;
  let changed = 0;
  let unlisted = 0;
  const carries = (query: Knex.QueryBuilder): void => {
    whereCarriesCipher(query, { makerId, foundryId });
  };
  for await (const lot of dateMarksOnRecord(carries, knex)) {
    await inTurns(lot.slice(0, MOST_MARKS - marks), (mark) => {
      marks += 1;
      const now = draft(mark.reading);
      const before = inForce?.(mark.reading) ?? null;
      const isChanged = before !== null && !sameDating(before, now);
      draftCounts.add(now);
      if (before !== null) inForceCounts.add(before);
      if (isChanged) changed += 1;
      if (!mark.isPublic) {
        unlisted += 1;
        return;
      }
      const listed = rows.get(isChanged ? 'changed' : readingOf(now));
      if (listed !== undefined && listed.length < MOST_OF_A_SORT) {
        listed.push({ item: { subject: subjectOfMark(mark), mark: mark.reading, text: sayDating(now) }, draft: now, inForce: before });
      }
    });
    if (marks >= MOST_MARKS) break;
  }
  return { marks, draft: draftCounts.counts(), inForce: inForce === null ? null : inForceCounts.counts(), changed, rows: [...rows.values()].flat(), unlisted };
}

/** What the interface calls a status, of a draft. */
export function readingOf({ status }: Pick<MarkDating, 'status'>): keyof ReadingsCounted {
  return status === 'dated' ? 'decoded' : status === 'several' ? 'ambiguous' : 'impossible';
}

function datingUnder(definition: CipherDefinition, asOf: number): (text: string) => MarkDating {
  const compiled = compileCipher(definition);
  if (!compiled.ok) throw new RangeError('The definition was checked before');
  return markDating(compiled.value, asOf);
}

function counter(): { readonly add: (dating: MarkDating) => void; readonly counts: () => ReadingsCounted } {
  const counted = { decoded: 0, ambiguous: 0, impossible: 0 };
  return {
    add: (dating) => {
      counted[readingOf(dating)] += 1;
    },
    counts: () => ({ ...counted }),
  };
}
