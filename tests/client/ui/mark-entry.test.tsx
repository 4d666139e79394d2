import { fireEvent, render, screen } from '@testing-library/react';
import { useState } from 'react';
import { describe, expect, it } from 'vitest';
import { MarkEntry } from '#client/ui/mark-entry.tsx';

function Plate({ start = '', fault = null }: { readonly start?: string; readonly fault?: string | null }) {
  const [value, setValue] = useState(start);
  return <MarkEntry label="The mark on the casting" value={value} onChange={setValue} fault={fault} />;
}

const box = () => screen.getByRole<HTMLInputElement>('textbox', { name: 'The mark on the casting' });
const press = (name: RegExp) => fireEvent.click(screen.getByRole('button', { name }));
const typeAtEnd = (key: string) => {
  const value = box().value + key;
  fireEvent.change(box(), { target: { value, selectionStart: value.length } });
};
const select = (start: number, end: number) => {
  box().focus();
  box().setSelectionRange(start, end);
  fireEvent.select(box());
};

describe('MarkEntry', () => {
  it('is one labelled text box with its notation explained', () => {
    render(<Plate />);
    expect(box()).toBeInstanceOf(HTMLInputElement);
    expect(document.getElementById(box().getAttribute('aria-describedby') ?? '')?.textContent).toContain('Question mark: can’t be read');
    expect(screen.getAllByRole('textbox')).toHaveLength(1);
  });
  it('takes letters as capitals', () => {
    render(<Plate start="BB" />);
    box().focus();
    typeAtEnd('o');
    expect(box().value).toBe('BBO');
  });
  it('puts on the plate what can’t be typed with gloves', () => {
    render(<Plate start="B" />);
    press(/can’t be read/);
    press(/a gap/);
    press(/broken away/);
    expect(box().value).toBe('B?-*');
    expect(document.activeElement).toBe(box());
  });
  it('turns the chosen glyph into one of several, and Enter leaves the bracket', () => {
    render(<Plate start="BOB" />);
    select(1, 2);
    press(/one of these/);
    expect(box().value).toBe('B[O]B');
    expect(box().selectionStart).toBe(3);
    fireEvent.change(box(), { target: { value: 'B[Od]B', selectionStart: 4 } });
    expect(box().value).toBe('B[OD]B');
    fireEvent.keyDown(box(), { key: 'Enter' });
    expect(box().selectionStart).toBe(5);
  });
  it('closes a bracket that was pasted open', () => {
    render(<Plate start="B[OD" />);
    select(3, 3);
    fireEvent.keyDown(box(), { key: 'Enter' });
    expect(box().value).toBe('B[OD]');
  });
  it('says what is wrong with the box itself', () => {
    render(<Plate start="é" fault="“é” is no glyph" />);
    expect(box().getAttribute('aria-invalid')).toBe('true');
    expect(document.getElementById(box().getAttribute('aria-describedby') ?? '')?.textContent).toBe('“é” is no glyph');
  });
});
