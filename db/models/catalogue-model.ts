import type { RelationMappings } from 'objection';
import { FactSource } from './fact-source.ts';
import { FactVersion } from './fact-version.ts';
import { RegisterModel } from './register-model.ts';

/** A row of the catalogue: a fact, with its versions and sources. The row is what is in force; its history is in `versions`. */
export abstract class CatalogueModel extends RegisterModel {
  declare id: string;

  declare versions?: FactVersion[];
  declare versionInForce?: FactVersion;
  declare factSources?: FactSource[];
}

/** The relations every table of facts has. */
export function factRelations(table: string): RelationMappings {
  const join = { from: `${table}.id`, to: 'fact_versions.factId' };
  return {
    versions: { relation: RegisterModel.HasManyRelation, modelClass: FactVersion, modify: 'newestFirst', join },
    versionInForce: { relation: RegisterModel.HasOneRelation, modelClass: FactVersion, modify: 'inForce', join },
    factSources: sourcesOf(table),
  };
}

/** The sources behind a fact. */
export function sourcesOf(table: string): RelationMappings[string] {
  return {
    relation: RegisterModel.HasManyRelation,
    modelClass: FactSource,
    join: { from: `${table}.id`, to: 'fact_sources.factId' },
  };
}
