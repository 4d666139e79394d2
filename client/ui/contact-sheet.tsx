import type { ReactNode } from 'react';
import { SkeletonBar } from './skeleton.tsx';

type Props<Row> = {
  readonly label: string;
  /** Null while the first are on their way. */
  readonly rows: readonly Row[] | null;
  readonly rowKey: (row: Row) => string;
  readonly card: (row: Row) => ReactNode;
  /** They are being replaced: the old ones stay, dimmed. */
  readonly stale?: boolean;
};

const SHEET = 'grid grid-cols-2 gap-x-4 gap-y-6 roomy:gap-x-5 wide:grid-cols-3';

/** Many things by their pictures, where a table would list them by their words. */
export function ContactSheet<Row>({ label, rows, rowKey, card, stale = false }: Props<Row>) {
  return (
    <ul aria-label={label} aria-busy={rows === null || stale} className={`${SHEET} ${stale ? 'is-stale-block' : ''}`}>
      {rows === null
        ? Array.from({ length: 6 }, (_, place) => (
            <li key={place} aria-hidden="true" className="space-y-2">
              <SkeletonBar width="aspect-[1.6] h-auto w-full" />
              <SkeletonBar width="w-2/3" />
            </li>
          ))
        : rows.map((row) => (
            <li key={rowKey(row)} className="min-w-0">
              {card(row)}
            </li>
          ))}
    </ul>
  );
}
