import { useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { changePassword } from '#contract/accounts.ts';
import type { Me } from '#contract/people.ts';
import { call } from '../../lib/call.ts';
import { useContractForm } from '../../lib/use-contract-form.ts';
import { Button } from '../../ui/button.tsx';
import { ActTrouble } from './act-trouble.tsx';
import { FormTrouble } from './form-trouble.tsx';
import { NEW_PASSWORD_HINT } from './new-password-hint.ts';
import { Outcome } from './outcome.tsx';
import { PasswordField } from './password-field.tsx';
import { peopleKeys } from './people-queries.ts';

/** Another password, given the one in use. */
export function PasswordForm({ viewer }: { readonly viewer: Me }) {
  const queryClient = useQueryClient();
  const [done, setDone] = useState(false);
  const form = useContractForm({
    schema: changePassword.body,
    fields: { password: 'Password in use', newPassword: 'New password' },
    send: (body) => call(changePassword, { body }),
    onDone: () => {
      setDone(true);
      void queryClient.invalidateQueries({ queryKey: peopleKeys.sessions });
    },
  });
  if (done) return <Outcome title="The password was changed">Every other session of yours has ended, and a letter says so.</Outcome>;
  return (
    <>
      <ActTrouble act={form.act} proofOnly />
      <form {...form.form}>
        <FormTrouble form={form} title="The password was not changed" />
        {/* Tells a password manager whose password this is. */}
        <input type="text" autoComplete="username" defaultValue={viewer.email} hidden readOnly />
        <PasswordField {...form.field('password')} label="Password in use" autoComplete="current-password" />
        <PasswordField {...form.field('newPassword')} label="New password" autoComplete="new-password" hint={NEW_PASSWORD_HINT} />
        <Button type="submit" disabled={form.busy}>
          Change the password
        </Button>
      </form>
    </>
  );
}
