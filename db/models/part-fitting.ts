import type { RelationMappings } from 'objection';
import type { DateRange } from '#db/ranges.ts';
import { Machine } from './machine.ts';
import { Position } from './position.ts';
import { RegisterModel } from './register-model.ts';

/** Where a part was, and when: on one machine at a time, and the only one at its position there. */
export class PartFitting extends RegisterModel {
  static override readonly tableName = 'part_fittings';
  static override readonly ranges = ['fitted'];

  declare id: string;
  declare partId: string;
  declare machineId: string;
  declare positionId: string;
  /** That of the machine and of the position. */
  declare modelId: string;
  /** First and last day it is known to have been there; no last day: it is there now. */
  declare fitted: DateRange;

  declare machine?: Machine;
  declare position?: Position;

  static override relationMappings = (): RelationMappings => ({
    machine: {
      relation: RegisterModel.BelongsToOneRelation,
      modelClass: Machine,
      join: { from: 'part_fittings.machineId', to: 'machines.id' },
    },
    position: {
      relation: RegisterModel.BelongsToOneRelation,
      modelClass: Position,
      join: { from: 'part_fittings.positionId', to: 'positions.id' },
    },
  });
}
