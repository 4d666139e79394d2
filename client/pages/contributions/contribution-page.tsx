import { useQuery } from '@tanstack/react-query';
import { Link, useParams } from 'react-router-dom';
import type { ContributionPage } from '#contract/contributions.ts';
import { formOf } from '#contract/kinds.ts';
import { NotFoundPage } from '../../app/error-page.tsx';
import { AuthorDeeds } from '../../features/contributions/author-deeds.tsx';
import { CitationMargin } from '../../features/contributions/citation-margin.tsx';
import { citationNotes, notesBehind } from '../../features/contributions/citation-notes.ts';
import { CommentsPart } from '../../features/contributions/comments-part.tsx';
import { STATE_WORDS } from '../../features/contributions/contribution-words.ts';
import { contributionPage, historyOfFact } from '../../features/contributions/contributions-queries.ts';
import { DecisionPart } from '../../features/contributions/decision-part.tsx';
import { DecisionsList } from '../../features/contributions/decisions-list.tsx';
import { DifferencesTable } from '../../features/contributions/differences-table.tsx';
import { hasMovedOn } from '../../features/contributions/draft-panels.tsx';
import { EvidencePart } from '../../features/contributions/evidence-part.tsx';
import { MovedOnBlock } from '../../features/contributions/moved-on-block.tsx';
import { OpenWith } from '../../features/contributions/open-with.tsx';
import { pathOfRef } from '../../features/contributions/path-of-ref.ts';
import { PayloadList } from '../../features/contributions/payload-list.tsx';
import { WorkingOut } from '../../features/moderation/working-out.tsx';
import { paths } from '../../lib/paths.ts';
import { ProblemError } from '../../lib/problem-error.ts';
import { sayMoment } from '../../lib/say-date.ts';
import { capital } from '../../lib/say-number.ts';
import { Caution } from '../../ui/caution.tsx';
import { FailureNote } from '../../ui/failure-note.tsx';
import { Block, PageGrid } from '../../ui/page-grid.tsx';
import { PageTitle } from '../../ui/page-title.tsx';
import { PartingLine } from '../../ui/parting-line.tsx';
import { Skeleton } from '../../ui/skeleton.tsx';

/** One contribution, for its author, for whoever decides on it and, once it is entered, for everybody. */
export function Component() {
  const { id = '' } = useParams();
  return <ContributionOf key={id} id={id} />;
}

function ContributionOf({ id }: { readonly id: string }) {
  const { data, error, refetch } = useQuery(contributionPage(id));
  if (data !== undefined) return <Contribution contribution={data} />;
  if (error instanceof ProblemError && (error.kind === 'not-found' || error.kind === 'invalid')) return <NotFoundPage />;
  return <div className="pt-8">{error === null ? <Skeleton lines={8} label="Loading the contribution" /> : <FailureNote error={error} onAgain={() => void refetch()} />}</div>;
}

function Contribution({ contribution }: { readonly contribution: ContributionPage }) {
  const { kind, title, subject, author, maker, payload, citations, sources, names, differences, base, note, comments, decisions, can } = contribution;
  const form = formOf(kind);
  const notes = citationNotes(citations, sources);
  const isChange = base !== null;
  return (
    <>
      <PageTitle
        title={`${title}: a contribution`}
        above={
          <>
            {isChange ? `Change of a ${form.name.toLowerCase()}` : `New ${form.name.toLowerCase()}`}
            {maker !== null && (
              <>
                {' '}
                · <Link to={paths.maker(maker.slug)}>{maker.name}</Link>
              </>
            )}
          </>
        }
        below={
          <>
            {capital(STATE_WORDS[contribution.state])}. From <Link to={paths.contributor(author.id)}>{author.displayName}</Link>, {sayWhen(contribution)}.
          </>
        }
      >
        {title}
      </PageTitle>
      <PartingLine />
      <div className="pt-8">
        {can.decide && <OpenWith contribution={contribution} />}
        <WorkUnderWay contribution={contribution} />
        <PageGrid>
          {hasMovedOn(contribution) && isOpen(contribution) && <MovedOnBlock contribution={contribution} />}
          {isChange && (
            <Block heading="What it changes">
              <DifferencesTable differences={differences} isChange caption="What it changes" />
            </Block>
          )}
          <Block
            heading={isChange ? 'The whole entry' : 'What it says'}
            margin={
              <>
                <CitationMargin kind={kind} notes={notes} />
                {subject !== null && (
                  <p className="border-t border-rule pt-3 text-[15px] leading-snug">
                    <Link to={pathOfRef(subject)} className="inline-block py-2">
                      The entry in the catalogue
                    </Link>
                    <br />
                    <Link to={paths.factHistory(subject.id)} className="inline-block py-2">
                      Every version of it
                    </Link>
                  </p>
                )}
              </>
            }
          >
            <PayloadList kind={kind} payload={payload} names={names} notesOf={(field) => notesBehind(notes, field)} />
            {form.caution !== undefined && (
              <div className="mt-5 max-w-measure">
                <Caution title={form.caution.title}>{form.caution.text}</Caution>
              </div>
            )}
          </Block>
          {note !== null && (
            <Block heading={`A word from ${author.displayName}`}>
              <p className="max-w-measure whitespace-pre-line wrap-anywhere">{note}</p>
            </Block>
          )}
          {can.seeEvidence && (
            <Block
              heading="What the record says"
              margin={<p className="text-[15px] leading-snug text-slag">Counted from the register as it stands. It weighs nothing: whoever decides, decides.</p>}
            >
              <EvidencePart contribution={contribution} />
            </Block>
          )}
          {(can.comment || comments.length > 0) && (
            <Block heading="Comments">
              <CommentsPart contribution={contribution} />
            </Block>
          )}
          {decisions.length > 0 && (
            <Block heading="What was decided">
              <DecisionsList contribution={contribution} />
            </Block>
          )}
          {(can.decide || can.seeEvidence) && <DecisionBlock contribution={contribution} />}
          {(can.edit || can.withdraw) && (
            <Block heading="Yours to do">
              <AuthorDeeds contribution={contribution} />
            </Block>
          )}
        </PageGrid>
      </div>
    </>
  );
}

/** Its own component for good, so that what a decision was refused for stays in sight when nothing is left to decide. */
function DecisionBlock({ contribution }: { readonly contribution: ContributionPage }) {
  return (
    <Block {...(contribution.can.decide ? { heading: 'Decide' } : {})}>
      <DecisionPart contribution={contribution} />
    </Block>
  );
}

function sayWhen({ putForwardAt, changedAt }: ContributionPage): string {
  return putForwardAt === null ? `last changed ${sayMoment(changedAt)}` : `put forward ${sayMoment(putForwardAt)}`;
}

function isOpen({ state }: ContributionPage): boolean {
  return state === 'put-forward' || state === 'sent-back' || state === 'drafted';
}

/** While what rested on the entry is worked out anew, that is said and no half of it shown. */
function WorkUnderWay({ contribution: { subject, enteredVersion } }: { readonly contribution: ContributionPage }) {
  const { data } = useQuery(historyOfFact(enteredVersion === null ? null : (subject?.id ?? null)));
  return (
    data?.workingOut === true && (
      <div className="mb-8">
        <WorkingOut>Decodings and fits that rest on this are gone through; they are shown again once that is done.</WorkingOut>
      </div>
    )
  );
}
