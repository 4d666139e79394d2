import { useQuery } from '@tanstack/react-query';
import { Link, useLocation } from 'react-router-dom';
import { flagFact } from '#contract/facts.ts';
import { call } from '../../lib/call.ts';
import { paths } from '../../lib/paths.ts';
import { useContractForm } from '../../lib/use-contract-form.ts';
import { Button } from '../../ui/button.tsx';
import { CONTROL, Field } from '../../ui/field.tsx';
import { ActTrouble } from '../people/act-trouble.tsx';
import { FormTrouble } from '../people/form-trouble.tsx';
import { Outcome } from '../people/outcome.tsx';
import { me } from '../people/people-queries.ts';

/** Tells the moderators that something is wrong with a fact, for those who don't know what would be right. */
export function FlagForm({ factId }: { readonly factId: string }) {
  const { pathname, search } = useLocation();
  const { data: viewer } = useQuery(me());
  const form = useContractForm({
    schema: flagFact.body,
    fields: { reason: 'What is wrong' },
    send: (body) => call(flagFact, { params: { id: factId }, body }),
  });
  if (form.act.isSuccess) return <Outcome title="Flagged">The moderators have it in their queue.</Outcome>;
  if (viewer === null) {
    return (
      <p>
        <Link to={paths.signIn(`${pathname}${search}`)}>Sign in</Link> to flag it, so that the moderators can ask you back.
      </p>
    );
  }
  const reason = form.field('reason');
  return (
    <form {...form.form} className="max-w-measure">
      <ActTrouble act={form.act} proofOnly />
      <FormTrouble form={form} title="It was not flagged" />
      <Field id={reason.id} label="What is wrong" hint="If you know what is right, put a change forward instead." error={reason.error}>
        {(control) => <textarea {...control} name={reason.name} rows={3} className={CONTROL} />}
      </Field>
      <Button type="submit" disabled={form.busy}>
        Tell the moderators
      </Button>
    </form>
  );
}
