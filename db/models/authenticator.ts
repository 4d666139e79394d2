import { RegisterModel } from './register-model.ts';

/** A member's source of six-digit codes (RFC 6238). */
export class Authenticator extends RegisterModel {
  static override readonly tableName = 'authenticators';
  static override readonly idColumn = 'memberId';

  declare memberId: string;
  /** Base32 (RFC 4648) without padding. */
  declare secret: string;
  declare addedAt: string;
  /** `null` until a first code was given. */
  declare confirmedAt: string | null;
  /** The time step of the last code taken, decimal digits. */
  declare lastStep: string | null;
}
