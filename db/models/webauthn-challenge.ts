import { RegisterModel } from './register-model.ts';

/** What a device was asked to sign and has not signed yet. */
export class WebauthnChallenge extends RegisterModel {
  static override readonly tableName = 'webauthn_challenges';
  static override readonly idColumn = 'challenge';

  /** Base64url. */
  declare challenge: string;
  /** `null`: somebody who has not said yet who they are. */
  declare memberId: string | null;
  declare purpose: 'add' | 'sign-in';
  declare expiresAt: string;
}
