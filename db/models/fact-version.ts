import type { Modifiers, QueryBuilder, RelationMappings } from 'objection';
import type { FactKind } from '#domain/vocabulary.ts';
import { Member } from './member.ts';
import { RegisterModel } from './register-model.ts';

/** What a fact said, who entered it, and why. Never changed afterwards but for the moment a later version took its place. */
export class FactVersion extends RegisterModel {
  static override readonly tableName = 'fact_versions';
  static override readonly idColumn = ['factId', 'number'];
  static override readonly jsonAttributes = ['payload'];

  declare factId: string;
  declare kind: Exclude<FactKind, 'cipher'>;
  /** 1, 2, 3 … without gaps. */
  declare number: number;
  /** The fields of the fact's row, without `id` and `kind`; ranges as `{ from, to }`. */
  declare payload: Readonly<Record<string, unknown>>;
  declare enteredById: string;
  declare enteredAt: string;
  declare reason: string;
  /** `null`: in force. */
  declare supersededAt: string | null;

  declare enteredBy?: Member;

  static override relationMappings = (): RelationMappings => ({
    enteredBy: {
      relation: RegisterModel.BelongsToOneRelation,
      modelClass: Member,
      join: { from: 'fact_versions.enteredById', to: 'members.id' },
    },
  });

  static override modifiers: Modifiers<QueryBuilder<FactVersion>> = {
    /** The one version that holds now. */
    inForce: (query) => query.whereNull('fact_versions.supersededAt'),
    /** Every version, the newest first. */
    newestFirst: (query) => query.orderBy('fact_versions.number', 'desc'),
  };
}
