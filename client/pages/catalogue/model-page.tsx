import type { QueryClient } from '@tanstack/react-query';
import { useSuspenseQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import type { LoaderFunction } from 'react-router-dom';
import type { BuildAnswer, ModelPage } from '#contract/models.ts';
import { FactActions } from '../../features/contributions/fact-actions.tsx';
import { modelPage } from '../../features/models/models-queries.ts';
import { sayMachineKind } from '../../features/models/models-table.tsx';
import { saySeries, serialRule } from '../../features/models/serial-rows.ts';
import type { SerialRule } from '../../features/models/serial-rows.ts';
import { paths } from '../../lib/paths.ts';
import { dayFrom, sayOpenSpan, saySpan } from '../../lib/say-date.ts';
import { NoteRef } from '../../ui/margin-notes.tsx';
import { Block, PageGrid } from '../../ui/page-grid.tsx';
import { PageTitle } from '../../ui/page-title.tsx';
import { PartingLine } from '../../ui/parting-line.tsx';
import { SourceLine } from '../../ui/source-line.tsx';
import { TimeRule } from '../../ui/time-rule.tsx';
import { ModelChecklist } from './model-checklist.tsx';
import { ModelSerials, serialFact } from './model-serials.tsx';
import { pageNotes, provenanceOfField } from './page-notes.ts';
import { SerialFinder, useSerial } from './serial-finder.tsx';
import { slugOf, useSlug } from './slug-param.ts';
import { sourceMargin, SourceNotes } from './source-notes.tsx';
import { VersionLinks } from './version-links.tsx';

export function loader(queryClient: QueryClient): LoaderFunction {
  return ({ params }) => queryClient.query({ ...modelPage(slugOf(params)), staleTime: 'static' });
}

export function Component() {
  const { data: model } = useSuspenseQuery(modelPage(useSlug()));
  const { serial, build } = useSerial(model.slug);
  const answered = serial === '' ? undefined : build.data;
  const notes = notesOf(model);
  const rule = withWindow(serialRule(model.series), answered);
  return (
    <>
      <PageTitle
        title={`${model.name}, ${model.maker.name}`}
        above={
          <>
            <Link to={paths.maker(model.maker.slug)}>{model.maker.name}</Link> · {sayMachineKind(model.kindOfMachine)}
          </>
        }
        below={
          <>
            Made {sayOpenSpan(model.made)}. {model.note}
            <NoteRef numbers={notes.numbersOf('model')} />
          </>
        }
      >
        {model.name}
      </PageTitle>
      <PartingLine />
      <div className="pt-8">
        <PageGrid>
          <Block
            heading="When was yours built?"
            margin={
              <>
                <SourceNotes notes={notes.beside('model')} />
                {answered !== undefined && <SourcesOfBuild build={answered} />}
                <VersionLinks version={model.provenance.version} history={paths.modelHistory(model.slug)} />
                <FactActions factId={model.id} />
              </>
            }
          >
            <SerialFinder {...{ model, serial, build }} />
          </Block>
          {model.series.map((one) => (
            <Block
              key={one.id}
              heading={model.series.length === 1 ? 'Serials' : `Serials, ${saySeries(one)}`}
              margin={
                <>
                  <SourceNotes notes={notes.beside(one.id)} />
                  <FactActions factId={one.id} name={`series ${saySeries(one)}`} />
                </>
              }
            >
              <ModelSerials series={one} numbersOf={notes.numbersOf} />
            </Block>
          ))}
          {rule !== null && (
            <Block heading="On the rule">
              <TimeRule title={`When ${model.name} serials were built`} {...rule} />
            </Block>
          )}
          <Block heading="Checklist" margin={sourceMargin(notes.beside('checklist'))}>
            <ModelChecklist
              positions={model.positions}
              notesOf={({ slug }) => notes.numbersOf(`position ${slug}`)}
              leadNotesOf={({ slug }) => notes.numbersOf(`lead ${slug}`)}
            />
            <p className="no-print mt-3">
              <Link to={paths.castings(`?model=${model.slug}`)} className="inline-flex min-h-11 items-center">
                Every casting that goes on it
              </Link>
            </p>
            <p className="no-print">
              <Link to={paths.contributeKind('position', `?modelId=${model.id}`)} className="inline-flex min-h-11 items-center">
                Put a position forward
              </Link>
            </p>
          </Block>
        </PageGrid>
      </div>
    </>
  );
}

function notesOf(model: ModelPage) {
  return pageNotes([
    { block: 'model', facts: [{ key: 'model', provenance: model.provenance }] },
    ...model.series.map((one) => ({
      block: one.id,
      facts: [
        ...one.ranges.map((range) => ({ key: serialFact.range(range), provenance: range.provenance })),
        ...one.anchors.map(({ number, provenance }) => ({ key: serialFact.anchor(one, number), provenance })),
      ],
    })),
    {
      block: 'checklist',
      facts: model.positions.flatMap(({ slug, lead, provenance }) => [
        { key: `position ${slug}`, provenance: provenanceOfField(provenance, 'name') },
        ...(lead === null ? [] : [{ key: `lead ${slug}`, provenance: provenanceOfField(provenance, 'lead') }]),
      ]),
    },
  ]);
}

/** What stands behind the answer to a serial. */
function SourcesOfBuild({ build: { serial, sources } }: { readonly build: BuildAnswer }) {
  return (
    <div className="text-[14px] leading-[1.45] text-slag">
      <p className="font-semibold text-graphite">Behind the answer for {serial.asStamped}</p>
      <ul className="mt-1 space-y-1">
        {sources.map((source) => (
          <li key={`${source.source.slug} ${source.locator ?? ''}`}>
            <SourceLine source={source} />
          </li>
        ))}
      </ul>
    </div>
  );
}

function withWindow(rule: SerialRule | null, build: BuildAnswer | undefined): SerialRule | null {
  if (rule === null || build === undefined || build.window === null) return rule;
  const span = { from: dayFrom(build.window.from), to: dayFrom(build.window.to) };
  const likely = build.likely === null ? {} : { likely: dayFrom(build.likely.day) };
  return {
    ...rule,
    lanes: [
      ...rule.lanes,
      { kind: 'window', name: `${build.serial.asStamped} built`, span, ...likely, label: saySpan(build.window) },
    ],
  };
}
