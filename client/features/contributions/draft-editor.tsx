import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useEffect, useMemo, useRef, useState } from 'react';
import { Link, useNavigate, useSearchParams } from 'react-router-dom';
import { discardContribution } from '#contract/contributions.ts';
import type { ContributionPage } from '#contract/contributions.ts';
import { formOf } from '#contract/kinds.ts';
import type { FieldFault } from '#contract/problem.ts';
import { call } from '../../lib/call.ts';
import { paths } from '../../lib/paths.ts';
import { Button } from '../../ui/button.tsx';
import { Caution } from '../../ui/caution.tsx';
import { ErrorSummary } from '../../ui/error-summary.tsx';
import type { SummaryFault } from '../../ui/error-summary.tsx';
import { CONTROL, Field } from '../../ui/field.tsx';
import { Block, PageGrid } from '../../ui/page-grid.tsx';
import { PageTitle } from '../../ui/page-title.tsx';
import { PartingLine } from '../../ui/parting-line.tsx';
import { ActTrouble } from '../people/act-trouble.tsx';
import { InlineStep } from '../people/inline-step.tsx';
import { CitationsEditor } from './citations-editor.tsx';
import { CommentNotes } from './comments-part.tsx';
import { contributionKeys } from './contributions-queries.ts';
import { DraftSurroundingsProvider } from './draft-context.ts';
import type { DraftSurroundings } from './draft-context.ts';
import { controlId, controlOf, draftFaults } from './draft-faults.ts';
import { DraftField } from './draft-field.tsx';
import { ConflictPanel, hasMovedOn, MovedOnPanel } from './draft-panels.tsx';
import { DraftPreview } from './draft-preview.tsx';
import type { DraftStore } from './draft-store.ts';
import type { Draft } from './draft-values.ts';
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
    if (draftFaults(kind, store.state().draft, NONE).length > 0) setTries((before) => before + 1);
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
        {!isPreview && contribution.can.discard && <Discard id={id} store={store} />}
      </div>
    </DraftSurroundingsProvider>
  );
}

type FormProps = {
  readonly contribution: ContributionPage;
  readonly draft: Draft;
  readonly store: DraftStore;
  readonly faults: readonly FieldFault[];
  /** Grows with each attempt to go on, so that the summary takes focus again. */
  readonly tries: number;
};

/** Room below a control that has focus, for the line that stays at the foot of the screen. */
const CLEAR_OF_FOOT = '[&_:is(a,button,input,select,summary,textarea)]:scroll-mb-28';

function DraftForm({ contribution, draft, store, faults, tries }: FormProps) {
  const { kind, decisions, state, comments } = contribution;
  const form = formOf(kind);
  const last = decisions.at(-1);
  return (
    <div className={CLEAR_OF_FOOT}>
      {state === 'sent-back' && last !== undefined && (
        <div className="mb-8 max-w-measure border-l-4 border-temper bg-bed px-4 py-3">
          <p className="font-semibold">{last.by.displayName} sent it back</p>
          <p className="whitespace-pre-line wrap-anywhere">{last.reason}</p>
        </div>
      )}
      {form.caution !== undefined && (
        <div className="mb-8 max-w-measure">
          <Caution title={form.caution.title}>{form.caution.text}</Caution>
        </div>
      )}
      {tries > 0 && faults.length > 0 && <FaultSummary key={tries} contribution={contribution} draft={draft} faults={faults} />}
      <PageGrid>
        <Block heading="What it says" {...(comments.length === 0 ? {} : { margin: <CommentNotes contribution={contribution} /> })}>
          <div className="space-y-3">
            {form.fields.map((field) => (
              <div key={field.key} className={field.control === 'cipher' ? '' : 'max-w-[680px]'}>
                <DraftField
                  field={field}
                  path={['payload', field.key]}
                  value={draft.payload[field.key]}
                  onChange={(value) => store.change((now) => ({ ...now, payload: { ...now.payload, [field.key]: value } }))}
                />
              </div>
            ))}
          </div>
        </Block>
        <Block
          heading="Sources"
          margin={
            <p className="text-[15px] leading-snug text-slag">
              At least one. A book needs its page; what you saw yourself is a sighting; what you simply know is a source too, and says so.
            </p>
          }
        >
          <CitationsEditor form={form} citations={draft.citations} onChange={(citations) => store.change((now) => ({ ...now, citations }))} />
        </Block>
        <Block heading="A word to the moderators">
          <Field
            id={controlId(['note'])}
            className="max-w-[680px]"
            label="To the moderators (optional)"
            hint="Becomes the reason that stands with the version."
            error={faults.find(({ path }) => path[0] === 'note')?.message}
          >
            {(control) => (
              <textarea
                {...control}
                rows={3}
                className={CONTROL}
                value={draft.note ?? ''}
                onChange={({ target }) => store.change((now) => ({ ...now, note: target.value === '' ? null : target.value }))}
              />
            )}
          </Field>
        </Block>
      </PageGrid>
    </div>
  );
}

/** The faults as they stood when the author last tried to go on; takes focus then, and not with each letter that mends one. */
function FaultSummary({ contribution, draft, faults }: Pick<FormProps, 'contribution' | 'draft' | 'faults'>) {
  const [summary] = useState(() =>
    faults.map(({ path, message }): SummaryFault => {
      const control = controlOf(contribution.kind, draft, path);
      return control === null ? { message, controlId: null } : { message: `${control.label}: ${message}`, controlId: control.id };
    }),
  );
  return <ErrorSummary title="It can’t be put forward yet" faults={summary} />;
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

function Discard({ id, store }: { readonly id: string; readonly store: DraftStore }) {
  const queryClient = useQueryClient();
  const navigate = useNavigate();
  const discard = useMutation({
    mutationFn: () => call(discardContribution, { params: { id } }),
    onSuccess: () => {
      store.forget();
      queryClient.removeQueries({ queryKey: contributionKeys.page(id) });
      void queryClient.invalidateQueries({ queryKey: contributionKeys.mine });
      void navigate(paths.myContributions());
    },
  });
  return (
    <div className="mt-6">
      <InlineStep label="Throw the draft away">
        {(close) => (
          <>
            <p className="mb-3">It is gone for good then; nobody but you has seen it.</p>
            <ActTrouble act={discard} />
            <div className="flex flex-wrap gap-3">
              <Button disabled={discard.isPending} onClick={() => discard.mutate()}>
                Throw it away for good
              </Button>
              <Button onClick={close}>Keep it</Button>
            </div>
          </>
        )}
      </InlineStep>
    </div>
  );
}
