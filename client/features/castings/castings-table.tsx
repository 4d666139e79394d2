import { Link } from 'react-router-dom';
import type { CastingItem, CastingPage } from '#contract/castings.ts';
import { paths } from '../../lib/paths.ts';
import { sayYears } from '../../lib/say-date.ts';
import { DataTable } from '../../ui/data-table.tsx';

export function CastingsTable({
  rows,
  stale = false,
}: {
  readonly rows: readonly CastingItem[] | null;
  readonly stale?: boolean;
}) {
  return (
    <DataTable
      caption="Castings"
      rows={rows}
      stale={stale}
      rowKey={({ id }) => id}
      columns={[
        { key: 'number', header: 'Number', rowHeader: true, cell: (casting) => <CastingLink casting={casting} /> },
        {
          key: 'type',
          header: 'what it is',
          cell: ({ partType }) => <Link to={paths.partType(partType.slug)}>{partType.name}</Link>,
        },
        { key: 'maker', header: 'maker', cell: ({ maker }) => <Link to={paths.maker(maker.slug)}>{maker.name}</Link> },
        { key: 'made', header: 'made', cell: ({ made }) => (made === null ? 'not on record' : sayYears(made)) },
      ]}
    />
  );
}

/** A casting by its number, and by its pattern where several share the number. */
export function CastingLink({
  casting: { slug, number, pattern },
}: {
  readonly casting: Pick<CastingPage, 'slug' | 'number' | 'pattern'>;
}) {
  return (
    <>
      <Link to={paths.casting(slug)} className="font-mono whitespace-nowrap">
        {number}
      </Link>
      {pattern !== null && <span className="font-normal text-slag">, {pattern}</span>}
    </>
  );
}
