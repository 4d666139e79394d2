import { useState } from 'react';
import type { ContributionPage } from '#contract/contributions.ts';
import { formOf } from '#contract/kinds.ts';
import type { FieldFault } from '#contract/problem.ts';
import { Caution } from '../../ui/caution.tsx';
import { ErrorSummary } from '../../ui/error-summary.tsx';
import type { SummaryFault } from '../../ui/error-summary.tsx';
import { CONTROL, Field } from '../../ui/field.tsx';
import { Block, PageGrid } from '../../ui/page-grid.tsx';
import { CitationsEditor } from './citations-editor.tsx';
import { CommentNotes } from './comments-part.tsx';
import { controlId, controlOf } from './draft-faults.ts';
import { DraftField } from './draft-field.tsx';
import type { DraftStore } from './draft-store.ts';
import type { Draft } from './draft-values.ts';

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

/** The whole form of a draft: what its kind asks for, its sources, and a word to the moderators. */
export function DraftForm({ contribution, draft, store, faults, tries }: FormProps) {
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
            hint="Whoever decides reads it first."
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
