import { Link } from 'react-router-dom';
import type { ModelItem } from '#contract/models.ts';
import { paths } from '../../lib/paths.ts';
import { sayYears } from '../../lib/say-date.ts';
import { DataTable } from '../../ui/data-table.tsx';

export function ModelsTable({ rows, stale = false }: { readonly rows: readonly ModelItem[] | null; readonly stale?: boolean }) {
  return (
    <DataTable
      caption="Models"
      rows={rows}
      stale={stale}
      rowKey={({ id }) => id}
      columns={[
        { key: 'name', header: 'Model', rowHeader: true, cell: ({ slug, name }) => <Link to={paths.model(slug)}>{name}</Link> },
        { key: 'maker', header: 'maker', cell: ({ maker }) => <Link to={paths.maker(maker.slug)}>{maker.name}</Link> },
        { key: 'kind', header: 'kind', cell: ({ kindOfMachine }) => sayMachineKind(kindOfMachine) },
        { key: 'made', header: 'made', cell: ({ made }) => sayYears(made) },
      ]}
    />
  );
}

/** `stationary-engine` → `stationary engine`. */
export function sayMachineKind(kind: string): string {
  return kind.replaceAll('-', ' ');
}
