import type { RelationMappings } from 'objection';
import { CatalogueModel, factRelations } from './catalogue-model.ts';

/** A sort of part, whoever made it. */
export class PartType extends CatalogueModel {
  static override readonly tableName = 'part_types';

  declare slug: string;
  declare name: string;
  declare note: string | null;
  /** What can hurt somebody who works on one; every screen that shows the type shows it. */
  declare caution: string | null;

  static override relationMappings = (): RelationMappings => factRelations('part_types');
}
