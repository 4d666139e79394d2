import { Link } from 'react-router-dom';
import type { Position } from '#contract/models.ts';
import { CastingLink } from '../../features/castings/castings-table.tsx';
import { RowActions } from '../../features/contributions/fact-actions.tsx';
import { sayAcceptedLead } from '../../features/decode/say-lead.ts';
import { paths } from '../../lib/paths.ts';
import { DataTable } from '../../ui/data-table.tsx';
import { Icon } from '../../ui/icon.tsx';
import { NoteRef } from '../../ui/margin-notes.tsx';

type Props = {
  readonly positions: readonly Position[];
  readonly notesOf: (position: Position) => readonly number[];
  readonly leadNotesOf: (position: Position) => readonly number[];
};

/** A model's positions: what goes there, what it weighs in a score, how long before assembly it was cast. */
export function ModelChecklist({ positions, notesOf, leadNotesOf }: Props) {
  return (
    <DataTable
      caption="Checklist"
      rows={positions}
      rowKey={({ id }) => id}
      empty={
        <p className="border-y border-rule py-4 text-slag">
          No position is on record yet. What goes where on this model will stand here.
        </p>
      }
      columns={[
        {
          key: 'position',
          header: 'Position',
          rowHeader: true,
          cell: (position) => (
            <>
              {position.name}
              <NoteRef numbers={notesOf(position)} />
              {position.partType.name !== position.name && (
                <span className="block text-[15px] font-normal">
                  <Link to={paths.partType(position.partType.slug)}>{position.partType.name}</Link>
                </span>
              )}
              {position.caution !== null && <PositionCaution caution={position.caution} />}
              <RowActions factId={position.id} name={position.name} />
            </>
          ),
        },
        { key: 'castings', header: 'castings', cell: ({ castings }) => <CastingLinks castings={castings} /> },
        {
          key: 'lead',
          header: 'accepted lead',
          cell: (position) =>
            position.lead === null ? (
              <span className="text-slag">no lead on record</span>
            ) : (
              <>
                {sayAcceptedLead(position.lead)}
                <NoteRef numbers={leadNotesOf(position)} />
              </>
            ),
        },
        { key: 'weight', header: 'weight', align: 'end', cell: ({ weight }) => weight },
      ]}
    />
  );
}

/** Folded away on a screen, where the warning itself stays in sight; written out on paper, where nothing unfolds. */
function PositionCaution({ caution }: { readonly caution: string }) {
  return (
    <>
      <details className="text-[15px] leading-snug font-normal print:hidden">
        <summary className="inline-flex min-h-11 cursor-pointer items-center gap-1.5 text-straw underline decoration-1 underline-offset-4">
          <Icon name="warning" /> Caution
        </summary>
        <p className="pb-2">{caution} Local codes and competent persons decide.</p>
      </details>
      <span className="hidden text-[13px] leading-snug font-normal print:block">Caution: {caution}</span>
    </>
  );
}

function CastingLinks({ castings }: { readonly castings: Position['castings'] }) {
  if (castings.length === 0) return <span className="text-slag">none on record</span>;
  return (
    <ul>
      {castings.map((casting) => (
        <li key={casting.slug}>
          <CastingLink casting={casting} />
        </li>
      ))}
    </ul>
  );
}
