import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { Link } from 'react-router-dom';
import { MarkText } from '#contract/decode.ts';
import { civilOf } from '#domain/dates/day.ts';
import { paths } from '../../lib/paths.ts';
import { dayFrom, sayOpenSpan } from '../../lib/say-date.ts';
import { ProblemError } from '../../lib/problem-error.ts';
import { useDraft } from '../../lib/use-draft.ts';
import { Button } from '../../ui/button.tsx';
import { FailureNote } from '../../ui/failure-note.tsx';
import { TextField } from '../../ui/text-field.tsx';
import { castingInHand, castingsByNumber } from './decode-queries.ts';
import type { DecodeState } from './decode-state.ts';
import type { ChangeState } from './use-decode-state.ts';

/** The casting's number, where it can be read: its years of production then stand on the rule, and narrow the dates only if asked to. */
export function CastingChoice({ state, change }: { readonly state: DecodeState; readonly change: ChangeState }) {
  return state.casting === null ? <CastingSearch state={state} change={change} /> : <CastingChosen state={state} change={change} slug={state.casting} />;
}

function CastingSearch({ state, change }: { readonly state: DecodeState; readonly change: ChangeState }) {
  const [settled, settle] = useState('');
  const [number, setNumber] = useDraft(settled, settle);
  const parsed = MarkText.safeParse(settled);
  const castings = useQuery(castingsByNumber(parsed.success ? settled : null, state.maker));
  const found = settled === '' ? null : (castings.data?.items ?? null);
  return (
    <div className="no-print mt-4 max-w-measure">
      <TextField
        label="Casting number, if you can read it"
        mono
        value={number}
        onChange={(event) => setNumber(event.target.value.toUpperCase())}
        autoComplete="off"
        spellCheck={false}
        hint="Puts the years it was made on the rule. ? and [ ] work here too."
        error={settled === '' || parsed.success ? null : (parsed.error.issues[0]?.message ?? null)}
      />
      {castings.isError && <FailureNote error={castings.error} onAgain={() => void castings.refetch()} />}
      {found !== null && (
        <ul aria-label="Castings with this number">
          {found.map(({ slug, number: read, pattern, maker, partType, made }) => (
            <li key={slug} className="flex flex-wrap items-center justify-between gap-x-4 gap-y-1 border-b border-rule py-2">
              <span>
                <span className="font-mono">{read}</span> {pattern === null ? '' : `${pattern}, `}
                {partType.name.toLowerCase()}, {maker.name}
                <span className="block text-[15px] text-slag">{made === null ? 'Years not on record' : sayOpenSpan(made)}</span>
              </span>
              <Button onClick={() => change({ casting: slug })}>
                Use<span className="sr-only"> {read}</span>
              </Button>
            </li>
          ))}
          {found.length === 0 && <li className="py-2 text-slag">No casting with this number is on record.</li>}
        </ul>
      )}
    </div>
  );
}

function CastingChosen({ state, change, slug }: { readonly state: DecodeState; readonly change: ChangeState; readonly slug: string }) {
  const casting = useQuery(castingInHand(slug));
  if (casting.isError) {
    return (
      <>
        {casting.error instanceof ProblemError && casting.error.kind === 'not-found' ? (
          <p>No such casting is on record.</p>
        ) : (
          <FailureNote error={casting.error} onAgain={() => void casting.refetch()} />
        )}
        <Button className="mt-3" onClick={() => change({ casting: null })}>
          Leave the casting out
        </Button>
      </>
    );
  }
  const made = casting.data?.made ?? null;
  const years = made === null ? null : { fromYear: yearOf(made.from), toYear: yearOf(made.to) };
  const kept = years !== null && years.fromYear === state.fromYear && years.toYear === state.toYear;
  return (
    <div className="mt-4 max-w-measure">
      <p>
        Casting <Link to={paths.casting(slug)} className="font-mono">{casting.data?.number ?? slug}</Link>
        {casting.data !== undefined && `, ${casting.data.partType.name.toLowerCase()}, ${made === null ? 'years not on record' : `made ${sayOpenSpan(made)}`}`}.
      </p>
      <div className="mt-2 flex flex-wrap gap-3">
        {years !== null && <Button onClick={() => change(kept ? { fromYear: '', toYear: '' } : years)}>{kept ? 'Show dates outside those years' : 'Keep to those years'}</Button>}
        <Button onClick={() => change({ casting: null })}>Leave the casting out</Button>
      </div>
    </div>
  );
}

function yearOf(iso: string | null): string {
  return iso === null ? '' : String(civilOf(dayFrom(iso)).year);
}
