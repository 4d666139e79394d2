import { useState } from 'react';
import { changeEmail } from '#contract/accounts.ts';
import { call } from '../../lib/call.ts';
import { useContractForm } from '../../lib/use-contract-form.ts';
import { Button } from '../../ui/button.tsx';
import { TextField } from '../../ui/text-field.tsx';
import { ActTrouble } from './act-trouble.tsx';
import { AddressText } from './address-text.tsx';
import { FormTrouble } from './form-trouble.tsx';
import { Outcome } from './outcome.tsx';
import { PasswordField } from './password-field.tsx';

/** Another address, which counts once the link sent to it was followed. */
export function EmailForm() {
  const [asked, setAsked] = useState<string | null>(null);
  const form = useContractForm({
    schema: changeEmail.body,
    fields: { email: 'New address', password: 'Password' },
    send: (body) => call(changeEmail, { body }),
    onDone: (_answer, { email }) => setAsked(email),
  });
  if (asked !== null) {
    return (
      <Outcome title="A letter is on its way">
        <p>
          Follow the link in it within 24 hours. Until then your address stays as it was. It goes to <AddressText email={asked} />, and word
          of it to the old one.
        </p>
      </Outcome>
    );
  }
  return (
    <>
      <ActTrouble act={form.act} proofOnly />
      <form {...form.form}>
        <FormTrouble form={form} title="The address was not changed" />
        <TextField {...form.field('email')} type="email" label="New address" autoComplete="email" />
        <PasswordField {...form.field('password')} label="Your password" autoComplete="current-password" />
        <Button type="submit" disabled={form.busy}>
          Send the link
        </Button>
      </form>
    </>
  );
}
