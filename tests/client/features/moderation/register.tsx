import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { render } from '@testing-library/react';
import type { ReactNode } from 'react';
import { MemoryRouter, Route, Routes } from 'react-router-dom';
import { afterEach, beforeEach, vi } from 'vitest';

export type Sent = { readonly method: string; readonly path: string; readonly body: unknown };
type Answer = { readonly status: number; readonly body: unknown };

/** A register that answers as it is told to, by method and path; what nobody told it is nothing at an address. */
export function standInRegister() {
  const answers = new Map<string, Answer>();
  const sent: Sent[] = [];
  beforeEach(() => {
    answers.clear();
    sent.length = 0;
    vi.stubGlobal('fetch', (address: string, init: RequestInit = {}) => {
      const method = init.method ?? 'GET';
      const [path = ''] = address.split('?');
      sent.push({ method, path: address, body: typeof init.body === 'string' ? (JSON.parse(init.body) as unknown) : null });
      const { status, body } = answers.get(`${method} ${path}`) ?? problem(404, 'not-found', 'Nothing here');
      return Promise.resolve(Response.json(body, { status }));
    });
  });
  afterEach(() => vi.unstubAllGlobals());
  return {
    sent,
    answer: (question: string, body: unknown) => void answers.set(question, { status: 200, body }),
    refuse: (question: string, status: number, kind: string, detail: string) => void answers.set(question, problem(status, kind, detail)),
  };
}

function problem(status: number, kind: string, detail: string): Answer {
  return { status, body: { type: `/problems/${kind}`, title: kind, status, detail, requestId: 'request-1' } };
}

/** Shows a page at an address. */
export function show(page: ReactNode, { at = '/', path = '*' }: { readonly at?: string; readonly path?: string } = {}): void {
  render(
    <QueryClientProvider client={new QueryClient({ defaultOptions: { queries: { retry: false } } })}>
      <MemoryRouter initialEntries={[at]}>
        <Routes>
          <Route path={path} element={page} />
        </Routes>
      </MemoryRouter>
    </QueryClientProvider>,
  );
}

const XHTML = 'http://www.w3.org/1999/xhtml';

/** Browsers know the element `search`, the test's window doesn't. */
export function knowSearchElement(): void {
  beforeEach(() => {
    vi.spyOn(document, 'createElement').mockImplementation((name: string) => document.createElementNS(XHTML, name === 'search' ? 'div' : name));
  });
}
