import { useQuery } from '@tanstack/react-query';
import { Link, useParams } from 'react-router-dom';
import type { MarkPage } from '#contract/marks.ts';
import { parseReading } from '#domain/marks/reading.ts';
import type { Reading } from '#domain/marks/reading.ts';
import { NotFoundPage } from '../../app/error-page.tsx';
import { pathOfRef } from '../../features/contributions/path-of-ref.ts';
import { MarkDates } from '../../features/marks/mark-dates.tsx';
import { sayMarkKind } from '../../features/marks/mark-words.ts';
import { markPage } from '../../features/marks/marks-queries.ts';
import { WorkingOut } from '../../features/moderation/working-out.tsx';
import { paths } from '../../lib/paths.ts';
import { ProblemError } from '../../lib/problem-error.ts';
import { sayMoment } from '../../lib/say-date.ts';
import { DataTable } from '../../ui/data-table.tsx';
import { FailureNote } from '../../ui/failure-note.tsx';
import { MarkPlate } from '../../ui/mark-plate.tsx';
import { Block, PageGrid } from '../../ui/page-grid.tsx';
import { PageTitle } from '../../ui/page-title.tsx';
import { PartingLine } from '../../ui/parting-line.tsx';
import { Skeleton } from '../../ui/skeleton.tsx';
import { FactList } from '../catalogue/fact-list.tsx';

export function Component() {
  const { id = '' } = useParams();
  const { data: mark, error, refetch } = useQuery(markPage(id));
  if (mark !== undefined) return <Mark mark={mark} />;
  // An id that is none is nothing at an address, like one that no public mark has.
  if (error instanceof ProblemError && (error.kind === 'not-found' || error.kind === 'invalid')) return <NotFoundPage />;
  return (
    <>
      <PageTitle title="A mark on record">A mark on record</PageTitle>
      <PartingLine />
      <div className="pt-8">
        {error === null ? <Skeleton lines={6} label="Loading the mark" /> : <FailureNote error={error} onAgain={() => void refetch()} />}
      </div>
    </>
  );
}

function Mark({ mark }: { readonly mark: MarkPage }) {
  const { reading, readings, dates, workingOut, maker, kind } = mark;
  const plate = plateOf(reading);
  return (
    <>
      <PageTitle
        title={reading === null ? 'A mark not read yet' : `Mark ${reading}`}
        above={maker === null ? 'A mark on record' : <Link to={paths.maker(maker.slug)}>{maker.name}</Link>}
        below={sayMarkKind(mark)}
      >
        {plate === null ? (reading ?? 'Not read yet') : <MarkPlate reading={plate} size="line" />}
      </PageTitle>
      <PartingLine />
      <div className="pt-8">
        <PageGrid>
          {kind === 'date-code' && (
            <Block heading="What it can mean" margin={<p className="text-[14px] leading-[1.45] text-slag">A date can only show that a part could have been there.</p>}>
              {workingOut ? (
                <WorkingOut>Its dates stand here again once that is done.</WorkingOut>
              ) : dates === null ? (
                <p className="text-slag">Nobody has read it yet, so there is nothing to date.</p>
              ) : (
                <MarkDates dates={dates} />
              )}
            </Block>
          )}
          <Block heading="Where it was found">
            <Found mark={mark} />
          </Block>
          <Block heading="As it was read">
            <DataTable
              caption="Readings"
              rows={readings}
              rowKey={({ by, at }) => `${by} ${at}`}
              empty={<p className="border-y border-rule py-4 text-slag">Nobody has read it yet.</p>}
              columns={[
                { key: 'text', header: 'Read as', rowHeader: true, cell: ({ text }) => <ReadingText text={text} /> },
                { key: 'by', header: 'by', cell: ({ by }) => by },
                { key: 'at', header: 'on', cell: ({ at }) => sayMoment(at) },
              ]}
            />
          </Block>
        </PageGrid>
      </div>
    </>
  );
}

function Found({ mark: { casting, machine, maker } }: { readonly mark: MarkPage }) {
  const facts = [
    ...(casting === null ? [] : [{ name: 'Casting', value: <Link to={pathOfRef(casting)}>{casting.title}</Link> }]),
    ...(maker === null ? [] : [{ name: 'Maker', value: <Link to={paths.maker(maker.slug)}>{maker.name}</Link> }]),
    ...(machine === null
      ? []
      : [
          { name: 'Machine', value: <Link to={paths.model(machine.model.slug)}>{machine.model.name}</Link> },
          { name: 'Its serial', value: <span className="font-mono">{machine.serial}</span> },
        ]),
  ];
  return facts.length === 0 ? <p className="text-slag">On a part by itself, whose casting is not known.</p> : <FactList facts={facts} />;
}

function ReadingText({ text }: { readonly text: string }) {
  const plate = plateOf(text);
  return plate === null ? <span className="font-mono">{text}</span> : <MarkPlate reading={plate} size="line" />;
}

function plateOf(text: string | null): Reading | null {
  const parsed = text === null ? null : parseReading(text);
  return parsed?.ok ? parsed.value : null;
}
