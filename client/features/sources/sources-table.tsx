import { Link } from 'react-router-dom';
import type { z } from 'zod';
import type { SourceItem as SourceItemSchema } from '#contract/sources.ts';
import { paths } from '../../lib/paths.ts';
import { DataTable } from '../../ui/data-table.tsx';
import { saySourceKind } from './say-source.ts';

export type SourceItem = z.infer<typeof SourceItemSchema>;

export function SourcesTable({ rows, stale = false }: { readonly rows: readonly SourceItem[] | null; readonly stale?: boolean }) {
  return (
    <DataTable
      caption="Sources"
      rows={rows}
      stale={stale}
      rowKey={({ id }) => id}
      columns={[
        {
          key: 'title',
          header: 'Source',
          rowHeader: true,
          cell: ({ slug, title }) => <Link to={paths.source(slug)}>{title}</Link>,
        },
        { key: 'kind', header: 'kind', cell: ({ kind }) => saySourceKind(kind) },
        { key: 'facts', header: 'stands behind', cell: ({ facts }) => (facts === 1 ? '1 fact' : `${facts} facts`) },
      ]}
    />
  );
}
