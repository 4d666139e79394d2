import { cleanup, fireEvent, screen, waitFor } from '@testing-library/react';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import type { ReadingDesk } from '#contract/marks.ts';
import { Component as ReadMarkPage } from '#client/pages/reading/read-mark-page.tsx';
import { dropSessionDrafts } from '#client/lib/session-draft.ts';
import { MEMBER, ok, refusal, registerThat, showAt } from '../contributions/register.tsx';
import type { Answers } from '../contributions/register.tsx';
import { answer, BBOCB, candidate, result, span } from '../decode/samples.ts';
import { id } from '../moderation/samples.ts';
import { blindDesk, desk, MARK, markPage, NO_RENDITIONS, photo, placed } from './samples.ts';

const SAVE = `POST /marks/${MARK}/readings`;

beforeEach(() => {
  sessionStorage.clear();
  // The test's window has no canvas to draw on, as some browsers have none.
  vi.spyOn(HTMLCanvasElement.prototype, 'getContext').mockReturnValue(null);
});
afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
});

function open(given: ReadingDesk, answers: Answers = {}) {
  const register = registerThat({ 'GET /me': () => ok({ me: MEMBER }), [`GET /marks/${MARK}/desk`]: () => ok(given), ...answers });
  showAt(`/marks/${MARK}/read`, '/marks/:id/read', <ReadMarkPage />);
  return register;
}
const plate = (kind = 'Date mark') => screen.findByLabelText<HTMLInputElement>(`${kind}, as you see it`);
const press = async (name: string) => fireEvent.click(await screen.findByText(name, { selector: 'button, button *' }));
const type = (box: HTMLInputElement, text: string) => fireEvent.change(box, { target: { value: text } });

describe('reading a date mark', () => {
  it('has the decoder answer what is typed, narrowed by the part, and lights the glyph that would settle it', async () => {
    const unsettled = result({
      candidates: [
        candidate('1941-02-25', 0.5, [span('month', 0, 1, 'L', 2), span('day', 1, 3, 'LK', 25), span('year', 3, 5, 'CB', 1941)]),
        candidate('1941-02-26', 0.5, [span('month', 0, 1, 'L', 2), span('day', 1, 3, 'LP', 26), span('year', 3, 5, 'CB', 1941)]),
      ],
      settle: [{ position: 2, bits: 0 }],
    });
    const register = open(desk(), { 'POST /decode': () => ok(answer('LL?CB', [unsettled])) });
    type(await plate(), 'LL?CB');
    await screen.findAllByText(/If the third letter were read for certain, one date would be left/);
    screen.getByRole('row', { name: /25 Feb 1941/ });
    expect(document.querySelector('.plate-tile.is-lit')?.getAttribute('data-tile')).toBe('2');
    expect(register.asked('POST /decode').at(-1)?.body).toEqual({ mark: 'LL?CB', makerId: id(62), limits: { from: '1938-07-01', to: '1944-03-31' } });
  });

  it('is saved with the photo it was read from, and goes on to the mark', async () => {
    const register = open(desk(), { 'POST /decode': () => ok(answer('BBOCB', [BBOCB])), [SAVE]: () => ({ status: 201, body: markPage() }) });
    type(await plate(), 'bbocb');
    await screen.findByText('kept as you type');
    await press('Save this reading');
    await screen.findByText('Another page');
    expect(register.asked(SAVE).map(({ body }) => body)).toEqual([{ text: 'BBOCB', photoId: id(80) }]);
    await waitFor(() => expect(Object.keys(sessionStorage).filter((key) => key.includes('reading'))).toEqual([]));
  });

  it('says beside the plate what can’t be saved, and sends nothing', async () => {
    const register = open(desk());
    await press('Save this reading');
    await screen.findByText('Type the mark as you see it', { selector: '[aria-hidden]' });
    expect(document.activeElement).toBe(await plate());
    type(await plate(), 'LL[K');
    expect(screen.queryByText('Type the mark as you see it')).toBeNull();
    await press('Save this reading');
    expect((await plate()).getAttribute('aria-invalid')).toBe('true');
    expect(register.asked(SAVE)).toEqual([]);
  });

  it('says there too what the register finds wrong with it', async () => {
    open(desk({ narrowing: null }), { [SAVE]: () => refusal('invalid', 422, 'Not a mark', [{ path: ['text'], message: 'this mark is too long' }]) });
    type(await plate(), 'LLKCB');
    await press('Save this reading');
    await screen.findByText('This mark is too long', { selector: '[aria-hidden]' });
    expect((await plate()).value).toBe('LLKCB');
  });

  it.each([
    ['not-found', 404, 'The mark is no longer there'],
    ['conflict', 409, 'The mark changed in the meantime'],
    ['unavailable', 503, 'The register is away for a moment'],
  ])('keeps what was typed where the answer is %s', async (kind, status, said) => {
    open(desk({ narrowing: null }), { [SAVE]: () => refusal(kind, status, 'It is so.') });
    type(await plate(), 'LLKCB');
    await press('Save this reading');
    const alert = await screen.findByText(said);
    expect(alert.parentElement?.textContent).toContain('Your reading was not saved; it is kept in this tab.');
    expect((await plate()).value).toBe('LLKCB');
  });
});

describe('what was typed', () => {
  const openTwo = async () => {
    open(desk({ narrowing: null, photos: [placed(), placed({ photo: photo({ id: id(81) }) })] }));
    return plate();
  };
  it('comes back after a reload, with the photo and the view', async () => {
    type(await openTwo(), 'LL?');
    await press('Photo 2');
    await press('Invert');
    await waitFor(() => expect(sessionStorage.getItem(Object.keys(sessionStorage).find((key) => key.includes(MARK)) ?? '')).toContain('"inverted":true'));
    cleanup();
    expect((await openTwo()).value).toBe('LL?');
    expect(screen.getByRole('button', { name: 'Photo 2' }).getAttribute('aria-pressed')).toBe('true');
    expect(screen.getByRole('button', { name: 'Invert' }).getAttribute('aria-pressed')).toBe('true');
    screen.getByRole('img', { name: 'Photo 2 of 2, inverted' });
  });
  it('is gone after signing out', async () => {
    type(await openTwo(), 'LL?');
    cleanup();
    dropSessionDrafts();
    expect((await openTwo()).value).toBe('');
  });
  it('is not said to be kept where the browser keeps nothing', async () => {
    vi.spyOn(Storage.prototype, 'setItem').mockImplementation(() => {
      throw new DOMException('full', 'QuotaExceededError');
    });
    type(await openTwo(), 'LL?');
    expect((await plate()).value).toBe('LL?');
    expect(screen.queryByText('kept as you type')).toBeNull();
  });
});

describe('reading blind', () => {
  it('shows no part and asks no decoder, and says why', async () => {
    const register = open(blindDesk());
    type(await plate(), 'LLKCB');
    screen.getByText(/You read it without seeing what others read/);
    expect(screen.queryByText(/Cylinder block|Brackwater|It can mean/)).toBeNull();
    await screen.findByText('kept as you type');
    expect(register.asked('POST /decode')).toEqual([]);
    expect(screen.queryByRole('button', { name: 'Draw where it stands' })).toBeNull();
  });
  it('can be given up, with what it costs said first', async () => {
    const register = open(blindDesk(), { [`POST /marks/${MARK}/looks`]: () => ok(markPage()) });
    await press('Show me what others read');
    screen.getByText(/no longer counts as independent/);
    expect(register.asked(`POST /marks/${MARK}/looks`)).toEqual([]);
    await press('Show all of it');
    await screen.findByText('Another page');
    expect(register.asked(`POST /marks/${MARK}/looks`)).toHaveLength(1);
  });
});

describe('other marks and photos', () => {
  it('finds the castings a number can be', async () => {
    const casting = { id: id(61), slug: 'brackwater-b4406', number: 'B4406', pattern: null, maker: { slug: 'brackwater', name: 'Brackwater Tractor Works' }, partType: { slug: 'block', name: 'Cylinder block' }, made: null };
    const register = open(desk({ kind: 'casting-number' }), { 'GET /castings': () => ok({ items: [casting], next: null }) });
    type(await plate('Casting number'), 'B440?');
    expect((await screen.findByRole('link', { name: 'B4406' })).getAttribute('href')).toBe('/castings/brackwater-b4406');
    expect(register.asked('GET /castings').at(-1)?.search.get('number')).toBe('B440?');
    expect(register.asked('POST /decode')).toEqual([]);
  });
  it('can be read from the iron where there is no photo', async () => {
    const register = open(desk({ photos: [], narrowing: null }), { [SAVE]: () => ({ status: 201, body: markPage() }) });
    await screen.findByText('No photo of it');
    type(await plate(), 'LLKCB');
    await press('Save this reading');
    await screen.findByText('Another page');
    expect(register.asked(SAVE)[0]?.body).toEqual({ text: 'LLKCB', photoId: null });
  });
  it('waits for a photo that is being made ready, and shows it once it is', async () => {
    let looks = 0;
    const waiting = photo({ state: 'waiting', renditions: NO_RENDITIONS });
    open(desk({ photos: [placed({ photo: waiting })] }), { [`GET /photos/${id(80)}`]: () => ok((looks += 1) > 1 ? photo() : waiting) });
    await screen.findByText('The picture is being made ready');
    await screen.findByRole('img', { name: 'Photo, as taken' }, { timeout: 3_000 });
  });
  it('says of a photo that failed why, and takes the reading as made from the iron', async () => {
    const failed = photo({ state: 'failed', failure: 'The file ends before the picture does.', renditions: NO_RENDITIONS });
    const register = open(desk({ photos: [placed({ photo: failed })], narrowing: null }), { [SAVE]: () => ({ status: 201, body: markPage() }) });
    await screen.findByText(/The file ends before the picture does/);
    type(await plate(), 'LLKCB');
    await press('Save this reading');
    await screen.findByText('Another page');
    expect(register.asked(SAVE)[0]?.body).toEqual({ text: 'LLKCB', photoId: null });
  });
  it('says what can’t be done without WebGL, and shows the register’s own relief', async () => {
    open(desk());
    await screen.findByText(/The light can’t be moved here/);
    await press('Relief');
    const picture = screen.getByRole('img', { name: 'Photo, relief, as the register made it' });
    expect(picture.getAttribute('src')).toContain('/relief-');
    expect(screen.queryByRole('slider', { name: 'Light from' })).toBeNull();
    await press('show as taken');
    expect(screen.getByRole('img', { name: 'Photo, as taken' }).getAttribute('src')).toContain('/page-');
  });
});

describe('where the mark stands', () => {
  const PLACE = `PUT /marks/${MARK}/photos/${id(80)}`;
  const stage = () => screen.getByRole('group', { name: 'The photo of the mark' });

  it('is drawn by keyboard and kept with the turn of the photo', async () => {
    const register = open(desk(), { [PLACE]: () => ok(markPage()) });
    await press('Turn 90°');
    await press('Draw where it stands');
    expect(document.activeElement).toBe(stage());
    fireEvent.keyDown(stage(), { key: 'ArrowRight' });
    fireEvent.keyDown(stage(), { key: 'ArrowDown', shiftKey: true });
    fireEvent.keyDown(stage(), { key: 'Enter' });
    await waitFor(() => expect(register.asked(PLACE)).toHaveLength(1));
    expect(register.asked(PLACE)[0]?.body).toMatchObject({ turn: 90, mirrored: false });
    await screen.findByRole('button', { name: 'Draw where it stands' });
  });
  it('is left as it was by Escape', async () => {
    const register = open(desk(), { [PLACE]: () => ok(markPage()) });
    await press('Draw where it stands');
    fireEvent.keyDown(stage(), { key: 'ArrowRight' });
    fireEvent.keyDown(stage(), { key: 'Escape' });
    await screen.findByRole('button', { name: 'Draw where it stands' });
    expect(register.asked(PLACE)).toEqual([]);
  });
  it('is kept in the tab while it can’t be saved', async () => {
    open(desk(), { [PLACE]: () => refusal('unavailable', 503, 'Away.') });
    await press('Draw where it stands');
    fireEvent.keyDown(stage(), { key: 'Enter' });
    expect((await screen.findByText('The register is away for a moment')).parentElement?.textContent).toContain('Your outline was not saved; it is kept in this tab.');
    screen.getByRole('button', { name: 'Keep it here' });
  });
});

describe('who may not read', () => {
  it('is offered to sign in and comes back', async () => {
    registerThat({ 'GET /me': () => ok({ me: null }) });
    showAt(`/marks/${MARK}/read`, '/marks/:id/read', <ReadMarkPage />);
    const links = await screen.findAllByRole('link', { name: 'Sign in' });
    expect(links.at(-1)?.getAttribute('href')).toBe(`/sign-in?next=${encodeURIComponent(`/marks/${MARK}/read`)}`);
  });
  it('finds nothing at the address of a mark that is another’s and private', async () => {
    registerThat({ 'GET /me': () => ok({ me: MEMBER }) });
    showAt(`/marks/${MARK}/read`, '/marks/:id/read', <ReadMarkPage />);
    await screen.findByText('Nothing stands at this address');
  });
});
