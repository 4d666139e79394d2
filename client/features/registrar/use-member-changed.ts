import { useQueryClient } from '@tanstack/react-query';
import type { MemberPage } from '#contract/admin.ts';
import { me } from '../people/people-queries.ts';
import { memberPage, registrarKeys } from './registrar-queries.ts';

/** After an act on a member: their page as it is now, and everything else about members asked for anew. A registrar may have changed themself. */
export function useMemberChanged(): (member: MemberPage) => void {
  const queryClient = useQueryClient();
  return (member) => {
    queryClient.setQueryData(memberPage(member.id).queryKey, member);
    void queryClient.invalidateQueries({ queryKey: registrarKeys.members });
    void queryClient.invalidateQueries({ queryKey: registrarKeys.audit });
    void queryClient.invalidateQueries({ queryKey: me().queryKey });
  };
}
