import { useEffect, useRef } from 'react';
import type { ReactNode } from 'react';
import { Link } from 'react-router-dom';
import { paths } from '../../lib/paths.ts';
import { ProblemError } from '../../lib/problem-error.ts';
import { ButtonLink } from '../../ui/button.tsx';
import { EmptyState } from '../../ui/empty-state.tsx';
import { FailureNote } from '../../ui/failure-note.tsx';
import { Live } from '../../ui/live.tsx';
import { Block, PageGrid } from '../../ui/page-grid.tsx';
import { PageTitle } from '../../ui/page-title.tsx';
import { PartingLine } from '../../ui/parting-line.tsx';
import { changeSearch } from './list-search.ts';

export type ListAnswer<Row> = {
  readonly items: readonly Row[];
  readonly next: string | null;
  readonly total?: number | undefined;
};

/** What a list page knows of its query; the fields are those of `useQuery`. */
export type ListState<Row> = {
  readonly data: ListAnswer<Row> | undefined;
  readonly error: Error | null;
  readonly isPlaceholderData: boolean;
  readonly refetch: () => unknown;
};

type Props<Row> = {
  readonly title: string;
  /** Where the list belongs; the catalogue unless another place is said, null where it is a place of its own. */
  readonly above?: ReactNode;
  /** One and many of what is listed: `casting`, `castings`. */
  readonly noun: readonly [one: string, many: string];
  readonly below: string;
  readonly filters: ReactNode;
  /** Stands in the margin: what these things are, how to search them. */
  readonly aside: ReactNode;
  readonly state: ListState<Row>;
  readonly params: URLSearchParams;
  /** Whether a filter is set. */
  readonly narrowed: boolean;
  /** Why nothing can be asked yet; null when all filters can be read. */
  readonly waiting?: string | null;
  readonly table: (rows: readonly Row[] | null, stale: boolean) => ReactNode;
  /** Said when nothing is on record at all. */
  readonly empty: string;
  /** What to try when nothing matches. */
  readonly advice?: ReactNode;
  /** What can be done here besides looking, above the filters. */
  readonly deeds?: ReactNode;
  /** Offered where nothing is on record at all. */
  readonly firstStep?: ReactNode;
};

/** What helps in the catalogue, where marks are looked for. */
const LOOK_AGAIN = (
  <>
    Take one filter away, or put <code className="font-mono">?</code> for a glyph you are not sure of.
  </>
);

/** A list of the catalogue: filters, rows, pages. The address holds all of it. */
export function ListPage<Row>({
  title,
  above = <Link to={paths.catalogue()}>Catalogue</Link>,
  noun,
  below,
  filters,
  aside,
  state,
  params,
  narrowed,
  waiting = null,
  table,
  empty,
  advice = LOOK_AGAIN,
  deeds,
  firstStep,
}: Props<Row>) {
  const results = useFocusOnNewPage(params.get('after'));
  return (
    <>
      <PageTitle title={title} below={below} {...(above === null ? {} : { above })}>
        {title}
      </PageTitle>
      <PartingLine />
      <div className="pt-6">
        <PageGrid>
          <Block margin={<div className="space-y-3 text-[15px] leading-snug text-slag">{aside}</div>}>
            {deeds !== undefined && <div className="no-print mb-6 flex flex-wrap items-center gap-3">{deeds}</div>}
            <search className="no-print mb-4 block">
              <form onSubmit={(event) => event.preventDefault()} className="grid grid-cols-2 gap-x-4 wide:grid-cols-3">
                {filters}
              </form>
              {narrowed && (
                <Link to="?" preventScrollReset className="inline-flex min-h-11 items-center">
                  Take all filters away
                </Link>
              )}
            </search>
            <section ref={results} tabIndex={-1} aria-label={title} className="scroll-mt-4 outline-none">
              <Results {...{ noun, state, params, narrowed, waiting, table, empty, advice, firstStep }} />
            </section>
          </Block>
        </PageGrid>
      </div>
    </>
  );
}

type ResultsProps<Row> = Pick<Props<Row>, 'noun' | 'state' | 'params' | 'narrowed' | 'table' | 'empty'> & {
  readonly advice: ReactNode;
  readonly waiting: string | null;
  readonly firstStep: ReactNode;
};

function Results<Row>({ noun, state, params, narrowed, waiting, table, empty, advice, firstStep }: ResultsProps<Row>) {
  const { data, error, isPlaceholderData, refetch } = state;
  const [one, many] = noun;
  if (waiting !== null) return <EmptyState title="Not asked yet">{waiting}</EmptyState>;
  if (error !== null)
    return isLostPlace(error) ? <LostPlace params={params} /> : <FailureNote error={error} onAgain={() => void refetch()} />;
  if (data?.items.length === 0) {
    return narrowed ? (
      <EmptyState title={`No ${one} matches`} action={<ButtonLink to="?">Take all filters away</ButtonLink>}>
        Nothing on record is all of what you asked for. {advice}
        <Live>{`No ${one} matches`}</Live>
      </EmptyState>
    ) : (
      <EmptyState title={`No ${many} on record yet`} action={firstStep}>
        {empty}
      </EmptyState>
    );
  }
  const said = data === undefined || isPlaceholderData ? '' : sayCount(data, noun, narrowed);
  return (
    <>
      <p className="min-h-7 text-slag">{said}</p>
      <Live>{said}</Live>
      {table(data?.items ?? null, isPlaceholderData)}
      <Pages next={data?.next ?? null} params={params} />
    </>
  );
}

/** `150 castings`, `3 castings match`; on a later page, where the register does not count again, nothing. */
function sayCount({ total }: ListAnswer<unknown>, [one, many]: Props<unknown>['noun'], narrowed: boolean): string {
  if (total === undefined) return '';
  if (total === 1) return narrowed ? `1 ${one} matches` : `1 ${one}`;
  return narrowed ? `${total} ${many} match` : `${total} ${many}`;
}

function Pages({ next, params }: { readonly next: string | null; readonly params: URLSearchParams }) {
  const first = params.has('after') ? searchOf(changeSearch(params, {})) : null;
  if (next === null && first === null) return null;
  return (
    <nav aria-label="Pages of the list" className="no-print mt-6 flex flex-wrap gap-3">
      {next !== null && (
        <ButtonLink to={searchOf(changeSearch(params, { after: next }))} preventScrollReset>
          Next page
        </ButtonLink>
      )}
      {first !== null && (
        <ButtonLink to={first} preventScrollReset>
          First page
        </ButtonLink>
      )}
    </nav>
  );
}

function searchOf(params: URLSearchParams): string {
  return `?${params.toString()}`;
}

/** The cursor in the address is none of this list's: made for another order, or cut short when it was copied. */
function isLostPlace(error: Error): boolean {
  return error instanceof ProblemError && error.faults.some(({ path }) => path[0] === 'after');
}

function LostPlace({ params }: { readonly params: URLSearchParams }) {
  return (
    <EmptyState
      title="This place in the list is gone"
      action={<ButtonLink to={searchOf(changeSearch(params, {}))}>First page</ButtonLink>}
    >
      The address was cut short, or made for another order. Your filters are kept.
    </EmptyState>
  );
}

/** On another page of the list its rows take focus, so that reading goes on at their top. */
function useFocusOnNewPage(after: string | null) {
  const results = useRef<HTMLElement>(null);
  const last = useRef(after);
  useEffect(() => {
    if (last.current === after) return;
    last.current = after;
    results.current?.focus();
    results.current?.scrollIntoView();
  }, [after]);
  return results;
}
