import type { UseMutationResult } from '@tanstack/react-query';
import { useMemo, useState } from 'react';
import type { ReactNode } from 'react';
import type { FieldFault } from '#contract/problem.ts';
import { ProblemError } from '../../lib/problem-error.ts';
import type { SessionDraft } from '../../lib/session-draft.ts';
import { Button, ButtonLink } from '../../ui/button.tsx';
import { ErrorSummary } from '../../ui/error-summary.tsx';
import { Live } from '../../ui/live.tsx';
import { ActTrouble } from '../people/act-trouble.tsx';
import { withPhoto } from '../photos/photo-picker.tsx';
import { useUploads } from '../photos/use-uploads.ts';
import { summaryOf } from './form-faults.ts';
import type { PartDraft } from './part-draft.ts';
import { PartFields } from './part-fields.tsx';

type Checked<Body> = { readonly ok: true; readonly body: Body } | { readonly ok: false; readonly faults: readonly FieldFault[] };

type Props<Body, Answer> = {
  readonly draft: SessionDraft<PartDraft>;
  readonly isNew: boolean;
  readonly check: (draft: PartDraft) => Checked<Body>;
  readonly act: UseMutationResult<Answer, Error, Body>;
  /** What the button says, and the title of what is wrong. */
  readonly words: { readonly submit: string; readonly refused: string };
  readonly cancel: { readonly to: string; readonly text: string };
  /** Said above the form: what changed meanwhile. */
  readonly notice?: ReactNode;
};

/** The form of a part, new or to be changed: the draft is kept as it is typed, faults stand beside their fields and in a summary. */
export function PartForm<Body, Answer>({ draft, isNew, check, act, words, cancel, notice }: Props<Body, Answer>) {
  const { value, change, kept, drop } = draft;
  const [cleared, setCleared] = useState<PartDraft | null>(null);
  const [found, setFound] = useState<readonly FieldFault[]>([]);
  const [isEarly, setIsEarly] = useState(false);
  const uploads = useUploads(({ id }) => change((now) => ({ ...now, photoIds: [...withPhoto(now.photoIds, id)] })));
  const { error } = act;
  const faults = useMemo(() => (found.length > 0 ? found : error instanceof ProblemError ? error.faults : []), [found, error]);
  const summary = useMemo(() => summaryOf(faults), [faults]);
  const save = (): void => {
    act.reset();
    setIsEarly(uploads.underWay > 0);
    if (uploads.underWay > 0) return;
    const checked = check(value);
    setFound(checked.ok ? [] : checked.faults);
    if (checked.ok) act.mutate(checked.body);
  };
  const isConflict = error instanceof ProblemError && error.kind === 'conflict';
  return (
    <form
      noValidate
      onSubmit={(event) => {
        event.preventDefault();
        if (!act.isPending) save();
      }}
    >
      {faults.length > 0 && <ErrorSummary title={words.refused} faults={summary} />}
      {faults.length === 0 && !isConflict && act.isError && (
        <div className="mb-6">
          <ActTrouble act={act} />
        </div>
      )}
      {notice}
      <PartFields draft={value} change={change} uploads={uploads} faults={faults} isNew={isNew} />
      <div className="mt-8 flex flex-wrap items-center gap-3">
        <Button type="submit" weight="primary" disabled={act.isPending}>
          {words.submit}
        </Button>
        <ButtonLink to={cancel.to}>{cancel.text}</ButtonLink>
        {kept && (
          <>
            <Button
              onClick={() => {
                setCleared(value);
                drop();
              }}
            >
              Begin anew
            </Button>
            <p className="text-slag">Kept in this tab as you type</p>
          </>
        )}
      </div>
      {cleared !== null && !kept && (
        <p role="status" className="mt-3 flex flex-wrap items-center gap-3">
          What was typed is taken out.
          <Button onClick={() => change(() => cleared)}>Put it back</Button>
        </p>
      )}
      {isEarly && uploads.underWay > 0 && (
        <p role="alert" className="mt-3 font-semibold text-scale">
          {uploads.underWay === 1 ? 'One photo is' : `${uploads.underWay} photos are`} still being sent. Wait for it, or stop it above.
        </p>
      )}
      <Live>{act.isPending ? 'Saving' : ''}</Live>
    </form>
  );
}
