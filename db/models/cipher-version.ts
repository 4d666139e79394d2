import type { Modifiers, QueryBuilder, RelationMappings } from 'objection';
import type { CipherDefinition } from '#domain/ciphers/definition.ts';
import type { DateRange } from '#db/ranges.ts';
import type { MachineKind } from '#domain/vocabulary.ts';
import type { FactCitation } from './fact-citation.ts';
import { Member } from './member.ts';
import { RegisterModel } from './register-model.ts';

export type CipherHeader = {
  readonly slug: string;
  readonly makerId: string;
  readonly foundryId: string | null;
  readonly title: string;
  readonly machineKind: MachineKind | null;
  readonly note: string | null;
};

/** What a cipher said, who entered it, and why. Never changed afterwards but for the moment a later version took its place. */
export class CipherVersion extends RegisterModel {
  static override readonly tableName = 'cipher_versions';
  static override readonly idColumn = ['cipherId', 'number'];
  static override readonly jsonAttributes = ['definition', 'header', 'citations'];

  declare cipherId: string;
  /** 1, 2, 3 … without gaps. */
  declare number: number;
  /** What the cipher's row said beside it. */
  declare header: CipherHeader;
  declare definition: CipherDefinition;
  /** The days in use, worked out by the database from the definition. */
  declare readonly used: DateRange;
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
      join: { from: 'cipher_versions.enteredById', to: 'members.id' },
    },
    decidedBy: {
      relation: RegisterModel.BelongsToOneRelation,
      modelClass: Member,
      join: { from: 'cipher_versions.decidedById', to: 'members.id' },
    },
  });

  static override modifiers: Modifiers<QueryBuilder<CipherVersion>> = {
    /** The one version that holds now. */
    inForce: (query) => query.whereNull('cipher_versions.supersededAt'),
    /** Every version, the newest first. */
    newestFirst: (query) => query.orderBy('cipher_versions.number', 'desc'),
  };
}
