import { useQueryClient } from '@tanstack/react-query';
import { useNavigate } from 'react-router-dom';
import { closeAccount } from '#contract/accounts.ts';
import { call } from '../../lib/call.ts';
import { paths } from '../../lib/paths.ts';
import type { ProblemError } from '../../lib/problem-error.ts';
import { useContractForm } from '../../lib/use-contract-form.ts';
import { Button } from '../../ui/button.tsx';
import { ActTrouble } from './act-trouble.tsx';
import { leaveViewer } from './change-viewer.ts';
import { FormTrouble } from './form-trouble.tsx';
import type { Explanation } from './form-trouble.tsx';
import { PasswordField } from './password-field.tsx';

/** The end of an account, which can't be undone. */
export function CloseForm() {
  const queryClient = useQueryClient();
  const navigate = useNavigate();
  const form = useContractForm({
    schema: closeAccount.body,
    fields: { password: 'Password' },
    send: (body) => call(closeAccount, { body }),
    onDone: () => {
      void navigate(paths.accountClosed(), { replace: true });
      leaveViewer(queryClient);
    },
  });
  return (
    <>
      <p className="mb-3">This can’t be undone: nobody can bring the account back, and we can’t either.</p>
      <ActTrouble act={form.act} proofOnly />
      <form {...form.form}>
        <FormTrouble form={form} title="The account was not closed" explain={explain} />
        <PasswordField {...form.field('password')} label="Your password" autoComplete="current-password" />
        <Button type="submit" disabled={form.busy}>
          Close the account for good
        </Button>
      </form>
    </>
  );
}

/** Here a conflict is the last registrar’s: nobody would be left to look after the members. */
function explain({ kind, message }: ProblemError): Explanation | null {
  return kind === 'conflict' ? { title: 'The account was not closed', advice: message } : null;
}
