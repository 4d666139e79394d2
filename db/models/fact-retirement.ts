import type { RelationMappings } from 'objection';
import { Member } from './member.ts';
import { RegisterModel } from './register-model.ts';

/** That a fact was taken out of the catalogue, at which version, by whom and why. */
export class FactRetirement extends RegisterModel {
  static override readonly tableName = 'fact_retirements';
  static override readonly idColumn = ['factId', 'version'];

  declare factId: string;
  /** The version that was in force. */
  declare version: number;
  declare retiredById: string;
  declare at: string;
  declare reason: string;

  declare retiredBy?: Member;

  static override relationMappings = (): RelationMappings => ({
    retiredBy: {
      relation: RegisterModel.BelongsToOneRelation,
      modelClass: Member,
      join: { from: 'fact_retirements.retiredById', to: 'members.id' },
    },
  });
}
