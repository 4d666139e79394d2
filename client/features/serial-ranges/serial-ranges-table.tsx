import { Link } from 'react-router-dom';
import type { SerialRangeItem } from '#contract/serial-ranges.ts';
import { paths } from '../../lib/paths.ts';
import { saySerials } from '../../lib/say-serials.ts';
import { DataTable } from '../../ui/data-table.tsx';
import { sayRangeDates } from './say-range.ts';

export function SerialRangesTable({
  rows,
  stale = false,
}: {
  readonly rows: readonly SerialRangeItem[] | null;
  readonly stale?: boolean;
}) {
  return (
    <DataTable
      caption="Serial ranges"
      rows={rows}
      stale={stale}
      rowKey={({ id }) => id}
      columns={[
        {
          key: 'numbers',
          header: 'Numbers',
          rowHeader: true,
          cell: ({ slug, series, first, last }) => (
            <Link to={paths.serialRange(slug)} className="font-mono text-[15px] whitespace-nowrap">
              {saySerials({ prefix: series.prefix, first, last })}
            </Link>
          ),
        },
        { key: 'model', header: 'model', cell: ({ model }) => <Link to={paths.model(model.slug)}>{model.name}</Link> },
        { key: 'dates', header: 'built', cell: (range) => sayRangeDates(range) },
        {
          key: 'account',
          header: 'account',
          cell: ({ account, preferred }) => (preferred ? `${account.title} (our reading)` : account.title),
        },
      ]}
    />
  );
}
