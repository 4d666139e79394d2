import { Link } from 'react-router-dom';
import type { MarkOnList } from '#contract/marks.ts';
import { paths } from '../../lib/paths.ts';
import { DataTable } from '../../ui/data-table.tsx';
import { MarkImage } from '../photos/photo-image.tsx';
import { MarkDatesLine, MarkEvidenceLine, MarkReading } from './mark-lines.tsx';
import { sayMarkKind, sayNoDates } from './mark-words.ts';

const THUMB = '132px';

/** Marks on record, each with its picture where there is one, its plate, what it can mean and how sure that is. */
export function MarksTable({ rows, stale = false }: { readonly rows: readonly MarkOnList[] | null; readonly stale?: boolean }) {
  return (
    <DataTable
      caption="Marks on record"
      rows={rows}
      stale={stale}
      rowKey={({ id }) => id}
      columns={[
        {
          key: 'mark',
          header: 'Mark',
          rowHeader: true,
          cell: (mark) => (
            <span className="font-normal">
              <Link to={paths.mark(mark.id)}>
                <MarkReading mark={mark} />
              </Link>
              <span className="block text-[15px] text-slag">{sayMarkKind(mark)}</span>
            </span>
          ),
        },
        {
          key: 'photo',
          header: 'photo',
          bare: true,
          cell: ({ photo }) => (photo === null ? <span className="text-slag">no photo</span> : <MarkImage markPhoto={photo} alt="" aspect={2.4} sizes={THUMB} className="w-[132px]" />),
        },
        { key: 'maker', header: 'maker', cell: ({ maker }) => (maker === null ? <span className="text-slag">not known</span> : <Link to={paths.maker(maker.slug)}>{maker.name}</Link>) },
        { key: 'dates', header: 'can mean', cell: (mark) => (mark.hidden || mark.dates === null ? <span className="text-slag">{sayNoDates(mark)}</span> : <MarkDatesLine mark={mark} />) },
        { key: 'evidence', header: 'evidence', cell: (mark) => <MarkEvidenceLine mark={mark} /> },
      ]}
    />
  );
}
