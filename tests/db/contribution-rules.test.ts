import type { Knex } from 'knex';
import { DatabaseError } from 'pg';
import { v7 as uuidV7 } from 'uuid';
import { beforeEach, describe, expect, test } from 'vitest';
import { Anchor } from '#db/models/anchor.ts';
import { Casting } from '#db/models/casting.ts';
import { ContributionDecision } from '#db/models/contribution-decision.ts';
import { Contribution } from '#db/models/contribution.ts';
import { FactVersion } from '#db/models/fact-version.ts';
import { Flag } from '#db/models/flag.ts';
import { Member } from '#db/models/member.ts';
import { useDatabase } from '#tests/support/database.ts';

/** What the schema itself refuses of contributions, versions, retirements and flags, whoever writes them. SQLSTATEs as in PostgreSQL's manual, appendix A. */
const FOREIGN_KEY = '23503';
const UNIQUE = '23505';
const CHECK = '23514';
const RESTRICT = '23001';
const NOW = '2026-11-01T12:00:00Z';

type Row = Readonly<Record<string, unknown>>;

const database = useDatabase();
let author: string;
let moderator: string;
let casting: string;

beforeEach(async () => {
  const [one, other] = await Member.query(database.knex).orderBy('id').limit(2);
  [author, moderator] = [one?.id ?? '', other?.id ?? ''];
  casting = (await Casting.query(database.knex).findOne({ slug: 'brackwater-b4406' }).throwIfNotFound()).id;
});

class Undone extends Error {}

/** `accepted`, or the SQLSTATE and the constraint it was refused with. Nothing of it stays. */
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

function draft(given: Row = {}): Row {
  return { id: uuidV7(), author_id: author, kind: 'casting', title: 'B1', state: 'drafted', payload: '{}', citations: '[]', ...given };
}

const PUT_FORWARD = { state: 'put-forward', put_forward_at: NOW };

describe('a contribution', () => {
  test.each<[string, () => Row, () => Row, string]>([
    ['is of a known kind', () => ({ kind: 'maker' }), () => ({ kind: 'photo' }), 'contributions_kind_check'],
    ['stands where one can', () => PUT_FORWARD, () => ({ ...PUT_FORWARD, state: 'lost' }), 'contributions_state_check'],
    ['says something by field', () => ({ payload: '{"a":1}' }), () => ({ payload: '[]' }), 'contributions_payload_check'],
    ['cites a list', () => ({ citations: '[{}]' }), () => ({ citations: '{}' }), 'contributions_citations_check'],
    ['was put forward once it is no draft', () => PUT_FORWARD, () => ({ state: 'put-forward' }), 'contributions_put_forward_check'],
    ['was not put forward while it is one', () => ({}), () => ({ put_forward_at: NOW }), 'contributions_put_forward_check'],
    [
      'was decided by somebody',
      () => ({ ...PUT_FORWARD, state: 'sent-back', decided_at: NOW, decided_by_id: moderator }),
      () => ({ ...PUT_FORWARD, state: 'sent-back', decided_at: NOW }),
      'contributions_decided_check',
    ],
    [
      'is not decided while it waits',
      () => PUT_FORWARD,
      () => ({ ...PUT_FORWARD, decided_at: NOW, decided_by_id: moderator }),
      'contributions_decided_check',
    ],
    [
      'is not decided by its author',
      () => ({ ...PUT_FORWARD, state: 'turned-down', decided_at: NOW, decided_by_id: moderator }),
      () => ({ ...PUT_FORWARD, state: 'turned-down', decided_at: NOW, decided_by_id: author }),
      'contributions_not_ones_own_check',
    ],
    ['of a fact was begun on a version', () => ({ subject_id: casting, base_version: 4 }), () => ({ subject_id: casting }), 'contributions_base_check'],
    ['of none was not', () => ({}), () => ({ base_version: 1 }), 'contributions_base_check'],
    [
      'entered became a version of a fact',
      () => ({ ...PUT_FORWARD, state: 'entered', decided_at: NOW, decided_by_id: moderator, subject_id: casting, entered_version: 4 }),
      () => ({ ...PUT_FORWARD, state: 'entered', decided_at: NOW, decided_by_id: moderator, entered_version: 4 }),
      'contributions_entered_check',
    ],
  ])('%s', async (_name, legal, illegal, by) => {
    expect(await outcome((trx) => trx('contributions').insert(draft(legal())))).toBe('accepted');
    expect(await outcome((trx) => trx('contributions').insert(draft(illegal())))).toBe(`${CHECK} ${by}`);
  });

  test('is of the kind of the fact it changes', async () => {
    const insert = (kind: string) => outcome((trx) => trx('contributions').insert(draft({ kind, subject_id: casting, base_version: 4 })));
    expect([await insert('casting'), await insert('maker')]).toEqual(['accepted', `${FOREIGN_KEY} contributions_subject_id_kind_fkey`]);
  });

  test('goes from one standing only to the next, and is kept once it was put forward', async () => {
    const id = await contributionIn('put-forward');
    const set = (change: Row) => outcome((trx) => trx('contributions').where({ id }).update(change));
    expect(await set({ state: 'withdrawn' })).toBe('accepted');
    expect(await set({ state: 'sent-back', decided_at: NOW, decided_by_id: moderator })).toBe('accepted');
    expect(await set({ state: 'drafted', put_forward_at: null })).toBe(`${CHECK} contributions_step`);
    expect(await set({ payload: '{"number":"B2"}' })).toBe(RESTRICT);
    expect(await set({ maker_id: null })).toBe('accepted');
    expect(await outcome((trx) => trx('contributions').where({ id }).delete())).toBe(RESTRICT);
    await Contribution.query(database.knex).findById(id).patch({ state: 'withdrawn' });
    expect(await set({ state: 'put-forward' })).toBe(`${CHECK} contributions_step`);
    const thrownAway = await contributionIn('drafted');
    expect(await outcome((trx) => trx('contributions').where({ id: thrownAway }).delete())).toBe('accepted');
  });

  test('is decided once as it stands, and what was decided, said and found out is kept', async () => {
    const contributionId = await contributionIn('put-forward');
    const decision = { contributionId, revision: 1, decision: 'send-back', reason: 'Where?', byId: moderator } as const;
    const { id } = await ContributionDecision.query(database.knex).insert({ id: uuidV7(), ...decision });
    const again = { id: uuidV7(), contribution_id: contributionId, revision: 1, decision: 'enter', reason: 'Now.', by_id: moderator };
    expect(await outcome((trx) => trx('contribution_decisions').insert(again))).toBe(`${UNIQUE} contribution_decisions_contribution_id_revision_key`);
    expect(await outcome((trx) => trx('contribution_decisions').insert({ ...again, revision: 2 }))).toBe('accepted');
    expect(await outcome((trx) => trx('contribution_decisions').where({ id }).update({ reason: 'Else.' }))).toBe(RESTRICT);
    expect(await outcome((trx) => trx('contribution_decisions').where({ id }).delete())).toBe(RESTRICT);
    const findings = (value: string) => outcome((trx) => trx('contribution_evidence').insert({ id: uuidV7(), contribution_id: contributionId, revision: 1, occasion: 'opened', findings: value }));
    expect([await findings('{"groups":[],"figures":[]}'), await findings('{"groups":[]}')]).toEqual(['accepted', `${CHECK} contribution_evidence_findings_check`]);
  });
});

describe('a version', () => {
  test('is not decided by who gave it, brings back an older one, and comes through one contribution', async () => {
    const version = await FactVersion.query(database.knex).findOne({ factId: casting, supersededAt: null }).throwIfNotFound();
    const contributionId = await contributionIn('put-forward');
    const insert = (change: Row) =>
      outcome(async (trx) => {
        await trx('fact_versions').where({ fact_id: casting, number: 4 }).update({ superseded_at: NOW });
        await trx('fact_versions').insert({
          fact_id: casting,
          kind: 'casting',
          number: 5,
          payload: JSON.stringify(version.payload),
          citations: '[]',
          entered_by_id: author,
          entered_at: NOW,
          reason: 'A test.',
          ...change,
        });
      });
    expect(await insert({ decided_by_id: moderator, contribution_id: contributionId })).toBe('accepted');
    expect(await insert({ decided_by_id: author })).toBe(`${CHECK} fact_versions_not_ones_own_check`);
    expect([await insert({ brought_back: 4 }), await insert({ brought_back: 5 })]).toEqual(['accepted', `${CHECK} fact_versions_brought_back_check`]);
    expect(await insert({ contribution_id: version.contributionId })).toBe(`${UNIQUE} fact_versions_contribution`);
  });
});

describe('at commit', () => {
  test('a retired fact has no row, nothing in force and no source; one that is not has all three', async () => {
    const { id } = await Anchor.query(database.knex).orderBy('id').first().throwIfNotFound();
    const { number } = await FactVersion.query(database.knex).findOne({ factId: id, supersededAt: null }).throwIfNotFound();
    const steps: Readonly<Record<string, (trx: Knex) => PromiseLike<unknown>>> = {
      row: (trx) => trx('anchors').where({ id }).delete(),
      version: (trx) => trx('fact_versions').where({ fact_id: id, number }).update({ superseded_at: NOW }),
      sources: (trx) => trx('fact_sources').where({ fact_id: id }).delete(),
      retirement: (trx) => trx('fact_retirements').insert({ fact_id: id, version: number, retired_by_id: moderator, at: NOW, reason: 'Never was.' }),
    };
    const after = (names: readonly string[]) =>
      outcome(async (trx) => {
        for (const name of names) await steps[name]?.(trx);
        await trx.raw('set constraints all immediate');
      });
    const all = Object.keys(steps);
    expect(await after(all)).toBe('accepted');
    for (const left of ['row', 'version', 'sources']) {
      expect(await after(all.filter((name) => name !== left)), left).toBe(`${CHECK} facts_retired_are_gone`);
    }
    expect(await after(['row', 'version', 'sources'])).toBe(`${CHECK} facts_have_a_row`);
  });
});

describe('a flag', () => {
  test('waits once for each member, and is settled wholly and by another', async () => {
    const flag = (given: Row = {}): Row => ({ id: uuidV7(), fact_id: casting, title: 'B4406', by_id: author, reason: 'Hm.', ...given });
    await Flag.query(database.knex).insert({ id: uuidV7(), factId: casting, title: 'B4406', byId: author, reason: 'Hm.' });
    const insert = (given: Row) => outcome((trx) => trx('flags').insert(flag(given)));
    const settled = { outcome: 'kept', settled_by_id: moderator, settled_at: NOW, settled_reason: 'So be it.' };
    expect(await insert({})).toBe(`${UNIQUE} flags_one_waiting`);
    expect(await insert({ by_id: moderator })).toBe('accepted');
    expect(await insert(settled)).toBe('accepted');
    expect(await insert({ ...settled, settled_reason: null })).toBe(`${CHECK} flags_settled_check`);
    expect(await insert({ ...settled, settled_by_id: author })).toBe(`${CHECK} flags_not_ones_own_check`);
  });
});

describe('a wear limit', () => {
  test('leaves a new part within it, and is told once of a measure', async () => {
    const limit = await database.knex('wear_limits').first<Row>().orderBy('id');
    const part = { ...limit, id: uuidV7(), kind: undefined, measure: 'Depth of the bore' };
    const insert = (given: Row) =>
      outcome(async (trx) => {
        await trx('facts').insert({ id: part.id, kind: 'wear-limit' });
        const { kind: _, partTypeId, modelId, asBuiltFrom, asBuiltTo, wearsTo, ...rest }: Row = { ...part, ...given };
        await trx('wear_limits').insert({ ...rest, partTypeId, modelId, asBuiltFrom, asBuiltTo, wearsTo });
      });
    expect(await insert({ asBuiltFrom: 4, asBuiltTo: 4.01, direction: 'most', wearsTo: 4.01 })).toBe('accepted');
    expect(await insert({ asBuiltFrom: 4, asBuiltTo: 4.01, direction: 'most', wearsTo: 4.005 })).toBe(`${CHECK} wear_limits_new_part_check`);
    expect(await insert({ asBuiltFrom: 4, asBuiltTo: null, direction: 'least', wearsTo: 4.005 })).toBe(`${CHECK} wear_limits_new_part_check`);
    expect(await insert({ asBuiltFrom: null, asBuiltTo: 4, direction: 'least', wearsTo: 3 })).toBe(`${CHECK} wear_limits_as_built_check`);
    expect(await insert({ measure: limit['measure'] })).toBe(`${UNIQUE} wear_limits_key`);
  });
});

async function contributionIn(state: 'drafted' | 'put-forward'): Promise<string> {
  const { id } = await Contribution.query(database.knex).insert({
    id: uuidV7(),
    authorId: author,
    kind: 'casting',
    title: 'B1',
    state,
    payload: {},
    citations: [],
    putForwardAt: state === 'drafted' ? null : NOW,
  });
  return id;
}
