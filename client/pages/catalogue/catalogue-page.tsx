import { useQuery } from '@tanstack/react-query';
import { useId, useState } from 'react';
import type { SubmitEvent } from 'react';
import { Link, useNavigate } from 'react-router-dom';
import { parseReading } from '#domain/marks/reading.ts';
import type { Reading } from '#domain/marks/reading.ts';
import { makersList } from '../../features/makers/makers-queries.ts';
import { MakersTable } from '../../features/makers/makers-table.tsx';
import { paths } from '../../lib/paths.ts';
import { capital } from '../../lib/say-number.ts';
import { Button } from '../../ui/button.tsx';
import { EmptyState } from '../../ui/empty-state.tsx';
import { FailureNote } from '../../ui/failure-note.tsx';
import { MarkPlate } from '../../ui/mark-plate.tsx';
import { Block, PageGrid } from '../../ui/page-grid.tsx';
import { PageTitle } from '../../ui/page-title.tsx';
import { PartingLine } from '../../ui/parting-line.tsx';
import { TextField } from '../../ui/text-field.tsx';
import { NotationHelp } from './notation-help.tsx';

/** `B?40*` */
const EXAMPLE: Reading = {
  glyphs: [
    { kind: 'sure', glyph: 'B' },
    { kind: 'unread' },
    { kind: 'sure', glyph: '4' },
    { kind: 'sure', glyph: '0' },
    { kind: 'run' },
  ],
  breaks: [],
};

const SHELVES = [
  { path: paths.castings(), name: 'Castings', holds: 'every casting number: what it is, how to tell it, where it belongs' },
  { path: paths.models(), name: 'Models', holds: 'checklists of positions, and serials with the days they were built' },
  { path: paths.partTypes(), name: 'Part types', holds: 'what a casting is, when no number is left on it' },
  { path: paths.ciphers(), name: 'Ciphers', holds: 'how each maker wrote its dates, worked through' },
  { path: paths.serialRanges(), name: 'Serial ranges', holds: 'numbers and dates, rival accounts side by side' },
  { path: paths.marks(), name: 'Record of marks', holds: 'what was read on parts, from which photo, and how sure it is' },
  { path: paths.sources(), name: 'Sources', holds: 'the books, drawings, plates and sightings it all rests on' },
] as const;

export function Component() {
  return (
    <>
      <PageTitle title="Catalogue" below="Every fact with its source, and who entered it.">
        The catalogue
      </PageTitle>
      <PartingLine />
      <div className="pt-8">
        <PageGrid>
          <Block
            heading="By the number cast into it"
            margin={
              <div className="space-y-3 text-[15px] leading-snug text-slag">
                <p className="font-semibold text-graphite">What can’t be read</p>
                <NotationHelp />
                <p>
                  Photograph a mark before you clean it. Old paint may hold lead, and a wire wheel blurs the letters for good.
                </p>
              </div>
            }
          >
            <NumberSearch />
          </Block>
          <Block heading="By its maker">
            <Makers />
          </Block>
          <Block heading="Or leaf through">
            <ul className="grid gap-x-10 roomy:grid-cols-2">
              {SHELVES.map(({ path, name, holds }) => (
                <li key={path} className="border-b border-rule py-2">
                  <Link to={path} className="inline-flex min-h-9 items-center font-semibold">
                    {name}
                  </Link>
                  <span className="block text-[15px] leading-snug text-slag">{holds}</span>
                </li>
              ))}
            </ul>
            <p className="mt-4 text-slag">
              Writing a program? <Link to={paths.developers()}>The same facts over HTTP</Link>.
            </p>
          </Block>
        </PageGrid>
      </div>
    </>
  );
}

/** A number in the mark notation, shown on a plate as it is typed; the castings that can carry it are the next page. */
function NumberSearch() {
  const [typed, setTyped] = useState('');
  const [fault, setFault] = useState<string | null>(null);
  const navigate = useNavigate();
  const field = useId();
  const reading = parseReading(typed);
  const search = (event: SubmitEvent) => {
    event.preventDefault();
    if (reading.ok) void navigate(paths.castings(`?number=${encodeURIComponent(typed.trim())}`));
    else setFault(typed.trim() === '' ? 'Type the number as you see it' : capital(reading.fault.message));
  };
  return (
    <search>
      <form onSubmit={search} className="grid gap-x-4 roomy:grid-cols-[minmax(0,20rem)_max-content] roomy:items-start" noValidate>
        <TextField
          id={field}
          type="search"
          label="Casting number"
          value={typed}
          onChange={(event) => {
            setTyped(event.target.value);
            setFault(null);
          }}
          autoComplete="off"
          autoCapitalize="characters"
          spellCheck={false}
          mono
          error={fault}
          hint="As you see it, gaps left out"
        />
        <Button type="submit" weight="primary" className="roomy:mt-[30px]">
          Find the casting
        </Button>
      </form>
      <div className="mt-3 min-h-32">
        {typed.trim() === '' ? (
          <>
            <MarkPlate reading={EXAMPLE} />
            <p className="mt-2 text-[15px] text-slag">
              For instance <code className="font-mono">B?40*</code>: the second can’t be read, and the end is broken away.
            </p>
          </>
        ) : (
          reading.ok && <MarkPlate reading={reading.value} />
        )}
      </div>
    </search>
  );
}

function Makers() {
  const { data, error, refetch } = useQuery(makersList({}));
  if (error !== null) return <FailureNote error={error} onAgain={() => void refetch()} />;
  if (data?.items.length === 0)
    return <EmptyState title="No makers on record yet">Makers and foundries will stand here.</EmptyState>;
  return (
    <>
      <MakersTable rows={data?.items ?? null} />
      {data !== undefined && data.next !== null && (
        <Link to={paths.makers()} className="mt-3 inline-flex min-h-11 items-center">
          All makers
        </Link>
      )}
    </>
  );
}
