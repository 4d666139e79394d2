import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { fireEvent, render, screen, waitFor, within } from '@testing-library/react';
import { useState } from 'react';
import { MemoryRouter } from 'react-router-dom';
import { afterEach, beforeEach, expect, it, vi } from 'vitest';
import { CipherWorkbench } from '#client/features/workbench/cipher-workbench.tsx';
import type { Trial } from '#client/features/workbench/workbench-queries.ts';
import type { FieldFault } from '#contract/problem.ts';
import { KEY, TEN } from './samples.ts';

const MAKER = '018d5bbd-2920-72c2-a4c4-26dc0063c791';
const MARK = '018d994d-f6c0-759e-9388-3e9cb54a1357';
const TRIAL: Trial = {
  marks: 9,
  draft: { decoded: 5, ambiguous: 3, impossible: 1 },
  inForce: { decoded: 4, ambiguous: 3, impossible: 2 },
  changed: 2,
  unlisted: 1,
  rows: [
    {
      item: { subject: { kind: 'mark', id: MARK, title: 'Cylinder block' }, mark: 'RLKON', text: 'on a B4406' },
      draft: { reading: 'decoded', dates: ['25 Jul 1939'] },
      inForce: { reading: 'impossible', dates: [] },
    },
  ],
};

const fetched = vi.fn<typeof fetch>();
const told = vi.fn<(next: unknown) => void>();

beforeEach(() => {
  told.mockReset();
  fetched.mockReset();
  fetched.mockImplementation(() => Promise.resolve(Response.json(TRIAL)));
  vi.stubGlobal('fetch', fetched);
});
afterEach(() => vi.unstubAllGlobals());

function Held({ begin, faults = [], makerId = null }: { readonly begin: unknown; readonly faults?: readonly FieldFault[]; readonly makerId?: string | null }) {
  const [value, setValue] = useState(begin);
  const change = (next: unknown) => {
    told(next);
    setValue(next);
  };
  return <CipherWorkbench id="d" label="Layout" value={value} onChange={change} faults={faults} makerId={makerId} foundryId={null} subjectId={null} />;
}

function show(begin: unknown, rest: { readonly faults?: readonly FieldFault[]; readonly makerId?: string } = {}) {
  return render(
    <QueryClientProvider client={new QueryClient({ defaultOptions: { queries: { retry: false } } })}>
      <MemoryRouter>
        <Held begin={begin} {...rest} />
      </MemoryRouter>
    </QueryClientProvider>,
  );
}

/** By its words: working out the accessible name of everything on the bench takes the test's browser seconds. */
function button(words: string | RegExp, within: ParentNode = document): HTMLElement {
  const found = [...within.querySelectorAll('button')].filter((one) => {
    const said = one.getAttribute('aria-label') ?? one.textContent;
    return typeof words === 'string' ? said === words : words.test(said);
  });
  if (found.length !== 1) throw new Error(`${found.length} buttons say ${String(words)}`);
  return found[0]!;
}
const press = (words: string | RegExp) => fireEvent.click(button(words));
/** A control by its label, or by the name it has of its own. */
function control(label: string): HTMLInputElement {
  const named = document.querySelector<HTMLInputElement>(`input[aria-label="${label}"]`);
  if (named !== null) return named;
  const [written] = [...document.querySelectorAll('label')].filter(({ textContent }) => textContent === label);
  return document.querySelector<HTMLInputElement>(`[id="${written?.htmlFor}"]`)!;
}
const type = (label: string, value: string) => fireEvent.change(control(label), { target: { value } });
const count = () => document.querySelector('#d [role=status]')?.textContent;
/** The draft as it was last told. */
const kept = () => told.mock.lastCall?.[0];
const faultLinks = () => [...document.querySelectorAll('a[href^="#d-"]')].map(({ textContent }) => textContent);
const mark = (name: string) => screen.getByLabelText(name, { selector: '[role=img]' });
const chosenFields = () => [...document.querySelectorAll<HTMLSelectElement>('#d-fields select[id$=-kind]')].map(({ value }) => value);

it('begins blank, and from a shape and a key word comes to a draft that makes sense', () => {
  show({});
  expect(count()).toBe('Nothing is laid out yet.');
  expect(faultLinks()).toEqual([]);
  press(/^Ten-letter key/);
  expect(chosenFields()).toEqual(['month', 'day', 'year']);
  expect(count()).toBe('Four faults to mend');
  type('Key word of “key”', 'BLOCKPRINT');
  type('First day', '1928-01-01');
  type('Last day', '1954-12-31');
  expect(count()).toBe('No fault: the draft makes sense.');
  expect(kept()).toEqual({ ...TEN, symbolSets: { key: KEY } });
});

it('refuses a key word in which a letter comes twice, says why, keeps what was typed and what the figures had', () => {
  show(TEN);
  type('Key word of “key”', 'BLOCB');
  screen.getByText('“B” comes twice, first and fifth: a letter can stand for one of them only');
  expect(control('Key word of “key”').value).toBe('BLOCB');
  expect(told).not.toHaveBeenCalled();
  type('Key word of “key”', 'BLOCK');
  expect(screen.queryByText(/comes twice/)).toBeNull();
  screen.getByText('five of ten letters');
});

it('shows a letter typed twice at its figure, and keeps the draft', () => {
  show(TEN);
  type('Figure 5 in “key”', 'B');
  expect(control('Figure 5 in “key”').getAttribute('aria-invalid')).toBe('true');
  expect(control('Figure 1 in “key”').getAttribute('aria-invalid')).toBe('false');
  expect(faultLinks()).toContain('“key”: “B” is there twice');
  expect(control('Figure 5 in “key”').value).toBe('B');
  type('Figure 5 in “key”', 'K');
  expect(count()).toBe('No fault: the draft makes sense.');
  expect(kept()).toMatchObject({ symbolSets: { key: { symbols: KEY.symbols } } });
});

it('shows a figure without a letter at the fields and at the key', () => {
  show(TEN);
  type('Figure 0 in “key”', '');
  expect(count()).toBe('Three faults to mend');
  screen.getByText('No symbol yet for 0');
});

it('shows a second claim on the month at the field that makes it, with the way to it from the count', () => {
  show(TEN);
  press('month');
  const link = screen.getByText('Fourth field: Two fields claim the month', { selector: 'a' });
  const target = document.getElementById(link.getAttribute('href')?.slice(1) ?? '');
  expect(target?.querySelector('label')?.textContent).toBe('Fourth field');
  expect(document.activeElement?.id).toBe('d-fields-3-kind');
  within(target!).getByText('Two fields claim the month');
});

it('moves a field, and focus with it', () => {
  show(TEN);
  press('Later: first field');
  expect(chosenFields()).toEqual(['day', 'month', 'year']);
  expect(document.activeElement?.getAttribute('aria-label')).toBe('Later: second field');
  press('Later: second field');
  expect(chosenFields()).toEqual(['day', 'year', 'month']);
  press('Later: third field');
  expect(chosenFields()).toEqual(['day', 'year', 'month']);
  press('Take out: first field');
  expect(chosenFields()).toEqual(['year', 'month']);
});

it('changes widths by steps and symbols by choice, and makes a set where a new one is chosen', () => {
  show(TEN);
  fireEvent.click(button(/^\+At least/, document.querySelector('#d-fields-0-width')!));
  expect(kept()).toMatchObject({ fields: [{ field: 'month', width: 2 }, {}, {}] });
  fireEvent.change(document.querySelector('#d-fields-0-symbols')!, { target: { value: 'new values' } });
  expect(kept()).toMatchObject({ fields: [{ field: 'month', symbols: 'months', width: 1 }, {}, {}], symbolSets: { months: { kind: 'values', symbols: {} } } });
  type('Letters of “months” in order', 'ABCDEFGHJKLM');
  expect(count()).toBe('No fault: the draft makes sense.');
  expect(screen.getAllByText('December')).toHaveLength(1);
});

it('keeps a row where it is while it is typed in', () => {
  show({ ...TEN, fields: [{ field: 'year', symbols: 'years', width: 1 }], symbolSets: { years: { kind: 'values', symbols: { A: 1911, B: 1912 } } } });
  type('Stands for, first row of “years”', '1920');
  expect(control('Symbol, first row of “years”').value).toBe('A');
  type('Stands for, first row of “years”', '19x');
  screen.getByText('Whole numbers, with commas between');
  expect(kept()).toMatchObject({ symbolSets: { years: { symbols: { A: [], B: 1912 } } } });
  press(/Take out the first row/);
  expect(kept()).toMatchObject({ symbolSets: { years: { symbols: { B: 1912 } } } });
});

it('puts another shape in the place of what is there, and that back again', () => {
  show(TEN);
  press(/^Week and year/);
  expect(chosenFields()).toEqual(['week', 'year']);
  press('Put it back');
  expect(kept()).toEqual(TEN);
});

it('takes exceptions, years that begin late, and a cipher still in use', () => {
  show(TEN);
  press('Put in an exception');
  type('Where the month is', 'r');
  type('it means the days from', '1930-01-01');
  type('to the day', '1930-02-01');
  fireEvent.click(control('Still in use'));
  fireEvent.click(control('The maker’s year began on another day than 1 January'));
  type('Month', '05');
  expect(kept()).toEqual({ ...TEN, usedTo: null, yearStart: '05-01', exceptions: [{ fields: { month: 'R' }, from: '1930-01-01', to: '1930-02-01' }] });
  expect(count()).toBe('No fault: the draft makes sense.');
});

it('writes any day, and goes from day to day', () => {
  show(TEN);
  type('Day', '1939-07-25');
  mark('Mark R, L, K, O, N');
  press(/A day later$/);
  mark('Mark R, L, P, O, N');
  press(/A month earlier$/);
  mark('Mark P, L, P, O, N');
  press(/^27 Jun 1939/);
  mark('Mark P, L, R, O, N');
  type('Day', '1955-01-01');
  screen.getByText(/carries no mark/);
});

it('reads any mark under the draft, and under the draft as it changes', async () => {
  show(TEN);
  type('A mark', 'BBOCB');
  await screen.findByText('3 Nov 1941');
  type('Last day', '1941-06-30');
  await waitFor(() => expect(screen.queryByText('3 Nov 1941')).toBeNull());
  type('A mark', '!');
  expect(screen.getAllByText(/is no glyph/)).toHaveLength(2);
});

it('reads the record after a pause, and says what changes', async () => {
  show(TEN, { makerId: MAKER });
  await screen.findByText('2 of 9 marks come out otherwise than under the version in force.', {}, { timeout: 3000 });
  expect(fetched).toHaveBeenCalledTimes(1);
  expect(fetched.mock.calls[0]?.[1]?.body).toBe(JSON.stringify({ makerId: MAKER, foundryId: null, definition: TEN, subjectId: null }));
  const row = screen.getByText('25 Jul 1939').closest('tr')!;
  expect(row.querySelector('a')?.getAttribute('href')).toBe(`/marks/${MARK}`);
  within(row).getByText('changed');
  screen.getByText('1 is on a part that is not public: counted, not listed.');
});

it('asks nothing of the register while the draft makes no sense, or before a maker is chosen', async () => {
  const { unmount } = show({ ...TEN, symbolSets: {} }, { makerId: MAKER });
  screen.getByText(/^Once the draft makes sense, every mark/);
  unmount();
  show(TEN);
  await screen.findByText(/^Choose the maker/);
  expect(fetched).not.toHaveBeenCalled();
});

it('says when the register could not read the record, and goes on with the rest', async () => {
  fetched.mockImplementation(() => Promise.reject(new TypeError('away')));
  show(TEN, { makerId: MAKER });
  await screen.findByText('The register could not be reached', {}, { timeout: 3000 });
  screen.getAllByLabelText(/^Mark /, { selector: '[role=img]' });
});

it('shows what the register says of a blank draft', () => {
  show({}, { faults: [{ path: ['fields'], message: 'Put in a field' }] });
  expect(faultLinks()).toEqual(['Layout: Put in a field']);
});
