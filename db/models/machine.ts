import type { RelationMappings } from 'objection';
import type { Visibility } from '#domain/vocabulary.ts';
import { MachineModel } from './machine-model.ts';
import { RegisterModel } from './register-model.ts';

/** One machine, by its owner. */
export class Machine extends RegisterModel {
  static override readonly tableName = 'machines';

  declare id: string;
  declare ownerId: string;
  declare modelId: string;
  declare serialAsStamped: string;
  /** What was read from the serial; capitals without separators, the number as decimal digits. */
  declare prefix: string;
  declare number: string;
  declare suffix: string;
  declare nickname: string | null;
  declare visibility: Visibility;
  /** Whether others see the last digits of the serial. */
  declare serialShown: boolean;

  declare model?: MachineModel;

  static override relationMappings = (): RelationMappings => ({
    model: {
      relation: RegisterModel.BelongsToOneRelation,
      modelClass: MachineModel,
      join: { from: 'machines.modelId', to: 'models.id' },
    },
  });
}
