import { useEffect, useMemo, useRef, useState } from 'react';
import { Link, useSearchParams } from 'react-router-dom';
import type { ContributionPage } from '#contract/contributions.ts';
import { formOf } from '#contract/kinds.ts';
import type { FieldFault } from '#contract/problem.ts';
import { paths } from '../../lib/paths.ts';
import { Button } from '../../ui/button.tsx';
import { PageTitle } from '../../ui/page-title.tsx';
import { PartingLine } from '../../ui/parting-line.tsx';
import { DiscardDraft } from './discard-draft.tsx';
import { DraftSurroundingsProvider } from './draft-context.ts';
import type { DraftSurroundings } from './draft-context.ts';
import { draftFaults } from './draft-faults.ts';
import { DraftForm } from './draft-form.tsx';
import { ConflictPanel, hasMovedOn, MovedOnPanel } from './draft-panels.tsx';
import { DraftPreview } from './draft-preview.tsx';
import { SavingLine } from './saving-line.tsx';
import { useDraftStore } from './use-draft-store.ts';
import { usePutForward } from './use-put-forward.ts';

const NONE: readonly FieldFault[] = [];

/** A contribution while it is written: its form, and the preview before it is put forward. */
export function DraftEditor({ contribution }: { readonly contribution: ContributionPage }) {
  const { id, kind, subject, state } = contribution;
  const form = formOf(kind);
  const { draft, saving, store } = useDraftStore(contribution);
  const [wasTried, setWasTried] = useState(false);
  const [tries, setTries] = useState(0);
  const [names, setNames] = useState<Readonly<Record<string, string>>>({});
  const { isPreview, show } = usePreview();
  const faults = useMemo(
    () => (wasTried ? draftFaults(kind, draft, contribution.faults) : NONE),
    [wasTried, kind, draft, contribution.faults],
  );
  const forward = usePutForward(id, store, () => {
    setWasTried(true);
    setTries((before) => before + 1);
    show('form');
  });

  const surroundings: DraftSurroundings = {
    payload: draft.payload,
    subjectId: subject?.id ?? null,
    faults,
    nameOf: (wanted) => names[wanted] ?? [...contribution.names, ...contribution.sources].find((one) => one.id === wanted)?.title ?? null,
    learnName: (learned, name) => setNames((now) => ({ ...now, [learned]: name })),
  };
  const lookOver = async (): Promise<void> => {
    setWasTried(true);
    const isSaved = await store.flush();
    if (draftFaults(kind, store.state().draft, store.latest().faults).length > 0) setTries((before) => before + 1);
    else if (isSaved) show('preview');
  };
  const heading = subject === null ? `A new ${form.name.toLowerCase()}` : `A change to ${subject.title}`;

  return (
    <DraftSurroundingsProvider value={surroundings}>
      <PageTitle
        title={isPreview ? `Preview: ${heading}` : heading}
        above={
          <>
            <Link to={paths.contribute()}>Contribute</Link> · {state === 'sent-back' ? 'sent back to you' : 'draft'}
          </>
        }
        below={isPreview ? 'As it will be put forward.' : form.about}
      >
        {heading}
      </PageTitle>
      <PartingLine />
      <div className="pt-8">
        {saving.state === 'conflict' && <ConflictPanel theirs={saving.theirs} draft={draft} names={contribution.names} store={store} />}
        {saving.state !== 'conflict' && <MovedOnPanel contribution={contribution} draft={draft} store={store} />}
        {isPreview ? (
          <DraftPreview contribution={contribution} onBack={() => show('form')} forward={forward} mayGo={saving.state === 'saved' && !hasMovedOn(contribution)} />
        ) : (
          <DraftForm {...{ contribution, draft, store, faults, tries }} />
        )}
        {!isPreview && (
          <div className="sticky bottom-0 mt-8 flex flex-wrap items-center justify-between gap-x-6 gap-y-2 border-t border-rule bg-sand py-2">
            <SavingLine saving={saving} onAgain={() => void store.flush()} />
            <Button weight="primary" onClick={() => void lookOver()}>
              Look it over
            </Button>
          </div>
        )}
        {!isPreview && contribution.can.discard && <DiscardDraft id={id} store={store} />}
      </div>
    </DraftSurroundingsProvider>
  );
}

/** Whether the preview is shown stands in the address; going from one to the other begins at the heading again. */
function usePreview() {
  const [params, setParams] = useSearchParams();
  const isPreview = params.get('preview') === 'true';
  const last = useRef(isPreview);
  useEffect(() => {
    if (last.current === isPreview) return;
    last.current = isPreview;
    window.scrollTo({ top: 0 });
    if (isPreview) document.querySelector<HTMLElement>('[data-page-heading]')?.focus({ preventScroll: true });
  }, [isPreview]);
  return {
    isPreview,
    show: (view: 'form' | 'preview') => setParams(view === 'preview' ? { preview: 'true' } : {}, { preventScrollReset: true, replace: view === 'form' }),
  };
}
