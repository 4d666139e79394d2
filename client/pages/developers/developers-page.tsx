import type { QueryClient } from '@tanstack/react-query';
import { useSuspenseQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import type { LoaderFunction } from 'react-router-dom';
import { PROBLEM_KINDS, PROBLEMS, problemType } from '#contract/problem.ts';
import { BREAK_CHARACTERS, NOTATION } from '#domain/marks/reading.ts';
import { DataTable } from '../../ui/data-table.tsx';
import { Block, PageGrid } from '../../ui/page-grid.tsx';
import { PageTitle } from '../../ui/page-title.tsx';
import { PartingLine } from '../../ui/parting-line.tsx';
import { apiDescription, areaOf, operationsOf } from './api-description.ts';
import type { ApiOperation, JsonSchema } from './api-description.ts';
import { ExampleRequests } from './example-requests.tsx';
import { outlineSchema, sayType } from './schema-outline.ts';
import { SchemaLines, shapeId } from './schema-lines.tsx';

export function loader(queryClient: QueryClient): LoaderFunction {
  return () => queryClient.query({ ...apiDescription(), staleTime: 'static' });
}

const NOTATION_ROWS = [
  { written: 'A … Z, 0 … 9', means: 'this glyph; small letters are taken for capitals' },
  { written: '?', means: 'one glyph that can’t be read' },
  { written: '[OD]', means: 'one of these, equally likely; no ranges' },
  { written: '*', means: 'any number of glyphs broken or ground away, none included; once at most' },
  {
    written: Array.from(BREAK_CHARACTERS, (one) => (one === ' ' ? 'space' : one)).join('  '),
    means: 'a gap: a field of the date must end here',
  },
] as const;

export function Component() {
  const { data: description } = useSuspenseQuery(apiDescription());
  const operations = operationsOf(description);
  const areas = [...new Set(operations.map(areaOf))];
  const shapes = Object.entries(description.components.schemas).filter(([name]) => !name.startsWith('__'));
  return (
    <>
      <PageTitle title="For developers" below="The same answers as the pages give, over HTTP.">
        For developers
      </PageTitle>
      <PartingLine />
      <div className="pt-8">
        <PageGrid>
          <Block
            heading="How it speaks"
            margin={
              <p className="text-[15px] leading-snug text-slag">
                The whole description, for machines: <a href="/api/openapi.json">/api/openapi.json</a>, OpenAPI 3.1.
              </p>
            }
          >
            <ul className="max-w-measure list-disc space-y-2 pl-5">
              <li>
                JSON below <code className="font-mono">/api</code>. Public reads need no account.
              </li>
              <li>
                Days are ISO 8601 text, and both ends of a span are included. Null stands for an end not known or still open.
              </li>
              <li>Serials and the bounds of ranges travel as text: they can be larger than a JSON number carries.</li>
              <li>
                A list gives <code className="font-mono">items</code> and <code className="font-mono">next</code>: send{' '}
                <code className="font-mono">next</code> back as <code className="font-mono">after</code>. On the first page{' '}
                <code className="font-mono">total</code> counts them all.
              </li>
              <li>
                Every fact brings its <code className="font-mono">provenance</code>: version, who entered it, when, and its
                sources.
              </li>
            </ul>
          </Block>
          <Block heading="The mark notation">
            <DataTable
              caption="The mark notation"
              rows={NOTATION_ROWS}
              rowKey={({ written }) => written}
              columns={[
                {
                  key: 'written',
                  header: 'Written',
                  rowHeader: true,
                  cell: ({ written }) => <code className="font-mono">{written}</code>,
                },
                { key: 'means', header: 'means', bare: true, cell: ({ means }) => means },
              ]}
            />
            <p className="mt-3">A mark has at most {NOTATION.glyphs} glyphs.</p>
          </Block>
          <Block heading="Three questions">
            <ExampleRequests />
          </Block>
          <Block heading="Every operation">
            <div className="space-y-6">
              {areas.map((area) => (
                <section key={area} aria-label={area}>
                  <h3 className="font-mono font-bold">{area}</h3>
                  {operations
                    .filter((operation) => areaOf(operation) === area)
                    .map((operation) => (
                      <Operation key={operation.id} operation={operation} />
                    ))}
                </section>
              ))}
            </div>
          </Block>
          {shapes.length > 0 && (
            <Block heading="Shapes used in several places">
              <div className="space-y-5">
                {shapes.map(([name, schema]) => (
                  <section key={name} id={shapeId(name)} aria-label={name} className="scroll-mt-4 target:bg-bed">
                    <h3 className="mb-1 font-mono font-bold">{name}</h3>
                    <SchemaLines label={name} lines={outlineSchema(schema)} />
                  </section>
                ))}
              </div>
            </Block>
          )}
          <Block
            heading="When something is wrong"
            margin={
              <p className="text-[15px] leading-snug text-slag">
                Problems follow RFC 9457. <code className="font-mono">requestId</code> stands in our log too: quote it when you
                write to us.
              </p>
            }
          >
            <p className="mb-3 max-w-measure">
              The answer is <code className="font-mono">application/problem+json</code>. Its{' '}
              <code className="font-mono">type</code> is one of the addresses below, and where values are wrong,{' '}
              <code className="font-mono">errors</code> names each with its path.
            </p>
            <DataTable
              caption="Kinds of problem"
              rows={PROBLEM_KINDS}
              rowKey={(kind) => kind}
              columns={[
                {
                  key: 'kind',
                  header: 'Kind',
                  rowHeader: true,
                  cell: (kind) => (
                    <Link to={problemType(kind)} className="font-mono">
                      {kind}
                    </Link>
                  ),
                },
                { key: 'status', header: 'status', cell: (kind) => PROBLEMS[kind].status },
                { key: 'title', header: 'title', cell: (kind) => PROBLEMS[kind].title },
              ]}
            />
          </Block>
        </PageGrid>
      </div>
    </>
  );
}

function Operation({ operation }: { readonly operation: ApiOperation }) {
  const { id, method, path, summary, parameters, body, answer, problems } = operation;
  return (
    <details id={id} className="border-b border-rule">
      <summary className="flex min-h-11 cursor-pointer flex-wrap items-baseline gap-x-3 py-2">
        <span className="font-mono text-[15px] font-bold break-all underline decoration-1 underline-offset-4">
          {method} {path}
        </span>
        <span className="text-[15px] text-slag">{summary}</span>
      </summary>
      <div className="space-y-5 pb-5 pl-4">
        {parameters.length > 0 && (
          <DataTable
            caption="Parameters"
            captionShown
            rows={parameters}
            rowKey={({ name }) => name}
            columns={[
              { key: 'name', header: 'Name', rowHeader: true, cell: ({ name }) => <code className="font-mono">{name}</code> },
              { key: 'in', header: 'in', cell: (parameter) => `${parameter.in}${parameter.required ? '' : ', may be left out'}` },
              { key: 'type', header: 'type', cell: ({ schema }) => <ParameterType schema={schema} /> },
            ]}
          />
        )}
        {body !== undefined && <Shape heading="Body" label={`${id}, body`} schema={body} />}
        {answer !== undefined && <Shape heading="Answer" label={`${id}, answer`} schema={answer} />}
        <p className="text-[15px] text-slag">
          Problems:{' '}
          {problems.map((kind, place) => (
            <span key={kind}>
              {place > 0 && ', '}
              <span className="font-mono">{kind}</span>
            </span>
          ))}
        </p>
      </div>
    </details>
  );
}

function ParameterType({ schema }: { readonly schema: JsonSchema }) {
  const note = outlineSchema(schema)[0]?.note ?? '';
  return (
    <>
      <span className="font-mono text-[15px] break-words">{sayType(schema)}</span>
      {note !== '' && <span className="text-[15px] text-slag">; {note}</span>}
    </>
  );
}

function Shape({ heading, label, schema }: { readonly heading: string; readonly label: string; readonly schema: JsonSchema }) {
  return (
    <div>
      <p className="text-[19px] font-semibold">{heading}</p>
      <SchemaLines label={label} lines={outlineSchema(schema)} />
    </div>
  );
}
