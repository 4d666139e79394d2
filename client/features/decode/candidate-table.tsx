import { useState } from 'react';
import type { CandidateAnswer, DecodeResult } from '#contract/decode.ts';
import type { FitAnswer } from '#contract/fit.ts';
import { saySpan } from '../../lib/say-date.ts';
import { sayFigure } from '../../lib/say-number.ts';
import { Button } from '../../ui/button.tsx';
import { DataTable } from '../../ui/data-table.tsx';
import type { Column } from '../../ui/data-table.tsx';
import { Verdict } from '../../ui/verdict.tsx';
import { ReadAs } from './read-as.tsx';
import { sayLeadDays } from './say-lead.ts';
import { sayShare, sayShareAloud } from './say-share.ts';

const SHOWN_AT_FIRST = 12;

type Row = { readonly key: string; readonly candidate: CandidateAnswer; readonly fit: FitAnswer['candidates'][number] | null };

type Props = {
  readonly result: DecodeResult;
  readonly fit: FitAnswer | null;
  /** The serial the fit speaks of. */
  readonly serial: string;
  readonly stale: boolean;
};

/** Every date the mark can mean, with its share, and what it would make of the machine. */
export function CandidateTable({ result, fit, serial, stale }: Props) {
  const [all, setAll] = useState(false);
  const { candidates, total } = result;
  if (candidates.length === 0) return null;
  const rows = candidates.map((candidate, place): Row => ({ key: `${candidate.from} ${place}`, candidate, fit: fit?.candidates[place] ?? null }));
  return (
    <div className="mt-6">
      <DataTable
        caption="What the mark can mean"
        columns={fit === null ? COLUMNS : [...COLUMNS, fitColumn(serial)]}
        rows={all ? rows : rows.slice(0, SHOWN_AT_FIRST)}
        rowKey={({ key }) => key}
        stale={stale}
      />
      {rows.length > SHOWN_AT_FIRST && (
        <Button className="mt-3" onClick={() => setAll(!all)} aria-expanded={all}>
          {all ? `Show the first ${SHOWN_AT_FIRST}` : `Show all ${rows.length}`}
        </Button>
      )}
      {total > candidates.length && (
        <p className="mt-2 text-slag">
          {sayFigure(total)} dates in all; the {candidates.length} with the largest shares are listed.
        </p>
      )}
    </div>
  );
}

const COLUMNS: readonly Column<Row>[] = [
  { key: 'date', header: 'It can mean', rowHeader: true, cell: ({ candidate }) => <span className="text-[19px]">{saySpan(candidate)}</span> },
  { key: 'read', header: 'read as', bare: true, cell: ({ candidate }) => <ReadAs candidate={candidate} /> },
  {
    key: 'share',
    header: 'share',
    align: 'end',
    cell: ({ candidate }) => (
      <>
        <span aria-hidden="true">{sayShare(candidate.share)}</span>
        <span className="sr-only">{sayShareAloud(candidate.share)}</span>
      </>
    ),
  },
];

function fitColumn(serial: string): Column<Row> {
  return {
    key: 'fit',
    header: `on machine ${serial}`,
    bare: true,
    cell: ({ fit }) =>
      fit === null ? null : (
        <>
          <Verdict kind={fit.verdict} />
          <span className="block text-[15px] text-slag">{sayLeadDays(fit.leadDays)}</span>
        </>
      ),
  };
}
