import type { Knex } from 'knex';
import * as domainsCreate from './migrations/0001_domains_create.ts';
import * as membersCreate from './migrations/0002_members_create.ts';
import * as factsCreate from './migrations/0003_facts_create.ts';
import * as sourcesCreate from './migrations/0004_sources_create.ts';
import * as makersCreate from './migrations/0005_makers_create.ts';
import * as modelsCreate from './migrations/0006_models_create.ts';
import * as castingsCreate from './migrations/0007_castings_create.ts';
import * as seriesCreate from './migrations/0008_series_create.ts';
import * as fitmentsCreate from './migrations/0009_fitments_create.ts';
import * as ciphersCreate from './migrations/0010_ciphers_create.ts';
import * as factsGuard from './migrations/0011_facts_guard.ts';
import * as membersSignIn from './migrations/0012_members_sign_in.ts';
import * as sessionsCreate from './migrations/0013_sessions_create.ts';
import * as secondFactorsCreate from './migrations/0014_second_factors_create.ts';
import * as auditCreate from './migrations/0015_audit_create.ts';
import * as noticesCreate from './migrations/0020_notices_create.ts';
import * as mailCreate from './migrations/0021_mail_create.ts';

type NamedMigration = { readonly name: string; readonly migration: Knex.Migration };

/**
 * The migrations in their order. They are imported by name rather than found in the folder, so that they load the same under every
 * runner and a missing one fails to compile. A name once released is never changed: it is what a database remembers.
 */
const MIGRATIONS: readonly NamedMigration[] = [
  { name: '0001_domains_create', migration: domainsCreate },
  { name: '0002_members_create', migration: membersCreate },
  { name: '0003_facts_create', migration: factsCreate },
  { name: '0004_sources_create', migration: sourcesCreate },
  { name: '0005_makers_create', migration: makersCreate },
  { name: '0006_models_create', migration: modelsCreate },
  { name: '0007_castings_create', migration: castingsCreate },
  { name: '0008_series_create', migration: seriesCreate },
  { name: '0009_fitments_create', migration: fitmentsCreate },
  { name: '0010_ciphers_create', migration: ciphersCreate },
  { name: '0011_facts_guard', migration: factsGuard },
  { name: '0012_members_sign_in', migration: membersSignIn },
  { name: '0013_sessions_create', migration: sessionsCreate },
  { name: '0014_second_factors_create', migration: secondFactorsCreate },
  { name: '0015_audit_create', migration: auditCreate },
  { name: '0020_notices_create', migration: noticesCreate },
  { name: '0021_mail_create', migration: mailCreate },
];

export const migrationSource: Knex.MigrationSource<NamedMigration> = {
  getMigrations: () => Promise.resolve([...MIGRATIONS]),
  getMigrationName: ({ name }) => name,
  getMigration: ({ migration }) => Promise.resolve(migration),
};
