import { act, cleanup, configure, fireEvent, screen, waitFor } from '@testing-library/react';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { Component as ChangePartPage } from '#client/pages/bench/change-part-page.tsx';
import { Component as BenchPage } from '#client/pages/bench/bench-page.tsx';
import { Component as NewMarkPage } from '#client/pages/bench/new-mark-page.tsx';
import { Component as NewPartPage } from '#client/pages/bench/new-part-page.tsx';
import { Component as PartPage } from '#client/pages/bench/part-page.tsx';
import type { MarkInShort } from '#contract/parts.ts';
import { MEMBER, ok, refusal, registerThat, showAt } from '../contributions/register.tsx';
import type { Answers } from '../contributions/register.tsx';
import { mark, markPhoto, NO_RENDITIONS, photo } from '../marks/samples.ts';
import { knowSearchElement } from '../moderation/register.tsx';
import { id } from '../moderation/samples.ts';
import { StandInRequest } from '../photos/stand-in-request.ts';
import { part } from './samples.ts';

// Nothing here is hidden by a stylesheet, and asking each element whether it is takes most of the time.
configure({ defaultHidden: true });

beforeEach(() => {
  sessionStorage.clear();
  vi.stubGlobal('XMLHttpRequest', StandInRequest);
  vi.stubGlobal('scrollTo', () => undefined);
  vi.spyOn(URL, 'createObjectURL').mockReturnValue('blob:picture');
  vi.spyOn(URL, 'revokeObjectURL').mockReturnValue();
});
afterEach(() => vi.unstubAllGlobals());

// The test's window has neither: each test gives them back with its other stand-ins.
URL.createObjectURL = () => '';
URL.revokeObjectURL = () => undefined;

const SIGNED_IN: Answers = { 'GET /me': () => ok({ me: MEMBER }), 'GET /photos': () => ok({ items: [] }), 'GET /part-types': () => ok({ items: [], next: null }) };
/** By what stands on it; asking for roles takes a second in a form of this length. */
function press(words: string): void {
  const [button, another] = [...document.querySelectorAll('button')].filter(({ textContent }) => textContent === words);
  expect([button?.textContent, another?.textContent]).toEqual([words, undefined]);
  fireEvent.click(button!);
}
/** The addresses of the links that say it. */
const leads = (words: string) => [...document.querySelectorAll('a')].filter(({ textContent }) => textContent === words).map((link) => link.getAttribute('href'));
const isPublic = () => screen.getByLabelText<HTMLInputElement>('Public');
const type = (label: string, value: string) => fireEvent.change(screen.getByLabelText(label), { target: { value } });
const value = (label: string) => screen.getByLabelText<HTMLInputElement>(label).value;

describe('a new part', () => {
  const open = (answers: Answers = {}) => {
    const register = registerThat({ ...SIGNED_IN, ...answers });
    showAt('/bench/new', '/bench/new', <NewPartPage />);
    return register;
  };

  it('is put on record with nothing but a photo, sent from this page', async () => {
    let looks = 0;
    const waiting = photo(1, { state: 'waiting', renditions: NO_RENDITIONS });
    const register = open({
      [`GET /photos/${id(1)}`]: () => {
        looks += 1;
        return ok(looks < 2 ? waiting : photo(1));
      },
      'POST /parts': () => ok(part()),
    });
    fireEvent.change(await screen.findByLabelText('Photos from this device'), { target: { files: [new File(['x'.repeat(4096)], 'case.jpg', { type: 'image/jpeg' })] } });
    await screen.findByText('0 of 4 KB');
    act(() => StandInRequest.last.progress(2048));
    screen.getByText('2 of 4 KB');
    expect(screen.getByLabelText<HTMLProgressElement>('Sending case.jpg').value).toBe(2048);
    press('Put it on record');
    await screen.findByText(/One photo is still being sent\./);
    act(() => StandInRequest.last.answer(201, waiting));
    // The file itself stands in until the register has a rendition; then that.
    const tile = await screen.findByAltText('Photo 1');
    expect(tile.getAttribute('src')).toBe('blob:picture');
    await waitFor(() => expect(screen.getByAltText('Photo 1').getAttribute('src')).toBe('/photos/address/thumb-640.webp'), { timeout: 6000 });
    press('Put it on record');
    await screen.findByText('Another page');
    expect(register.asked('POST /parts').map(({ body }) => body)).toEqual([expect.objectContaining({ photoIds: [id(1)], number: null, visibility: 'private' })]);
    // It waits for a look a second later.
  }, 15_000);

  it('keeps what is typed over a reload, until it is on record', async () => {
    open();
    await screen.findByLabelText('In your own words');
    type('In your own words', 'Case with one ear');
    type('Casting number, as you read it on the iron', 'B44');
    fireEvent.click(isPublic());
    cleanup();
    open({ 'POST /parts': () => ok(part()) });
    await screen.findByLabelText('In your own words');
    expect([value('In your own words'), value('Casting number, as you read it on the iron')]).toEqual(['Case with one ear', 'B44']);
    expect(isPublic().checked).toBe(true);
    press('Put it on record');
    await screen.findByText('Another page');
    cleanup();
    open();
    await screen.findByLabelText('In your own words');
    expect(value('In your own words')).toBe('');
  });

  it('begins anew, and takes that back', async () => {
    open();
    await screen.findByLabelText('Condition');
    type('Condition', 'Cracked');
    press('Begin anew');
    expect(value('Condition')).toBe('');
    press('Put it back');
    expect(value('Condition')).toBe('Cracked');
  });

  it('says what is wrong beside its field and in a summary that takes focus', async () => {
    const register = open();
    await screen.findByLabelText('Casting number, as you read it on the iron');
    type('Casting number, as you read it on the iron', 'B[');
    press('Put it on record');
    const summary = await screen.findByText('It is not on record yet');
    expect(document.activeElement?.contains(summary)).toBe(true);
    expect(screen.getByRole('link', { name: /^Casting number: / }).getAttribute('href')).toBe('#part-number');
    expect(register.asked('POST /parts')).toEqual([]);
  });

  it('shows what the register finds wrong, and keeps what was typed', async () => {
    open({ 'POST /parts': () => refusal('invalid', 422, 'A value is wrong', [{ path: ['foundSerial'], message: 'No letters can stand there' }]) });
    await screen.findByLabelText('Its serial');
    type('Its serial', 'X');
    press('Put it on record');
    await screen.findByRole('link', { name: 'Its serial: No letters can stand there' });
    expect(screen.getByLabelText('Its serial').getAttribute('aria-invalid')).toBe('true');
    expect(value('Its serial')).toBe('X');
  });

  it('offers photos sent before, takes one off and puts it back', async () => {
    open({ 'GET /photos': () => ok({ items: [photo(1), photo(2)] }), [`GET /photos/${id(1)}`]: () => ok(photo(1)) });
    await screen.findByText('Sent before, and not used yet');
    press('Use it photo-1.jpg');
    await screen.findByAltText('Photo 1');
    press('Take off photo 1');
    expect(screen.queryByLabelText('Photos chosen')).toBeNull();
    press('Put it back');
    await screen.findByAltText('Photo 1');
  });

  it('says of a photo that is gone that it is, and lets it be taken off', async () => {
    open({ 'GET /photos': () => ok({ items: [photo(1)] }) });
    await screen.findByText('Sent before, and not used yet');
    press('Use it photo-1.jpg');
    await screen.findByText('This photo is no longer on record.');
    press('Take off photo 1');
    expect(screen.queryByText('This photo is no longer on record.')).toBeNull();
  });

  it('cautions once a visit', async () => {
    open();
    await screen.findByText('Photograph a mark before you clean it');
    cleanup();
    open();
    await screen.findByLabelText('Condition');
    expect(screen.queryByText('Photograph a mark before you clean it')).toBeNull();
  });

  it('tells a visitor what the bench is', async () => {
    registerThat({ 'GET /me': () => ok({ me: null }) });
    showAt('/bench/new', '/bench/new', <NewPartPage />);
    await screen.findByText(/The bench is where your parts lie/);
    expect(screen.getAllByRole('link', { name: 'Sign in' })[0]?.getAttribute('href')).toBe('/sign-in?next=%2Fbench%2Fnew');
  });
});

describe('changing a part', () => {
  const PATH = `/parts/${id(71)}`;

  it('says what changed meanwhile, keeps what was typed, and saves it on top', async () => {
    let now = part();
    const register = registerThat({
      ...SIGNED_IN,
      [`GET ${PATH}`]: () => ok(now),
      [`GET /photos/${id(1)}`]: () => ok(photo(1)),
      [`GET /photos/${id(2)}`]: () => ok(photo(2)),
      [`PUT ${PATH}`]: ({ body }) => ((body as { revision: number }).revision === now.revision ? ok(now) : refusal('conflict', 409, 'It changed')),
    });
    showAt(`${PATH}/change`, '/parts/:id/change', <ChangePartPage />);
    await screen.findByLabelText('Condition');
    type('Condition', 'Welded');
    now = part({ revision: 4, note: 'Sold' });
    press('Save the change');
    const told = await screen.findByText('It was changed meanwhile, perhaps in another window');
    expect(told.parentElement?.textContent).toContain('Note for yourselfnow Sold');
    expect(value('Condition')).toBe('Welded');
    press('Save the change');
    await screen.findByText('Another page');
    expect(register.asked(`PUT ${PATH}`).map(({ body }) => (body as { revision: number }).revision)).toEqual([3, 4]);
  });

  it('is nothing for who does not hold the part', async () => {
    registerThat({ ...SIGNED_IN, [`GET ${PATH}`]: () => ok(part({ isMine: false, can: { change: false, remove: false, addMark: false } })) });
    showAt(`${PATH}/change`, '/parts/:id/change', <ChangePartPage />);
    await screen.findByText('Nothing stands at this address');
  });
});

const short = (over: Partial<MarkInShort> = {}): MarkInShort => ({
  id: id(70),
  kind: 'date-code',
  technique: 'cast',
  reading: 'BOCB',
  hidden: false,
  evidence: 'photographed',
  wantsReading: true,
  dates: { status: 'dated', total: 1, candidates: [{ from: '1939-03-12', to: '1939-03-12', share: 1 }] },
  photo: markPhoto(1),
  ...over,
});

describe('a part’s page', () => {
  const open = (answer: ReturnType<typeof part>, answers: Answers = {}) => {
    const register = registerThat({ ...SIGNED_IN, [`GET /parts/${id(71)}`]: () => ok(answer), ...answers });
    showAt(`/parts/${id(71)}`, '/parts/:id', <PartPage />);
    return register;
  };

  it('shows its holder everything, and what to do next', async () => {
    open(part({ marks: [short(), short({ id: id(75), kind: 'serial', reading: null, dates: null, evidence: 'claimed', photo: null })] }));
    await screen.findByText('12 Mar 1939');
    screen.getByText('Under the bench');
    screen.getByText('3C 1204');
    await waitFor(() => expect(leads('Read this mark Serial, cast when poured')).toEqual([`/marks/${id(75)}/read`]));
    expect(leads('Read this mark Date mark, cast when poured')).toEqual([]);
    expect(leads('Add a mark')).toEqual([`/parts/${id(71)}/marks/new`]);
  });

  it('shows another member what is public, asks them to read first, and offers no change', async () => {
    const can = { change: false, remove: false, addMark: false };
    open(part({ isMine: false, can, note: null, visibility: 'public', number: null, marks: [short({ hidden: true, reading: null, dates: null })] }));
    await screen.findByText('kept until you read it');
    await waitFor(() => expect(leads('Read it first Date mark, cast when poured')).toEqual([`/marks/${id(70)}/read`]));
    for (const words of ['Add a mark', 'Change what is on record']) expect(leads(words)).toEqual([]);
    expect(screen.queryByText('12 Mar 1939')).toBeNull();
  });

  it('says why a part that others have read stays', async () => {
    open(part(), { [`DELETE /parts/${id(71)}`]: () => refusal('conflict', 409, 'Una has read a mark of it: make it private instead.') });
    fireEvent.click(await screen.findByRole('button', { name: 'Take it off the record' }));
    press('Take it off for good');
    await screen.findByText('Una has read a mark of it: make it private instead.');
  });

  it('is nothing at the address of somebody else’s private part', async () => {
    registerThat(SIGNED_IN);
    showAt(`/parts/${id(71)}`, '/parts/:id', <PartPage />);
    await screen.findByText('Nothing stands at this address');
  });
});

describe('a new mark', () => {
  it('goes on record with its kind and photos, and straight on to be read', async () => {
    const register = registerThat({
      ...SIGNED_IN,
      [`GET /parts/${id(71)}`]: () => ok(part()),
      [`GET /photos/${id(2)}`]: () => ok(photo(2)),
      [`POST /parts/${id(71)}/marks`]: () => ok(mark()),
    });
    showAt(`/parts/${id(71)}/marks/new`, '/parts/:id/marks/new', <NewMarkPage />);
    fireEvent.change(await screen.findByLabelText('Kind of mark'), { target: { value: 'serial' } });
    fireEvent.click(screen.getByLabelText('Stamped'));
    press('Use it photo-2.jpg');
    press('Put it on record and read it');
    await screen.findByText('Another page');
    expect(register.asked(`POST /parts/${id(71)}/marks`).map(({ body }) => body)).toEqual([
      { kind: 'serial', technique: 'stamped', photos: [{ photoId: id(2), region: null }], reading: null },
    ]);
  });
});

describe('the bench', () => {
  knowSearchElement();

  it('offers the first step where nothing is on it yet', async () => {
    registerThat({ ...SIGNED_IN, 'GET /parts': () => ok({ items: [], next: null, total: 0 }) });
    showAt('/bench', '/bench', <BenchPage />);
    await screen.findByText('No parts on record yet');
    expect(screen.getAllByText('Put a part on record').map((link) => link.getAttribute('href'))).toEqual(['/bench/new']);
  });

  it('says what is wrong where it can’t be had', async () => {
    registerThat({ ...SIGNED_IN, 'GET /parts': () => refusal('not-allowed', 403, 'Not yours') });
    showAt('/bench', '/bench', <BenchPage />);
    await screen.findByText('You may not do this');
  });

  it('shows the same parts as a table and as a contact sheet, as the address says', async () => {
    const { number, ...item } = part({ marks: [short()] });
    const answers: Answers = { ...SIGNED_IN, 'GET /parts': () => ok({ items: [{ ...item, number }], next: null, total: 1 }) };
    registerThat(answers);
    showAt('/bench?view=sheet&on=bench', '/bench', <BenchPage />);
    await screen.findByRole('link', { name: 'Gear case, Brackwater Tractor Works' });
    expect(screen.queryByRole('table')).toBeNull();
    fireEvent.click(screen.getByRole('link', { name: 'Table' }));
    await screen.findByRole('row', { name: /^Gear case ?Brackwater/ });
    expect(screen.getByLabelText<HTMLSelectElement>('Where').value).toBe('bench');
  });
});
