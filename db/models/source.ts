import type { RelationMappings } from 'objection';
import type { SourceKind } from '#domain/vocabulary.ts';
import { Member } from './member.ts';
import { RegisterModel } from './register-model.ts';

/** What a fact is from. Which fields a source has depends on its kind; the rest are null. */
export class Source extends RegisterModel {
  static override readonly tableName = 'sources';

  declare id: string;
  declare slug: string;
  declare kind: SourceKind;
  declare title: string;
  /** Who wrote the book or letter, or took the photo. */
  declare author: string | null;
  declare publisher: string | null;
  declare year: number | null;
  declare drawingNumber: string | null;
  declare sheet: string | null;
  /** What the plate is on, the photo shows, the sighting was of. */
  declare subject: string | null;
  declare addressee: string | null;
  /** ISO day of a photo, sighting or letter. */
  declare dated: string | null;
  /** Whose knowledge it is, or who saw it. */
  declare memberId: string | null;
  declare note: string | null;
  declare enteredById: string;
  declare enteredAt: string;

  declare member?: Member | null;
  declare enteredBy?: Member;

  static override relationMappings = (): RelationMappings => ({
    member: {
      relation: RegisterModel.BelongsToOneRelation,
      modelClass: Member,
      join: { from: 'sources.memberId', to: 'members.id' },
    },
    enteredBy: {
      relation: RegisterModel.BelongsToOneRelation,
      modelClass: Member,
      join: { from: 'sources.enteredById', to: 'members.id' },
    },
  });
}
