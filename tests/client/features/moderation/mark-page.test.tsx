import { screen } from '@testing-library/react';
import { expect, it } from 'vitest';
import { Component as MarkPage } from '#client/pages/moderation/mark-page.tsx';
import { show, standInRegister } from './register.tsx';
import { id, mark } from './samples.ts';

const register = standInRegister();
const open = () => show(<MarkPage />, { at: `/marks/${id(70)}`, path: '/marks/:id' });
const tell = (answer: unknown) => register.answer(`GET /api/marks/${id(70)}`, answer);

it('shows the plate, what it can mean, where it was found and who read it', async () => {
  tell(mark());
  open();
  await screen.findByText(/^It can mean two dates\./);
  expect(screen.getAllByLabelText('Mark B, O or D, gap, B, O, gap, C, B')).toHaveLength(2);
  screen.getByRole('row', { name: '13 Jan 1941 1 in 2' });
  expect(screen.getByText('B4406, first pattern').getAttribute('href')).toBe('/castings/brackwater-b4406');
  screen.getByText('3C 12••');
  screen.getByRole('row', { name: /Harrow Lane 1 Mar 2026/ });
});

it('shows no dates while they are being worked out again', async () => {
  tell(mark({ workingOut: true }));
  open();
  await screen.findByText('Being worked out again.');
  expect(screen.queryByText(/It can mean/)).toBeNull();
});

it('says what nobody has read or dated yet', async () => {
  tell(mark({ reading: null, readings: [], dates: null, casting: null, machine: null, maker: null }));
  open();
  await screen.findByText('Not read yet');
  screen.getByText('Nobody has read it yet, so there is nothing to date.');
  screen.getByText('Nobody has read it yet.');
  screen.getByText('On a part by itself, whose casting is not known.');
});

it('has no dates where the mark is none', async () => {
  tell(mark({ kind: 'casting-number', dates: null }));
  open();
  await screen.findByText('Casting number, cast when poured');
  expect(screen.queryByText('What it can mean')).toBeNull();
});

it('is nothing at an address where no public mark is', async () => {
  open();
  await screen.findByText('Nothing stands at this address');
});
