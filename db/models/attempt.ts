import type { AttemptKind } from '#db/vocabulary.ts';
import { RegisterModel } from './register-model.ts';

/** A try at something that may be guessed or overdone; it stands as failed until it is forgiven. */
export class Attempt extends RegisterModel {
  static override readonly tableName = 'attempts';

  declare id: string;
  declare kind: AttemptKind;
  /** SHA-256 of the address typed or of the member's id, hexadecimal. */
  declare account: string;
  /** Where it came from, in CIDR notation. */
  declare network: string;
  declare at: string;
}
