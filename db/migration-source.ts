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
import * as wearLimitsCreate from './migrations/0022_wear_limits_create.ts';
import * as contributionsCreate from './migrations/0023_contributions_create.ts';
import * as versionsGrow from './migrations/0024_versions_grow.ts';
import * as factsRetire from './migrations/0025_facts_retire.ts';
import * as flagsCreate from './migrations/0026_flags_create.ts';
import * as factNamesCreate from './migrations/0027_fact_names_create.ts';
import * as machinesCreate from './migrations/0030_machines_create.ts';
import * as partsCreate from './migrations/0031_parts_create.ts';
import * as marksCreate from './migrations/0032_marks_create.ts';
import * as reworksCreate from './migrations/0033_reworks_create.ts';
import * as photosCreate from './migrations/0040_photos_create.ts';
import * as partsGrow from './migrations/0041_parts_grow.ts';
import * as readingsGrow from './migrations/0042_readings_grow.ts';
import * as idempotencyKeysCreate from './migrations/0043_idempotency_keys_create.ts';

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
  { name: '0022_wear_limits_create', migration: wearLimitsCreate },
  { name: '0023_contributions_create', migration: contributionsCreate },
  { name: '0024_versions_grow', migration: versionsGrow },
  { name: '0025_facts_retire', migration: factsRetire },
  { name: '0026_flags_create', migration: flagsCreate },
  { name: '0027_fact_names_create', migration: factNamesCreate },
  { name: '0030_machines_create', migration: machinesCreate },
  { name: '0031_parts_create', migration: partsCreate },
  { name: '0032_marks_create', migration: marksCreate },
  { name: '0033_reworks_create', migration: reworksCreate },
  { name: '0040_photos_create', migration: photosCreate },
  { name: '0041_parts_grow', migration: partsGrow },
  { name: '0042_readings_grow', migration: readingsGrow },
  { name: '0043_idempotency_keys_create', migration: idempotencyKeysCreate },
];

export const migrationSource: Knex.MigrationSource<NamedMigration> = {
  getMigrations: () => Promise.resolve([...MIGRATIONS]),
  getMigrationName: ({ name }) => name,
  getMigration: ({ migration }) => Promise.resolve(migration),
};
