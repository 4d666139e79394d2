import { QueryClientProvider } from '@tanstack/react-query';
import { render } from '@testing-library/react';
import type { ReactNode } from 'react';
import { createMemoryRouter, RouterProvider } from 'react-router-dom';
import { vi } from 'vitest';
import type { Me } from '#contract/people.ts';
import { createQueryClient } from '#client/app/query-client.ts';
import { ID } from './samples.ts';

export const MEMBER: Me = {
  id: ID,
  displayName: 'Harrow Lane',
  email: 'harrow@example.org',
  role: 'member',
  moderates: [],
  secondFactors: { authenticator: false, passkeys: 0, recoveryCodesLeft: 0 },
  secondFactorOwed: false,
  unreadNotices: 0,
  can: { decideContributions: false, seeMembers: false, seeAudit: false },
};

export type Asked = { readonly method: string; readonly path: string; readonly search: URLSearchParams; readonly body: unknown };
type Answer = { readonly status?: number; readonly body: unknown };
/** Answers by `METHOD /path`, below `/api`. */
export type Answers = Readonly<Record<string, (asked: Asked) => Answer>>;

export const ok = (body: unknown): Answer => ({ body });
export const refusal = (kind: string, status: number, detail: string, errors: readonly { path: (string | number)[]; message: string }[] = []): Answer => ({
  status,
  body: { type: `/problems/${kind}`, title: detail, status, detail, requestId: 'request-1', errors },
});

/** A register that answers what a test says and keeps what it was asked; anything else is nothing there. */
export function registerThat(answers: Answers): { readonly asked: (route: string) => readonly Asked[] } {
  const all: Asked[] = [];
  vi.stubGlobal('fetch', (input: string, init: RequestInit = {}) => {
    const { pathname, searchParams } = new URL(input, 'http://localhost');
    const sent: unknown = typeof init.body === 'string' ? JSON.parse(init.body) : undefined;
    const asked = { method: init.method ?? 'GET', path: pathname.replace(/^\/api/, ''), search: searchParams, body: sent };
    all.push(asked);
    const { status = 200, body } = answers[`${asked.method} ${asked.path}`]?.(asked) ?? refusal('not-found', 404, 'Nothing here.');
    return Promise.resolve(new Response(JSON.stringify(body), { status, headers: { 'Content-Type': 'application/json' } }));
  });
  return { asked: (route) => all.filter(({ method, path }) => `${method} ${path}` === route) };
}

/** Shows a page at an address, with every other address of the site as its bare path. */
export function showAt(address: string, path: string, page: ReactNode): void {
  const router = createMemoryRouter(
    [
      { path, element: page },
      { path: '*', Component: Elsewhere },
    ],
    { initialEntries: [address] },
  );
  render(
    <QueryClientProvider client={createQueryClient()}>
      <RouterProvider router={router} />
    </QueryClientProvider>,
  );
}

function Elsewhere() {
  return <p>Another page</p>;
}
