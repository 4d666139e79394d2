import type { RelationMappings } from 'objection';
import type { Decision } from '#domain/vocabulary.ts';
import { Member } from './member.ts';
import { RegisterModel } from './register-model.ts';

/** What a moderator decided about a contribution as it stood, and why. */
export class ContributionDecision extends RegisterModel {
  static override readonly tableName = 'contribution_decisions';

  declare id: string;
  declare contributionId: string;
  declare revision: number;
  declare decision: Decision;
  declare reason: string;
  declare byId: string;
  declare at: string;

  declare by?: Member;

  static override relationMappings = (): RelationMappings => ({
    by: {
      relation: RegisterModel.BelongsToOneRelation,
      modelClass: Member,
      join: { from: 'contribution_decisions.byId', to: 'members.id' },
    },
  });
}
