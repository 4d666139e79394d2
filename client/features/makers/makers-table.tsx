import { Link } from 'react-router-dom';
import type { MakerItem } from '#contract/makers.ts';
import { paths } from '../../lib/paths.ts';
import { sayYears } from '../../lib/say-date.ts';
import { DataTable } from '../../ui/data-table.tsx';

export function MakersTable({ rows, stale = false }: { readonly rows: readonly MakerItem[] | null; readonly stale?: boolean }) {
  return (
    <DataTable
      caption="Makers and foundries"
      rows={rows}
      stale={stale}
      rowKey={({ id }) => id}
      columns={[
        {
          key: 'name',
          header: 'Maker',
          rowHeader: true,
          cell: (maker) => <Link to={paths.maker(maker.slug)}>{maker.name}</Link>,
        },
        { key: 'place', header: 'place', cell: ({ place }) => place ?? 'not on record' },
        { key: 'active', header: 'years', cell: ({ active }) => sayYears(active) },
        { key: 'work', header: 'on record', cell: (maker) => sayHoldings(maker) },
      ]}
    />
  );
}

/** `5 models, 61 castings, 2 ciphers`; what there is none of is left out. */
export function sayHoldings({ models, castings, ciphers }: Pick<MakerItem, 'models' | 'castings' | 'ciphers'>): string {
  const counts = [
    [models, 'model'],
    [castings, 'casting'],
    [ciphers, 'cipher'],
  ] as const;
  const said = counts.filter(([count]) => count > 0).map(([count, noun]) => `${count} ${noun}${count === 1 ? '' : 's'}`);
  return said.length === 0 ? 'nothing yet' : said.join(', ');
}
