import type { LinkPurpose } from '#db/vocabulary.ts';
import { RegisterModel } from './register-model.ts';

/** A link sent by e-mail that was not followed yet. */
export class LinkToken extends RegisterModel {
  static override readonly tableName = 'link_tokens';
  static override readonly idColumn = 'hash';

  /** SHA-256 of the secret in the link, hexadecimal. */
  declare hash: string;
  declare memberId: string;
  declare purpose: LinkPurpose;
  /** The address the account is to have; only of the purpose `change-email`. */
  declare email: string | null;
  declare expiresAt: string;
}
