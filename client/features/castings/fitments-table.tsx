import { Link } from 'react-router-dom';
import type { Fitment } from '#contract/castings.ts';
import { paths } from '../../lib/paths.ts';
import { sayOpenSpan } from '../../lib/say-date.ts';
import { saySerials } from '../../lib/say-serials.ts';
import { DataTable } from '../../ui/data-table.tsx';
import { NoteRef } from '../../ui/margin-notes.tsx';
import { Verdict } from '../../ui/verdict.tsx';
import { RowActions } from '../contributions/fact-actions.tsx';

type Props = { readonly fitments: readonly Fitment[]; readonly notesOf: (fitment: Fitment) => readonly number[] };

/** Where a casting belongs: model and position, serials, when those were built, and the verdict on the type. */
export function FitmentsTable({ fitments, notesOf }: Props) {
  return (
    <DataTable
      caption="Where it belongs"
      rows={fitments}
      rowKey={({ id }) => id}
      columns={[
        {
          key: 'model',
          header: 'Model',
          rowHeader: true,
          cell: (fitment) => (
            <>
              <Link to={paths.model(fitment.model.slug)}>{fitment.model.name}</Link>
              <NoteRef numbers={notesOf(fitment)} />
              <span className="block text-[15px] font-normal text-slag">{fitment.position.name}</span>
            </>
          ),
        },
        {
          key: 'serials',
          header: 'serials',
          cell: (fitment) => <span className="font-mono text-[15px] whitespace-nowrap">{saySerials(fitment)}</span>,
        },
        { key: 'built', header: 'built', cell: ({ built }) => (built === null ? 'not on record' : sayOpenSpan(built)) },
        {
          key: 'verdict',
          header: 'verdict',
          bare: true,
          cell: ({ id, model, position, verdict, note }) => (
            <>
              <Verdict kind={verdict} />
              {note !== null && <span className="block text-[15px] leading-snug text-slag">{note}</span>}
              <RowActions factId={id} name={`${position.name}, ${model.name}`} />
            </>
          ),
        },
      ]}
      empty={
        <p className="border-y border-rule py-4 text-slag">
          No machine is on record for it yet. That says nothing about where it goes.
        </p>
      }
    />
  );
}
