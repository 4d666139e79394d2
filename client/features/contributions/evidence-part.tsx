import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import type { UseMutationResult } from '@tanstack/react-query';
import { useEffect, useRef } from 'react';
import { Link } from 'react-router-dom';
import { gatherEvidence } from '#contract/contributions.ts';
import type { ContributionPage } from '#contract/contributions.ts';
import type { Evidence, EvidenceFigure, EvidenceGroup, EvidenceItem } from '#contract/evidence.ts';
import { parseReading } from '#domain/marks/reading.ts';
import { call } from '../../lib/call.ts';
import { paths } from '../../lib/paths.ts';
import { ProblemError } from '../../lib/problem-error.ts';
import { sayInstant } from '../../lib/say-instant.ts';
import { sayFigure } from '../../lib/say-number.ts';
import { FailureNote } from '../../ui/failure-note.tsx';
import { MarkPlate } from '../../ui/mark-plate.tsx';
import { Skeleton } from '../../ui/skeleton.tsx';
import { ActTrouble } from '../people/act-trouble.tsx';
import { evidenceOf } from './contributions-queries.ts';
import { pathOfRef } from './path-of-ref.ts';

/** What the record says about a contribution. Who decides on it has it worked out anew on opening; it says what is, and no verdict. */
export function EvidencePart({ contribution }: { readonly contribution: ContributionPage }) {
  const { id, revision, can } = contribution;
  return can.decide ? <FreshEvidence key={revision} {...{ id, revision }} /> : <KeptEvidence {...{ id, revision }} />;
}

/** Lines of a group before the rest is folded away: on a phone the decision stands below them all. */
const LISTED_AT_ONCE = 6;

type Of = { readonly id: string; /** What is shown of it now. */ readonly revision: number };

function FreshEvidence({ id, revision }: Of) {
  const queryClient = useQueryClient();
  const kept = useQuery(evidenceOf(id));
  const gather = useMutation({
    mutationFn: () => call(gatherEvidence, { params: { id } }),
    onSuccess: (answer) => queryClient.setQueryData(evidenceOf(id).queryKey, answer),
  });
  const asked = useRef(false);
  const { mutate } = gather;
  useEffect(() => {
    if (asked.current) return;
    asked.current = true;
    mutate();
  }, [mutate]);
  return (
    <>
      {gather.isError && <NotGathered act={gather} />}
      {gather.isPending && <p className="mb-3 text-slag italic">Working it out on today’s record.</p>}
      <EvidenceList items={kept.data?.items} error={kept.error} onAgain={() => void kept.refetch()} stale={gather.isPending} revision={revision} />
    </>
  );
}

/** What it says may be taken no longer, as when a casting it names was retired: the register's own words say so. */
function NotGathered({ act }: { readonly act: UseMutationResult<unknown, Error, void> }) {
  const { error } = act;
  return error instanceof ProblemError && error.kind === 'conflict' ? (
    <p role="alert" className="mb-3 border-l-4 border-scale bg-bed px-4 py-2">
      {error.message}
    </p>
  ) : (
    <ActTrouble act={act} />
  );
}

function KeptEvidence({ id, revision }: Of) {
  const { data, error, refetch } = useQuery(evidenceOf(id));
  return <EvidenceList items={data?.items} error={error} onAgain={() => void refetch()} stale={false} revision={revision} />;
}

type ListProps = { readonly items: readonly Evidence[] | undefined; readonly error: Error | null; readonly onAgain: () => void; readonly stale: boolean; readonly revision: number };

/** The newest, and the older ones folded away below it. */
function EvidenceList({ items, error, onAgain, stale, revision }: ListProps) {
  if (items === undefined) return error === null ? <Skeleton lines={5} label="Loading the evidence" /> : <FailureNote error={error} onAgain={onAgain} />;
  const [newest, ...older] = items;
  if (newest === undefined && stale) return <Skeleton lines={5} label="Working out the evidence" />;
  if (newest === undefined) return <p className="border-y border-rule py-3 text-slag">None was worked out yet.</p>;
  return (
    <div className={stale ? 'is-stale-block' : ''} aria-busy={stale}>
      <OneEvidence evidence={newest} revision={revision} />
      {older.map((evidence) => (
        <details key={evidence.id} className="mt-2">
          <summary className="inline-flex min-h-11 cursor-pointer items-center text-[15px] text-slag underline underline-offset-4">{sayOccasion(evidence, revision)}</summary>
          <OneEvidence evidence={evidence} revision={revision} />
        </details>
      ))}
    </div>
  );
}

/** `As it was put forward, 4 Mar 2026, 10:07 UTC`; that it was about other words than those shown, where it was. */
function sayOccasion({ occasion, gatheredAt, revision: then }: Evidence, revision: number): string {
  return `${occasion === 'put-forward' ? 'As it was put forward' : 'As a moderator opened it'}, ${sayInstant(gatheredAt)}${then === revision ? '' : ', of what it said then'}`;
}

function OneEvidence({ evidence, revision }: { readonly evidence: Evidence; readonly revision: number }) {
  const { groups, figures } = evidence;
  return (
    <div>
      <p className="mb-2 text-[15px] text-slag">{sayOccasion(evidence, revision)}.</p>
      {groups.length === 0 && figures.length === 0 && <p className="border-y border-rule py-3 text-slag">The record holds nothing that bears on it.</p>}
      {groups.map((group) => (
        <Group key={group.code} group={group} />
      ))}
      {figures.map((figure) => (
        <Figure key={figure.code} figure={figure} />
      ))}
    </div>
  );
}

function Group({ group: { title, count, of, items, unlisted } }: { readonly group: EvidenceGroup }) {
  const more = Math.max(0, count - items.length - unlisted);
  return (
    <section className="border-t border-rule py-3">
      <h3 className={`flex flex-wrap items-baseline justify-between gap-x-6 ${count === 0 ? '' : 'font-semibold'}`}>
        {title}
        <span className="font-normal tabular-nums">{of === null ? sayFigure(count) : `${sayFigure(count)} of ${sayFigure(of)}`}</span>
      </h3>
      <Items items={items.slice(0, LISTED_AT_ONCE)} />
      {items.length > LISTED_AT_ONCE && (
        <details>
          <summary className="inline-flex min-h-11 cursor-pointer items-center text-[15px] text-temper underline decoration-1 underline-offset-[3px]">
            The next {sayFigure(items.length - LISTED_AT_ONCE)}
            <span className="sr-only"> of {title}</span>
          </summary>
          <Items items={items.slice(LISTED_AT_ONCE)} />
        </details>
      )}
      {unlisted + more > 0 && (
        <p className="text-[15px] text-slag">
          {[...(more > 0 ? [`${sayFigure(more)} more.`] : []), ...(unlisted > 0 ? [`${sayFigure(unlisted)} on parts that are not public: counted, not listed.`] : [])].join(' ')}
        </p>
      )}
    </section>
  );
}

function Items({ items }: { readonly items: readonly EvidenceItem[] }) {
  return (
    items.length > 0 && (
      <ul className="mt-1">
        {items.map((item, place) => (
          <li key={place} className="flex flex-wrap items-center gap-x-3 gap-y-1 py-1.5 text-[15px] leading-snug">
            <Item item={item} />
          </li>
        ))}
      </ul>
    )
  );
}

function Item({ item: { subject, mark, text } }: { readonly item: EvidenceItem }) {
  return (
    <>
      {mark !== null && <Mark text={mark} />}
      {subject !== null && <Link to={subject.kind === 'mark' ? paths.mark(subject.id) : pathOfRef(subject)}>{subject.title}</Link>}
      <span className="wrap-anywhere">{text}</span>
    </>
  );
}

/** As it stands on the iron; in its notation where that can't be read. */
function Mark({ text }: { readonly text: string }) {
  const reading = parseReading(text);
  return reading.ok ? <MarkPlate size="line" reading={reading.value} /> : <span className="font-mono">{text}</span>;
}

function Figure({ figure: { name, value, unit, working } }: { readonly figure: EvidenceFigure }) {
  return (
    <section className="border-t border-rule py-3">
      <h3 className="flex flex-wrap items-baseline justify-between gap-x-6 font-semibold">
        {name}
        <span className="font-normal tabular-nums">{sayValue(value, unit)}</span>
      </h3>
      <p className="max-w-measure text-[15px] text-slag">{working}</p>
    </section>
  );
}

function sayValue(value: number, unit: EvidenceFigure['unit']): string {
  switch (unit) {
    case 'share':
      return `${(value * 100).toFixed(1)} %`;
    case 'count':
      return sayFigure(value);
    case 'days':
      return `${sayFigure(value)} ${value === 1 ? 'day' : 'days'}`;
  }
}
