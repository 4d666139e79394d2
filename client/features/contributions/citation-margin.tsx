import { Link } from 'react-router-dom';
import { formOf } from '#contract/kinds.ts';
import type { FactKind } from '#domain/vocabulary.ts';
import { paths } from '../../lib/paths.ts';
import { MarginNotes } from '../../ui/margin-notes.tsx';
import type { CitationNote } from './citation-notes.ts';

/** The sources behind a contribution, in the margin of what they stand behind. */
export function CitationMargin({ kind, notes }: { readonly kind: FactKind; readonly notes: readonly CitationNote[] }) {
  if (notes.length === 0) return <p className="text-[14px] leading-[1.45] text-slag">No source is cited yet.</p>;
  return (
    <MarginNotes
      notes={notes.map(({ number, field, title, slug, locator, remark, about }) => ({
        number,
        body: (
          <>
            {title === null ? 'No source chosen yet' : slug === null ? title : <Link to={paths.source(slug)}>{title}</Link>}
            {locator !== null && `, ${locator}`}.{remark !== null && ` ${remark}`}
          </>
        ),
        fine: [about, field === null ? 'Behind all of it.' : `Behind ${sayBehind(kind, field)}.`].filter((part) => part !== null).join(' '),
      }))}
    />
  );
}

/** `tells.2` → `tells, 2`, as the form calls it. */
function sayBehind(kind: FactKind, field: string): string {
  const [key = '', row] = field.split('.');
  const label = formOf(kind).fields.find((one) => one.key === key)?.label.toLowerCase() ?? key;
  return row === undefined ? label : `${label}, ${row}`;
}
