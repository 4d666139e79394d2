import { useState } from 'react';
import { Link } from 'react-router-dom';
import { forgotPassword } from '#contract/accounts.ts';
import { AddressText } from '../../features/people/address-text.tsx';
import { FormPage } from '../../features/people/form-page.tsx';
import { FormTrouble } from '../../features/people/form-trouble.tsx';
import { Outcome } from '../../features/people/outcome.tsx';
import { call } from '../../lib/call.ts';
import { paths } from '../../lib/paths.ts';
import { useContractForm } from '../../lib/use-contract-form.ts';
import { Button } from '../../ui/button.tsx';
import { TextField } from '../../ui/text-field.tsx';

export function Component() {
  const [sentTo, setSentTo] = useState<string | null>(null);
  const form = useContractForm({
    schema: forgotPassword.body,
    fields: { email: 'E-mail address' },
    send: (body) => call(forgotPassword, { body }),
    onDone: (_answer, { email }) => setSentTo(email),
  });
  return (
    <FormPage
      title="Set a new password"
      aside={
        <p>
          It came back to you? <Link to={paths.signIn()}>Sign in</Link>.
        </p>
      }
    >
      {sentTo === null ? (
        <form {...form.form} className="max-w-[460px]">
          <p className="mb-5">We send a link to your address, with which you set a new one.</p>
          <FormTrouble form={form} title="No letter was sent" />
          <TextField {...form.field('email')} type="email" label="E-mail address" autoComplete="username" spellCheck={false} />
          <Button type="submit" weight="primary" disabled={form.busy} className="mt-2">
            Send the link
          </Button>
        </form>
      ) : (
        <Outcome title="A letter is on its way">
          <p>
            We wrote to <AddressText email={sentTo} />. The link in the letter works once, within an hour.
          </p>
          <p>Nothing there after a few minutes? Look among unwanted letters, then ask once more.</p>
        </Outcome>
      )}
    </FormPage>
  );
}
