import { useMemo, useState } from 'react';
import type { CompiledCipher } from '#domain/ciphers/compiled-cipher.ts';
import { parseDay, writeDay } from '#domain/dates/day.ts';
import type { Day } from '#domain/dates/day.ts';
import { formatDay, formatSpan } from '#domain/dates/format-day.ts';
import { parseReading } from '#domain/marks/reading.ts';
import { Live } from '../../ui/live.tsx';
import { MarkPlate } from '../../ui/mark-plate.tsx';
import { TextField } from '../../ui/text-field.tsx';
import { divisionOf, STEPS, stepped, stripOf } from './day-strip.ts';
import type { DaysWritten, Step } from './day-strip.ts';

type Props = {
  readonly compiled: CompiledCipher;
  readonly today: Day;
  readonly day: Day;
  readonly onDay: (day: Day) => void;
  /** The draft as typed is newer than what is drawn. */
  readonly stale: boolean;
};

const AROUND = 3;

/** Any day with the mark it would carry, and what comes before and after it. */
export function CalendarStrip({ compiled, today, day, onDay, stale }: Props) {
  const strip = useMemo(() => stripOf(compiled, day, AROUND, today), [compiled, day, today]);
  const inHand = strip[AROUND];
  return (
    <div className={stale ? 'is-stale-block' : ''}>
      <DayChoice key={day} day={day} onDay={onDay} />
      {inHand !== undefined && <InHand day={day} written={inHand} />}
      <ol aria-label="What comes before and after" className="mt-5 grid border-t border-graphite roomy:grid-cols-7">
        {strip.map((written) => (
          <Neighbour key={written.from} written={written} isInHand={written === inHand} onDay={onDay} />
        ))}
      </ol>
    </div>
  );
}

function DayChoice({ day, onDay }: { readonly day: Day; readonly onDay: (day: Day) => void }) {
  const [typed, setTyped] = useState(writeDay(day));
  return (
    <div className="grid gap-x-5 wide:grid-cols-[220px_minmax(0,1fr)]">
      <TextField
        type="date"
        label="Day"
        value={typed}
        onChange={({ target }) => {
          setTyped(target.value);
          const parsed = parseDay(target.value);
          if (parsed.ok) onDay(parsed.value);
        }}
      />
      <div role="group" aria-label="Another day" className="flex flex-wrap items-start gap-2 wide:pt-8">
        {STEPS.map((step) => (
          <span key={step} className="inline-flex">
            <StepButton step={step} by={-1} day={day} onDay={onDay} />
            <span aria-hidden="true" className="inline-flex min-h-11 items-center border-y border-edge px-2 text-[15px] text-slag">
              {step}
            </span>
            <StepButton step={step} by={1} day={day} onDay={onDay} />
          </span>
        ))}
      </div>
    </div>
  );
}

function StepButton({ step, by, day, onDay }: { readonly step: Step; readonly by: -1 | 1; readonly day: Day; readonly onDay: (day: Day) => void }) {
  return (
    <button
      type="button"
      onClick={() => onDay(stepped(day, step, by))}
      className="grid size-11 cursor-pointer place-items-center rounded border border-edge bg-paper text-[19px] hover:border-graphite"
    >
      <span aria-hidden="true">{by < 0 ? '‹' : '›'}</span>
      <span className="sr-only">
        A {step} {by < 0 ? 'earlier' : 'later'}
      </span>
    </button>
  );
}

function InHand({ day, written: { from, to, marks } }: { readonly day: Day; readonly written: DaysWritten }) {
  const [mark, ...others] = marks;
  const reading = mark === undefined ? null : parseReading(mark.text);
  if (mark === undefined || reading === null || !reading.ok) {
    return <p className="mt-4">{formatDay(day)} carries no mark: the cipher was not in use, or has no symbols for it.</p>;
  }
  return (
    <>
      <p className="mt-4 mb-2">
        On <strong className="font-semibold">{formatDay(day)}</strong>
        {from !== to && <>, as all through {formatSpan({ from, to })},</>} a casting would be marked
      </p>
      <MarkPlate reading={reading.value} divisions={[divisionOf(mark)]} />
      <Live>{`${formatDay(day)}: ${mark.text}`}</Live>
      {others.length > 0 && (
        <p className="mt-2 text-[15px] text-slag">
          or{' '}
          {others.map(({ text }, place) => (
            <span key={text}>
              {place > 0 && ', '}
              <span className="font-mono">{text}</span>
            </span>
          ))}
        </p>
      )}
    </>
  );
}

type NeighbourProps = { readonly written: DaysWritten; readonly isInHand: boolean; readonly onDay: (day: Day) => void };

function Neighbour({ written: { from, to, marks }, isInHand, onDay }: NeighbourProps) {
  const [mark] = marks;
  return (
    <li className="border-b border-rule roomy:border-r roomy:last:border-r-0">
      <button
        type="button"
        {...(isInHand ? { 'aria-current': 'date' } : {})}
        onClick={() => onDay(from)}
        className={`flex size-full min-h-11 cursor-pointer items-center gap-x-4 px-2 py-1.5 text-left roomy:flex-col roomy:items-start ${isInHand ? 'bg-bed' : 'hover:bg-bed'}`}
      >
        <span className={`w-36 shrink-0 text-[15px] leading-snug roomy:w-full roomy:grow ${isInHand ? 'font-semibold' : 'text-slag'}`}>{formatSpan({ from, to })}</span>
        <span className="font-mono wrap-anywhere">{mark?.text ?? '–'}</span>
      </button>
    </li>
  );
}
