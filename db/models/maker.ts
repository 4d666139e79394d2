import type { RelationMappings } from 'objection';
import { CatalogueModel, factRelations } from './catalogue-model.ts';

/** Who built machines, or poured iron, or both. */
export class Maker extends CatalogueModel {
  static override readonly tableName = 'makers';

  declare slug: string;
  declare name: string;
  declare buildsMachines: boolean;
  declare poursIron: boolean;
  /** What it cast into iron it poured. */
  declare foundryMark: string | null;
  declare place: string | null;
  declare founded: number | null;
  declare closed: number | null;
  declare note: string | null;

  static override relationMappings = (): RelationMappings => factRelations('makers');
}
