import type { ContributionPage } from '#contract/contributions.ts';
import { formOf } from '#contract/kinds.ts';
import { ProblemError } from '../../lib/problem-error.ts';
import { Button } from '../../ui/button.tsx';
import { Caution } from '../../ui/caution.tsx';
import { FailureNote } from '../../ui/failure-note.tsx';
import { Block, PageGrid } from '../../ui/page-grid.tsx';
import { CitationMargin } from './citation-margin.tsx';
import { citationNotes, notesBehind } from './citation-notes.ts';
import { DifferencesTable } from './differences-table.tsx';
import { PayloadList } from './payload-list.tsx';
import type { Forward } from './use-put-forward.ts';

type Props = {
  readonly contribution: ContributionPage;
  readonly onBack: () => void;
  readonly forward: Forward;
  /** All of it is saved, and nothing stands in its way. */
  readonly mayGo: boolean;
};

/** What the contribution changes, and the whole entry as it will stand, before it is put forward. */
export function DraftPreview({ contribution, onBack, forward, mayGo }: Props) {
  const { kind, payload, names, differences, inForce, citations, sources, note } = contribution;
  const form = formOf(kind);
  const notes = citationNotes(citations, sources);
  return (
    <PageGrid>
      {inForce !== null && (
        <Block heading="What it changes">
          <DifferencesTable differences={differences} isChange caption="What it changes" />
        </Block>
      )}
      <Block heading="The whole entry as it will stand" margin={<CitationMargin kind={kind} notes={notes} />}>
        <PayloadList kind={kind} payload={payload} names={names} notesOf={(field) => notesBehind(notes, field)} />
        {form.caution !== undefined && (
          <div className="mt-5 max-w-measure">
            <Caution title={form.caution.title}>{form.caution.text}</Caution>
          </div>
        )}
      </Block>
      {note !== null && (
        <Block heading="A word to the moderators">
          <p className="max-w-measure whitespace-pre-line wrap-anywhere">{note}</p>
        </Block>
      )}
      <Block margin={<p className="text-[15px] leading-snug text-slag">Once put forward it waits in the queue of whoever moderates this maker. You can take it back until it is decided.</p>}>
        {forward.isError && !isOfFields(forward.error) && (
          <div className="mb-4">
            <FailureNote error={forward.error} onAgain={() => forward.mutate()} />
          </div>
        )}
        <div className="flex flex-wrap gap-3">
          <Button weight="primary" disabled={forward.isPending || !mayGo} onClick={() => forward.mutate()}>
            Put forward
          </Button>
          <Button onClick={onBack}>Go on writing</Button>
        </div>
        {!mayGo && <p className="mt-2 text-[15px] text-slag">Not everything of it is saved and settled yet.</p>}
      </Block>
    </PageGrid>
  );
}

function isOfFields(error: Error): boolean {
  return error instanceof ProblemError && error.kind === 'invalid';
}
