import { Link } from 'react-router-dom';
import type { AuditRow } from '#contract/admin.ts';
import { sayInstant } from '../../lib/say-instant.ts';
import { DataTable } from '../../ui/data-table.tsx';
import { ACT_WORDS, sayDetail } from './audit-words.ts';

type Props = {
  readonly rows: readonly AuditRow[] | null;
  readonly stale: boolean;
  /** Where the trail narrowed to somebody as who did it, or to whom it was done, stands. */
  readonly narrow: (part: 'actor' | 'subject', id: string) => string;
};

/** The trail, an act a row. A name narrows the trail to it. */
export function AuditTable({ rows, stale, narrow }: Props) {
  return (
    <DataTable
      caption="Audit trail"
      rows={rows}
      stale={stale}
      rowKey={({ id }) => id}
      columns={[
        { key: 'act', header: 'Act', rowHeader: true, cell: ({ act }) => ACT_WORDS[act] },
        {
          key: 'actor',
          header: 'who',
          cell: ({ actor }) => (actor === null ? 'nobody signed in' : <Link to={narrow('actor', actor.id)}>{actor.displayName}</Link>),
        },
        {
          key: 'subject',
          header: 'to whom or what',
          cell: ({ subject, actor }) =>
            subject === null ? '' : subject.id === actor?.id ? 'themself' : <Link to={narrow('subject', subject.id)}>{subject.name}</Link>,
        },
        { key: 'at', header: 'when', cell: ({ at }) => <time dateTime={at}>{sayInstant(at)}</time> },
        { key: 'detail', header: 'details', cell: (row) => <Details row={row} /> },
      ]}
    />
  );
}

function Details({ row: { detail, requestId } }: { readonly row: AuditRow }) {
  return (
    <span className="text-[15px] leading-snug text-slag">
      {sayDetail(detail).map((part) => (
        <span key={part} className="block wrap-anywhere">
          {part}
        </span>
      ))}
      {requestId !== null && (
        <details>
          <summary className="inline-flex min-h-11 cursor-pointer items-center underline decoration-rule underline-offset-4">request</summary>
          <span className="font-mono text-[13px] wrap-anywhere">{requestId}</span>
        </details>
      )}
    </span>
  );
}
