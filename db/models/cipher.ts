import type { RelationMappings } from 'objection';
import type { MachineKind } from '#domain/vocabulary.ts';
import { sourcesOf } from './catalogue-model.ts';
import { CipherVersion } from './cipher-version.ts';
import type { FactSource } from './fact-source.ts';
import { Maker } from './maker.ts';
import { RegisterModel } from './register-model.ts';

/** How a maker wrote dates. A fact like the others, but its versions hold a definition. */
export class Cipher extends RegisterModel {
  static override readonly tableName = 'ciphers';

  declare id: string;
  declare makerId: string;
  /** The foundry whose castings for the maker carry it; `null`: not known to depend on the foundry. */
  declare foundryId: string | null;
  declare slug: string;
  declare title: string;
  /** `null`: on machines of every kind. */
  declare machineKind: MachineKind | null;
  declare note: string | null;

  declare maker?: Maker;
  declare foundry?: Maker | null;
  declare versions?: CipherVersion[];
  declare versionInForce?: CipherVersion;
  declare factSources?: FactSource[];

  static override relationMappings = (): RelationMappings => {
    const join = { from: 'ciphers.id', to: 'cipher_versions.cipherId' };
    return {
      maker: {
        relation: RegisterModel.BelongsToOneRelation,
        modelClass: Maker,
        join: { from: 'ciphers.makerId', to: 'makers.id' },
      },
      foundry: {
        relation: RegisterModel.BelongsToOneRelation,
        modelClass: Maker,
        join: { from: 'ciphers.foundryId', to: 'makers.id' },
      },
      versions: { relation: RegisterModel.HasManyRelation, modelClass: CipherVersion, modify: 'newestFirst', join },
      versionInForce: { relation: RegisterModel.HasOneRelation, modelClass: CipherVersion, modify: 'inForce', join },
      factSources: sourcesOf('ciphers'),
    };
  };
}
