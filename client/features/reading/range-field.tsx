import { useId } from 'react';

type Props = {
  readonly label: string;
  readonly value: number;
  readonly least: number;
  readonly most: number;
  readonly step: number;
  /** The value in words: shown beside the label and read out. */
  readonly said: string;
  readonly onChange: (value: number) => void;
};

/** A slider that says its value in words. */
export function RangeField({ label, value, least, most, step, said, onChange }: Props) {
  const id = useId();
  return (
    <div className="min-w-0">
      <label htmlFor={id} className="flex flex-wrap justify-between gap-x-3 text-[15px]">
        <span>{label}</span>
        <span aria-hidden="true" className="text-slag tabular-nums">
          {said}
        </span>
      </label>
      <input
        id={id}
        type="range"
        min={least}
        max={most}
        step={step}
        value={value}
        aria-valuetext={said}
        onChange={({ target }) => onChange(target.valueAsNumber)}
        className="block h-11 w-full cursor-pointer accent-oxide"
      />
    </div>
  );
}
