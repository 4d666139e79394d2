import type { FactKind } from '#domain/vocabulary.ts';
import { RegisterModel } from './register-model.ts';

/** The identity of a row of the catalogue, whatever its table. */
export class Fact extends RegisterModel {
  static override readonly tableName = 'facts';

  declare id: string;
  declare kind: FactKind;
}
