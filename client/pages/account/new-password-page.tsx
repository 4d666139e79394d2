import { useState } from 'react';
import { useSearchParams } from 'react-router-dom';
import { resetPassword } from '#contract/accounts.ts';
import { DeadLink, isDeadLink } from '../../features/people/dead-link.tsx';
import { FormPage } from '../../features/people/form-page.tsx';
import { FormTrouble } from '../../features/people/form-trouble.tsx';
import { NEW_PASSWORD_HINT } from '../../features/people/new-password-hint.ts';
import { Outcome } from '../../features/people/outcome.tsx';
import { PasswordField } from '../../features/people/password-field.tsx';
import { call } from '../../lib/call.ts';
import { paths } from '../../lib/paths.ts';
import { useContractForm } from '../../lib/use-contract-form.ts';
import { Button, ButtonLink } from '../../ui/button.tsx';

const NewPasswordForm = resetPassword.body.pick({ password: true });

export function Component() {
  const token = useSearchParams()[0].get('token') ?? '';
  const [done, setDone] = useState(false);
  const form = useContractForm({
    schema: NewPasswordForm,
    fields: { password: 'Password' },
    send: ({ password }) => call(resetPassword, { body: { token, password } }),
    onDone: () => setDone(true),
  });
  return (
    <FormPage title="Choose a new password">
      {done ? (
        <Outcome title="The new password is set" action={<ButtonLink weight="primary" to={paths.signIn()}>Sign in</ButtonLink>}>
          <p>Every session of yours has ended. Sign in with the new password.</p>
        </Outcome>
      ) : token === '' || isDeadLink(form.act.error) ? (
        <DeadLink lasts="an hour" action={<ButtonLink to={paths.passwordForgotten()}>Ask for a new link</ButtonLink>} />
      ) : (
        <form {...form.form} className="max-w-[460px]">
          <FormTrouble form={form} title="The password was not set" />
          <PasswordField {...form.field('password')} label="New password" autoComplete="new-password" hint={NEW_PASSWORD_HINT} />
          <Button type="submit" weight="primary" disabled={form.busy} className="mt-2">
            Set the password
          </Button>
        </form>
      )}
    </FormPage>
  );
}
