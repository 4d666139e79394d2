import type { QueryClient } from '@tanstack/react-query';
import { useSuspenseQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import type { LoaderFunction } from 'react-router-dom';
import { AddressText } from '../../features/people/address-text.tsx';
import { paths } from '../../lib/paths.ts';
import { sayInstant } from '../../lib/say-instant.ts';
import { Button } from '../../ui/button.tsx';
import { DataTable } from '../../ui/data-table.tsx';
import { EmptyState } from '../../ui/empty-state.tsx';
import { PageTitle } from '../../ui/page-title.tsx';
import { PartingLine } from '../../ui/parting-line.tsx';
import { postList } from './post-queries.ts';

/** Answers as the register does: where there is no local post there is no such page. */
export function loader(queryClient: QueryClient): LoaderFunction {
  return () => queryClient.query(postList());
}

/** Letters that a developer's machine kept instead of sending. */
export function Component() {
  const { data, refetch, isFetching } = useSuspenseQuery(postList());
  return (
    <>
      <PageTitle title="Local post" below="Letters this machine kept instead of sending them.">
        Local post
      </PageTitle>
      <PartingLine />
      <div className="space-y-4 pt-6">
        <Button disabled={isFetching} onClick={() => void refetch()}>
          Look again
        </Button>
        <DataTable
          caption="Letters"
          rows={data.items}
          rowKey={({ id }) => id}
          empty={<EmptyState title="No letters yet">Open an account, or ask for a new password: the letter comes here.</EmptyState>}
          columns={[
            { key: 'subject', header: 'Subject', rowHeader: true, cell: ({ id, subject }) => <Link to={paths.letter(id)}>{subject}</Link> },
            { key: 'to', header: 'to', cell: ({ to }) => <AddressText email={to} /> },
            { key: 'at', header: 'came', cell: ({ at }) => sayInstant(at) },
          ]}
        />
      </div>
    </>
  );
}
