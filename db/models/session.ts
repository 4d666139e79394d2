import type { SessionStage, SignInStrength } from '#db/vocabulary.ts';
import { RegisterModel } from './register-model.ts';

/** One place where a member is signed in, or about to be. */
export class Session extends RegisterModel {
  static override readonly tableName = 'sessions';

  /** SHA-256 of the secret in the cookie, hexadecimal. */
  declare id: string;
  declare publicId: string;
  declare memberId: string;
  declare stage: SessionStage;
  declare strength: SignInStrength;
  /** Browser and system in plain words. */
  declare device: string;
  declare startedAt: string;
  /** To the minute. */
  declare lastSeenAt: string;
  /** When the member last proved who they are. */
  declare confirmedAt: string;
}
