import type { RelationMappings } from 'objection';
import { Member } from './member.ts';
import { RegisterModel } from './register-model.ts';

/** One thing that was done. The database refuses to change or delete it. */
export class AuditRow extends RegisterModel {
  static override readonly tableName = 'audit_rows';
  static override readonly jsonAttributes = ['detail'];

  declare id: string;
  declare at: string;
  /** `noun.deed`. */
  declare act: string;
  /** `null`: nobody was signed in, or it was done at the server. */
  declare actorId: string | null;
  declare subjectKind: string | null;
  declare subjectId: string | null;
  declare detail: Readonly<Record<string, unknown>>;
  declare requestId: string | null;

  declare actor?: Member | null;

  static override relationMappings = (): RelationMappings => ({
    actor: {
      relation: RegisterModel.BelongsToOneRelation,
      modelClass: Member,
      join: { from: 'audit_rows.actorId', to: 'members.id' },
    },
  });
}
