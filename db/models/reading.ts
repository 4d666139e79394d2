import type { Modifiers, QueryBuilder, RelationMappings } from 'objection';
import { Member } from './member.ts';
import { RegisterModel } from './register-model.ts';

/** What one member read at a mark. */
export class Reading extends RegisterModel {
  static override readonly tableName = 'readings';

  declare id: string;
  declare markId: string;
  declare readerId: string;
  /** In the mark notation, as `writeReading` writes it. */
  declare text: string;
  declare madeAt: string;
  /** The photo it was read from; `null`: from the iron, or from one that is gone. */
  declare photoId: string | null;
  /** Made before its reader was shown what others had read. */
  declare independent: boolean;
  /** By whoever held the part then. */
  declare asHolder: boolean;
  /** `null` while it stands. */
  declare takenBackAt: string | null;

  declare reader?: Member;

  static override relationMappings = (): RelationMappings => ({
    reader: {
      relation: RegisterModel.BelongsToOneRelation,
      modelClass: Member,
      join: { from: 'readings.readerId', to: 'members.id' },
    },
  });

  static override modifiers: Modifiers<QueryBuilder<Reading>> = {
    newestFirst: (query) => query.orderBy([
      { column: 'readings.madeAt', order: 'desc' },
      { column: 'readings.id', order: 'desc' },
    ]),
  };
}
