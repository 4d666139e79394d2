import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import type { ContributionPage } from '#contract/contributions.ts';
import { createDraftStore } from '#client/features/contributions/draft-store.ts';
import type { SaveRequest } from '#client/features/contributions/draft-store.ts';
import { draftShelf } from '#client/features/contributions/kept-drafts.ts';
import { ProblemError, UnreachableError } from '#client/lib/problem-error.ts';
import { contributionOf, ID } from './samples.ts';

beforeEach(() => {
  vi.useFakeTimers();
  localStorage.clear();
});
afterEach(() => vi.useRealTimers());

const problem = (kind: 'conflict' | 'not-signed-in' | 'invalid', status: number) =>
  new ProblemError({ kind, status, detail: 'As the register says.', faults: [], requestId: 'request-1', retryAfter: null });

/** A register that saves, and whose next answers can be set. */
function storeOn(contribution: ContributionPage, load = () => Promise.resolve(contribution)) {
  let revision = contribution.revision;
  const save = vi.fn<(request: SaveRequest) => Promise<ContributionPage>>(({ draft }) => {
    revision += 1;
    return Promise.resolve({ ...contribution, payload: draft.payload, citations: [...draft.citations], note: draft.note, revision });
  });
  const onAnswer = vi.fn<(contribution: ContributionPage) => void>();
  const shelf = draftShelf(contribution.id);
  const store = createDraftStore({ contribution, save, load, shelf, onAnswer });
  const type = (number: string) => store.change((draft) => ({ ...draft, payload: { ...draft.payload, number } }));
  const sent = () => save.mock.calls.map(([{ revision: on, draft }]) => [on, draft.payload['number']]);
  return { store, save, shelf, onAnswer, type, sent, pass: (ms: number) => vi.advanceTimersByTimeAsync(ms) };
}

const draft = contributionOf('casting', { can: { edit: true } });
const elsewhere = (number: string) => contributionOf('casting', { revision: 5, payload: { ...draft.payload, number }, can: { edit: true } });

describe('saving', () => {
  it('sends what was typed once, after a pause, and keeps a copy until then', async () => {
    const { store, shelf, type, sent, pass } = storeOn(draft);
    type('B');
    type('B 5');
    expect(store.state().saving.state).toBe('waiting');
    expect(shelf.read()).toEqual({ revision: 1, draft: store.state().draft });
    await pass(2000);
    expect(sent()).toEqual([[1, 'B 5']]);
    expect(store.state().saving).toMatchObject({ state: 'saved' });
    expect(shelf.read()).toBeNull();
  });

  it('sends one at a time, each on the revision of the one before', async () => {
    const { store, save, type, sent, pass } = storeOn(draft);
    let arrive: (answer: ContributionPage) => void = () => undefined;
    save.mockReturnValueOnce(
      new Promise((resolve) => {
        arrive = resolve;
      }),
    );
    type('B');
    await pass(1000);
    type('B 5');
    await pass(5000);
    expect(sent()).toEqual([[1, 'B']]);
    arrive({ ...draft, revision: 2 });
    await pass(1000);
    expect(sent()).toEqual([
      [1, 'B'],
      [2, 'B 5'],
    ]);
    expect(store.state().draft.payload['number']).toBe('B 5');
  });

  it('saves at once when asked to, and says that it did', async () => {
    const { store, type, sent } = storeOn(draft);
    type('B');
    expect(await store.flush()).toBe(true);
    expect(sent()).toEqual([[1, 'B']]);
    expect(await store.flush()).toBe(true);
    expect(sent()).toHaveLength(1);
  });

  it('keeps what could not be sent, says why, and tries again by itself', async () => {
    const { store, save, shelf, type, sent, pass } = storeOn(draft);
    save.mockRejectedValueOnce(new UnreachableError('offline', null));
    type('B');
    await pass(1000);
    expect(store.state().saving).toMatchObject({ state: 'kept', error: { reason: 'offline' } });
    expect(shelf.read()?.draft.payload['number']).toBe('B');
    await pass(20_000);
    expect(sent()).toHaveLength(2);
    expect(store.state().saving.state).toBe('saved');
  });

  it('keeps what was typed when the session ended, and does not ask again and again', async () => {
    const { store, save, shelf, type, sent, pass } = storeOn(draft);
    save.mockRejectedValue(problem('not-signed-in', 401));
    type('B');
    await pass(60_000);
    expect(sent()).toHaveLength(1);
    expect(store.state().saving.state).toBe('kept');
    expect(shelf.read()?.draft.payload['number']).toBe('B');
  });

  it('keeps and sends nothing of a draft that is no more', async () => {
    const { store, shelf, type, sent, pass } = storeOn(draft);
    type('B');
    store.forget();
    await pass(5000);
    expect(await store.flush()).toBe(false);
    expect(sent()).toEqual([]);
    expect(shelf.read()).toBeNull();
  });
});

describe('what the device kept', () => {
  const kept = (revision: number, number: string) => draftShelf(ID).keep({ revision, draft: { payload: { ...draft.payload, number }, citations: [], note: null } });

  it('is taken up after a reload, and saved', async () => {
    kept(1, 'B 51');
    const { store, sent, pass } = storeOn(draft);
    store.resume();
    expect(store.state().draft.payload['number']).toBe('B 51');
    await pass(100);
    expect(sent()).toEqual([[1, 'B 51']]);
  });

  it('is dropped where the register has the same', () => {
    kept(4, 'B 51');
    const { store, shelf } = storeOn(elsewhere('B 51'));
    store.resume();
    expect(store.state().saving.state).toBe('saved');
    expect(shelf.read()).toBeNull();
  });

  it('stands beside what was saved elsewhere since', () => {
    kept(4, 'B 51');
    const { store } = storeOn(elsewhere('C 7'));
    store.resume();
    expect(store.state()).toMatchObject({ draft: { payload: { number: 'B 51' } }, saving: { state: 'conflict', theirs: { payload: { number: 'C 7' } } } });
  });

  it('is nothing where something else wrote it', () => {
    localStorage.setItem(`pourbook:draft:${ID}`, '{"revision":1');
    expect(draftShelf(ID).read()).toBeNull();
    localStorage.setItem(`pourbook:draft:${ID}`, '{"revision":1,"draft":{"payload":[]}}');
    expect(draftShelf(ID).read()).toBeNull();
  });
});

describe('saved elsewhere meanwhile', () => {
  async function inConflict() {
    const there = elsewhere('C 7');
    const site = storeOn(draft, () => Promise.resolve(there));
    site.save.mockRejectedValueOnce(problem('conflict', 409));
    site.type('B');
    await site.pass(1000);
    return site;
  }

  it('says so, and sends nothing until one of the two is chosen', async () => {
    const { store, type, sent, pass, onAnswer } = await inConflict();
    expect(store.state().saving).toMatchObject({ state: 'conflict', theirs: { revision: 5 } });
    expect(onAnswer).toHaveBeenCalledWith(expect.objectContaining({ revision: 5 }));
    type('B 5');
    await pass(20_000);
    expect(sent()).toHaveLength(1);
    expect(await store.flush()).toBe(false);
  });

  it('goes on with what is here', async () => {
    const { store, sent, pass } = await inConflict();
    store.settle('ours');
    await pass(1000);
    expect(sent().at(-1)).toEqual([5, 'B']);
    expect(store.state().saving.state).toBe('saved');
  });

  it('takes what was saved elsewhere', async () => {
    const { store, shelf, sent } = await inConflict();
    store.settle('theirs');
    expect(store.state().draft.payload['number']).toBe('C 7');
    expect(store.latest().revision).toBe(5);
    expect(shelf.read()).toBeNull();
    expect(sent()).toHaveLength(1);
  });

  it('is no conflict where both say the same', async () => {
    const { store, save, type, pass } = storeOn(draft, () => Promise.resolve(elsewhere('B')));
    save.mockRejectedValueOnce(problem('conflict', 409));
    type('B');
    await pass(1000);
    expect(store.state().saving.state).toBe('saved');
    expect(store.latest().revision).toBe(5);
  });
});

describe('carrying over to the version in force', () => {
  it('names the version, once', async () => {
    const { store, save, type } = storeOn(draft);
    expect(await store.carryOver(3)).toBe(true);
    type('B');
    await store.flush();
    expect(save.mock.calls.map(([{ baseVersion }]) => baseVersion)).toEqual([3, undefined]);
  });

  it('says why it can’t be, where that version is in force no more', async () => {
    const { store, save } = storeOn(draft);
    save.mockRejectedValueOnce(problem('conflict', 409));
    expect(await store.carryOver(3)).toBe(false);
    expect(store.state().saving).toMatchObject({ state: 'kept', error: { message: 'As the register says.' } });
    await store.flush();
    expect(save.mock.calls.at(-1)?.[0].baseVersion).toBeUndefined();
  });
});
