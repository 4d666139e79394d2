import { Link } from 'react-router-dom';
import { KINDS } from '#contract/kinds.ts';
import type { WearLimit } from '#contract/part-types.ts';
import { paths } from '../../lib/paths.ts';
import { Caution } from '../../ui/caution.tsx';
import { DataTable } from '../../ui/data-table.tsx';
import { NoteRef } from '../../ui/margin-notes.tsx';
import { RowActions } from '../contributions/fact-actions.tsx';
import { saySize, saySizes } from './say-measure.ts';

type Props = {
  readonly limits: readonly WearLimit[];
  /** The notes a limit's sources have on the page. */
  readonly notesOf: (id: string) => readonly number[];
};

/** How far the measures of a part type may wear, with the caution that a limit is no sign of soundness. */
export function WearLimitsTable({ limits, notesOf }: Props) {
  const { caution } = KINDS['wear-limit'];
  return (
    <div className="space-y-4">
      {caution && <Caution title={caution.title}>{caution.text}</Caution>}
      <DataTable
        caption="Wear limits"
        rows={limits}
        rowKey={({ id }) => id}
        columns={[
          {
            key: 'measure',
            header: 'Measure',
            rowHeader: true,
            cell: (limit) => (
              <>
                {limit.measure}
                <NoteRef numbers={notesOf(limit.id)} />
                <RowActions factId={limit.id} name={limit.measure} />
              </>
            ),
          },
          { key: 'model', header: 'on', cell: ({ model }) => (model === null ? 'every model' : <Link to={paths.model(model.slug)}>{model.name}</Link>) },
          { key: 'new', header: 'when new', cell: ({ asBuilt, unit }) => (asBuilt === null ? <span className="text-slag">not known</span> : saySizes(asBuilt, unit)) },
          { key: 'limit', header: 'limit', cell: ({ direction, limit, unit }) => `at ${direction} ${saySize(limit, unit)}` },
          {
            key: 'method',
            header: 'how it is measured',
            cell: ({ method, note }) => [method, note].filter((text) => text !== null).join(' ') || <span className="text-slag">not said</span>,
          },
        ]}
      />
    </div>
  );
}
