import type { ReworkState } from '#db/vocabulary.ts';
import type { FactKind } from '#domain/vocabulary.ts';
import { RegisterModel } from './register-model.ts';

/** Everything that rests on a fact, being worked out again after it changed. */
export class Rework extends RegisterModel {
  static override readonly tableName = 'reworks';

  declare id: string;
  declare factId: string;
  declare kind: FactKind;
  /** The version that came into force; `null`: the fact was retired. */
  declare version: number | null;
  /** Ids: parts of these makers and foundries, and on machines of these models, are gone through. */
  declare makers: string[];
  declare models: string[];
  declare state: ReworkState;
  declare startedAt: string;
  declare finishedAt: string | null;
  /** The last part that was done. */
  declare reached: string | null;
  /** Parts and date marks that were gone through, of how many; `null` until they were counted. */
  declare done: number;
  declare total: number | null;
  declare changed: number;
}
