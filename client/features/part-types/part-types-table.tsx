import { Link } from 'react-router-dom';
import type { z } from 'zod';
import type { PartTypeItem as PartTypeItemSchema } from '#contract/part-types.ts';
import { paths } from '../../lib/paths.ts';
import { DataTable } from '../../ui/data-table.tsx';

export type PartTypeItem = z.infer<typeof PartTypeItemSchema>;

export function PartTypesTable({
  rows,
  stale = false,
}: {
  readonly rows: readonly PartTypeItem[] | null;
  readonly stale?: boolean;
}) {
  return (
    <DataTable
      caption="Part types"
      rows={rows}
      stale={stale}
      rowKey={({ id }) => id}
      columns={[
        {
          key: 'name',
          header: 'Part type',
          rowHeader: true,
          cell: ({ slug, name }) => <Link to={paths.partType(slug)}>{name}</Link>,
        },
        {
          key: 'castings',
          header: 'castings',
          cell: ({ slug, castings }) =>
            castings === 0 ? 'none yet' : <Link to={paths.castings(`?partType=${slug}`)}>{castings}</Link>,
        },
      ]}
    />
  );
}
