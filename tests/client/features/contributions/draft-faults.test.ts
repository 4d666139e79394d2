// @vitest-environment node
import { describe, expect, it } from 'vitest';
import { NewSource } from '#contract/citations.ts';
import { formOf } from '#contract/kinds.ts';
import { FACT_KINDS, SOURCE_KINDS } from '#domain/vocabulary.ts';
import { controlOf, draftFaults } from '#client/features/contributions/draft-faults.ts';
import { blankPayload } from '#client/features/contributions/draft-values.ts';
import type { Draft } from '#client/features/contributions/draft-values.ts';
import { fieldsOfSource, sourceOfKind } from '#client/features/contributions/source-fields.ts';
import { SOURCE, WHOLE } from './samples.ts';

const said = (faults: ReturnType<typeof draftFaults>) => faults.map(({ path, message }) => `${path.join('.')}: ${message}`);
const whole = (kind: (typeof FACT_KINDS)[number], change: Partial<Draft> = {}): Draft => ({ payload: WHOLE[kind], citations: [SOURCE], note: null, ...change });

describe.each(FACT_KINDS)('a draft of a %s', (kind) => {
  it('has no fault once it is whole', () => {
    expect(said(draftFaults(kind, whole(kind), []))).toEqual([]);
  });

  it('is asked for in plain words, each with a control to go to, while it is blank', () => {
    const blank: Draft = { payload: blankPayload(formOf(kind).fields), citations: [], note: null };
    const faults = draftFaults(kind, blank, []);
    expect(faults.length).toBeGreaterThan(1);
    expect(said(faults).filter((line) => /invalid|expected|received|option/i.test(line))).toEqual([]);
    expect(faults.filter(({ path }) => controlOf(kind, blank, path) === null)).toEqual([]);
  });

  it('names every field of its payload, and none that it has not', () => {
    expect(Object.keys(blankPayload(formOf(kind).fields)).toSorted()).toEqual(Object.keys(WHOLE[kind]).toSorted());
  });
});

describe('draftFaults', () => {
  it('says what is missing, where', () => {
    const faults = draftFaults('casting', whole('casting', { payload: { ...WHOLE.casting, makerId: null, number: '' }, citations: [] }), []);
    expect(said(faults)).toEqual(['payload.makerId: Missing', 'payload.number: Missing', 'citations: At least one source']);
  });
  it('says how a number must be', () => {
    const payload = { ...WHOLE.position, ordinal: 1.5, weight: 'heavy' };
    expect(said(draftFaults('position', whole('position', { payload }), []))).toEqual(['payload.ordinal: A whole number', 'payload.weight: A number']);
  });
  it('asks a book for its page', () => {
    const book = { ...SOURCE, sourceId: null, newSource: sourceOfKind('book', { title: 'Parts book' }), locator: null };
    expect(said(draftFaults('casting', whole('casting', { citations: [book] }), []))).toEqual(['citations.0.locator: Name the page']);
  });
  it('adds what only the register knows, to a part that is right in itself', () => {
    const told = [{ path: ['payload', 'number'], message: 'Taken' }];
    expect(said(draftFaults('casting', whole('casting'), told))).toEqual(['payload.number: Taken']);
    const without = { ...WHOLE.casting, makerId: null };
    expect(said(draftFaults('casting', whole('casting', { payload: without }), told))).toEqual(['payload.makerId: Missing']);
  });
});

describe('controlOf', () => {
  const draft = whole('casting', { citations: [{ ...SOURCE, sourceId: null, newSource: sourceOfKind('photo', {}) }] });
  it.each([
    [['payload', 'number'], 'draft-payload-number', 'Casting number'],
    [['payload', 'made'], 'draft-payload-made-from', 'Poured'],
    [['payload', 'made', 'from'], 'draft-payload-made-from', 'Poured, first'],
    [['payload', 'made', 'to'], 'draft-payload-made-to', 'Poured, last'],
    [['payload', 'tells', 1, 'tell'], 'draft-payload-tells-1-tell', 'Tells, 2: what is seen there'],
    [['payload', 'tells'], 'draft-payload-tells', 'Tells'],
    [['citations'], 'draft-citations', 'Sources'],
    [['citations', 0, 'newSource', 'subject'], 'draft-citations-0-newSource-subject', 'Source 1, what it shows'],
    [['citations', 0], 'draft-citations-0-sourceId', 'Source 1, source'],
    [['note'], 'draft-note', 'To the moderators'],
  ])('%j', (path, id, label) => {
    expect(controlOf('casting', draft, path)).toEqual({ id, label });
  });
  it('knows none for what no control holds', () => {
    expect(controlOf('casting', draft, ['payload', 'slug'])).toBeNull();
    expect(controlOf('casting', draft, [])).toBeNull();
  });
});

describe('a new source', () => {
  it.each(SOURCE_KINDS)('of kind %s is whole once its form is filled', (kind) => {
    const filled = Object.fromEntries(
      fieldsOfSource(kind).map(({ key, control }) => [key, key === 'dated' ? '1939-07-25' : control === 'number' ? 1939 : 'said']),
    );
    expect(NewSource.safeParse({ kind, ...filled }).success).toBe(true);
    expect(Object.keys(sourceOfKind(kind, {})).toSorted()).toEqual(['kind', ...fieldsOfSource(kind).map(({ key }) => key)].toSorted());
  });
  it('keeps what was said when its kind changes, and leaves out what the kind has no place for', () => {
    const book = { ...sourceOfKind('book', {}), title: 'Parts book 14', publisher: 'The works' };
    expect(sourceOfKind('plate', book)).toEqual({ kind: 'plate', title: 'Parts book 14', subject: '', year: null, note: null });
  });
});
