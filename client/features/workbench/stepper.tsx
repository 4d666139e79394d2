import { useId } from 'react';

type Props = {
  readonly label: string;
  readonly value: number;
  readonly least: number;
  readonly most: number;
  readonly onStep: (by: -1 | 1) => void;
};

const STEP = 'grid size-11 cursor-pointer place-items-center rounded border border-edge bg-paper text-[22px] leading-none aria-disabled:cursor-not-allowed aria-disabled:text-edge';

/** A small number changed by one at a time, with a thumb or the keyboard. */
export function Stepper({ label, value, least, most, onStep }: Props) {
  const id = useId();
  const button = (by: -1 | 1) => {
    const atEnd = by < 0 ? value <= least : value >= most;
    return (
      <button type="button" className={STEP} aria-disabled={atEnd} onClick={() => !atEnd && onStep(by)}>
        <span aria-hidden="true">{by < 0 ? '−' : '+'}</span>
        <span className="sr-only">
          {label}: one {by < 0 ? 'fewer' : 'more'}
        </span>
      </button>
    );
  };
  return (
    <div role="group" aria-labelledby={id} className="flex items-center gap-2">
      <span id={id} className="min-w-16 text-slag">
        {label}
      </span>
      {button(-1)}
      <output className="min-w-6 text-center font-mono tabular-nums">{value}</output>
      {button(1)}
    </div>
  );
}
