import type { RelationMappings } from 'objection';
import { Machine } from './machine.ts';
import { RegisterModel } from './register-model.ts';

/** A machine on which a rework came out otherwise, and how many castings, dates and fits. */
export class ReworkMachine extends RegisterModel {
  static override readonly tableName = 'rework_machines';
  static override readonly idColumn = ['reworkId', 'machineId'];

  declare reworkId: string;
  declare machineId: string;
  declare castings: number;
  declare dates: number;
  declare fits: number;

  declare machine?: Machine;

  static override relationMappings = (): RelationMappings => ({
    machine: {
      relation: RegisterModel.BelongsToOneRelation,
      modelClass: Machine,
      join: { from: 'rework_machines.machineId', to: 'machines.id' },
    },
  });
}
