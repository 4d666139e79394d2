import type { Difference } from '#contract/contributions.ts';
import { DataTable } from '../../ui/data-table.tsx';
import type { Column } from '../../ui/data-table.tsx';

type Props = { readonly differences: readonly Difference[]; /** Whether there is a version to differ from. */ readonly isChange: boolean; readonly caption: string };

/** What a contribution changes against the version in force; for a new fact, all it says. */
export function DifferencesTable({ differences, isChange, caption }: Props) {
  const field: Column<Difference> = { key: 'field', header: 'Field', rowHeader: true, cell: ({ label }) => label };
  const after: Column<Difference> = { key: 'after', header: isChange ? 'after' : 'says', cell: (row) => <Said text={row.after} /> };
  return (
    <DataTable
      caption={caption}
      rows={differences}
      rowKey={({ path }) => path.join('.')}
      empty={<p className="border-y border-rule py-3 text-slag">{isChange ? 'It says the same as the version in force.' : 'It says nothing yet.'}</p>}
      columns={isChange ? [field, { key: 'before', header: 'before', cell: (row) => <Said text={row.before} /> }, after] : [field, after]}
    />
  );
}

function Said({ text }: { readonly text: string | null }) {
  return text === null ? <span className="text-slag italic">nothing</span> : <span className="whitespace-pre-line wrap-anywhere">{text}</span>;
}
