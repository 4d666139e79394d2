import { useEffect, useRef, useState } from 'react';
import type { ReactNode } from 'react';
import type { LoosePayload } from '#contract/contributions.ts';
import { capital } from '../../lib/say-number.ts';
import { Button } from '../../ui/button.tsx';
import { useFaultAt } from './draft-context.ts';
import { controlId } from './draft-faults.ts';
import { labelOf } from './draft-field-props.ts';
import type { DraftFieldProps } from './draft-field-props.ts';
import { blankPayload, rowsOf } from './draft-values.ts';

type Props = DraftFieldProps<'rows'> & { /** Draws one box of a row. */ readonly cell: (props: DraftFieldProps) => ReactNode };

type Removed = { readonly row: LoosePayload; readonly place: number };

/** A list of rows, each with its own boxes: added at the end, moved, taken out, and put back if that was a slip. */
export function RowsField({ field, path, value, onChange, cell }: Props) {
  const rows = rowsOf(value);
  const fault = useFaultAt(path);
  const [removed, setRemoved] = useState<Removed | null>(null);
  const { box, focusNext } = useFocusAfter();
  const set = (next: readonly LoosePayload[]): void => onChange([...next]);

  const add = (): void => {
    set([...rows, blankPayload(field.columns)]);
    focusNext(`#${controlId([...path, rows.length, field.columns[0]?.key ?? ''])}`);
  };
  const remove = (place: number): void => {
    const row = rows[place];
    if (row === undefined) return;
    set(rows.toSpliced(place, 1));
    setRemoved({ row, place });
    focusNext('[data-undo]');
  };
  const undo = ({ row, place }: Removed): void => {
    set(rows.toSpliced(place, 0, row));
    setRemoved(null);
    focusNext(`#${controlId([...path, place, field.columns[0]?.key ?? ''])}`);
  };
  const move = (place: number, by: -1 | 1): void => {
    const row = rows[place];
    if (row === undefined) return;
    set(rows.toSpliced(place, 1).toSpliced(place + by, 0, row));
    setRemoved(null);
    focusNext(`[data-row="${place + by}"]`);
  };

  return (
    <fieldset ref={box} id={controlId(path)} tabIndex={-1} className="mb-6 min-w-0 outline-none">
      <legend className="text-slag">{labelOf(field)}</legend>
      <p className={`min-h-6 text-[15px] leading-6 ${fault === null ? 'text-slag' : 'font-semibold text-scale'}`}>{fault ?? field.hint}</p>
      <ol>
        {rows.map((row, place) => (
          <li key={place} className="border-t border-rule py-3">
            <div className="flex flex-wrap items-center justify-between gap-x-4">
              <p className="font-semibold" data-row={place} tabIndex={-1}>
                {capital(field.row)} {place + 1}
              </p>
              <RowDeeds name={`${field.row} ${place + 1}`} isFirst={place === 0} isLast={place === rows.length - 1} onMove={(by) => move(place, by)} onRemove={() => remove(place)} />
            </div>
            <div className="grid gap-x-4 roomy:grid-cols-2">
              {field.columns.map((column) =>
                cell({
                  field: column,
                  path: [...path, place, column.key],
                  value: row[column.key],
                  onChange: (next) => set(rows.with(place, { ...row, [column.key]: next })),
                }),
              )}
            </div>
          </li>
        ))}
      </ol>
      {removed !== null && (
        <p role="status" className="mb-3 flex flex-wrap items-center gap-x-4 border-l-4 border-temper bg-bed px-3 py-1">
          {capital(field.row)} {removed.place + 1} was taken out.
          <button type="button" data-undo="" className="min-h-11 cursor-pointer text-temper underline" onClick={() => undo(removed)}>
            Put it back
          </button>
        </p>
      )}
      {rows.length < field.most && <Button onClick={add}>Add a {field.row}</Button>}
    </fieldset>
  );
}

type RowDeedsProps = {
  readonly name: string;
  readonly isFirst: boolean;
  readonly isLast: boolean;
  readonly onMove: (by: -1 | 1) => void;
  readonly onRemove: () => void;
};

const SMALL = 'min-h-11 min-w-11 cursor-pointer text-temper underline disabled:cursor-not-allowed disabled:text-slag disabled:no-underline';

function RowDeeds({ name, isFirst, isLast, onMove, onRemove }: RowDeedsProps) {
  return (
    <p className="flex gap-3 text-[15px]">
      {!(isFirst && isLast) && (
        <>
          <button type="button" className={SMALL} disabled={isFirst} onClick={() => onMove(-1)}>
            Up<span className="sr-only">: {name}</span>
          </button>
          <button type="button" className={SMALL} disabled={isLast} onClick={() => onMove(1)}>
            Down<span className="sr-only">: {name}</span>
          </button>
        </>
      )}
      <button type="button" className={SMALL} onClick={onRemove}>
        Take out<span className="sr-only">: {name}</span>
      </button>
    </p>
  );
}

/** Sets focus on something that is only there after the next drawing. */
function useFocusAfter() {
  const box = useRef<HTMLFieldSetElement>(null);
  const wanted = useRef<string | null>(null);
  useEffect(() => {
    if (wanted.current === null) return;
    box.current?.querySelector<HTMLElement>(wanted.current)?.focus();
    wanted.current = null;
  });
  return { box, focusNext: (selector: string) => (wanted.current = selector) };
}
