import type { Knex } from 'knex';
import { DatabaseError } from 'pg';
import { v7 as uuidV7 } from 'uuid';
import { describe, expect, test } from 'vitest';
import { useDatabase } from '#tests/support/database.ts';

/**
 * Wrong states written straight in SQL, past every model and contract: the schema refuses each, and accepts its legal neighbour.
 * SQLSTATE codes are those of appendix A of the PostgreSQL 15 manual.
 */
const NOT_NULL = '23502';
const FOREIGN_KEY = '23503';
const UNIQUE = '23505';
const CHECK = '23514';
const EXCLUSION = '23P01';
const RESTRICT = '23001';
const GENERATED_ALWAYS = '428C9';

type Row = Readonly<Record<string, unknown>>;
type Ids = Awaited<ReturnType<typeof demoIds>>;
type Case = {
  readonly name: string;
  readonly table: string;
  readonly legal: (ids: Ids) => Row;
  readonly illegal: (ids: Ids) => Row;
  readonly refused: string;
  /** The constraint that refuses it; an error that comes of no constraint has none. */
  readonly by?: string;
};

const KINDS: Readonly<Record<string, string>> = {
  makers: 'maker',
  works: 'works',
  models: 'model',
  part_types: 'part-type',
  positions: 'position',
  castings: 'casting',
  fitments: 'fitment',
  supersessions: 'supersession',
  series: 'series',
  serial_ranges: 'serial-range',
  anchors: 'anchor',
  ciphers: 'cipher',
};

const database = useDatabase();

const NOW = '2026-11-01T12:00:00Z';
const DEFINITION = { fields: [], symbolSets: {}, usedFrom: '1930-01-01', usedTo: '1931-12-31' };

/** A legal row of each table, for the case to spoil one thing in. */
const LEGAL: Readonly<Record<string, (ids: Ids) => Row>> = {
  makers: () => ({ slug: 'new-maker', name: 'New Maker', builds_machines: true, pours_iron: false, founded: 1900, closed: 1950 }),
  works: (ids) => ({ maker_id: ids.hesper, slug: 'new-works', name: 'New works' }),
  models: (ids) => ({
    maker_id: ids.hesper,
    slug: 'new-model',
    name: 'New model',
    machine_kind: 'lathe',
    made: '[1930-01-01,1940-12-31]',
  }),
  part_types: () => ({ slug: 'new-part-type', name: 'New part type' }),
  positions: (ids) => ({
    model_id: ids.crawler,
    part_type_id: ids.block,
    slug: 'new-position',
    name: 'New position',
    ordinal: 99,
    weight: 1,
  }),
  castings: (ids) => ({
    maker_id: ids.brackwater,
    part_type_id: ids.block,
    slug: 'new-casting',
    number: 'B9999',
    made: '[1930-01-01,1940-12-31]',
  }),
  casting_tells: (ids) => ({ casting_id: ids.b4406, ordinal: 90, place: 'Rear', tell: 'A rib.' }),
  casting_part_numbers: (ids) => ({ casting_id: ids.b4406, ordinal: 90, number: '9999' }),
  supersessions: (ids) => ({ part_type_id: ids.block, old_id: ids.b5120, new_id: ids.b3102, interchange: 'both-ways' }),
  series: (ids) => ({ model_id: ids.crawler, maker_id: ids.brackwater, prefix: 'Z', works_id: ids.lowWorks }),
  accounts: (ids) => ({ slug: 'new-account', title: 'New account', source_id: ids.source }),
  series_accounts: (ids) => ({ series_id: ids.series3c, account_id: ids.otherAccount, preferred: false }),
  serial_ranges: (ids) => ({
    slug: 'new-range',
    series_id: ids.series3c,
    account_id: ids.partsBook,
    numbers: '[5000,5999]',
    built: '[1945-01-01,1945-12-31]',
    precision: 'year',
    standing: 'solid',
    in_order: true,
    meaning: 'built',
  }),
  anchors: (ids) => ({
    series_id: ids.series3c,
    number: 1300,
    built: '[1941-07-01,1941-07-31]',
    precision: 'month',
    meaning: 'built',
  }),
  fitments: (ids) => ({
    casting_id: ids.b3102,
    position_id: ids.blockPosition,
    model_id: ids.crawler,
    part_type_id: ids.block,
    series_id: ids.series3c,
    numbers: '[1001,1100]',
    verdict: 'does-not-belong',
  }),
  ciphers: (ids) => ({ maker_id: ids.brackwater, slug: 'new-cipher', title: 'New cipher' }),
  cipher_versions: (ids) => ({
    cipher_id: ids.tenLetter,
    number: 4,
    header: '{}',
    definition: JSON.stringify(DEFINITION),
    citations: '[]',
    entered_by_id: ids.member,
    entered_at: NOW,
    reason: 'A test.',
    superseded_at: NOW,
  }),
  fact_versions: (ids) => ({
    fact_id: ids.b4406,
    kind: 'casting',
    number: 5,
    payload: '{}',
    citations: '[]',
    entered_by_id: ids.member,
    entered_at: NOW,
    reason: 'A test.',
    superseded_at: NOW,
  }),
  fact_sources: (ids) => ({ fact_id: ids.b4406, source_id: ids.source, field: 'note' }),
  sources: (ids) => ({ slug: 'new-source', kind: 'book', title: 'A book', entered_by_id: ids.member, entered_at: NOW }),
  members: () => ({ display_name: 'A member' }),
  facts: () => ({ kind: 'maker' }),
};

function changed(name: string, table: string, legal: Row, illegal: Row, refused: string, by = ''): Case {
  return { name, table, legal: () => legal, illegal: () => illegal, refused, by };
}

const CASES: readonly Case[] = [
  // Values
  changed('a slug has no capitals', 'makers', { slug: 'a-b' }, { slug: 'A-b' }, CHECK, 'slug_check'),
  changed('a slug has no double hyphen', 'makers', { slug: 'a-b-c' }, { slug: 'a--c' }, CHECK, 'slug_check'),
  changed('a name is not blank', 'makers', { name: 'N' }, { name: '' }, CHECK, 'label_check'),
  changed('a name has no space round it', 'makers', { name: 'N' }, { name: ' N' }, CHECK, 'label_check'),
  changed('a name is there', 'makers', { name: 'N' }, { name: null }, NOT_NULL),
  changed('a note is absent rather than blank', 'makers', { note: null }, { note: '' }, CHECK, 'prose_check'),
  changed('a year is a year', 'makers', { founded: 1500 }, { founded: 1499 }, CHECK, 'calendar_year_check'),
  changed('a member has a name', 'members', { display_name: 'A' }, { display_name: null }, NOT_NULL),
  changed('a fact is of a known kind', 'facts', { kind: 'works' }, { kind: 'photo' }, CHECK, 'facts_kind_check'),

  // Makers and models
  changed(
    'a maker builds or pours',
    'makers',
    { pours_iron: true, builds_machines: false },
    { pours_iron: false, builds_machines: false },
    CHECK,
    'makers_trade_check',
  ),
  changed(
    'a maker closes after it was founded',
    'makers',
    { founded: 1950, closed: 1950 },
    { founded: 1951, closed: 1950 },
    CHECK,
    'makers_years_check',
  ),
  changed(
    'a foundry mark is a foundry’s',
    'makers',
    { pours_iron: true, foundry_mark: 'Q' },
    { pours_iron: false, foundry_mark: 'Q' },
    CHECK,
    'makers_foundry_mark_check',
  ),
  changed('a maker’s slug is its own', 'makers', { slug: 'hesper' }, { slug: 'hesper-lathe-company' }, UNIQUE, 'makers_slug_key'),
  changed(
    'works are told apart within a maker',
    'works',
    { slug: 'low-works' },
    { slug: 'bridge-street' },
    UNIQUE,
    'works_maker_id_slug_key',
  ),
  changed(
    'a machine is of a known kind',
    'models',
    { machine_kind: 'barn-machine' },
    { machine_kind: 'aeroplane' },
    CHECK,
    'machine_kind_check',
  ),
  changed('a span of years may lack an end', 'models', { made: '[1930-01-01,)' }, { made: '(,)' }, CHECK, 'open_day_span_check'),
  changed('a span is not empty', 'models', { made: '[1930-01-01,1930-01-01]' }, { made: 'empty' }, CHECK, 'open_day_span_check'),
  changed(
    'a day is not infinitely far',
    'models',
    { made: '[1930-01-01,)' },
    { made: '[1930-01-01,infinity)' },
    CHECK,
    'open_day_span_check',
  ),
  changed(
    'a model’s name is told apart within a maker',
    'models',
    { name: '5 Bench Plus' },
    { name: '5 Bench' },
    UNIQUE,
    'models_maker_id_name_key',
  ),

  // Positions
  changed('a weight is more than nothing', 'positions', { weight: 0.001 }, { weight: 0 }, CHECK, 'positions_weight_check'),
  changed('a weight is a number', 'positions', { weight: 2 }, { weight: 'NaN' }, CHECK, 'positions_weight_check'),
  changed(
    'a lead begins on the day or before',
    'positions',
    { lead: '[0,365]' },
    { lead: '[-1,365]' },
    CHECK,
    'positions_lead_check',
  ),
  changed('a lead has a least', 'positions', { lead: '[0,)' }, { lead: '(,365]' }, CHECK, 'positions_lead_check'),
  changed('a lead is not empty', 'positions', { lead: '[5,5]' }, { lead: 'empty' }, CHECK, 'positions_lead_check'),
  changed(
    'one position at a place on the checklist',
    'positions',
    { ordinal: 98 },
    { ordinal: 1 },
    UNIQUE,
    'positions_model_id_ordinal_key',
  ),
  changed(
    'a position’s slug is told apart within a model',
    'positions',
    { slug: 'new' },
    { slug: 'cylinder-block' },
    UNIQUE,
    'positions_model_id_slug_key',
  ),

  // Castings
  changed('a casting number is in capitals', 'castings', { number: 'B99' }, { number: 'b99' }, CHECK, 'castings_number_check'),
  changed(
    'a casting number has a glyph at each end',
    'castings',
    { number: 'B-9' },
    { number: 'B9-' },
    CHECK,
    'castings_number_check',
  ),
  changed('a number’s key is worked out', 'castings', { number: 'B99' }, { number_key: 'B99' }, GENERATED_ALWAYS),
  changed('one casting a number and pattern', 'castings', { number: 'B 4406' }, { number: 'B-4441' }, UNIQUE, 'castings_key'),
  {
    name: 'a foundry pours iron',
    table: 'castings',
    refused: FOREIGN_KEY,
    by: 'castings_poured_by_id_poured_by_pours_iron_fkey',
    legal: (ids) => ({ poured_by_id: ids.skerry }),
    illegal: (ids) => ({ poured_by_id: ids.member }),
  },
  changed('tells stand in an order', 'casting_tells', { ordinal: 91 }, { ordinal: 1 }, UNIQUE, 'casting_tells_pkey'),
  changed(
    'a part number stands once on a casting',
    'casting_part_numbers',
    { number: '4410' },
    { number: '44 09' },
    UNIQUE,
    'casting_part_numbers_casting_id_number_key_key',
  ),
  {
    name: 'a casting does not follow itself',
    table: 'supersessions',
    refused: CHECK,
    by: 'supersessions_two_castings_check',
    legal: (ids) => ({ old_id: ids.b5120, new_id: ids.b3102 }),
    illegal: (ids) => ({ old_id: ids.b5120, new_id: ids.b5120 }),
  },
  {
    name: 'castings do not follow each other in a circle',
    table: 'supersessions',
    refused: CHECK,
    by: 'supersessions_no_cycle',
    legal: (ids) => ({ old_id: ids.b3102, new_id: ids.b4406 }),
    illegal: (ids) => ({ old_id: ids.b5120, new_id: ids.b4406 }),
  },
  {
    name: 'one casting follows another once',
    table: 'supersessions',
    refused: UNIQUE,
    by: 'supersessions_old_id_new_id_key',
    legal: (ids) => ({ old_id: ids.b3102, new_id: ids.b5120 }),
    illegal: (ids) => ({ old_id: ids.b4406, new_id: ids.b5120 }),
  },
  {
    name: 'a casting is followed by one of its part type',
    table: 'supersessions',
    refused: FOREIGN_KEY,
    by: 'supersessions_new_id_part_type_id_fkey',
    legal: (ids) => ({ old_id: ids.b3102, new_id: ids.b4406 }),
    illegal: (ids) => ({ old_id: ids.b3102, new_id: ids.flywheelCasting }),
  },

  // Series
  changed('a prefix has no separators', 'series', { prefix: '3CX' }, { prefix: '3-C' }, CHECK, 'series_prefix_check'),
  {
    name: 'one series a model, prefix, works and label',
    table: 'series',
    refused: UNIQUE,
    by: 'series_key',
    legal: (ids) => ({ prefix: '3C', works_id: ids.hillWorks, label: 'second run' }),
    illegal: (ids) => ({ prefix: '3C', works_id: ids.hillWorks, label: null }),
  },
  {
    name: 'a series is built at works of its maker',
    table: 'series',
    refused: FOREIGN_KEY,
    by: 'series_works_id_maker_id_fkey',
    legal: (ids) => ({ works_id: ids.hillWorks }),
    illegal: (ids) => ({ works_id: ids.hesperWorks }),
  },
  {
    name: 'one account of a series is preferred',
    table: 'series_accounts',
    refused: UNIQUE,
    by: 'series_accounts_one_preferred',
    legal: () => ({ preferred: false }),
    illegal: () => ({ preferred: true }),
  },
  changed(
    'ranges of one account share no number',
    'serial_ranges',
    { numbers: '[4121,4200]' },
    { numbers: '[4120,4200]' },
    EXCLUSION,
    'serial_ranges_no_overlap',
  ),
  changed(
    'an open range has every number after it',
    'serial_ranges',
    { numbers: '[4121,)' },
    { numbers: '[4000,)' },
    EXCLUSION,
    'serial_ranges_no_overlap',
  ),
  changed(
    'what is dispatched is not what is built',
    'serial_ranges',
    { meaning: 'dispatched', numbers: '[1001,1390]' },
    { numbers: '[1001,1390]' },
    EXCLUSION,
    'serial_ranges_no_overlap',
  ),
  {
    name: 'rival accounts stand side by side',
    table: 'serial_ranges',
    refused: EXCLUSION,
    by: 'serial_ranges_no_overlap',
    legal: (ids) => ({ account_id: ids.rivalAccount, numbers: '[1391,1400]' }),
    illegal: (ids) => ({ account_id: ids.partsBook, numbers: '[1391,1400]' }),
  },
  {
    name: 'a range is by an account of the series',
    table: 'serial_ranges',
    refused: FOREIGN_KEY,
    by: 'serial_ranges_series_id_account_id_fkey',
    legal: (ids) => ({ account_id: ids.rivalAccount }),
    illegal: (ids) => ({ account_id: ids.otherAccount }),
  },
  changed(
    'a range of numbers is not empty',
    'serial_ranges',
    { numbers: '[5000,5000]' },
    { numbers: 'empty' },
    CHECK,
    'number_span_check',
  ),
  changed('a range has numbers', 'serial_ranges', { numbers: '[5000,5001]' }, { numbers: null }, NOT_NULL),
  changed(
    'a range has a first number',
    'serial_ranges',
    { numbers: '[5000,)' },
    { numbers: '(,5000]' },
    CHECK,
    'number_span_check',
  ),
  changed(
    'a serial is not less than nothing',
    'serial_ranges',
    { numbers: '[5000,6000]' },
    { numbers: '[-1,-1]' },
    CHECK,
    'number_span_check',
  ),
  changed(
    'building has a first and a last day',
    'serial_ranges',
    { built: '[1945-01-01,1946-12-31]' },
    { built: '[1945-01-01,)' },
    CHECK,
    'day_span_check',
  ),
  changed(
    'a span told by years is of whole years',
    'serial_ranges',
    { built: '[1945-01-01,1945-12-31]' },
    { built: '[1945-01-01,1945-12-30]' },
    CHECK,
    'serial_ranges_precision_check',
  ),
  changed(
    'a span told by months is of whole months',
    'serial_ranges',
    { built: '[1945-02-01,1945-02-28]', precision: 'month' },
    { built: '[1945-02-02,1945-02-28]', precision: 'month' },
    CHECK,
    'serial_ranges_precision_check',
  ),
  changed(
    'a range stands somehow',
    'serial_ranges',
    { standing: 'interpolated' },
    { standing: 'certain' },
    CHECK,
    'serial_ranges_standing_check',
  ),
  changed(
    'a date means one of four things',
    'serial_ranges',
    { meaning: 'sold' },
    { meaning: 'painted' },
    CHECK,
    'date_meaning_check',
  ),
  changed(
    'a machine has one date of one meaning',
    'anchors',
    { number: 1190, meaning: 'sold' },
    { number: 1190, meaning: 'built' },
    UNIQUE,
    'anchors_series_id_number_meaning_key',
  ),
  changed(
    'a dated machine has a first and a last day',
    'anchors',
    { built: '[1941-07-01,1941-07-31]' },
    { built: '(,1941-07-31]' },
    CHECK,
    'day_span_check',
  ),
  changed('a dated machine has a number', 'anchors', { number: 0 }, { number: -1 }, CHECK, 'anchors_number_check'),

  // Fitments
  {
    name: 'a casting goes to a position of its part type',
    table: 'fitments',
    refused: FOREIGN_KEY,
    by: 'fitments_casting_id_part_type_id_fkey',
    legal: (ids) => ({ casting_id: ids.b3102 }),
    illegal: (ids) => ({ casting_id: ids.flywheelCasting }),
  },
  {
    name: 'a series is one of the position’s model',
    table: 'fitments',
    refused: FOREIGN_KEY,
    by: 'fitments_series_id_model_id_fkey',
    legal: (ids) => ({ series_id: ids.series3c }),
    illegal: (ids) => ({ series_id: ids.series5c }),
  },
  {
    name: 'a casting has one verdict on a number',
    table: 'fitments',
    refused: EXCLUSION,
    by: 'fitments_one_verdict',
    legal: (ids) => ({ casting_id: ids.b4406, numbers: '[4121,)', verdict: 'earlier-fits' }),
    illegal: (ids) => ({ casting_id: ids.b4406, numbers: '[4120,)', verdict: 'earlier-fits' }),
  },
  {
    name: 'a verdict on every series meets the one on this series',
    table: 'fitments',
    refused: EXCLUSION,
    by: 'fitments_one_verdict',
    legal: (ids) => ({ casting_id: ids.b3102, series_id: null, numbers: '(,)' }),
    illegal: (ids) => ({ casting_id: ids.b4406, series_id: null, numbers: '(,)' }),
  },
  changed(
    'numbers are those of a series',
    'fitments',
    { series_id: null, numbers: '(,)' },
    { series_id: null, numbers: '[1001,1100]' },
    CHECK,
    'fitments_numbers_need_series_check',
  ),
  changed(
    'numbers have a first unless they are all',
    'fitments',
    { numbers: '(,)' },
    { numbers: '(,1100]' },
    CHECK,
    'whole_or_number_span_check',
  ),
  changed(
    'a verdict is a known one',
    'fitments',
    { verdict: 'earlier-fits' },
    { verdict: 'perhaps' },
    CHECK,
    'fitments_verdict_check',
  ),

  // Ciphers
  {
    name: 'a cipher’s foundry pours iron',
    table: 'ciphers',
    refused: FOREIGN_KEY,
    by: 'ciphers_foundry_id_foundry_pours_iron_fkey',
    legal: (ids) => ({ foundry_id: ids.skerry }),
    illegal: (ids) => ({ foundry_id: ids.member }),
  },
  changed(
    'one cipher a maker, foundry and title',
    'ciphers',
    { title: 'Another key' },
    { title: 'Brackwater ten-letter key' },
    UNIQUE,
    'ciphers_key',
  ),
  changed(
    'one version of a cipher is in force',
    'cipher_versions',
    { superseded_at: NOW },
    { superseded_at: null },
    UNIQUE,
    'cipher_versions_one_in_force',
  ),
  changed(
    'versions of a cipher leave no gap',
    'cipher_versions',
    { number: 4 },
    { number: 5 },
    FOREIGN_KEY,
    'cipher_versions_previous_fkey',
  ),
  changed(
    'a cipher is first used before it is last',
    'cipher_versions',
    { definition: JSON.stringify({ ...DEFINITION, usedTo: null }) },
    { definition: JSON.stringify({ ...DEFINITION, usedTo: '1929-12-31' }) },
    '22000',
  ),
  changed(
    'a cipher has a first day',
    'cipher_versions',
    { definition: JSON.stringify(DEFINITION) },
    { definition: JSON.stringify({ ...DEFINITION, usedFrom: undefined }) },
    CHECK,
    'cipher_versions_definition_check',
  ),
  changed(
    'a cipher’s days are days',
    'cipher_versions',
    { definition: JSON.stringify({ ...DEFINITION, usedFrom: '1928-02-29' }) },
    { definition: JSON.stringify({ ...DEFINITION, usedFrom: '1930-02-29' }) },
    '22008',
  ),
  changed(
    'a cipher has fields',
    'cipher_versions',
    { definition: JSON.stringify(DEFINITION) },
    { definition: '{}' },
    CHECK,
    'cipher_versions_definition_check',
  ),

  // Versions and sources
  changed(
    'one version of a fact is in force',
    'fact_versions',
    { superseded_at: NOW },
    { superseded_at: null },
    UNIQUE,
    'fact_versions_one_in_force',
  ),
  changed('versions leave no gap', 'fact_versions', { number: 5 }, { number: 6 }, FOREIGN_KEY, 'fact_versions_previous_fkey'),
  changed(
    'a version has a payload of fields',
    'fact_versions',
    { payload: '{"a":1}' },
    { payload: '[1]' },
    CHECK,
    'fact_versions_payload_check',
  ),
  changed(
    'a version is of the fact’s kind',
    'fact_versions',
    { kind: 'casting' },
    { kind: 'maker' },
    FOREIGN_KEY,
    'fact_versions_fact_id_kind_fkey',
  ),
  {
    name: 'a cipher’s versions are in their own table',
    table: 'fact_versions',
    refused: CHECK,
    by: 'fact_versions_kind_check',
    legal: (ids) => ({ fact_id: ids.b4406 }),
    illegal: (ids) => ({ fact_id: ids.tenLetter, kind: 'cipher', number: 1 }),
  },
  changed(
    'a version is superseded after it was entered',
    'fact_versions',
    { superseded_at: NOW },
    { superseded_at: '2026-10-31T12:00:00Z' },
    CHECK,
    'fact_versions_superseded_check',
  ),
  changed('a version says why', 'fact_versions', { reason: 'Why.' }, { reason: null }, NOT_NULL),
  changed(
    'a citation names a field',
    'fact_sources',
    { field: 'tells.1' },
    { field: 'tells.0' },
    CHECK,
    'fact_sources_field_check',
  ),
  {
    name: 'a source stands once behind a field',
    table: 'fact_sources',
    refused: UNIQUE,
    by: 'fact_sources_key',
    legal: (ids) => ({ source_id: ids.drawing, field: 'note', locator: 'table of alterations' }),
    illegal: (ids) => ({ source_id: ids.drawing, field: 'made', locator: 'table of alterations' }),
  },
  changed('a source is of a known kind', 'sources', { kind: 'book' }, { kind: 'hearsay' }, CHECK, 'sources_kind_check'),
  changed(
    'only a book has a publisher',
    'sources',
    { publisher: 'P' },
    { kind: 'correspondence', publisher: 'P' },
    CHECK,
    'sources_publisher_check',
  ),
  changed(
    'a drawing has a number',
    'sources',
    { kind: 'drawing', drawing_number: '1' },
    { kind: 'drawing' },
    CHECK,
    'sources_drawing_number_check',
  ),
  changed(
    'only a drawing has a sheet',
    'sources',
    { kind: 'drawing', drawing_number: '1', sheet: '2' },
    { sheet: '2' },
    CHECK,
    'sources_sheet_check',
  ),
  changed(
    'a plate is on something',
    'sources',
    { kind: 'plate', subject: 'A crawler' },
    { kind: 'plate' },
    CHECK,
    'sources_subject_check',
  ),
  changed('a book has a year, not a day', 'sources', { year: 1930 }, { dated: '1930-01-01' }, CHECK, 'sources_dated_check'),
  changed(
    'only a letter has an addressee',
    'sources',
    { kind: 'correspondence', addressee: 'A' },
    { addressee: 'A' },
    CHECK,
    'sources_addressee_check',
  ),
  changed(
    'a photo has no year without a day',
    'sources',
    { kind: 'photo', subject: 'S', dated: '1930-01-01' },
    { kind: 'photo', subject: 'S', year: 1930 },
    CHECK,
    'sources_year_check',
  ),
  {
    name: 'knowledge is somebody’s',
    table: 'sources',
    refused: CHECK,
    by: 'sources_member_check',
    legal: (ids) => ({ kind: 'own-knowledge', member_id: ids.member }),
    illegal: () => ({ kind: 'own-knowledge' }),
  },
  {
    name: 'a sighting has a day',
    table: 'sources',
    refused: CHECK,
    by: 'sources_dated_check',
    legal: (ids) => ({ kind: 'sighting', subject: 'S', member_id: ids.member, dated: '2026-01-01' }),
    illegal: (ids) => ({ kind: 'sighting', subject: 'S', member_id: ids.member }),
  },
];

describe('illegal rows', () => {
  test.each(CASES)('$table: $name', async ({ table, legal, illegal, refused, by = '' }) => {
    const ids = await demoIds(database.knex);
    expect(await outcomeOf(table, legal(ids), ids)).toBe('accepted');
    expect(await outcomeOf(table, illegal(ids), ids)).toBe(`${refused} ${by}`.trim());
  });

  test('every table has a case', () => {
    const without = Object.keys(LEGAL).filter((table) => !CASES.some((one) => one.table === table));
    expect(without).toEqual(['part_types', 'accounts']);
  });
});

describe('history', () => {
  test.each([
    ['fact_versions', 'fact_id', 'casting'],
    ['cipher_versions', 'cipher_id', 'cipher'],
  ])('%s keeps what was entered', async (table, key, kind) => {
    const ids = await demoIds(database.knex);
    const fact = kind === 'cipher' ? ids.tenLetter : ids.b4406;
    const number = kind === 'cipher' ? 3 : 4;
    const row = { [key]: fact, number };
    expect(await outcome((trx) => trx(table).where(row).update({ superseded_at: NOW }))).toBe('accepted');
    expect(await outcome((trx) => trx(table).where(row).update({ reason: 'Another.' }))).toBe(RESTRICT);
    expect(
      await outcome((trx) =>
        trx(table)
          .where({ ...row, number: 1 })
          .update({ superseded_at: NOW }),
      ),
    ).toBe(RESTRICT);
    expect(await outcome((trx) => trx(table).where(row).delete())).toBe(RESTRICT);
  });
});

describe('at commit', () => {
  test('a fact has its row, a version in force and a source', async () => {
    const ids = await demoIds(database.knex);
    const id = uuidV7();
    const steps: readonly ((trx: Knex) => PromiseLike<unknown>)[] = [
      (trx) => trx('facts').insert({ id, kind: 'works' }),
      (trx) => trx('works').insert({ id, ...LEGAL['works']!(ids) }),
      (trx) =>
        trx('fact_versions').insert({
          fact_id: id,
          kind: 'works',
          number: 1,
          payload: '{}',
          citations: '[]',
          entered_by_id: ids.member,
          entered_at: NOW,
          reason: 'First entry.',
        }),
      (trx) => trx('fact_sources').insert({ id: uuidV7(), fact_id: id, source_id: ids.source }),
    ];
    const after = async (count: number): Promise<string> =>
      outcome(async (trx) => {
        for (const step of steps.slice(0, count)) await step(trx);
        await trx.raw('set constraints all immediate');
      });
    expect([await after(1), await after(2), await after(3), await after(4)]).toEqual([
      `${CHECK} facts_have_a_row`,
      `${CHECK} facts_have_a_version_in_force`,
      `${CHECK} facts_have_a_source`,
      'accepted',
    ]);
  });

  test.each<[string, string, (trx: Knex, ids: Ids) => PromiseLike<unknown>]>([
    ['its last source', 'facts_have_a_source', (trx, ids) => trx('fact_sources').where({ fact_id: ids.brackwater }).delete()],
    [
      'its version in force',
      'facts_have_a_version_in_force',
      (trx, ids) => trx('fact_versions').where({ fact_id: ids.brackwater, superseded_at: null }).update({ superseded_at: NOW }),
    ],
    [
      'the source of its lead',
      'positions_lead_has_a_source',
      (trx, ids) => trx('fact_sources').where({ fact_id: ids.blockPosition, field: 'lead' }).delete(),
    ],
    ['its row', 'facts_have_a_row', (trx, ids) => trx('anchors').where({ series_id: ids.series3c }).delete()],
  ])('a fact does not lose %s', async (_, by, lose) => {
    const ids = await demoIds(database.knex);
    expect(await outcome((trx) => lose(trx, ids))).toBe('accepted');
    expect(
      await outcome(async (trx) => {
        await lose(trx, ids);
        await trx.raw('set constraints all immediate');
      }),
    ).toBe(`${CHECK} ${by}`);
  });

  test('a lead without a source of its own is refused, and accepted with one', async () => {
    const ids = await demoIds(database.knex);
    const giveLead = async (trx: Knex, cited: boolean): Promise<void> => {
      await trx('positions').where({ id: ids.unsourcedPosition }).update({ lead: '[0,90]' });
      if (cited)
        await trx('fact_sources').insert({ id: uuidV7(), fact_id: ids.unsourcedPosition, source_id: ids.source, field: 'lead' });
      await trx.raw('set constraints all immediate');
    };
    expect(await outcome((trx) => giveLead(trx, false))).toBe(`${CHECK} positions_lead_has_a_source`);
    expect(await outcome((trx) => giveLead(trx, true))).toBe('accepted');
  });
});

/** What inserting the row comes to: `accepted`, or the SQLSTATE and constraint it was refused with. Nothing of it stays. */
function outcomeOf(table: string, change: Row, ids: Ids): Promise<string> {
  const id = uuidV7();
  const hasId = !['casting_tells', 'casting_part_numbers', 'series_accounts', 'fact_versions', 'cipher_versions'].includes(table);
  return outcome(async (trx) => {
    const kind = KINDS[table];
    if (kind !== undefined) await trx('facts').insert({ id, kind });
    await trx(table).insert({ ...(hasId ? { id } : {}), ...LEGAL[table]!(ids), ...change });
  });
}

class Undone extends Error {}

async function outcome(work: (trx: Knex) => PromiseLike<unknown>): Promise<string> {
  try {
    await database.knex.transaction(async (trx) => {
      await work(trx);
      throw new Undone();
    });
  } catch (error) {
    if (error instanceof Undone) return 'accepted';
    if (!(error instanceof DatabaseError)) throw error;
    return `${error.code ?? ''} ${error.constraint ?? ''}`.trim();
  }
  throw new Error('the work was neither undone nor refused');
}

async function demoIds(knex: Knex) {
  const idOf = async (table: string, where: Row): Promise<string> => {
    const rows = await knex(table).where(where).select<{ id: string }[]>('id');
    if (rows.length !== 1) throw new Error(`${String(rows.length)} rows of ${table} are ${JSON.stringify(where)}`);
    return rows[0]!.id;
  };
  const crawler = await idOf('models', { slug: 'brackwater-30-crawler' });
  const brackwater = await idOf('makers', { slug: 'brackwater-tractor-works' });
  return {
    crawler,
    brackwater,
    hesper: await idOf('makers', { slug: 'hesper-lathe-company' }),
    skerry: await idOf('makers', { slug: 'skerry-foundry' }),
    block: await idOf('part_types', { slug: 'cylinder-block' }),
    b3102: await idOf('castings', { slug: 'brackwater-b3102' }),
    b4406: await idOf('castings', { slug: 'brackwater-b4406' }),
    b5120: await idOf('castings', { slug: 'brackwater-b5120' }),
    flywheelCasting: await idOf('castings', { slug: 'brackwater-b4433' }),
    blockPosition: await idOf('positions', { model_id: crawler, slug: 'cylinder-block' }),
    unsourcedPosition: await idOf('positions', { model_id: crawler, slug: 'manifold' }),
    lowWorks: await idOf('works', { slug: 'low-works' }),
    hillWorks: await idOf('works', { slug: 'hill-works' }),
    hesperWorks: await idOf('works', { slug: 'bridge-street' }),
    series3c: await idOf('series', { prefix: '3C' }),
    series5c: await idOf('series', { prefix: '5C' }),
    partsBook: await idOf('accounts', { slug: 'brackwater-parts-book-14' }),
    rivalAccount: await idOf('accounts', { slug: 'two-valleys-lot-list' }),
    otherAccount: await idOf('accounts', { slug: 'hesper-order-book' }),
    source: await idOf('sources', { slug: 'brackwater-instruction-book' }),
    drawing: await idOf('sources', { slug: 'brackwater-drawing-4406-2' }),
    member: await idOf('members', { display_name: 'Perrin Oast' }),
    tenLetter: await idOf('ciphers', { slug: 'brackwater-ten-letter' }),
  };
}
