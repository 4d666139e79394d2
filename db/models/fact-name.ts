import type { FactKind } from '#domain/vocabulary.ts';
import { RegisterModel } from './register-model.ts';

/** What a fact in the catalogue is called and belongs to, whatever its kind. A view: nothing is written to it. */
export class FactName extends RegisterModel {
  static override readonly tableName = 'fact_names';

  declare readonly id: string;
  declare readonly kind: FactKind;
  /** `null`: its kind has no page of its own. */
  declare readonly slug: string | null;
  declare readonly title: string;
  /** Whose moderators decide about it; `null`: only those of all makers. */
  declare readonly makerId: string | null;
  declare readonly modelId: string | null;
  declare readonly partTypeId: string | null;
}
