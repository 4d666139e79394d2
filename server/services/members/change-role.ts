import type { Knex } from 'knex';
import type { Role } from '#contract/people.ts';
import { Maker } from '#db/models/maker.ts';
import { MemberScope } from '#db/models/member-scope.ts';
import type { Member } from '#db/models/member.ts';
import type { MemberScopeKind } from '#db/vocabulary.ts';
import { queueMail } from '#server/mail/queue-mail.ts';
import { writeAudit } from '#server/services/audit/write-audit.ts';
import { notify } from '#server/services/notices/notify.ts';
import type { RequestContext } from '#server/services/people/request-context.ts';
import { endSessionsOf } from '#server/services/people/sessions.ts';
import { ProblemError } from '#server/services/problem-error.ts';
import { actOnMember } from './act-on-member.ts';
import type { MemberPageOnRecord } from './read-member.ts';

export type RoleChange = {
  readonly role: Role;
  /** Slugs of the makers a moderator is to decide for; `null`: all of them. Of nobody else. */
  readonly moderates: readonly string[] | null;
  readonly version: number;
};

/**
 * Gives a member a role and a moderator a scope. Every session of theirs ends, so that the role begins with a new one; they are told by
 * letter and when they come back.
 *
 * @throws ProblemError `invalid` at `moderates`; what `actOnMember` throws.
 */
export async function changeRole(
  id: string,
  { role, moderates, version }: RoleChange,
  context: RequestContext,
  knex: Knex,
): Promise<MemberPageOnRecord> {
  return actOnMember(
    { deed: 'changeRole', id, version },
    async ({ member, registrar }, trx) => {
      const makers = await makersNamed(role, moderates, trx);
      const scope = scopeOf(role, moderates);
      const before = member.role;

      await MemberScope.query(trx).delete().where({ memberId: id });
      await member.$query(trx).patch({ role, scope, version: member.version + 1 });
      if (makers.length > 0) await MemberScope.query(trx).insert(makers.map((maker) => ({ memberId: id, makerId: maker.id })));
      await endSessionsOf(id, trx);
      if (id === registrar.id) await context.session.end(trx);
      await tell(member, role, scope === 'all' ? null : makers.map(({ name }) => name), trx);
      await writeAudit(
        {
          act: 'role.changed',
          actorId: registrar.id,
          subject: { kind: 'member', id },
          detail: { from: before, to: role, moderates: scope === 'all' ? 'all' : makers.map(({ slug }) => slug) },
          requestId: context.requestId,
        },
        trx,
      );
    },
    context,
    knex,
  );
}

function scopeOf(role: Role, moderates: RoleChange['moderates']): MemberScopeKind {
  if (role !== 'moderator') return 'none';
  return moderates === null ? 'all' : 'some';
}

/** @throws ProblemError `invalid` at `moderates`. */
async function makersNamed(role: Role, moderates: RoleChange['moderates'], trx: Knex.Transaction): Promise<readonly Maker[]> {
  if (role !== 'moderator') {
    if (moderates !== null && moderates.length > 0) throw invalidMakers([{ path: ['moderates'], message: 'Only a moderator decides for makers' }]);
    return [];
  }
  if (moderates === null) return [];
  if (moderates.length === 0) throw invalidMakers([{ path: ['moderates'], message: 'Name a maker, or choose all of them' }]);
  const makers = await Maker.query(trx).whereIn('slug', [...moderates]).orderBy('name');
  const known = new Set(makers.map(({ slug }) => slug));
  const unknown = moderates.flatMap((slug, place) => (known.has(slug) ? [] : [{ path: ['moderates', place], message: 'No maker of this name' }]));
  if (unknown.length > 0) throw invalidMakers(unknown);
  return makers;
}

function invalidMakers(errors: readonly { path: (string | number)[]; message: string }[]): ProblemError {
  return new ProblemError('invalid', 'See which, and why, under errors.', { errors });
}

async function tell({ id, email }: Member, role: Role, makerNames: readonly string[] | null, trx: Knex.Transaction): Promise<void> {
  if (email !== null) {
    const moderates = role === 'moderator' && makerNames !== null ? [...makerNames] : null;
    await queueMail({ to: email, template: 'role-changed', data: { role, moderates }, memberId: id }, trx);
  }
  await notify({ memberId: id, kind: 'role', title: `You are a ${role} now`, body: sayDuties(role, makerNames), href: '/account' }, trx);
}

function sayDuties(role: Role, makerNames: readonly string[] | null): string {
  switch (role) {
    case 'member':
      return 'A registrar changed your role. You have no other duties now.';
    case 'moderator':
      return makerNames === null
        ? 'A registrar asked you to decide contributions, for all makers. It takes a second factor.'
        : `A registrar asked you to decide contributions, for: ${inOneNotice(makerNames)}. It takes a second factor.`;
    case 'registrar':
      return 'A registrar made you one as well. It takes a second factor.';
  }
}

/** Names enough for anybody to see what it is about; all of them stand on the account page. */
function inOneNotice(names: readonly string[]): string {
  const most = 10;
  return names.length <= most ? names.join(', ') : `${names.slice(0, most).join(', ')} and ${names.length - most} more`;
}
