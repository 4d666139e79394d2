import type { Router } from 'express';
import * as contract from '#contract/admin.ts';
import { presentAuditRow } from '#server/presenters/audit.ts';
import { presentPage } from '#server/presenters/common.ts';
import { presentMember, presentMemberItem } from '#server/presenters/member.ts';
import { listAudit } from '#server/services/audit/list-audit.ts';
import { changeRole } from '#server/services/members/change-role.ts';
import { endMemberSessions } from '#server/services/members/end-member-sessions.ts';
import { listMembers } from '#server/services/members/list-members.ts';
import { readMember } from '#server/services/members/read-member.ts';
import { suspendMember } from '#server/services/members/suspend-member.ts';
import { unsuspendMember } from '#server/services/members/unsuspend-member.ts';
import type { ApiDependencies } from '../dependencies.ts';
import { serve } from '../serve.ts';

/** The registrars' pages. To everybody else they are not there. */
export function mountMembers(router: Router, { knex }: ApiDependencies): void {
  serve(router, contract.listMembers, async ({ query }, { viewer }) => presentPage(await listMembers(viewer, query, knex), presentMemberItem));
  serve(router, contract.readMember, async ({ params }, { viewer }) => presentMember(await readMember(viewer, params.id, knex)));
  serve(router, contract.changeRole, async ({ params, body }, context) => presentMember(await changeRole(params.id, body, context, knex)));
  serve(router, contract.suspendMember, async ({ params, body }, context) => presentMember(await suspendMember(params.id, body, context, knex)));
  serve(router, contract.unsuspendMember, async ({ params, body }, context) => presentMember(await unsuspendMember(params.id, body, context, knex)));
  serve(router, contract.endMemberSessions, async ({ params }, context) => presentMember(await endMemberSessions(params.id, context, knex)));
  serve(router, contract.listAudit, async ({ query }, { viewer }) => presentPage(await listAudit(viewer, query, knex), presentAuditRow));
}
