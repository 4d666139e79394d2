import type { RelationMappings } from 'objection';
import { Member } from './member.ts';
import { RegisterModel } from './register-model.ts';

/** That somebody says something is wrong with a fact, and what became of it. */
export class Flag extends RegisterModel {
  static override readonly tableName = 'flags';

  declare id: string;
  declare factId: string;
  /** What the fact was called. */
  declare title: string;
  /** Whose moderators it went to; `null`: those of all makers. */
  declare makerId: string | null;
  declare byId: string;
  declare at: string;
  declare reason: string;
  /** `null`: it waits. */
  declare outcome: 'acted' | 'kept' | null;
  declare settledById: string | null;
  declare settledAt: string | null;
  declare settledReason: string | null;

  declare by?: Member;
  declare settledBy?: Member | null;

  static override relationMappings = (): RelationMappings => ({
    by: { relation: RegisterModel.BelongsToOneRelation, modelClass: Member, join: { from: 'flags.byId', to: 'members.id' } },
    settledBy: { relation: RegisterModel.BelongsToOneRelation, modelClass: Member, join: { from: 'flags.settledById', to: 'members.id' } },
  });
}
