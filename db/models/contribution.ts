import type { RelationMappings } from 'objection';
import type { ContributionState, FactKind } from '#domain/vocabulary.ts';
import { Maker } from './maker.ts';
import { Member } from './member.ts';
import { RegisterModel } from './register-model.ts';

/** What somebody would have the catalogue say, from the first draft to what became of it. The database keeps its steps. */
export class Contribution extends RegisterModel {
  static override readonly tableName = 'contributions';
  static override readonly jsonAttributes = ['payload', 'citations'];

  declare id: string;
  declare authorId: string;
  declare kind: FactKind;
  /** The fact it changes, or has become; `null`: it would be a new one. */
  declare subjectId: string | null;
  /** The version it was begun on. */
  declare baseVersion: number | null;
  declare title: string;
  /** Whose moderators decide; `null`: only those of all makers. */
  declare makerId: string | null;
  declare state: ContributionState;
  /** As drafted: half or wrong while it is a draft, as its kind's form has it once put forward. */
  declare payload: Readonly<Record<string, unknown>>;
  declare citations: readonly Readonly<Record<string, unknown>>[];
  declare note: string | null;
  /** Grows with every change of what it says and with every putting forward. */
  declare revision: number;
  declare startedAt: string;
  declare changedAt: string;
  declare putForwardAt: string | null;
  declare decidedAt: string | null;
  declare decidedById: string | null;
  /** The version it became. */
  declare enteredVersion: number | null;

  declare author?: Member;
  declare maker?: Maker | null;

  static override relationMappings = (): RelationMappings => ({
    author: {
      relation: RegisterModel.BelongsToOneRelation,
      modelClass: Member,
      join: { from: 'contributions.authorId', to: 'members.id' },
    },
    maker: {
      relation: RegisterModel.BelongsToOneRelation,
      modelClass: Maker,
      join: { from: 'contributions.makerId', to: 'makers.id' },
    },
  });
}
