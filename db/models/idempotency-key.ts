import { RegisterModel } from './register-model.ts';

/** A creating request that named a key, and what it was answered. */
export class IdempotencyKey extends RegisterModel {
  static override readonly tableName = 'idempotency_keys';

  static override readonly idColumn = ['memberId', 'key'];

  declare memberId: string;
  declare key: string;
  /** SHA-256 of method, address and body. */
  declare request: Buffer;
  /** JSON as it was sent; `null` until it was answered. */
  declare answer: string | null;
  declare at: string;
}
