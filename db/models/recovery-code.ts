import { RegisterModel } from './register-model.ts';

/** A code for the day the other second factors are lost; it works once. */
export class RecoveryCode extends RegisterModel {
  static override readonly tableName = 'recovery_codes';
  static override readonly idColumn = 'hash';

  /** SHA-256 of the code's letters and digits, hexadecimal. */
  declare hash: string;
  declare memberId: string;
  declare usedAt: string | null;
}
