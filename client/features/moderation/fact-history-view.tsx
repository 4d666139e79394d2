import { useQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import { readFactHistory } from '#contract/facts.ts';
import type { FactHistory } from '#contract/facts.ts';
import { NotFoundPage } from '../../app/error-page.tsx';
import { addressOf } from '../../lib/call.ts';
import { paths } from '../../lib/paths.ts';
import { ProblemError } from '../../lib/problem-error.ts';
import { ButtonLink } from '../../ui/button.tsx';
import { FailureNote } from '../../ui/failure-note.tsx';
import { Block, PageGrid } from '../../ui/page-grid.tsx';
import { PageTitle } from '../../ui/page-title.tsx';
import { PartingLine } from '../../ui/parting-line.tsx';
import { Skeleton } from '../../ui/skeleton.tsx';
import { historyOfFact } from '../contributions/contributions-queries.ts';
import { InlineStep } from '../people/inline-step.tsx';
import { pathOfFact, sayFactKind } from '../sources/say-source.ts';
import { RetireForm } from './history-deeds.tsx';
import { HistoryStep } from './history-step.tsx';
import { WorkingOut } from './working-out.tsx';

/** Every version of a fact, newest first, whatever its kind; a retired one's too. */
export function FactHistoryView({ id }: { readonly id: string }) {
  const { data: history, error, refetch } = useQuery(historyOfFact(id));
  if (history !== undefined) return <View history={history} />;
  // An id that is none is nothing at an address, like one that no fact has.
  if (error instanceof ProblemError && (error.kind === 'not-found' || error.kind === 'invalid')) return <NotFoundPage />;
  return (
    <>
      <PageTitle title="History">What changed</PageTitle>
      <PartingLine />
      <div className="pt-8">
        {error === null ? <Skeleton lines={8} label="Loading the history" /> : <FailureNote error={error} onAgain={() => void refetch()} />}
      </div>
    </>
  );
}

function View({ history }: { readonly history: FactHistory }) {
  const { fact, inForce, steps, workingOut, can } = history;
  const page = inForce === null ? null : pathOfFact(fact);
  return (
    <>
      <PageTitle
        title={`History of ${fact.title}`}
        above={
          <>
            {page === null ? fact.title : <Link to={page}>{fact.title}</Link>} · {sayFactKind(fact.kind, 1).toLowerCase()}
          </>
        }
        below={
          inForce === null ? 'Retired: nothing of it is in force. Every version stays here.' : 'Nothing is overwritten: every version stays, newest first.'
        }
      >
        What changed
      </PageTitle>
      <PartingLine />
      <div className="pt-8">
        <PageGrid>
          {workingOut && <WorkingOut>Decodings and fits that rest on this are gone through; they are shown again once that is done.</WorkingOut>}
          <Block margin={<AsJson id={fact.id} />}>
            <div className="no-print flex flex-wrap items-start gap-3">
              {can.edit && inForce !== null && <ButtonLink to={paths.changeFact(fact.id)}>Put a change forward</ButtonLink>}
              {can.retire && inForce !== null && (
                <InlineStep label="Retire it">{(close) => <RetireForm history={history} inForce={inForce} onDone={close} />}</InlineStep>
              )}
            </div>
          </Block>
          {steps.map((step, place) => (
            <HistoryStep key={`${step.step} ${step.version}`} step={step} history={history} isFirst={place === steps.length - 1} />
          ))}
        </PageGrid>
      </div>
    </>
  );
}

function AsJson({ id }: { readonly id: string }) {
  return (
    <p className="no-print text-[15px] leading-snug">
      <a href={addressOf(readFactHistory.path, { id }, {})} className="inline-block py-2">
        The same for programs
      </a>
    </p>
  );
}
