import { fireEvent, screen } from '@testing-library/react';
import { afterEach, expect, it, vi } from 'vitest';
import { FactActions, RowActions } from '#client/features/contributions/fact-actions.tsx';
import { MEMBER, ok, refusal, registerThat, showAt } from './register.tsx';
import { ID } from './samples.ts';

afterEach(() => vi.unstubAllGlobals());

it('leads to a change of the fact', () => {
  registerThat({ 'GET /me': () => ok({ me: null }) });
  showAt('/', '/', <RowActions factId={ID} name="Headstock" />);
  expect(screen.getByRole('link', { name: /^Put a change forward/, hidden: true }).getAttribute('href')).toBe(`/facts/${ID}/change`);
  expect(screen.getByRole('link', { name: /^What changed/, hidden: true }).getAttribute('href')).toBe(`/facts/${ID}/history`);
});

it('flags it with a reason, once', async () => {
  const { asked } = registerThat({ 'GET /me': () => ok({ me: MEMBER }), [`POST /facts/${ID}/flags`]: () => ({ status: 201, body: { id: ID } }) });
  showAt('/', '/', <FactActions factId={ID} />);
  fireEvent.click(screen.getByText('Flag it'));
  fireEvent.change(await screen.findByLabelText('What is wrong'), { target: { value: 'The drawing shows three ribs.' } });
  fireEvent.click(screen.getByRole('button', { name: 'Tell the moderators' }));
  await screen.findByText('Flagged');
  expect(asked(`POST /facts/${ID}/flags`).map(({ body }) => body)).toEqual([{ reason: 'The drawing shows three ribs.' }]);
});

it('says what is wrong with a flag, and keeps what was typed', async () => {
  registerThat({ 'GET /me': () => ok({ me: MEMBER }), [`POST /facts/${ID}/flags`]: () => refusal('too-many-requests', 429, 'Slower.') });
  showAt('/', '/', <FactActions factId={ID} />);
  fireEvent.click(screen.getByText('Flag it'));
  fireEvent.click(await screen.findByRole('button', { name: 'Tell the moderators' }));
  await screen.findByRole('link', { name: 'What is wrong: Say why' });
  fireEvent.change(screen.getByLabelText('What is wrong'), { target: { value: 'Three ribs.' } });
  fireEvent.click(screen.getByRole('button', { name: 'Tell the moderators' }));
  await screen.findByText('Too many questions at once');
  expect(screen.getByLabelText<HTMLTextAreaElement>('What is wrong').value).toBe('Three ribs.');
});

it('asks a visitor to sign in, and comes back', async () => {
  registerThat({ 'GET /me': () => ok({ me: null }) });
  showAt('/castings/b-5120', '/castings/:slug', <FactActions factId={ID} />);
  fireEvent.click(screen.getByText('Flag it'));
  expect((await screen.findByText('Sign in')).getAttribute('href')).toBe('/sign-in?next=%2Fcastings%2Fb-5120');
});
