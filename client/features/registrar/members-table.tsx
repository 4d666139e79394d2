import { Link } from 'react-router-dom';
import type { MemberItem } from '#contract/admin.ts';
import { paths } from '../../lib/paths.ts';
import { sayMoment } from '../../lib/say-date.ts';
import { DataTable } from '../../ui/data-table.tsx';
import { Icon } from '../../ui/icon.tsx';
import { AddressText } from '../people/address-text.tsx';
import { sayRole } from '../people/say-role.ts';
import { STATE_WORDS } from './member-words.ts';

export function MembersTable({ rows, stale = false }: { readonly rows: readonly MemberItem[] | null; readonly stale?: boolean }) {
  return (
    <DataTable
      caption="Members"
      rows={rows}
      stale={stale}
      rowKey={({ id }) => id}
      columns={[
        {
          key: 'name',
          header: 'Name and address',
          rowHeader: true,
          cell: ({ id, displayName, email }) => (
            <>
              <Link to={paths.registrarMember(id)}>{displayName}</Link>
              {email !== null && <span className="block text-[15px] leading-snug font-normal text-slag">
                  <AddressText email={email} />
                </span>}
            </>
          ),
        },
        { key: 'role', header: 'role', cell: sayRole },
        { key: 'state', header: 'state', cell: ({ state }) => <MemberState state={state} /> },
        { key: 'factor', header: 'second factor', cell: ({ secondFactor }) => (secondFactor ? 'yes' : 'no') },
        { key: 'seen', header: 'last seen', cell: ({ lastSeenAt }) => (lastSeenAt === null ? 'not lately' : sayMoment(lastSeenAt)) },
      ]}
    />
  );
}

/** A word, and an icon where something is amiss. */
export function MemberState({ state }: Pick<MemberItem, 'state'>) {
  if (state !== 'suspended') return STATE_WORDS[state];
  return (
    <span className="inline-flex items-center gap-2 font-semibold text-scale">
      <Icon name="cross" /> {STATE_WORDS[state]}
    </span>
  );
}
