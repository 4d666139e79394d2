import { useState } from 'react';
import { Link, useSearchParams } from 'react-router-dom';
import type { CipherPage } from '#contract/ciphers.ts';
import type { Candidate } from '#domain/ciphers/decoding.ts';
import { includesDay } from '#domain/dates/day-span.ts';
import { parseDay, writeDay } from '#domain/dates/day.ts';
import type { Day } from '#domain/dates/day.ts';
import { formatDay, formatSpan } from '#domain/dates/format-day.ts';
import { choiceOfDay, lifeOf, workDay } from '../../features/ciphers/worked-day.ts';
import type { WorkedDay } from '../../features/ciphers/worked-day.ts';
import { NOTHING_SAID, writeDecodeState } from '../../features/decode/decode-state.ts';
import { DIVISIONS_SHOWN, divisionsOf } from '../../features/decode/divisions.ts';
import { sayShare } from '../../features/decode/say-share.ts';
import { paths } from '../../lib/paths.ts';
import { dayFrom } from '../../lib/say-date.ts';
import { sayCount } from '../../lib/say-number.ts';
import { today as todayIso } from '../../lib/today.ts';
import { Icon } from '../../ui/icon.tsx';
import { Live } from '../../ui/live.tsx';
import { MarkPlate } from '../../ui/mark-plate.tsx';
import { TextField } from '../../ui/text-field.tsx';

/** Dates listed of a mark that can mean many. */
const DATES_SHOWN = 8;

/** A day of the cipher's life, written and read back in the page. Which day lives in the address; without one it is today's choice. */
export function WorkedDecode({ cipher }: { readonly cipher: CipherPage }) {
  const [params, setParams] = useSearchParams();
  const [today] = useState(() => dayFrom(todayIso()));
  const life = lifeOf(cipher.definition, today);
  if (life === null) return <p className="text-slag">The cipher is not in use yet, so there is no day to write.</p>;
  const asked = params.get('day');
  const parsed = asked === null ? null : parseDay(asked);
  const isAsked = parsed !== null && parsed.ok && includesDay(life, parsed.value);
  const day = isAsked ? parsed.value : choiceOfDay(today, life);
  const worked = workDay(cipher.definition, day, today);
  const first = writeDay(life.from);
  const last = writeDay(life.to);
  const choose = (iso: string) => {
    if (iso !== '') setParams({ day: iso }, { preventScrollReset: true, replace: params.has('day') });
  };
  return (
    <>
      <TextField
        key={isAsked ? 'asked' : 'chosen'}
        type="date"
        label="A day it was in use"
        className="no-print max-w-80"
        defaultValue={writeDay(day)}
        min={first}
        max={last}
        onChange={(event) => choose(event.target.value)}
        error={asked !== null && !isAsked ? `It was in use from ${formatDay(life.from)} to ${formatDay(life.to)}` : null}
        hint={
          isAsked ? (
            <Link to="?" preventScrollReset>
              Back to today’s choice
            </Link>
          ) : (
            'Today’s choice; take any other'
          )
        }
      />
      {worked !== null && <Worked {...{ cipher, worked }} />}
    </>
  );
}

function Worked({
  cipher,
  worked: { day, marks, reading, decoding },
}: {
  readonly cipher: CipherPage;
  readonly worked: WorkedDay;
}) {
  if (reading === null || decoding === null) return <p className="mt-3">The cipher has no symbols for {formatDay(day)}.</p>;
  const [mark = '', ...others] = marks;
  const candidates = decoding.candidates.map((candidate) => ({
    ...candidate,
    from: writeDay(candidate.from),
    to: writeDay(candidate.to),
    spans: [...candidate.spans],
  }));
  const dates = decoding.total === 1 ? 'one date' : `${decoding.total} dates`;
  const sayBack = `${formatDay(day)} is cast ${mark}. It reads back as ${dates}.`;
  return (
    <div className="mt-2 space-y-4">
      <Live>{sayBack}</Live>
      <p>
        On <strong>{formatDay(day)}</strong> a casting was marked
      </p>
      <MarkPlate reading={reading} divisions={divisionsOf(candidates).slice(0, DIVISIONS_SHOWN)} />
      <ReadBack day={day} candidates={decoding.candidates} total={decoding.total} />
      {others.length > 0 && (
        <p className="text-[15px] text-slag">
          The same day could also be cast{' '}
          {others.map((other, place) => (
            <span key={other}>
              {place > 0 && ', '}
              <span className="font-mono">{other}</span>
            </span>
          ))}
          .
        </p>
      )}
      <p className="no-print">
        <Link
          to={paths.decode(
            `?${writeDecodeState({ ...NOTHING_SAID, maker: cipher.maker.slug, cipher: cipher.slug, mark }).toString()}`,
          )}
          className="inline-flex min-h-11 items-center"
        >
          Take this mark to the decoder
        </Link>
      </p>
    </div>
  );
}

/** What a reader finds who has only the mark; the day it was cast is told from the others. */
function ReadBack({
  day,
  candidates,
  total,
}: {
  readonly day: Day;
  readonly candidates: readonly Candidate[];
  readonly total: number;
}) {
  const [only] = candidates;
  if (total === 1 && only !== undefined) {
    return (
      <p>
        and it can mean no other date: <strong>{formatSpan(only)}</strong>.
      </p>
    );
  }
  return (
    <div>
      <p>
        but who has only the mark can’t tell it from the {total === 2 ? 'other date' : `${sayCount(total - 1)} other dates`} it
        can mean:
      </p>
      <ul className="mt-1">
        {candidates.slice(0, DATES_SHOWN).map((candidate) => (
          <li
            key={`${candidate.from} ${candidate.to}`}
            className="flex flex-wrap items-baseline gap-x-4 border-b border-rule py-1.5"
          >
            <span className="min-w-48 font-semibold">{formatSpan(candidate)}</span>
            <span className="min-w-10 text-slag">{sayShare(candidate.share)}</span>
            {includesDay(candidate, day) && (
              <span className="inline-flex items-center gap-1.5 text-verdigris">
                <Icon name="check" /> the day above
              </span>
            )}
          </li>
        ))}
      </ul>
      {total > DATES_SHOWN && <p className="mt-2 text-[15px] text-slag">and {total - DATES_SHOWN} more.</p>}
    </div>
  );
}
