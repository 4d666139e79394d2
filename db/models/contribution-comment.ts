import type { RelationMappings } from 'objection';
import { Member } from './member.ts';
import { RegisterModel } from './register-model.ts';

/** Something its author or a moderator said about a contribution. */
export class ContributionComment extends RegisterModel {
  static override readonly tableName = 'contribution_comments';

  declare id: string;
  declare contributionId: string;
  declare authorId: string;
  declare at: string;
  /** The field it is about, from the payload inwards, joined by points; `null`: the whole. */
  declare path: string | null;
  declare text: string;

  declare author?: Member;

  static override relationMappings = (): RelationMappings => ({
    author: {
      relation: RegisterModel.BelongsToOneRelation,
      modelClass: Member,
      join: { from: 'contribution_comments.authorId', to: 'members.id' },
    },
  });
}
