import type { ReactNode } from 'react';
import type { LoosePayload } from '#contract/contributions.ts';
import { formOf } from '#contract/kinds.ts';
import type { FactField } from '#contract/kinds/kind.ts';
import type { FactKind } from '#domain/vocabulary.ts';
import { DataTable } from '../../ui/data-table.tsx';
import { isBlank, isSame } from './draft-values.ts';
import { PayloadValue } from './payload-list.tsx';
import type { Names } from './payload-list.tsx';

export type Side = { readonly header: string; readonly payload: LoosePayload };

type Props = {
  readonly kind: FactKind;
  readonly caption: string;
  readonly sides: readonly Side[];
  readonly names: Names;
  /** What can be done about one field, in a column of its own. */
  readonly deed?: { readonly header: string; readonly cell: (field: FactField) => ReactNode };
};

/** Several accounts of one entry, field by field; fields that all of them say alike are left out. */
export function SideBySide({ kind, caption, sides, names, deed }: Props) {
  const [first, ...others] = sides;
  const differing = formOf(kind).fields.filter(({ key }) => others.some(({ payload }) => !isAlike(payload[key], first?.payload[key])));
  return (
    <DataTable
      caption={caption}
      rows={differing}
      rowKey={({ key }) => key}
      empty={<p className="border-y border-rule py-3 text-slag">They say the same.</p>}
      columns={[
        { key: 'field', header: 'Field', rowHeader: true, cell: ({ label }) => label },
        ...sides.map(({ header, payload }, place) => ({
          key: `side ${place}`,
          header,
          cell: (field: FactField) => <PayloadValue field={field} value={payload[field.key]} names={names} />,
        })),
        ...(deed === undefined ? [] : [{ key: 'deed', header: deed.header, bare: true, cell: deed.cell }]),
      ]}
    />
  );
}

function isAlike(one: LoosePayload[string] | undefined, other: LoosePayload[string] | undefined): boolean {
  return isSame(one, other) || (isBlank(one) && isBlank(other));
}
