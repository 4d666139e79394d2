import { fireEvent, screen, waitFor, within } from '@testing-library/react';
import { describe, expect, it } from 'vitest';
import { Component as QueuePage } from '#client/pages/moderation/queue-page.tsx';
import { Component as ReworksPage } from '#client/pages/moderation/reworks-page.tsx';
import { show, standInRegister, knowSearchElement } from './register.tsx';
import { flag, id, MODERATOR, RUN, UNA, waiting } from './samples.ts';

const register = standInRegister();
knowSearchElement();

function tell(items: readonly unknown[], viewer: unknown = MODERATOR): void {
  register.answer('GET /api/me', { me: viewer });
  register.answer('GET /api/makers', { items: [], next: null });
  register.answer('GET /api/moderation/queue', { items, next: null, total: items.length });
  register.answer('GET /api/moderation/reworks', { items, next: null, total: items.length });
}
const asked = () => register.sent.filter(({ path }) => path.startsWith('/api/moderation/queue')).at(-1)?.path;

describe('the queue', () => {
  it('lists what waits as the register orders it, with who has it open and what is one’s own', async () => {
    tell([waiting(30, { openWith: [UNA] }), flag(31), waiting(32, { own: true })]);
    show(<QueuePage />);
    const rows = within(await screen.findByLabelText('The queue', { selector: 'ol' })).getAllByRole('listitem');
    expect(rows).toHaveLength(3);
    expect(rows[0]!.textContent).toContain('Open with Una Kettlemere');
    expect(rows[0]!.querySelector('a')?.getAttribute('href')).toBe(`/contributions/${id(30)}`);
    expect(rows[1]!.textContent).toContain('“Two <b>ribs</b>, not three.”');
    expect(rows[2]!.textContent).toContain('Your own: another moderator decides it');
    expect(rows[0]!.textContent).not.toContain('Your own');
  });

  it('asks for what the address narrows it to', async () => {
    tell([]);
    show(<QueuePage />, { at: '/moderation?type=flag&kind=casting&maker=skerry-foundry&sort=-at' });
    await screen.findAllByText('No entry matches');
    expect(Object.fromEntries(new URLSearchParams(asked()?.split('?')[1]))).toMatchObject({ type: 'flag', kind: 'casting', maker: 'skerry-foundry', sort: '-at' });
  });

  it('passes over what the address says wrongly', async () => {
    tell([]);
    show(<QueuePage />, { at: '/moderation?type=riddle' });
    await screen.findAllByText('No entry matches');
    expect(asked()).not.toContain('riddle');
  });

  it('says that nothing waits', async () => {
    tell([]);
    show(<QueuePage />);
    await screen.findByText(/^Nothing waits\./);
  });

  it('settles a flag in its place, for a reason', async () => {
    tell([flag(31)]);
    register.answer(`POST /api/flags/${id(31)}/settle`, { ...flag(31)['flag' as keyof object] as object, settled: { by: UNA, at: '2026-12-01T12:00:00Z', outcome: 'kept', reason: 'Drawing 2 has three.' } });
    show(<QueuePage />);
    fireEvent.click(await screen.findByText('Settle', { selector: 'button' }));
    fireEvent.click(screen.getByText('Settle the flag'));
    await screen.findByText('Reason: Say why');
    expect(register.sent.some(({ method }) => method === 'POST')).toBe(false);

    fireEvent.change(screen.getByLabelText('What became of it'), { target: { value: 'kept' } });
    fireEvent.change(screen.getByLabelText('Reason'), { target: { value: 'Drawing 2 has three.' } });
    tell([]);
    fireEvent.click(screen.getByText('Settle the flag'));
    await screen.findByText(/^Nothing waits\./);
    expect(register.sent.find(({ method }) => method === 'POST')?.body).toEqual({ outcome: 'kept', reason: 'Drawing 2 has three.' });
  });

  it('keeps the reason where another moderator was first', async () => {
    tell([flag(31)]);
    register.refuse(`POST /api/flags/${id(31)}/settle`, 409, 'conflict', 'Harrow Lane settled it.');
    show(<QueuePage />);
    fireEvent.click(await screen.findByText('Settle', { selector: 'button' }));
    fireEvent.change(screen.getByLabelText('Reason'), { target: { value: 'Drawing 2 has three.' } });
    fireEvent.click(screen.getByText('Settle the flag'));
    await screen.findByText('Harrow Lane settled it.');
    expect(screen.getByLabelText<HTMLTextAreaElement>('Reason').value).toBe('Drawing 2 has three.');
  });

  it('lets a registrar look on', async () => {
    tell([flag(31)], { ...MODERATOR, role: 'registrar', moderates: [], can: { decideContributions: false, seeMembers: true, seeAudit: true } });
    show(<QueuePage />);
    await screen.findByText('Flagged');
    expect(screen.queryByText('Settle', { selector: 'button' })).toBeNull();
  });
});

describe('who is let in', () => {
  it.each([
    ['a visitor', null],
    ['a member', { ...MODERATOR, role: 'member', moderates: [], can: { decideContributions: false, seeMembers: false, seeAudit: false } }],
  ])('it is not there for %s, and nothing is asked', async (_, viewer) => {
    tell([flag(31)], viewer);
    show(<QueuePage />);
    await screen.findByText('Nothing stands at this address');
    expect(asked()).toBeUndefined();
  });
  it('a moderator who owes a second factor is sent to add one', async () => {
    tell([flag(31)], { ...MODERATOR, secondFactorOwed: true, can: { ...MODERATOR.can, decideContributions: false } });
    show(<QueuePage />);
    await screen.findByText('Go to your second factors');
    expect(asked()).toBeUndefined();
  });
});

describe('what is worked out again', () => {
  it('shows how far each run has come, and what it changed', async () => {
    tell([RUN, { ...RUN, id: id(41), state: 'done', done: 4300, finishedAt: '2026-12-01T10:02:00Z' }, { ...RUN, id: id(42), state: 'failed', version: null }]);
    show(<ReworksPage />);
    const bar = await screen.findByRole('progressbar');
    expect([bar.getAttribute('aria-valuenow'), bar.getAttribute('aria-valuemax')]).toEqual(['1200', '4300']);
    screen.getByText('31 came out otherwise, on 4 machines');
    screen.getByText('a fault stopped it; it is taken up again by itself');
    screen.getByText('Cipher, retired');
  });
  it('looks again and again while something runs', async () => {
    tell([RUN]);
    show(<ReworksPage />);
    await screen.findByText('1,200 of 4,300 looked at');
    tell([{ ...RUN, done: 4300, state: 'done', finishedAt: '2026-12-01T10:02:00Z' }]);
    await waitFor(() => screen.getByText('4,300 looked at'), { timeout: 4000 });
  });
});
