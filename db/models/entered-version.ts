import type { FactKind } from '#domain/vocabulary.ts';
import { RegisterModel } from './register-model.ts';

/** A version of a fact of any kind, without what it says. A view: nothing is written to it. */
export class EnteredVersion extends RegisterModel {
  static override readonly tableName = 'entered_versions';

  declare readonly id: string;
  declare readonly factId: string;
  declare readonly kind: FactKind;
  declare readonly number: number;
  declare readonly enteredById: string;
  declare readonly enteredAt: string;
  declare readonly reason: string;
  declare readonly inForce: boolean;
}
