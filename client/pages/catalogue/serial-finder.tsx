import { useQuery } from '@tanstack/react-query';
import type { UseQueryResult } from '@tanstack/react-query';
import { useId, useState } from 'react';
import type { SubmitEvent } from 'react';
import { Link, useSearchParams } from 'react-router-dom';
import type { BuildAnswer, ModelPage } from '#contract/models.ts';
import { LIMITS } from '#contract/limits.ts';
import { sayStanding, saySubstitutions } from '../../features/decode/build-words.ts';
import { NOTHING_SAID, writeDecodeState } from '../../features/decode/decode-state.ts';
import { modelBuild } from '../../features/models/models-queries.ts';
import { saySeries } from '../../features/models/serial-rows.ts';
import { sayRangeDates, sayRangeStanding } from '../../features/serial-ranges/say-range.ts';
import { paths } from '../../lib/paths.ts';
import { ProblemError } from '../../lib/problem-error.ts';
import { sayDay, saySpan } from '../../lib/say-date.ts';
import { saySerials } from '../../lib/say-serials.ts';
import { Button, ButtonLink } from '../../ui/button.tsx';
import { FailureNote } from '../../ui/failure-note.tsx';
import { Live } from '../../ui/live.tsx';
import { Skeleton } from '../../ui/skeleton.tsx';
import { TextField } from '../../ui/text-field.tsx';

/** The serial the address holds, and what the register answers of it. */
export function useSerial(slug: string): { readonly serial: string; readonly build: UseQueryResult<BuildAnswer> } {
  const [params] = useSearchParams();
  const serial = (params.get('serial') ?? '').trim().slice(0, LIMITS.serial);
  return { serial, build: useQuery(modelBuild(slug, serial)) };
}

type Props = { readonly model: ModelPage; readonly serial: string; readonly build: UseQueryResult<BuildAnswer> };

/** A serial in, a build window out, in place. The serial lives in the address. */
export function SerialFinder({ model, serial, build }: Props) {
  const [, setParams] = useSearchParams();
  const [isEmpty, setEmpty] = useState(false);
  const field = useId();
  const submit = (event: SubmitEvent<HTMLFormElement>) => {
    event.preventDefault();
    const typed = new FormData(event.currentTarget).get('serial');
    const given = typeof typed === 'string' ? typed.trim() : '';
    setEmpty(given === '');
    if (given !== '') setParams({ serial: given }, { preventScrollReset: true });
  };
  const fault = isEmpty ? 'Type the serial as stamped' : faultOf(build.error);
  const example = model.series[0]?.ranges[0];
  return (
    <>
      <form
        onSubmit={submit}
        className="no-print grid gap-x-4 roomy:grid-cols-[minmax(0,20rem)_max-content] roomy:items-start"
        noValidate
      >
        <TextField
          key={serial}
          id={field}
          name="serial"
          label="Serial as stamped"
          defaultValue={serial}
          maxLength={LIMITS.serial}
          autoComplete="off"
          autoCapitalize="characters"
          spellCheck={false}
          mono
          error={fault}
          hint={
            example === undefined
              ? undefined
              : `Such as ${saySerials({ prefix: example.series.prefix, first: example.first, last: example.first })}`
          }
        />
        <Button type="submit" weight="primary" className="mb-2 roomy:mt-[30px]">
          Find when it was built
        </Button>
      </form>
      {serial !== '' && fault === null && <BuildResult {...{ model, build }} />}
    </>
  );
}

function faultOf(error: Error | null): string | null {
  return error instanceof ProblemError ? (error.faults.find(({ path }) => path[0] === 'serial')?.message ?? null) : null;
}

function BuildResult({ model, build: { data, error, refetch } }: Pick<Props, 'model' | 'build'>) {
  if (error !== null) return <FailureNote error={error} onAgain={() => void refetch()} />;
  if (data === undefined) return <Skeleton lines={3} label="Looking the serial up" />;
  const standing = sayStanding(data);
  const said = data.window === null ? (standing ?? 'No build window') : `Built ${saySpan(data.window)}`;
  return (
    <div className="mt-2 border-t border-graphite pt-4">
      <Live>{said}</Live>
      {data.window === null ? (
        <p className="max-w-measure text-[19px]">{standing}</p>
      ) : (
        <p className="text-[26px] leading-tight font-semibold">
          {saySpan(data.window)}
          {data.likely !== null && data.window.from !== data.window.to && (
            <span className="mt-1 block text-[17px] font-normal">
              Most likely about {sayDay(data.likely.day)}, if the shop kept an even pace.
            </span>
          )}
        </p>
      )}
      <p className="mt-2 max-w-measure">{[sayHolding(data), saySubstitutions(data)].filter((part) => part !== null).join(' ')}</p>
      <Rivals build={data} />
      {data.readsAlike.length > 0 && (
        <p className="mt-3 max-w-measure">
          The same glyphs are also a serial of{' '}
          {data.readsAlike.map(({ model: other, window }, place) => (
            <span key={other.slug}>
              {place > 0 && ', '}
              <Link to={`${paths.model(other.slug)}?serial=${encodeURIComponent(data.serial.asStamped)}`}>{other.name}</Link> (
              {saySpan(window)})
            </span>
          ))}
          . Make sure of the model.
        </p>
      )}
      {data.window !== null && (
        <p className="no-print mt-4">
          <ButtonLink
            to={paths.decode(
              `?${writeDecodeState({ ...NOTHING_SAID, maker: model.maker.slug, model: model.slug, serial: data.serial.asStamped }).toString()}`,
            )}
          >
            Hold a mark against it
          </ButtonLink>
        </p>
      )}
    </div>
  );
}

/** Whose range holds the number, where one does, and whether dated machines narrow it. */
function sayHolding({ accounts, range, window, serial: { prefix } }: BuildAnswer): string | null {
  const [own] = accounts;
  if (range === null || own === undefined) return null;
  const numbers = saySerials({ prefix, first: range.first, last: range.last });
  const isNarrowed = window !== null && (window.from !== range.dates.from || window.to !== range.dates.to);
  const dates = range.meaning === 'built' ? `built ${sayRangeDates(range)}` : sayRangeDates(range);
  return `By ${own.account.title}: ${numbers}, ${dates}.${isNarrowed ? ' Dated machines on either side narrow it.' : ''}`;
}

/** What accounts other than the register's reading say of the same number. */
function Rivals({ build: { accounts } }: { readonly build: BuildAnswer }) {
  const rivals = accounts.slice(1).flatMap((rival) => (rival.range === null ? [] : [{ ...rival, range: rival.range }]));
  if (rivals.length === 0) return null;
  return (
    <div className="mt-4">
      <p>That is the register’s reading. {rivals.length === 1 ? 'Another account says:' : 'Other accounts say:'}</p>
      <ul className="mt-1">
        {rivals.map(({ series, account, window, range }) => (
          <li key={`${series.id} ${account.id}`} className="border-b border-rule py-2">
            <span className="font-semibold">{window === null ? sayRangeDates(range) : saySpan(window)}</span>, {account.title}
            <span className="text-slag">
              {range.standing !== 'solid' && `, ${sayRangeStanding(range.standing)}`}
              {series.label !== null && ` (${saySeries(series)})`}
            </span>
          </li>
        ))}
      </ul>
    </div>
  );
}
