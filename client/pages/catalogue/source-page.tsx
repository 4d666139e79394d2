import type { QueryClient } from '@tanstack/react-query';
import { useSuspenseQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import type { LoaderFunction } from 'react-router-dom';
import { groupFacts, pathOfFact, sayFactKind, saySourceKind } from '../../features/sources/say-source.ts';
import { sourceHistory, sourcePage } from '../../features/sources/sources-queries.ts';
import { paths } from '../../lib/paths.ts';
import { sayMoment } from '../../lib/say-date.ts';
import { capital } from '../../lib/say-number.ts';
import { EmptyState } from '../../ui/empty-state.tsx';
import { Block, PageGrid } from '../../ui/page-grid.tsx';
import { PageTitle } from '../../ui/page-title.tsx';
import { PartingLine } from '../../ui/parting-line.tsx';
import { FactList } from './fact-list.tsx';
import { sayFieldName } from './payload-difference.ts';
import { slugOf, useSlug } from './slug-param.ts';
import { VersionLinks } from './version-links.tsx';

export function loader(queryClient: QueryClient): LoaderFunction {
  return async ({ params }) => {
    const slug = slugOf(params);
    await Promise.all([
      queryClient.query({ ...sourcePage(slug), staleTime: 'static' }),
      queryClient.query({ ...sourceHistory(slug), staleTime: 'static' }),
    ]);
    return null;
  };
}

export function Component() {
  const slug = useSlug();
  const { data: source } = useSuspenseQuery(sourcePage(slug));
  const { data: history } = useSuspenseQuery(sourceHistory(slug));
  const inForce = history.items.find((version) => version.inForce);
  return (
    <>
      <PageTitle
        title={source.title}
        above={<Link to={paths.sources()}>Sources</Link>}
        below={capital(saySourceKind(source.kind))}
      >
        {source.title}
      </PageTitle>
      <PartingLine />
      <div className="pt-8">
        <PageGrid>
          <Block
            heading="What it is"
            notes={
              inForce === undefined
                ? []
                : [{ number: null, body: '', fine: `Entered by ${inForce.enteredBy}, ${sayMoment(inForce.enteredAt)}.` }]
            }
            {...(inForce === undefined
              ? {}
              : { margin: <VersionLinks version={inForce.version} history={paths.sourceHistory(slug)} /> })}
          >
            <FactList
              facts={[
                ...source.details.map(({ name, value }) => ({ name: capital(name), value })),
                ...(source.note === null ? [] : [{ name: 'Note', value: source.note }]),
                { name: 'Stands behind', value: source.facts === 1 ? '1 fact' : `${source.facts} facts` },
              ]}
            />
          </Block>
          {source.behind.length === 0 && (
            <EmptyState title="No fact rests on it yet">Facts that name this source will be listed here.</EmptyState>
          )}
          {groupFacts(source.behind).map(({ kind, facts }) => (
            <Block key={kind} heading={sayFactKind(kind, facts.length)}>
              <ul>
                {facts.map((fact, place) => {
                  const path = pathOfFact(fact);
                  return (
                    <li
                      key={`${fact.slug ?? ''} ${place}`}
                      className="grid gap-x-6 border-b border-rule py-2 roomy:grid-cols-[minmax(0,1fr)_minmax(0,15rem)]"
                    >
                      <span>{path === null ? fact.title : <Link to={path}>{fact.title}</Link>}</span>
                      <span className="text-[15px] text-slag">
                        {[fact.field === null ? null : sayFieldName(fact.field), fact.locator]
                          .filter((part) => part !== null)
                          .join(', ')}
                      </span>
                    </li>
                  );
                })}
              </ul>
            </Block>
          ))}
        </PageGrid>
      </div>
    </>
  );
}
