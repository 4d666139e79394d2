import { useQuery } from '@tanstack/react-query';
import { listMembers, MEMBER_STATES } from '#contract/admin.ts';
import type { MemberItem } from '#contract/admin.ts';
import { MEMBER_ROLES } from '#domain/vocabulary.ts';
import { ROLE_WORDS, STATE_WORDS } from '../../features/registrar/member-words.ts';
import { MembersTable } from '../../features/registrar/members-table.tsx';
import { RegistrarLinks } from '../../features/registrar/registrar-links.tsx';
import { RegistrarOnly } from '../../features/registrar/registrar-only.tsx';
import { membersList } from '../../features/registrar/registrar-queries.ts';
import { ChoiceFilter, OrderFilter, TextFilter } from '../catalogue/list-filters.tsx';
import { ListPage } from '../catalogue/list-page.tsx';
import { useListSearch } from '../catalogue/use-list-search.ts';

const ORDERS = [
  { value: 'name', text: 'name' },
  { value: '-joined', text: 'joined, newest first' },
] as const;
const ROLE_CHOICES = MEMBER_ROLES.map((role) => ({ value: role, text: ROLE_WORDS[role] }));
const STATE_CHOICES = MEMBER_STATES.map((state) => ({ value: state, text: STATE_WORDS[state] }));

export function Component() {
  return (
    <RegistrarOnly can="seeMembers">
      <Members />
    </RegistrarOnly>
  );
}

function Members() {
  const { query, params, narrowed, change } = useListSearch(listMembers.query);
  const state = useQuery(membersList(query));
  return (
    <ListPage<MemberItem>
      title="Members"
      noun={['member', 'members']}
      above={<RegistrarLinks />}
      below="Everybody who has an account, or had one."
      {...{ state, params, narrowed }}
      filters={
        <>
          <TextFilter label="Name or address" value={query.q ?? ''} onChange={(q) => change({ q })} />
          <ChoiceFilter label="Role" value={query.role} choices={ROLE_CHOICES} all="any role" onChange={(role) => change({ role })} />
          <ChoiceFilter label="State" value={query.state} choices={STATE_CHOICES} all="any state" onChange={(wanted) => change({ state: wanted })} />
          <OrderFilter value={query.sort} orders={ORDERS} onChange={(sort) => change({ sort })} />
        </>
      }
      aside={<p>Addresses are shown to registrars and to nobody else. What you do here is written down in the audit trail.</p>}
      table={(rows, stale) => <MembersTable {...{ rows, stale }} />}
      advice="Take one filter away, or look for a part of the name."
      empty="Members will stand here once accounts are opened."
    />
  );
}
