import type { RelationMappings } from 'objection';
import type { MemberScopeKind } from '#db/vocabulary.ts';
import type { MemberRole } from '#domain/vocabulary.ts';
import { MemberScope } from './member-scope.ts';
import { RegisterModel } from './register-model.ts';

/** Whoever entered something, or has an account, or had one. */
export class Member extends RegisterModel {
  static override readonly tableName = 'members';

  declare id: string;
  declare displayName: string;
  /** As typed; unique whatever its case. `null`: no account. */
  declare email: string | null;
  declare emailVerifiedAt: string | null;
  /** argon2id in the PHC string format. */
  declare passwordHash: string | null;
  declare role: MemberRole;
  declare scope: MemberScopeKind;
  declare joinedAt: string;
  declare suspendedAt: string | null;
  declare suspensionReason: string | null;
  declare suspendedById: string | null;
  declare closedAt: string | null;
  /** Signs in with a password everybody knows. */
  declare demo: boolean;
  /** Grows with every change a registrar makes. */
  declare version: number;

  declare scopes?: MemberScope[];
  declare suspendedBy?: Member | null;

  static override relationMappings = (): RelationMappings => ({
    scopes: {
      relation: RegisterModel.HasManyRelation,
      modelClass: MemberScope,
      join: { from: 'members.id', to: 'member_scopes.memberId' },
    },
    suspendedBy: {
      relation: RegisterModel.BelongsToOneRelation,
      modelClass: Member,
      join: { from: 'members.suspendedById', to: 'members.id' },
    },
  });
}
