import type { RelationMappings } from 'objection';
import type { EvidenceStrength, MarkKind, MarkTechnique } from '#domain/vocabulary.ts';
import { Machine } from './machine.ts';
import { MarkDecoding } from './mark-decoding.ts';
import { MarkPhoto } from './mark-photo.ts';
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
  /** The reading in force; `null` while nobody has read it. This and the three after it are settled whenever readings or photos change. */
  declare reading: string | null;
  /** When the newest reading that counts was made. */
  declare readAt: string | null;
  declare evidence: EvidenceStrength;
  /** Since when another reading is wanted; `null`: none is. */
  declare wantsReadingSince: string | null;
  /** Grows with every change of what it is said to be. */
  declare revision: number;

  declare part?: Part | null;
  declare machine?: Machine | null;
  declare photos?: MarkPhoto[];
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
    photos: {
      relation: RegisterModel.HasManyRelation,
      modelClass: MarkPhoto,
      modify: 'inOrder',
      join: { from: 'marks.id', to: 'mark_photos.markId' },
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
