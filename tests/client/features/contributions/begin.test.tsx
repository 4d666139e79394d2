import { configure, fireEvent, screen } from '@testing-library/react';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { FactHistory } from '#contract/facts.ts';
import { formOf } from '#contract/kinds.ts';
import { FACT_KINDS } from '#domain/vocabulary.ts';
import { blankPayload } from '#client/features/contributions/draft-values.ts';
import { Component as ChangeFactPage } from '#client/pages/contributions/change-fact-page.tsx';
import { Component as ContributeKindPage } from '#client/pages/contributions/contribute-kind-page.tsx';
import { Component as ContributePage } from '#client/pages/contributions/contribute-page.tsx';
import { MEMBER, ok, refusal, registerThat, showAt } from './register.tsx';
import { contributionOf, OTHER_ID } from './samples.ts';

configure({ defaultHidden: true });
afterEach(() => vi.unstubAllGlobals());

const SIGNED_IN = { 'GET /me': () => ok({ me: MEMBER }) };
const BEGUN = { 'POST /contributions': () => ({ status: 201, body: contributionOf('casting') }) };

describe('what can be put forward', () => {
  it('names every kind, each with the way to begin one', async () => {
    registerThat(SIGNED_IN);
    showAt('/contribute', '/contribute', <ContributePage />);
    await screen.findByRole('link', { name: 'Your contributions' });
    const ways = screen.getAllByRole('link').map((link) => link.getAttribute('href'));
    expect(FACT_KINDS.filter((kind) => !ways.includes(`/contribute/${kind}`))).toEqual([]);
  });
  it('asks a visitor to sign in, and to come back', async () => {
    registerThat({ 'GET /me': () => ok({ me: null }) });
    showAt('/contribute', '/contribute', <ContributePage />);
    expect((await screen.findByRole('link', { name: 'Sign in' })).getAttribute('href')).toBe('/sign-in?next=%2Fcontribute');
  });
});

describe('beginning', () => {
  it('makes one blank draft of the kind, with what the address names, and goes to it', async () => {
    const { asked } = registerThat({ ...SIGNED_IN, ...BEGUN });
    showAt(`/contribute/casting?makerId=${OTHER_ID}&number=B1&partTypeId=none`, '/contribute/:kind', <ContributeKindPage />);
    await screen.findByText('Another page');
    expect(asked('POST /contributions').map(({ body }) => body)).toEqual([{ kind: 'casting', payload: { ...blankPayload(formOf('casting').fields), makerId: OTHER_ID } }]);
  });
  it('says why it can’t, and tries again when asked', async () => {
    let isAway = true;
    registerThat({ ...SIGNED_IN, 'POST /contributions': () => (isAway ? refusal('unavailable', 503, 'Away.') : { status: 201, body: contributionOf('casting') }) });
    showAt('/contribute/casting', '/contribute/:kind', <ContributeKindPage />);
    await screen.findByText('The register is away for a moment');
    isAway = false;
    fireEvent.click(screen.getByRole('button', { name: 'Ask again' }));
    await screen.findByText('Another page');
  });
  it('knows no other kinds', async () => {
    registerThat(SIGNED_IN);
    showAt('/contribute/boiler', '/contribute/:kind', <ContributeKindPage />);
    await screen.findByRole('heading', { name: 'Nothing stands at this address' });
  });
  it('asks a visitor to sign in, and begins nothing', async () => {
    const { asked } = registerThat({ 'GET /me': () => ok({ me: null }), ...BEGUN });
    showAt('/contribute/casting', '/contribute/:kind', <ContributeKindPage />);
    await screen.findByRole('heading', { name: 'Sign in first' });
    expect(asked('POST /contributions')).toEqual([]);
  });
});

describe('beginning a change', () => {
  const historyOf = (inForce: number | null) =>
    FactHistory.parse({
      fact: { id: OTHER_ID, kind: 'casting', slug: 'b-5120', title: 'B 5120' },
      inForce,
      steps: [],
      names: [],
      sources: [],
      workingOut: false,
      can: { edit: true, bringBack: false, retire: false, flag: true },
    });
  const open = (inForce: number | null) => {
    const register = registerThat({ ...SIGNED_IN, ...BEGUN, [`GET /facts/${OTHER_ID}/history`]: () => ok(historyOf(inForce)) });
    showAt(`/facts/${OTHER_ID}/change`, '/facts/:id/change', <ChangeFactPage />);
    return register;
  };
  it('names the version in force', async () => {
    const { asked } = open(4);
    await screen.findByText('Another page');
    expect(asked('POST /contributions').map(({ body }) => body)).toEqual([{ kind: 'casting', subjectId: OTHER_ID, baseVersion: 4 }]);
  });
  it('has nothing to change where the fact was retired', async () => {
    const { asked } = open(null);
    await screen.findByText('Nothing of it is in force');
    expect(asked('POST /contributions')).toEqual([]);
  });
});
