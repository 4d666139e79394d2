import { fireEvent, screen, waitFor } from '@testing-library/react';
import { beforeEach, expect, it } from 'vitest';
import { RivalAccounts } from '#client/features/moderation/rival-accounts.tsx';
import { accountsOf } from '#client/features/models/serial-rows.ts';
import type { ModelPage } from '#contract/models.ts';
import { show, standInRegister } from './register.tsx';
import { id, MODERATOR } from './samples.ts';

const register = standInRegister();
const MODEL = { slug: 'brackwater-30-crawler', name: '30 Crawler' };
const provenance = { version: 1, enteredBy: 'Harrow Lane', enteredAt: '2024-02-01T10:00:00Z', sources: [] };
const series: ModelPage['series'][number] = {
  id: id(80),
  prefix: '3C',
  works: null,
  label: null,
  provenance,
  anchors: [],
  ranges: ['Factory record', 'Parts book 14'].map((title, place) => ({
    id: id(81 + place),
    slug: `range-${place}`,
    model: MODEL,
    series: { id: id(80), prefix: '3C', works: null, label: null },
    account: { id: id(91 + place), title },
    preferred: place === 1,
    first: '1',
    last: '400',
    dates: { from: '1938-01-01', to: '1938-12-31' },
    precision: 'year',
    meaning: 'built',
    standing: 'solid',
    inOrder: true,
    provenance,
  })),
};
const model = { id: id(79), ...MODEL, maker: { slug: 'brackwater-tractor-works', name: 'Brackwater Tractor Works' }, kindOfMachine: 'crawler-tractor', made: { from: null, to: null }, note: null, positions: [], series: [series], provenance };

function open(viewer: unknown): void {
  register.answer('GET /api/me', { me: viewer });
  show(<RivalAccounts series={series} accounts={accountsOf(series)} />);
}
const offers = () => screen.queryAllByText('Make it the register’s reading');

beforeEach(() => register.answer(`GET /api/models/${MODEL.slug}`, model));

it('names the accounts, the register’s reading first and marked', async () => {
  open(null);
  const rows = (await screen.findByLabelText('Accounts of these serials')).querySelectorAll('li');
  expect([...rows].map(({ textContent }) => textContent.trim())).toEqual(['Parts book 14 The register’s reading', 'Account 2: Factory record']);
  expect(offers()).toEqual([]);
});

it('lets a moderator of the maker move the mark, for a reason', async () => {
  register.answer(`POST /api/series/${id(80)}/reading`, { accountId: id(91) });
  open(MODERATOR);
  fireEvent.click(await screen.findByText('Make it the register’s reading'));
  fireEvent.change(screen.getByLabelText('Reason'), { target: { value: 'The record was found.' } });
  fireEvent.click(screen.getByText('Go by this account'));
  await waitFor(() => expect(screen.queryByLabelText('Reason')).toBeNull());
  expect(register.sent.find(({ method }) => method === 'POST')?.body).toEqual({ accountId: id(91), reason: 'The record was found.' });
});

it.each([
  ['of another maker', { ...MODERATOR, moderates: [{ slug: 'skerry-foundry', name: 'Skerry Foundry' }] }],
  ['who may not decide yet', { ...MODERATOR, can: { ...MODERATOR.can, decideContributions: false } }],
])('offers nothing to a moderator %s', async (_, viewer) => {
  open(viewer);
  await waitFor(() => expect(register.sent.some(({ path }) => path === '/api/me')).toBe(true));
  await screen.findByText('Parts book 14');
  expect(offers()).toEqual([]);
});
