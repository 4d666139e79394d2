import type { Modifiers, QueryBuilder, RelationMappings } from 'objection';
import type { FactKind } from '#domain/vocabulary.ts';
import type { FactCitation } from './fact-citation.ts';
import { Member } from './member.ts';
import { RegisterModel } from './register-model.ts';

/** What a fact said, who entered it, and why. Never changed afterwards but for the moment a later version took its place. */
export class FactVersion extends RegisterModel {
  static override readonly tableName = 'fact_versions';
  static override readonly idColumn = ['factId', 'number'];
  static override readonly jsonAttributes = ['payload', 'citations'];

  declare factId: string;
  declare kind: Exclude<FactKind, 'cipher'>;
  /** 1, 2, 3 … without gaps. */
  declare number: number;
  /** What the form of its kind asks for, with the `slug` where the kind has one. */
  declare payload: Readonly<Record<string, unknown>>;
  declare citations: readonly FactCitation[];
  /** Under whose name it stands. */
  declare enteredById: string;
  declare enteredAt: string;
  declare reason: string;
  /** `null`: in force. */
  declare supersededAt: string | null;
  /** What it came through; `null`: entered before there were contributions, or brought back. */
  declare contributionId: string | null;
  declare decidedById: string | null;
  /** The older version it says again. */
  declare broughtBack: number | null;

  declare enteredBy?: Member;
  declare decidedBy?: Member | null;

  static override relationMappings = (): RelationMappings => ({
    enteredBy: {
      relation: RegisterModel.BelongsToOneRelation,
      modelClass: Member,
      join: { from: 'fact_versions.enteredById', to: 'members.id' },
    },
    decidedBy: {
      relation: RegisterModel.BelongsToOneRelation,
      modelClass: Member,
      join: { from: 'fact_versions.decidedById', to: 'members.id' },
    },
  });

  static override modifiers: Modifiers<QueryBuilder<FactVersion>> = {
    /** The one version that holds now. */
    inForce: (query) => query.whereNull('fact_versions.supersededAt'),
    /** Every version, the newest first. */
    newestFirst: (query) => query.orderBy('fact_versions.number', 'desc'),
  };
}
