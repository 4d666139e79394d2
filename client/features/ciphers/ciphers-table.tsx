import { Link } from 'react-router-dom';
import type { CipherItem } from '#contract/ciphers.ts';
import { paths } from '../../lib/paths.ts';
import { sayYears } from '../../lib/say-date.ts';
import { DataTable } from '../../ui/data-table.tsx';

export function CiphersTable({ rows, stale = false }: { readonly rows: readonly CipherItem[] | null; readonly stale?: boolean }) {
  return (
    <DataTable
      caption="Ciphers"
      rows={rows}
      stale={stale}
      rowKey={({ id }) => id}
      columns={[
        {
          key: 'title',
          header: 'Cipher',
          rowHeader: true,
          cell: ({ slug, title }) => <Link to={paths.cipher(slug)}>{title}</Link>,
        },
        { key: 'maker', header: 'maker', cell: ({ maker }) => <Link to={paths.maker(maker.slug)}>{maker.name}</Link> },
        {
          key: 'foundry',
          header: 'poured by',
          cell: ({ maker, foundry }) =>
            foundry === null || foundry.slug === maker.slug ? (
              'its own foundry'
            ) : (
              <Link to={paths.maker(foundry.slug)}>{foundry.name}</Link>
            ),
        },
        { key: 'used', header: 'in use', cell: ({ used }) => sayYears(used) },
      ]}
    />
  );
}
