import { fireEvent, screen, within } from '@testing-library/react';
import { describe, expect, it } from 'vitest';
import { FactHistoryView } from '#client/features/moderation/fact-history-view.tsx';
import { show, standInRegister } from './register.tsx';
import { CIPHER, history, id, step, UNA } from './samples.ts';

const register = standInRegister();
const tell = (answer: unknown) => register.answer(`GET /api/facts/${CIPHER.id}/history`, answer);
const open = () => show(<FactHistoryView id={CIPHER.id} />);
const posted = () => register.sent.filter(({ method }) => method === 'POST');
const ALL = { edit: true, bringBack: true, retire: true, flag: true };

describe('the history of a fact', () => {
  it('shows every version with who, when, why, what changed and what stands behind it', async () => {
    tell(history());
    open();
    expect((await screen.findAllByRole('heading', { level: 2 })).map(({ textContent }) => textContent)).toEqual(['Version 2', 'Version 1']);
    const second = screen.getByRole('region', { name: 'Version 2' });
    within(second).getByText('In force');
    within(second).getByText('Reason of version 2.');
    within(second).getByRole('row', { name: 'Title Title 1 Title 2' });
    expect(within(second).getByText('Harrow Lane').closest('li')?.textContent).toBe('Harrow Lane put it forward, Una Kettlemere entered it, 1 Feb 2024.The contribution');
    expect(within(second).getByText('The contribution').getAttribute('href')).toBe(`/contributions/${id(30)}`);
    expect(within(second).getByText('Works drawing 2210').closest('li')?.textContent).toBe('Works drawing 2210, page 14.Behind layout.');
    const first = screen.getByRole('region', { name: 'Version 1' });
    expect(within(first).getByText('Harrow Lane').closest('li')?.textContent).toBe('Harrow Lane entered it, 1 Feb 2024.');
    within(first).getByText('Title 1');
    expect(screen.queryByRole('button')).toBeNull();
  });

  it('says when nothing is in force, who retired it and why', async () => {
    tell(history({ inForce: null, steps: [step(2, { step: 'retired', by: UNA, decidedBy: UNA, reason: 'Entered twice.' }), step(2), step(1)] }));
    open();
    await screen.findByText(/^Retired: nothing of it is in force\./);
    const retired = screen.getByRole('region', { name: 'Version 2 retired' });
    within(retired).getByText('Entered twice.');
    within(retired).getByText('Una Kettlemere');
    expect(screen.queryByText('In force')).toBeNull();
    expect(screen.queryByRole('link', { name: CIPHER.title })).toBeNull();
  });

  it('says that what rests on it is being worked out again', async () => {
    tell(history({ workingOut: true }));
    open();
    await screen.findByText('Being worked out again.');
  });

  it('shows what was typed as it was typed', async () => {
    tell(history({ steps: [step(1, { reason: '<img src=x onerror=alert(1)>' })] }));
    open();
    await screen.findByText('<img src=x onerror=alert(1)>');
    expect(document.querySelector('img')).toBeNull();
  });

  it('is nothing at an address where no fact is', async () => {
    open();
    await screen.findByText('Nothing stands at this address');
  });
});

describe('what moderators do', () => {
  it('brings an older version back, for a reason', async () => {
    tell(history({ can: ALL }));
    open();
    fireEvent.click(await screen.findByText('Bring version 1 back'));
    fireEvent.click(screen.getByText('Enter it again'));
    await screen.findByText('Reason: Say why');
    expect(posted()).toEqual([]);
    fireEvent.change(screen.getByLabelText('Reason'), { target: { value: 'The marks of 1955 were misread.' } });
    const steps = [step(3, { inForce: true, by: UNA, decidedBy: UNA, broughtBack: 1 }), step(2), step(1)];
    register.answer(`POST /api/facts/${CIPHER.id}/bring-back`, history({ inForce: 3, can: ALL, steps }));
    tell(history({ inForce: 3, can: ALL, steps }));
    fireEvent.click(screen.getByText('Enter it again'));
    await screen.findByText('Brought version 1 back.');
    expect(posted().map(({ body }) => body)).toEqual([{ version: 1, reason: 'The marks of 1955 were misread.', inForce: 2 }]);
  });

  it('says what stands in the way, and keeps the reason', async () => {
    tell(history({ can: ALL }));
    register.refuse(`POST /api/facts/${CIPHER.id}/retire`, 409, 'conflict', 'Two castings rest on it: B4406 and B5120.');
    open();
    fireEvent.click(await screen.findByText('Retire it', { selector: 'button' }));
    fireEvent.change(screen.getByLabelText('Reason'), { target: { value: 'No such key.' } });
    fireEvent.submit(screen.getByLabelText('Reason').closest('form')!);
    await screen.findByText('Two castings rest on it: B4406 and B5120.');
    expect(screen.getByLabelText<HTMLTextAreaElement>('Reason').value).toBe('No such key.');
    expect(posted().map(({ body }) => body)).toEqual([{ reason: 'No such key.', inForce: 2 }]);
  });

  it('offers to bring the last version of a retired fact back, and not to retire it again', async () => {
    tell(history({ inForce: null, can: ALL, steps: [step(2, { step: 'retired' }), step(2), step(1)] }));
    open();
    await screen.findByText('Bring version 2 back');
    expect(screen.queryByText('Retire it')).toBeNull();
    expect(screen.queryByText('Put a change forward')).toBeNull();
  });
});
