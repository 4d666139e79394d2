import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { fireEvent, render, screen, waitFor } from '@testing-library/react';
import { expect, it, vi } from 'vitest';
import { z } from 'zod';
import { FormTrouble } from '#client/features/people/form-trouble.tsx';
import { ProblemError, UnreachableError } from '#client/lib/problem-error.ts';
import { useContractForm } from '#client/lib/use-contract-form.ts';

const schema = z.strictObject({ name: z.string().trim().min(2, 'At least 2 characters').regex(/^[A-Z]/, 'A capital first'), reason: z.string() });
type Body = z.infer<typeof schema>;

function Form({ send, onDone }: { readonly send: (body: Body) => Promise<string>; readonly onDone: (answer: string, body: Body) => void }) {
  const form = useContractForm({ schema, fields: { name: 'Name', reason: 'Reason' }, send, onDone });
  const name = form.field('name');
  return (
    <form {...form.form} aria-label="form">
      <FormTrouble form={form} title="Not sent" />
      <input id={name.id} name="name" aria-label="Name" aria-invalid={name.error !== null} />
      <p data-testid="beside">{name.error}</p>
      <input name="reason" aria-label="Reason" />
      <button type="submit">{form.busy ? 'Sending' : 'Send'}</button>
    </form>
  );
}

function show(send: (body: Body) => Promise<string>) {
  const onDone = vi.fn<(answer: string, body: Body) => void>();
  render(
    <QueryClientProvider client={new QueryClient()}>
      <Form send={send} onDone={onDone} />
    </QueryClientProvider>,
  );
  return { onDone };
}

const type = (label: string, value: string) => fireEvent.change(screen.getByLabelText(label), { target: { value } });
const submit = () => fireEvent.submit(screen.getByRole('form'));
const beside = () => screen.getByTestId('beside').textContent;
const problem = (faults: ProblemError['faults']) =>
  new ProblemError({ kind: 'invalid', status: 422, detail: 'See which.', faults, requestId: 'request-1', retryAfter: null });

it('sends what the schema makes of the boxes, and hands on the answer', async () => {
  const send = vi.fn<(body: Body) => Promise<string>>().mockResolvedValue('kept');
  const { onDone } = show(send);
  type('Name', '  Wren ');
  submit();
  await waitFor(() => expect(onDone).toHaveBeenCalled());
  expect(send.mock.calls[0]?.[0]).toEqual({ name: 'Wren', reason: '' });
  expect(onDone.mock.calls[0]?.slice(0, 2)).toEqual(['kept', { name: 'Wren', reason: '' }]);
});

it('sends nothing the schema refuses, and says of each box the first thing to mend', async () => {
  const send = vi.fn<(body: Body) => Promise<string>>();
  show(send);
  type('Reason', 'kept as typed');
  submit();
  await screen.findByRole('link', { name: 'Name: At least 2 characters' });
  expect(screen.getAllByRole('listitem')).toHaveLength(1);
  expect(beside()).toBe('At least 2 characters');
  expect(document.activeElement).toBe(screen.getByRole('alert'));
  expect(screen.getByLabelText<HTMLInputElement>('Reason').value).toBe('kept as typed');
  expect(send).not.toHaveBeenCalled();
});

it('puts what the register says of a box beside it, and keeps what was typed', async () => {
  show(() => Promise.reject(problem([{ path: ['name'], message: 'Taken' }])));
  type('Name', 'Wren');
  submit();
  await screen.findByRole('link', { name: 'Name: Taken' });
  expect(beside()).toBe('Taken');
  expect(screen.getByLabelText<HTMLInputElement>('Name').value).toBe('Wren');
});

it('says a fault of no box of this form in the summary alone', async () => {
  show(() => Promise.reject(problem([{ path: ['token'], message: 'Used before' }])));
  type('Name', 'Wren');
  submit();
  await screen.findByText('Used before');
  expect(screen.queryByRole('link')).toBeNull();
  expect(beside()).toBe('');
});

it('says when the register could not be reached', async () => {
  show(() => Promise.reject(new UnreachableError('offline', null)));
  type('Name', 'Wren');
  submit();
  await screen.findByText('This device is offline');
  expect(screen.getByLabelText<HTMLInputElement>('Name').value).toBe('Wren');
});

it('leaves asking for a proof to whoever does that', async () => {
  const owed = new ProblemError({ kind: 'identity-not-confirmed', status: 403, detail: 'Prove it.', faults: [], requestId: null, retryAfter: null });
  const send = vi.fn<(body: Body) => Promise<string>>().mockRejectedValue(owed);
  show(send);
  type('Name', 'Wren');
  submit();
  await waitFor(() => expect(send).toHaveBeenCalled());
  await screen.findByRole('button', { name: 'Send' });
  expect(screen.queryByRole('alert')).toBeNull();
});

it('does not send twice what is on its way', async () => {
  const send = vi.fn<(body: Body) => Promise<string>>().mockReturnValue(new Promise(() => undefined));
  show(send);
  type('Name', 'Wren');
  submit();
  await screen.findByRole('button', { name: 'Sending' });
  submit();
  expect(send).toHaveBeenCalledTimes(1);
});
