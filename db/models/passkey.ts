import { RegisterModel } from './register-model.ts';

/** A public key of the Web Authentication API (W3C) that a member's device signs with. */
export class Passkey extends RegisterModel {
  static override readonly tableName = 'passkeys';

  declare id: string;
  declare memberId: string;
  /** Base64url. */
  declare credentialId: string;
  /** COSE key (RFC 9052). */
  declare publicKey: Buffer;
  /** Signatures counted by the device, decimal digits. */
  declare counter: string;
  declare transports: string[];
  declare name: string;
  declare backedUp: boolean;
  declare addedAt: string;
  declare lastUsedAt: string | null;
}
