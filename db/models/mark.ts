import type { RelationMappings } from 'objection';
import type { MarkKind, MarkTechnique } from '#domain/vocabulary.ts';
import { Machine } from './machine.ts';
import { MarkDecoding } from './mark-decoding.ts';
import { Part } from './part.ts';
import { Reading } from './reading.ts';
import { RegisterModel } from './register-model.ts';

/** What stands on a part or a machine. */
export class Mark extends RegisterModel {
  static override readonly tableName = 'marks';

  declare id: string;
  /** One of these two. */
  declare partId: string | null;
  declare machineId: string | null;
  declare kind: MarkKind;
  declare technique: MarkTechnique;
  /** The register's reading, kept up by the database from the readings; `null` while there are none. */
  declare readonly reading: string | null;

  declare part?: Part | null;
  declare machine?: Machine | null;
  declare readings?: Reading[];
  declare decoding?: MarkDecoding | null;

  static override relationMappings = (): RelationMappings => ({
    part: {
      relation: RegisterModel.BelongsToOneRelation,
      modelClass: Part,
      join: { from: 'marks.partId', to: 'parts.id' },
    },
    machine: {
      relation: RegisterModel.BelongsToOneRelation,
      modelClass: Machine,
      join: { from: 'marks.machineId', to: 'machines.id' },
    },
    readings: {
      relation: RegisterModel.HasManyRelation,
      modelClass: Reading,
      modify: 'newestFirst',
      join: { from: 'marks.id', to: 'readings.markId' },
    },
    decoding: {
      relation: RegisterModel.HasOneRelation,
      modelClass: MarkDecoding,
      join: { from: 'marks.id', to: 'mark_decodings.markId' },
    },
  });
}
