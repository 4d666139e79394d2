import { act, cleanup, configure, fireEvent, screen, waitFor, within } from '@testing-library/react';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { z } from 'zod';
import type { ContributionPage } from '#contract/contributions.ts';
import { formOf } from '#contract/kinds.ts';
import { FACT_KINDS } from '#domain/vocabulary.ts';
import { Component as DraftPage } from '#client/pages/contributions/draft-page.tsx';
import { MEMBER, ok, refusal, registerThat, showAt } from './register.tsx';
import type { Answers } from './register.tsx';
import { contributionOf, ID, MODERATOR, OTHER_ID, SOURCE, WHOLE } from './samples.ts';

const Saved = z.object({ revision: z.number(), payload: z.record(z.string(), z.json()), sources: z.array(z.record(z.string(), z.json())), note: z.string().nullable(), baseVersion: z.number().optional() });
const MINE = { edit: true, putForward: true, discard: true } as const;
const HERE = `/contributions/${ID}/draft`;
const PATH = `/contributions/${ID}`;

// Nothing here is hidden by a stylesheet, and asking each element whether it is takes most of the time.
configure({ defaultHidden: true });

beforeEach(() => {
  vi.useFakeTimers({ shouldAdvanceTime: true });
  localStorage.clear();
  vi.stubGlobal('scrollTo', () => undefined);
});
afterEach(() => {
  vi.useRealTimers();
  vi.unstubAllGlobals();
});

/** The draft's page over a register that saves what it is sent. */
function open(contribution: ContributionPage, answers: Answers = {}) {
  let now = contribution;
  const register = registerThat({
    'GET /me': () => ok({ me: MEMBER }),
    [`GET ${PATH}`]: () => ok(now),
    [`PUT ${PATH}`]: ({ body }) => {
      const { payload, sources, note } = Saved.parse(body);
      now = { ...now, payload, citations: sources, note, revision: now.revision + 1 };
      return ok(now);
    },
    ...answers,
  });
  showAt(HERE, '/contributions/:id/draft', <DraftPage />);
  const saves = () => register.asked(`PUT ${PATH}`).map(({ body }) => Saved.parse(body));
  return { ...register, saves };
}

const box = (label: string | RegExp) => screen.findByLabelText<HTMLInputElement>(label);
const type = (control: HTMLElement, value: string) => fireEvent.change(control, { target: { value } });
/** By what stands on it; asking for roles takes a second in a form of this length. */
function press(words: string): void {
  const [button, another] = [...document.querySelectorAll('button')].filter(({ textContent }) => textContent === words);
  expect([button?.textContent, another?.textContent]).toEqual([words, undefined]);
  fireEvent.click(button!);
}
/** Longer than the draft or a chooser waits for more letters. */
const pause = () => act(() => vi.advanceTimersByTimeAsync(1000));

describe.each(FACT_KINDS)('the form of a %s', (kind) => {
  it('has a control for each of its fields, and shows what was drafted', async () => {
    const { fields, caution } = formOf(kind);
    open(contributionOf(kind, { payload: WHOLE[kind], citations: [SOURCE], can: MINE }));
    await screen.findByRole('heading', { name: 'What it says' });
    for (const { label, control } of fields) {
      const named = control === 'cipher' ? screen.getAllByRole('region', { name: label }) : screen.getAllByText((text) => text === label || text === `${label} (optional)`);
      expect(named.length).toBeGreaterThan(0);
    }
    expect(screen.queryAllByRole('complementary').length).toBe(caution === undefined ? 0 : 1);
  });
});

describe('writing', () => {
  it('saves what is typed, on the revision it has', async () => {
    const { saves } = open(contributionOf('maker', { can: MINE, revision: 7 }));
    type(await box('Name'), 'Example Works');
    await pause();
    await screen.findByText(/^Saved \d\d:\d\d$/);
    expect(saves()).toEqual([expect.objectContaining({ revision: 7, payload: expect.objectContaining({ name: 'Example Works' }) as unknown })]);
  });

  it('keeps numbers as numbers, what is no number as it was typed, and nothing as nothing', async () => {
    const { saves } = open(contributionOf('maker', { can: MINE }));
    const founded = await box('Founded (optional)');
    for (const [typed, kept] of [['1901', 1901], ['about 1900', 'about 1900'], ['', null]] as const) {
      const before = saves().length;
      type(founded, typed);
      expect(screen.getByLabelText<HTMLInputElement>('Founded (optional)').value).toBe(typed);
      await pause();
      await waitFor(() => expect(saves()).toHaveLength(before + 1));
      expect(saves().at(-1)?.payload['founded']).toBe(kept);
    }
  });

  it('keeps what could not be sent, says so, and has it again after a reload', async () => {
    const away = { [`PUT ${PATH}`]: () => refusal('not-allowed', 403, 'Not now.') };
    open(contributionOf('maker', { can: MINE }), away);
    type(await box('Name'), 'Kept Works');
    await pause();
    expect((await screen.findByRole('alert')).textContent).toContain('kept on this device');
    cleanup();
    const { saves } = open(contributionOf('maker', { can: MINE }));
    await waitFor(() => expect(screen.getByLabelText<HTMLInputElement>('Name').value).toBe('Kept Works'));
    await waitFor(() => expect(saves().at(-1)?.payload['name']).toBe('Kept Works'));
  });

  it('shows both where it was saved elsewhere, and goes on with the one that is chosen', async () => {
    const there = contributionOf('maker', { can: MINE, revision: 9, payload: { ...WHOLE.maker, name: 'There' } });
    let refused = false;
    const { saves } = open(contributionOf('maker', { can: MINE }), {
      [`GET ${PATH}`]: () => ok(refused ? there : contributionOf('maker', { can: MINE })),
      [`PUT ${PATH}`]: () => {
        if (refused) return ok({ ...there, revision: 10 });
        refused = true;
        return refusal('conflict', 409, 'Saved elsewhere.');
      },
    });
    type(await box('Name'), 'Here');
    await pause();
    const both = await screen.findByRole('table', { name: 'Here and as saved elsewhere' });
    within(both).getByRole('row', { name: /Name.*Here.*There/ });
    press('Go on with what is here');
    await waitFor(() => expect(saves().at(-1)).toMatchObject({ revision: 9, payload: { name: 'Here' } }));
    expect(screen.queryByRole('table', { name: 'Here and as saved elsewhere' })).toBeNull();
  });

  it('carries a draft over when the entry moved on, taking what is agreed with', async () => {
    const base = { version: 2, payload: WHOLE.maker, citations: [] };
    const inForce = { version: 3, payload: { ...WHOLE.maker, name: 'Newer Works', founded: 1899 }, citations: [] };
    const subject = { id: ID, kind: 'maker', slug: 'example-works', title: 'Example Works' } as const;
    const { saves } = open(contributionOf('maker', { can: MINE, payload: { ...WHOLE.maker, place: 'Northwick' }, subject, base, inForce }));
    await screen.findByRole('table', { name: 'Both versions and yours' });
    press('Take version 3’s for founded');
    press('Carry mine over to version 3');
    await waitFor(() => expect(saves().at(-1)).toMatchObject({ baseVersion: 3, payload: { name: 'Example Works', founded: 1899, place: 'Northwick' } }));
  });
});

describe('rows', () => {
  it('are added, moved, taken out and put back', async () => {
    open(contributionOf('casting', { can: MINE }));
    await screen.findByText('Add a tell');
    press('Add a tell');
    expect(document.activeElement).toBe(screen.getByLabelText('Where'));
    type(screen.getByLabelText('Where'), 'Rear web');
    press('Add a tell');
    const places = () => screen.getAllByLabelText<HTMLInputElement>('Where').map(({ value }) => value);
    expect(places()).toEqual(['Rear web', '']);
    press('Down: tell 1');
    expect(places()).toEqual(['', 'Rear web']);
    press('Take out: tell 2');
    expect(places()).toEqual(['']);
    expect(document.activeElement?.textContent).toBe('Put it back');
    press('Put it back');
    expect(places()).toEqual(['', 'Rear web']);
  });
});

describe('choosing a fact', () => {
  const FACTS = { items: [{ id: OTHER_ID, kind: 'maker', slug: 'skerry', title: 'Skerry Foundry', maker: null }], next: null };

  it('finds by name, chooses with the keyboard, and shows it by name', async () => {
    const { asked, saves } = open(contributionOf('works', { can: MINE }), { 'GET /facts': () => ok(FACTS) });
    const maker = await screen.findByLabelText('Maker');
    type(maker, 'sker');
    await pause();
    await screen.findByRole('option', { name: 'Skerry Foundry' });
    expect(asked('GET /facts').at(-1)?.search.toString()).toContain('q=sker');
    expect(maker.getAttribute('aria-activedescendant')).toBe(screen.getByRole('option').id);
    fireEvent.keyDown(maker, { key: 'Enter' });
    expect(screen.getByLabelText<HTMLInputElement>('Maker').value).toBe('Skerry Foundry');
    expect(screen.queryByRole('option')).toBeNull();
    await pause();
    expect(saves().at(-1)?.payload['makerId']).toBe(OTHER_ID);
  });

  it('goes back to what was chosen on Escape, and chooses nothing of an emptied box', async () => {
    const names = [{ id: ID, kind: 'maker' as const, slug: 'example-works', title: 'Example Works' }];
    const { saves } = open(contributionOf('works', { can: MINE, payload: WHOLE.works, names }), { 'GET /facts': () => ok(FACTS) });
    const maker = await screen.findByLabelText<HTMLInputElement>('Maker');
    type(maker, 'sk');
    fireEvent.keyDown(maker, { key: 'Escape' });
    expect(maker.value).toBe('Example Works');
    type(maker, '');
    fireEvent.blur(maker);
    expect(maker.value).toBe('');
    await pause();
    expect(saves().at(-1)?.payload['makerId']).toBeNull();
  });

  it('asks only for what belongs to the one chosen further up', async () => {
    const { asked } = open(contributionOf('supersession', { can: MINE, payload: { ...WHOLE.supersession, newId: null } }), { 'GET /facts': () => ok({ items: [], next: null }) });
    fireEvent.click(await screen.findByLabelText('New casting'));
    await screen.findByText(/None of that name is on record/);
    expect(asked('GET /facts').at(-1)?.search.get('within')).toBe(ID);
  });
});

describe('sources', () => {
  it('cites one on record by name, behind one field', async () => {
    const { saves } = open(contributionOf('maker', { can: MINE }), {
      'GET /sources': () => ok({ items: [{ id: OTHER_ID, slug: 'parts-book', kind: 'book', title: 'Parts book 14', facts: 3 }], next: null, total: 1 }),
    });
    await screen.findByRole('heading', { name: 'Sources' });
    press('Cite a source on record');
    const source = screen.getByLabelText('Source');
    expect(document.activeElement).toBe(source);
    type(source, 'parts');
    await pause();
    fireEvent.click(await screen.findByRole('option', { name: /Parts book 14/ }));
    fireEvent.change(screen.getByLabelText('Stands behind'), { target: { value: 'founded' } });
    await pause();
    expect(saves().at(-1)?.sources).toEqual([expect.objectContaining({ sourceId: OTHER_ID, field: 'founded' })]);
  });

  it('describes a new one in its kind’s own words', async () => {
    const { saves } = open(contributionOf('maker', { can: MINE }));
    await screen.findByRole('heading', { name: 'Sources' });
    press('Describe a new source');
    type(await box('Title'), 'Works gate');
    fireEvent.change(screen.getByLabelText('Kind of source'), { target: { value: 'plate' } });
    type(await box('What it is on'), 'The gate of the north works');
    expect(screen.queryByLabelText(/Publisher/)).toBeNull();
    await pause();
    expect(saves().at(-1)?.sources[0]?.['newSource']).toEqual({ kind: 'plate', title: 'Works gate', subject: 'The gate of the north works', year: null, note: null });
  });
});

describe('looking it over', () => {
  it('tells no fault before, and then each beside its control and in a summary that has focus', async () => {
    open(contributionOf('maker', { can: MINE }));
    const name = await box('Name');
    expect(name.getAttribute('aria-invalid')).toBeNull();
    press('Look it over');
    const summary = await screen.findByRole('alert');
    await waitFor(() => expect(document.activeElement).toBe(summary));
    expect(within(summary).getByRole('link', { name: 'Name: Missing' }).getAttribute('href')).toBe(`#${name.id}`);
    within(summary).getByRole('link', { name: 'Sources: At least one source' });
    expect(name.getAttribute('aria-invalid')).toBe('true');
    type(name, 'Example Works');
    expect(name.getAttribute('aria-invalid')).toBeNull();
  });

  it('shows the whole entry, puts it forward and goes to its page', async () => {
    const whole = contributionOf('maker', { can: MINE, payload: WHOLE.maker, citations: [SOURCE], sources: [{ id: OTHER_ID, slug: 'parts-book', title: 'Parts book 14' }] });
    const { asked } = open(whole, { [`POST ${PATH}/put-forward`]: () => ok({ ...whole, state: 'put-forward', revision: 2 }) });
    await box('Name');
    press('Look it over');
    await screen.findByRole('heading', { name: 'The whole entry as it will stand' });
    screen.getByText('Example Works');
    screen.getByRole('link', { name: 'Parts book 14' });
    press('Put forward');
    await screen.findByText('Another page');
    expect(asked(`POST ${PATH}/put-forward`)[0]?.body).toEqual({ revision: 1 });
  });

  it('comes back to the form with what the register finds wrong', async () => {
    const whole = contributionOf('maker', { can: MINE, payload: WHOLE.maker, citations: [SOURCE] });
    open(whole, { [`POST ${PATH}/put-forward`]: () => refusal('invalid', 422, 'See which.', [{ path: ['payload', 'name'], message: 'There is a maker of this name' }]) });
    await box('Name');
    press('Look it over');
    await screen.findByText('Put forward');
    press('Put forward');
    await screen.findByRole('link', { name: 'Name: There is a maker of this name' });
    expect((await box('Name')).getAttribute('aria-invalid')).toBe('true');
  });
});

describe('around it', () => {
  it('says why it was sent back, and what was said of a field', async () => {
    const decisions = [{ decision: 'send-back', reason: 'Which gate?', by: MODERATOR, at: '2026-03-06T12:00:00Z' }] as const;
    const comments = [{ id: ID, author: MODERATOR, at: '2026-03-06T12:00:00Z', path: 'place', text: '<b>Where</b> is that?' }];
    open(contributionOf('maker', { state: 'sent-back', can: MINE, decisions: [...decisions], comments }));
    await screen.findByText('Anna Wren sent it back');
    screen.getByText('Which gate?');
    screen.getByText('<b>Where</b> is that?');
  });

  it('goes to the contribution’s page where nothing can be written any more', async () => {
    open(contributionOf('maker', { state: 'put-forward' }));
    await screen.findByText('Another page');
  });

  it('is thrown away for good only when asked twice', async () => {
    const { asked, saves } = open(contributionOf('maker', { can: MINE }), { [`DELETE ${PATH}`]: () => ok({ done: true }) });
    await box('Name');
    press('Throw the draft away');
    expect(asked(`DELETE ${PATH}`)).toHaveLength(0);
    press('Throw it away for good');
    await screen.findByText('Another page');
    await act(() => Promise.resolve());
    expect([asked(`DELETE ${PATH}`).length, saves().length]).toEqual([1, 0]);
  });
});
