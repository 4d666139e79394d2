import { useState } from 'react';
import { Link } from 'react-router-dom';
import { signUp } from '#contract/accounts.ts';
import { AddressText } from '../../features/people/address-text.tsx';
import { FormPage } from '../../features/people/form-page.tsx';
import { FormTrouble } from '../../features/people/form-trouble.tsx';
import { NEW_PASSWORD_HINT } from '../../features/people/new-password-hint.ts';
import { Outcome } from '../../features/people/outcome.tsx';
import { PasswordField } from '../../features/people/password-field.tsx';
import { call } from '../../lib/call.ts';
import { paths } from '../../lib/paths.ts';
import { useContractForm } from '../../lib/use-contract-form.ts';
import { Button, ButtonLink } from '../../ui/button.tsx';
import { TextField } from '../../ui/text-field.tsx';

export function Component() {
  const [sentTo, setSentTo] = useState<string | null>(null);
  const form = useContractForm({
    schema: signUp.body,
    fields: { displayName: 'Name', email: 'E-mail address', password: 'Password' },
    send: (body) => call(signUp, { body }),
    onDone: (_answer, { email }) => setSentTo(email),
  });
  return (
    <FormPage
      title="Open an account"
      below="To enter what you know, and to keep your own machines."
      aside={
        <>
          <p>
            You have one already? <Link to={paths.signIn()}>Sign in</Link>.
          </p>
          <p>Nobody but registrars sees your address. You can close the account at any time, and take all that is on record about you with you.</p>
        </>
      }
    >
      {sentTo === null ? (
        <form {...form.form} className="max-w-[460px]">
          <FormTrouble form={form} title="The account is not open yet" />
          <TextField {...form.field('displayName')} label="Name" autoComplete="nickname" hint="Everybody sees it beside what you enter. It need not be your own." />
          <TextField {...form.field('email')} type="email" label="E-mail address" autoComplete="username" spellCheck={false} />
          <PasswordField {...form.field('password')} label="Password" autoComplete="new-password" hint={NEW_PASSWORD_HINT} />
          <Button type="submit" weight="primary" disabled={form.busy} className="mt-2">
            Open the account
          </Button>
        </form>
      ) : (
        <Outcome title="A letter is on its way" action={<ButtonLink to={paths.signIn()}>Go to sign in</ButtonLink>}>
          <p>
            We wrote to <AddressText email={sentTo} />. Follow the link in the letter within 24 hours; then you can sign in.
          </p>
          <p>Nothing there after a few minutes? Look among unwanted letters, or open the account again: a new link takes the old one’s place.</p>
        </Outcome>
      )}
    </FormPage>
  );
}
