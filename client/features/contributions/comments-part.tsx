import { useQueryClient } from '@tanstack/react-query';
import { commentOnContribution } from '#contract/contributions.ts';
import type { ContributionPage } from '#contract/contributions.ts';
import { formOf } from '#contract/kinds.ts';
import type { FactKind } from '#domain/vocabulary.ts';
import { call } from '../../lib/call.ts';
import { sayInstant } from '../../lib/say-instant.ts';
import { useContractForm } from '../../lib/use-contract-form.ts';
import { Button } from '../../ui/button.tsx';
import { CONTROL, Field } from '../../ui/field.tsx';
import { MarginNotes } from '../../ui/margin-notes.tsx';
import { SelectField } from '../../ui/select-field.tsx';
import { ActTrouble } from '../people/act-trouble.tsx';
import { FormTrouble } from '../people/form-trouble.tsx';
import { contributionPage } from './contributions-queries.ts';

/** What was said about a contribution, the oldest first, and a box to say more. */
export function CommentsPart({ contribution }: { readonly contribution: ContributionPage }) {
  const { kind, comments, can } = contribution;
  return (
    <>
      {comments.length === 0 ? (
        <p className="text-slag">Nothing has been said about it yet.</p>
      ) : (
        <ol aria-label="Comments" className="max-w-measure border-t border-graphite">
          {comments.map(({ id, author, at, path, text }) => (
            <li key={id} className="border-b border-rule py-3">
              <p className="text-[15px] text-slag">
                <span className="font-semibold text-graphite">{author.displayName}</span>
                {path !== null && `, on ${sayField(kind, path)}`} · <time dateTime={at}>{sayInstant(at)}</time>
              </p>
              <p className="whitespace-pre-line wrap-anywhere">{text}</p>
            </li>
          ))}
        </ol>
      )}
      {can.comment && <CommentForm contribution={contribution} />}
    </>
  );
}

function CommentForm({ contribution: { id, kind } }: { readonly contribution: ContributionPage }) {
  const queryClient = useQueryClient();
  const form = useContractForm({
    schema: commentOnContribution.body,
    fields: { path: 'About', text: 'Comment' },
    read: (data) => ({ path: data.get('path') === '' ? null : data.get('path'), text: data.get('text') }),
    send: (body) => call(commentOnContribution, { params: { id }, body }),
    onDone: (answer) => {
      form.clear();
      queryClient.setQueryData(contributionPage(id).queryKey, answer);
    },
  });
  const text = form.field('text');
  return (
    <form {...form.form} className="mt-4 max-w-measure">
      <ActTrouble act={form.act} proofOnly />
      <FormTrouble form={form} title="The comment was not written down" />
      <SelectField {...form.field('path')} label="About" className="max-w-[440px]">
        <option value="">All of it</option>
        {formOf(kind).fields.map(({ key, label }) => (
          <option key={key} value={key}>
            {label}
          </option>
        ))}
      </SelectField>
      <Field id={text.id} label="Comment" error={text.error}>
        {(control) => <textarea {...control} name={text.name} rows={3} className={CONTROL} />}
      </Field>
      <Button type="submit" disabled={form.busy}>
        Say it
      </Button>
    </form>
  );
}

/** What was said, beside the form it is about. */
export function CommentNotes({ contribution: { kind, comments } }: { readonly contribution: ContributionPage }) {
  return (
    <MarginNotes
      notes={comments.map(({ author, at, path, text }) => ({
        number: null,
        heading: path === null ? author.displayName : `${author.displayName}, on ${sayField(kind, path)}`,
        body: <span className="whitespace-pre-line wrap-anywhere">{text}</span>,
        fine: sayInstant(at),
      }))}
    />
  );
}

/** `number` → `casting number`, as the form calls it. */
function sayField(kind: FactKind, path: string): string {
  const [key] = path.split('.');
  return formOf(kind).fields.find((field) => field.key === key)?.label.toLowerCase() ?? path;
}
