import type { RelationMappings } from 'objection';
import { Member } from './member.ts';
import { RegisterModel } from './register-model.ts';

/** That a moderator had a contribution open, and when last. */
export class ContributionOpening extends RegisterModel {
  static override readonly tableName = 'contribution_openings';
  static override readonly idColumn = ['contributionId', 'memberId'];

  declare contributionId: string;
  declare memberId: string;
  declare seenAt: string;

  declare member?: Member;

  static override relationMappings = (): RelationMappings => ({
    member: {
      relation: RegisterModel.BelongsToOneRelation,
      modelClass: Member,
      join: { from: 'contribution_openings.memberId', to: 'members.id' },
    },
  });
}
