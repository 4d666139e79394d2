import { keepPreviousData, queryOptions } from '@tanstack/react-query';
import { listAudit, listMembers, readMember } from '#contract/admin.ts';
import type { CallInput } from '#contract/endpoint.ts';
import { call } from '../../lib/call.ts';

export const registrarKeys = {
  all: ['registrar'] as const,
  members: ['registrar', 'members'] as const,
  member: (id: string) => ['registrar', 'member', id] as const,
  audit: ['registrar', 'audit'] as const,
};

export const membersList = (query: CallInput<typeof listMembers>['query']) =>
  queryOptions({
    queryKey: [...registrarKeys.members, query],
    queryFn: ({ signal }) => call(listMembers, { query, signal }),
    placeholderData: keepPreviousData,
    staleTime: 0,
  });

export const memberPage = (id: string) =>
  queryOptions({ queryKey: registrarKeys.member(id), queryFn: ({ signal }) => call(readMember, { params: { id }, signal }), staleTime: 0 });

export const auditList = (query: CallInput<typeof listAudit>['query']) =>
  queryOptions({
    queryKey: [...registrarKeys.audit, query],
    queryFn: ({ signal }) => call(listAudit, { query, signal }),
    placeholderData: keepPreviousData,
    staleTime: 0,
  });
