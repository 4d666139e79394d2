import type { Knex } from 'knex';
import { LinkToken } from '#db/models/link-token.ts';
import type { LinkPurpose } from '#db/vocabulary.ts';
import { ProblemError } from '#server/services/problem-error.ts';
import { hashOfSecret, newSecret } from './secrets.ts';

const HOUR = 3_600;

/** Seconds a link can be followed. */
const LASTS: Readonly<Record<LinkPurpose, number>> = { verify: 24 * HOUR, reset: HOUR, 'change-email': 24 * HOUR };

const ISSUE = `
  insert into link_tokens (hash, member_id, purpose, email, expires_at)
  select :hash, id, :purpose, cast(:email as text), now() + make_interval(secs => cast(:lasts as integer))
    from members where id = cast(:memberId as uuid)
  on conflict (member_id, purpose) do update
    set hash = excluded.hash, email = excluded.email, expires_at = excluded.expires_at`;

export type LinkWanted = {
  /** `null`: nobody's; the same is done and nothing comes of it, so that it takes as long. */
  readonly memberId: string | null;
  readonly purpose: LinkPurpose;
  /** The address the account is to have; for `change-email` alone. */
  readonly email?: string;
};

/** The secret of a new link. An earlier one of the same purpose is void from now on. */
export async function issueLink({ memberId, purpose, email }: LinkWanted, trx: Knex.Transaction): Promise<string> {
  const secret = newSecret();
  await trx.raw(ISSUE, { hash: hashOfSecret(secret), purpose, email: email ?? null, lasts: LASTS[purpose], memberId });
  return secret;
}

/** A link of one of these purposes that can still be followed, left where it is. */
export async function findLink(secret: string, purposes: readonly LinkPurpose[], knex: Knex): Promise<LinkToken> {
  const found = await LinkToken.query(knex).findById(hashOfSecret(secret)).whereIn('purpose', purposes).whereRaw('expires_at > now()');
  return found ?? refuseLink();
}

/**
 * Follows a link, which can be done once: of many at the same time one has it.
 *
 * @throws ProblemError `invalid` at `token` where it is void, used, too old or for something else; which of these is not told.
 */
export async function takeLink(secret: string, purposes: readonly LinkPurpose[], trx: Knex.Transaction): Promise<LinkToken> {
  const [taken] = await LinkToken.query(trx)
    .delete()
    .where({ hash: hashOfSecret(secret) })
    .whereIn('purpose', purposes)
    .whereRaw('expires_at > now()')
    .returning('*');
  return taken ?? refuseLink();
}

/** Voids every link a member was sent. */
export async function voidLinksOf(memberId: string, trx: Knex.Transaction): Promise<void> {
  await LinkToken.query(trx).delete().where({ memberId });
}

function refuseLink(): never {
  throw new ProblemError('invalid', 'This link no longer works.', {
    errors: [{ path: ['token'], message: 'The link was used, replaced by a newer one, or is too old; ask for another' }],
  });
}
