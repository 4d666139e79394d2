import { Link } from 'react-router-dom';
import type { PartItem } from '#contract/parts.ts';
import { paths } from '../../lib/paths.ts';
import { sayMoment } from '../../lib/say-date.ts';
import { DataTable } from '../../ui/data-table.tsx';
import { MarkDatesLine, MarkReading } from '../marks/mark-lines.tsx';
import { sayKind } from '../marks/mark-words.ts';
import { PhotoImage } from '../photos/photo-image.tsx';
import { sayPlace, sayVisibility } from './part-words.ts';

const THUMB = '96px';

/** One's parts as a table: what each is, its marks, where it is. */
export function PartsTable({ rows, stale = false }: { readonly rows: readonly PartItem[] | null; readonly stale?: boolean }) {
  return (
    <DataTable
      caption="Your parts"
      rows={rows}
      stale={stale}
      rowKey={({ id }) => id}
      columns={[
        {
          key: 'part',
          header: 'Part',
          rowHeader: true,
          cell: ({ id, title, maker }) => (
            <>
              <Link to={paths.part(id)}>{title}</Link>
              {maker !== null && <span className="block text-[15px] font-normal text-slag">{maker.name}</span>}
            </>
          ),
        },
        {
          key: 'photo',
          header: 'photo',
          bare: true,
          cell: ({ photo }) => (photo === null ? <span className="text-slag">no photo</span> : <PhotoImage photo={photo} alt="" aspect={4 / 3} sizes={THUMB} className="w-24" />),
        },
        { key: 'marks', header: 'marks', cell: ({ marks }) => <Marks marks={marks} /> },
        { key: 'place', header: 'where', cell: (part) => sayPlace(part) },
        { key: 'sees', header: 'seen by', cell: ({ visibility }) => sayVisibility(visibility).toLowerCase() },
        { key: 'recorded', header: 'on record', cell: ({ recordedAt }) => <span className="whitespace-nowrap">{sayMoment(recordedAt)}</span> },
      ]}
    />
  );
}

function Marks({ marks }: Pick<PartItem, 'marks'>) {
  if (marks.length === 0) return <span className="text-slag">none yet</span>;
  return (
    <ul className="space-y-1">
      {marks.map((mark) => (
        <li key={mark.id}>
          <Link to={paths.mark(mark.id)} aria-label={`${sayKind(mark.kind)}${mark.reading === null ? '' : ` ${mark.reading}`}`}>
            <MarkReading mark={mark} />
          </Link>
          <span className="block text-[15px] text-slag">
            <MarkDatesLine mark={mark} />
          </span>
        </li>
      ))}
    </ul>
  );
}
