import { useQuery } from '@tanstack/react-query';
import { useMemo, useState } from 'react';
import { Link } from 'react-router-dom';
import type { CompiledCipher } from '#domain/ciphers/compiled-cipher.ts';
import type { CipherDefinition } from '#domain/ciphers/definition.ts';
import { parseReading } from '#domain/marks/reading.ts';
import { paths } from '../../lib/paths.ts';
import { sayFigure } from '../../lib/say-number.ts';
import { Button } from '../../ui/button.tsx';
import { DataTable } from '../../ui/data-table.tsx';
import type { Column } from '../../ui/data-table.tsx';
import { FailureNote } from '../../ui/failure-note.tsx';
import { Icon } from '../../ui/icon.tsx';
import { Live } from '../../ui/live.tsx';
import { MarkPlate } from '../../ui/mark-plate.tsx';
import { Skeleton } from '../../ui/skeleton.tsx';
import { isChanged, READING_WORDS, sayChange, sayNotListed, sayOutcome } from './trial-words.ts';
import type { TrialRow } from './trial-words.ts';
import { useSettled } from './use-settled.ts';
import { trialOf } from './workbench-queries.ts';
import type { Trial, TrialRequest } from './workbench-queries.ts';

type Props = {
  readonly definition: CipherDefinition;
  readonly compiled: CompiledCipher | null;
  readonly makerId: string | null;
  readonly foundryId: string | null;
  readonly subjectId: string | null;
};

/** Long enough that a word is typed, short enough to feel like an answer. */
const PAUSE_MS = 700;
const SHOWN_AT_FIRST = 10;
const READINGS = ['decoded', 'ambiguous', 'impossible'] as const;

/** How the draft reads every mark of the maker on record, and what changes. */
export function RecordTrial({ definition, compiled, makerId, foundryId, subjectId }: Props) {
  const request = useMemo(
    (): TrialRequest | null => (compiled === null || makerId === null ? null : { makerId, foundryId, definition, subjectId }),
    [compiled, definition, makerId, foundryId, subjectId],
  );
  const settled = useSettled(request, PAUSE_MS);
  const trial = useQuery(trialOf(settled));
  if (makerId === null) return <p className="text-slag">Choose the maker, and every mark of theirs on record is read under the draft.</p>;
  if (trial.data === undefined) {
    if (trial.error !== null) return <FailureNote error={trial.error} onAgain={() => void trial.refetch()} />;
    return request === null ? (
      <p className="text-slag">Once the draft makes sense, every mark of the maker on record is read under it.</p>
    ) : (
      <Skeleton lines={4} label="Reading the marks on record" />
    );
  }
  const stale = trial.isPlaceholderData || settled !== request;
  return (
    <>
      {trial.error !== null && <FailureNote error={trial.error} onAgain={() => void trial.refetch()} />}
      <Answer trial={trial.data} stale={stale} />
    </>
  );
}

function Answer({ trial, stale }: { readonly trial: Trial; readonly stale: boolean }) {
  const [all, setAll] = useState(false);
  const { marks, rows, inForce } = trial;
  const change = sayChange(trial);
  if (marks === 0) return <p className="text-slag">No date mark of this maker is on record yet.</p>;
  return (
    <div className={stale ? 'is-stale-block' : ''} aria-busy={stale}>
      <Counts trial={trial} />
      {change !== null && <p className="mt-3 max-w-measure">{change}</p>}
      <Live>{stale ? '' : `${READINGS.map((reading) => `${sayFigure(trial.draft[reading])} ${READING_WORDS[reading]}`).join(', ')}. ${change ?? ''}`}</Live>
      <div className="mt-5">
        <DataTable
          caption="Marks on record under the draft"
          rows={all ? rows : rows.slice(0, SHOWN_AT_FIRST)}
          rowKey={(row) => `${row.item.subject?.id ?? ''} ${row.item.mark ?? ''} ${row.item.text}`}
          columns={inForce === null ? [MARK, DRAFT] : [MARK, DRAFT, IN_FORCE]}
          empty={<p className="text-slag">None of them is on a public part.</p>}
        />
      </div>
      {rows.length > SHOWN_AT_FIRST && (
        <Button className="mt-3" onClick={() => setAll(!all)} aria-expanded={all}>
          {all ? `Show the first ${SHOWN_AT_FIRST}` : `Show all ${rows.length}`}
        </Button>
      )}
      {sayNotListed(trial).map((said) => (
        <p key={said} className="mt-2 text-slag">
          {said}
        </p>
      ))}
    </div>
  );
}

function Counts({ trial: { marks, draft, inForce } }: { readonly trial: Trial }) {
  return (
    <DataTable
      caption={`${sayFigure(marks)} ${marks === 1 ? 'mark' : 'marks'} of this maker on record`}
      captionShown
      rows={READINGS}
      rowKey={(reading) => reading}
      columns={[
        { key: 'reading', header: 'Comes out as', rowHeader: true, cell: (reading) => READING_WORDS[reading] },
        { key: 'draft', header: 'under the draft', align: 'end', cell: (reading) => sayFigure(draft[reading]) },
        ...(inForce === null
          ? []
          : [{ key: 'in-force', header: 'in force now', align: 'end', cell: (reading: (typeof READINGS)[number]) => sayFigure(inForce[reading]) } as const]),
      ]}
    />
  );
}

const MARK: Column<TrialRow> = {
  key: 'mark',
  header: 'Mark',
  rowHeader: true,
  cell: ({ item: { mark, subject, text }, draft }) => {
    const reading = mark === null ? null : parseReading(mark);
    const plate = reading?.ok ? <MarkPlate reading={reading.value} size="line" /> : mark;
    return (
      <>
        {subject?.kind === 'mark' ? <Link to={paths.mark(subject.id)}>{plate ?? subject.title}</Link> : plate}
        {draft.reading === 'impossible' && text !== '' && <span className="block text-[15px] leading-snug font-normal text-slag">{text}</span>}
      </>
    );
  },
};

const DRAFT: Column<TrialRow> = {
  key: 'draft',
  header: 'under the draft',
  cell: (row) => (
    <>
      {sayOutcome(row.draft)}
      {isChanged(row) && (
        <span className="flex items-center gap-1.5 text-[15px] text-straw">
          <Icon name="around" /> changed
        </span>
      )}
    </>
  ),
};

const IN_FORCE: Column<TrialRow> = { key: 'in-force', header: 'in force now', cell: ({ inForce }) => (inForce === null ? '' : sayOutcome(inForce)) };
