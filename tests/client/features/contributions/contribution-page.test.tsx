import { configure, fireEvent, screen, waitFor, within } from '@testing-library/react';
import { afterEach, describe, expect, it, vi } from 'vitest';
import type { ContributionPage } from '#contract/contributions.ts';
import { Evidence } from '#contract/evidence.ts';
import { FactHistory } from '#contract/facts.ts';
import { Component as ContributionPageComponent } from '#client/pages/contributions/contribution-page.tsx';
import { MEMBER, ok, refusal, registerThat, showAt } from './register.tsx';
import type { Answers } from './register.tsx';
import { AUTHOR, contributionOf, ID, MODERATOR, OTHER_ID, SOURCE, WHOLE } from './samples.ts';

configure({ defaultHidden: true });
afterEach(() => vi.unstubAllGlobals());

const PATH = `/contributions/${ID}`;
const DECIDES = { decide: true, comment: true, seeEvidence: true } as const;
const NOBODY = { [`POST ${PATH}/opened`]: () => ok({ openWith: [] }) };

const EVIDENCE = Evidence.parse({
  id: ID,
  gatheredAt: '2026-03-05T09:01:00Z',
  occasion: 'opened',
  revision: 3,
  groups: [
    {
      code: 'dates',
      title: 'Marks on record that it dates',
      count: 12,
      of: 40,
      items: [
        { subject: { kind: 'mark', id: ID, title: 'a gear case' }, mark: 'KR4?', text: '1944 or 1945' },
        { subject: { kind: 'casting', id: OTHER_ID, slug: 'example-b-5120', title: 'B 5120' }, mark: null, text: 'poured from 1944' },
        { subject: { kind: 'anchor', id: OTHER_ID, slug: null, title: 'No. 1207' }, mark: null, text: 'built 4 Aug 1938' },
      ],
      unlisted: 9,
    },
    { code: 'same-number', title: 'Castings of this number', count: 1, of: null, items: [], unlisted: 0 },
  ],
  figures: [{ code: 'chance', name: 'What chance alone would date', value: 0.2134, unit: 'share', working: 'Of 200 random keys the middle one dates 21.3 %.' }],
});

const GATHERED = { [`GET ${PATH}/evidence`]: () => ok({ items: [] }), [`POST ${PATH}/evidence`]: () => ok({ items: [EVIDENCE] }) };

function open(contribution: ContributionPage, answers: Answers = {}) {
  const register = registerThat({ 'GET /me': () => ok({ me: MEMBER }), [`GET ${PATH}`]: () => ok(contribution), ...NOBODY, ...GATHERED, ...answers });
  showAt(PATH, '/contributions/:id', <ContributionPageComponent />);
  return register;
}

const castingOf = (change: Parameters<typeof contributionOf>[1] = {}) =>
  contributionOf('casting', { payload: WHOLE.casting, citations: [SOURCE], sources: [{ id: OTHER_ID, slug: 'parts-book', title: 'Parts book 14' }], ...change });

describe('a contribution', () => {
  it('shows its state, what it says and what stands behind it', async () => {
    open(castingOf({ state: 'put-forward', putForwardAt: '2026-03-04T10:07:31Z', can: { comment: true } }));
    await screen.findByText(/Waits for a decision/);
    screen.getByRole('link', { name: AUTHOR.displayName });
    screen.getByText('Rear web');
    screen.getByRole('link', { name: 'Parts book 14' });
    screen.getByText(/page 12/);
    expect(screen.queryByRole('button', { name: 'Enter it' })).toBeNull();
  });

  it('says what it changes, field by field', async () => {
    const version = { version: 2, payload: WHOLE.casting, citations: [] };
    const differences = [{ path: ['number'], label: 'Casting number', before: 'B 5120', after: '<i>B 5121</i>' }];
    open(castingOf({ base: version, inForce: version, differences, state: 'put-forward' }));
    within(await screen.findByRole('table', { name: 'What it changes' })).getByRole('row', { name: /Casting number.*B 5120.*<i>B 5121<\/i>/ });
  });

  it('lays the versions beside it where the entry moved on', async () => {
    const base = { version: 2, payload: WHOLE.casting, citations: [] };
    const inForce = { version: 3, payload: { ...WHOLE.casting, number: 'B 5122' }, citations: [] };
    open(castingOf({ base, inForce, state: 'put-forward', can: DECIDES }));
    await screen.findByRole('heading', { name: 'Version 3 was entered meanwhile' });
    screen.getByText(/carries it over to the version in force/);
    within(screen.getByRole('table', { name: 'The versions and this contribution' })).getByText('B 5122');
  });

  it('is nothing where the register shows none', async () => {
    open(castingOf(), { [`GET ${PATH}`]: () => refusal('not-found', 404, 'Nothing here.') });
    await screen.findByRole('heading', { name: 'Nothing stands at this address' });
  });

  it('is taken back by its author', async () => {
    const before = castingOf({ state: 'put-forward', revision: 4, can: { withdraw: true } });
    const { asked } = open(before, { [`POST ${PATH}/withdraw`]: () => ok({ ...before, state: 'withdrawn', can: { ...before.can, withdraw: false, edit: true } }) });
    fireEvent.click(await screen.findByRole('button', { name: 'Take it back' }));
    await screen.findByText(/^Withdrawn/);
    expect(asked(`POST ${PATH}/withdraw`)[0]?.body).toEqual({ revision: 4 });
    expect(screen.getByRole('link', { name: 'Open the draft' }).getAttribute('href')).toBe(`${PATH}/draft`);
  });

  it('takes a comment on one field, and says what is wrong with an empty one', async () => {
    const before = castingOf({ state: 'put-forward', can: { comment: true } });
    const said = { id: OTHER_ID, author: AUTHOR, at: '2026-03-07T08:00:00Z', path: 'number', text: 'Read twice.' };
    const { asked } = open(before, { [`POST ${PATH}/comments`]: () => ok({ ...before, comments: [said] }) });
    fireEvent.click(await screen.findByRole('button', { name: 'Say it' }));
    await screen.findByRole('link', { name: 'Comment: Write something' });
    fireEvent.change(screen.getByLabelText('About'), { target: { value: 'number' } });
    fireEvent.change(screen.getByLabelText('Comment'), { target: { value: 'Read twice.' } });
    fireEvent.click(screen.getByRole('button', { name: 'Say it' }));
    await screen.findByText(/on casting number/);
    expect(asked(`POST ${PATH}/comments`)[0]?.body).toEqual({ path: 'number', text: 'Read twice.' });
  });

  it('says while what rests on it is being worked out again', async () => {
    const subject = { id: OTHER_ID, kind: 'casting', slug: 'example-b-5120', title: 'B 5120' } as const;
    const history = FactHistory.parse({ fact: subject, inForce: 1, steps: [], names: [], sources: [], workingOut: true, can: { edit: true, bringBack: false, retire: false, flag: true } });
    open(castingOf({ state: 'entered', enteredVersion: 1, subject }), { [`GET /facts/${OTHER_ID}/history`]: () => ok(history) });
    await screen.findByText('Being worked out again.');
  });
});

describe('for whoever decides', () => {
  const waiting = castingOf({ state: 'put-forward', revision: 3, can: DECIDES });

  it('has the evidence worked out on opening: counts out of how many, each line linked, figures with their working', async () => {
    const { asked } = open(waiting);
    await screen.findByText('Marks on record that it dates');
    expect(asked(`POST ${PATH}/evidence`)).toHaveLength(1);
    screen.getByText('12 of 40');
    expect(screen.getByRole('link', { name: 'a gear case' }).getAttribute('href')).toBe(`/marks/${ID}`);
    expect(screen.getByRole('link', { name: 'B 5120' }).getAttribute('href')).toBe('/castings/example-b-5120');
    expect(screen.getByRole('link', { name: 'No. 1207' }).getAttribute('href')).toBe(`/facts/${OTHER_ID}/history`);
    screen.getByText('9 on parts that are not public: counted, not listed.');
    screen.getByText('21.3 %');
    screen.getByText('Of 200 random keys the middle one dates 21.3 %.');
  });

  it('folds all but the first lines of a long group away, and leaves none out', async () => {
    const [dates] = EVIDENCE.groups;
    const items = Array.from({ length: 8 }, (_, place) => ({ subject: null, mark: null, text: `line ${place + 1}` }));
    open(waiting, { [`POST ${PATH}/evidence`]: () => ok({ items: [{ ...EVIDENCE, groups: [{ ...dates, items }] }] }) });
    const summary = await screen.findByText('The next 2');
    const folded = summary.closest('details')?.textContent ?? '';
    for (const { text } of items) screen.getByText(text);
    expect(items.filter(({ text }) => folded.includes(text)).map(({ text }) => text)).toEqual(['line 7', 'line 8']);
  });

  it('keeps the evidence there was where it can’t be worked out again, and says so', async () => {
    open(waiting, { [`GET ${PATH}/evidence`]: () => ok({ items: [EVIDENCE] }), [`POST ${PATH}/evidence`]: () => refusal('unavailable', 503, 'Away.') });
    await screen.findByText('The register is away for a moment');
    screen.getByText('12 of 40');
  });

  it('says who else has it open', async () => {
    open(waiting, { [`POST ${PATH}/opened`]: () => ok({ openWith: [{ id: OTHER_ID, displayName: 'Ossian Reed' }, MODERATOR] }) });
    await screen.findByText(/Ossian Reed and Anna Wren have it open too/);
  });

  it.each([
    ['Enter it', 'enter', 'entered', /^Entered\./],
    ['Send it back', 'send-back', 'sent-back', /^Sent back\./],
    ['Turn it down', 'turn-down', 'turned-down', /^Turned down\./],
  ] as const)('“%s” decides, with its reason', async (press, decision, state, shown) => {
    const decided = { ...waiting, state, can: { ...waiting.can, decide: false }, decisions: [{ decision, reason: 'As drawn.', by: MODERATOR, at: '2026-03-07T08:00:00Z' }] };
    let now: ContributionPage = waiting;
    const { asked } = open(waiting, {
      [`GET ${PATH}`]: () => ok(now),
      [`POST ${PATH}/decision`]: () => {
        now = decided;
        return ok(decided);
      },
    });
    fireEvent.change(await screen.findByLabelText('Reason'), { target: { value: 'As drawn.' } });
    fireEvent.click(screen.getByRole('button', { name: press }));
    await screen.findByText(shown);
    expect(asked(`POST ${PATH}/decision`)[0]?.body).toEqual({ decision, reason: 'As drawn.', revision: 3 });
    expect(screen.queryByRole('button', { name: press })).toBeNull();
    screen.getByText('As drawn.');
  });

  it('asks for a reason', async () => {
    const { asked } = open(waiting);
    fireEvent.click(await screen.findByRole('button', { name: 'Turn it down' }));
    await screen.findByRole('link', { name: 'Reason: Say why' });
    expect(asked(`POST ${PATH}/decision`)).toEqual([]);
  });

  it('says what another moderator did first, and shows it', async () => {
    const decided = { ...waiting, state: 'sent-back' as const, can: { ...waiting.can, decide: false }, decisions: [{ decision: 'send-back' as const, reason: 'Which web?', by: MODERATOR, at: '2026-03-07T08:00:00Z' }] };
    let isDecided = false;
    open(waiting, {
      [`GET ${PATH}`]: () => ok(isDecided ? decided : waiting),
      [`POST ${PATH}/decision`]: () => {
        isDecided = true;
        return refusal('conflict', 409, 'Anna Wren sent it back on 7 Mar 2026: Which web?');
      },
    });
    fireEvent.change(await screen.findByLabelText('Reason'), { target: { value: 'As drawn.' } });
    fireEvent.click(screen.getByRole('button', { name: 'Enter it' }));
    await screen.findByText('Which web?');
    await waitFor(() => expect(screen.queryByRole('button', { name: 'Enter it' })).toBeNull());
    expect(screen.getByRole('alert').textContent).toContain('Anna Wren sent it back on 7 Mar 2026: Which web?');
  });
});
