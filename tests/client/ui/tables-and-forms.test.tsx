import { fireEvent, render, screen, within } from '@testing-library/react';
import { describe, expect, it, vi } from 'vitest';
import { DataTable } from '#client/ui/data-table.tsx';
import type { Column } from '#client/ui/data-table.tsx';
import { ErrorSummary } from '#client/ui/error-summary.tsx';
import { SelectField } from '#client/ui/select-field.tsx';
import { TextField } from '#client/ui/text-field.tsx';

type Row = { readonly name: string; readonly year: number };
const COLUMNS: readonly Column<Row>[] = [
  { key: 'name', header: 'Model', rowHeader: true, cell: ({ name }) => name },
  { key: 'year', header: 'year', align: 'end', cell: ({ year }) => year },
];
const table = (rows: readonly Row[] | null) => <DataTable caption="Models" columns={COLUMNS} rows={rows} rowKey={({ name }) => name} empty={<p>None yet</p>} />;

describe('DataTable', () => {
  it('names its rows and columns', () => {
    render(table([{ name: '30 Crawler', year: 1938 }]));
    const row = screen.getByRole('rowheader', { name: '30 Crawler' }).closest('tr')!;
    expect(within(row).getByRole('cell').textContent).toContain('1938');
    expect(screen.getByRole('table', { name: 'Models' }).getAttribute('aria-busy')).toBe('false');
  });
  it('keeps its shape while rows are on their way', () => {
    render(table(null));
    expect(screen.getByRole('table', { name: 'Models' }).getAttribute('aria-busy')).toBe('true');
    expect(screen.getAllByRole('columnheader')).toHaveLength(2);
    expect(screen.queryByText('None yet')).toBeNull();
  });
  it('says that there is nothing', () => {
    render(table([]));
    expect(screen.queryByRole('table')).toBeNull();
    screen.getByText('None yet');
  });
  it('can be sorted by a heading', () => {
    const onSort = vi.fn();
    render(<DataTable caption="Models" rows={[]} rowKey={() => ''} columns={[{ key: 'name', header: 'Model', cell: () => '', sort: { direction: 'ascending', onSort } }]} />);
    fireEvent.click(screen.getByRole('button', { name: 'Model' }));
    expect(onSort).toHaveBeenCalledOnce();
    expect(screen.getByRole('columnheader').getAttribute('aria-sort')).toBe('ascending');
  });
});

describe('fields', () => {
  it('tie label, hint and control together', () => {
    render(<TextField label="Serial" hint="As stamped" name="serial" />);
    const control = screen.getByLabelText('Serial');
    expect(document.getElementById(control.getAttribute('aria-describedby') ?? '')?.textContent).toBe('As stamped');
    expect(control.hasAttribute('aria-invalid')).toBe(false);
  });
  it('say an error in place of the hint', () => {
    render(
      <SelectField label="Model" hint="Any" error="Choose one">
        <option>30 Crawler</option>
      </SelectField>,
    );
    const control = screen.getByRole('combobox', { name: 'Model' });
    expect(control.getAttribute('aria-invalid')).toBe('true');
    screen.getByText('Choose one');
    expect(screen.queryByText('Any')).toBeNull();
  });
});

describe('ErrorSummary', () => {
  it('takes focus and leads to the fields', () => {
    render(<ErrorSummary title="To check the fit" faults={[{ message: 'Choose a model', controlId: 'model' }, { message: 'Away', controlId: null }]} />);
    expect(document.activeElement).toBe(screen.getByRole('alert'));
    expect(screen.getByRole('link', { name: 'Choose a model' }).getAttribute('href')).toBe('#model');
  });
});
