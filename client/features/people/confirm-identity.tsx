import { useQuery } from '@tanstack/react-query';
import { useEffect, useRef, useState } from 'react';
import { confirmIdentity } from '#contract/accounts.ts';
import { call } from '../../lib/call.ts';
import { useContractForm } from '../../lib/use-contract-form.ts';
import { Button } from '../../ui/button.tsx';
import { CodeField } from './code-field.tsx';
import { FormTrouble } from './form-trouble.tsx';
import { PasswordField } from './password-field.tsx';
import { me } from './people-queries.ts';

type Way = 'password' | 'authenticator';

type Props = { /** Called once proven: the act that was held up goes on. */ readonly onProven: () => void; readonly onGiveUp: () => void };

/** Asks once more who is at the page, in line, before an act that matters. */
export function ConfirmIdentity({ onProven, onGiveUp }: Props) {
  const [way, setWay] = useState<Way>('password');
  const hasAuthenticator = useQuery(me()).data?.secondFactors.authenticator ?? false;
  const heading = useRef<HTMLParagraphElement>(null);
  useEffect(() => heading.current?.focus(), []);
  const form = useContractForm({
    schema: confirmIdentity.body,
    fields: { password: 'Password', code: 'Code' },
    send: (body) => call(confirmIdentity, { body }),
    onDone: onProven,
  });
  return (
    <div role="group" aria-label="Prove once more who you are" className="my-4 max-w-[520px] border-l-4 border-temper bg-bed px-4 py-3">
      <p ref={heading} tabIndex={-1} className="font-semibold outline-none">
        Prove once more who you are
      </p>
      <p className="mb-3">It is more than ten minutes since you last did. What you asked for goes on after it.</p>
      <form {...form.form}>
        <FormTrouble form={form} title="Not proven yet" />
        <input type="hidden" name="way" value={way} />
        {way === 'password' ? (
          <PasswordField key="password" {...form.field('password')} label="Your password" autoComplete="current-password" />
        ) : (
          <CodeField key="code" {...form.field('code')} label="Code of now from your authenticator" />
        )}
        <div className="flex flex-wrap gap-3">
          <Button type="submit" disabled={form.busy}>
            Go on
          </Button>
          <Button onClick={onGiveUp}>Leave it</Button>
        </div>
        {hasAuthenticator && (
          <button type="button" className="mt-2 min-h-11 cursor-pointer text-temper underline" onClick={() => setWay(way === 'password' ? 'authenticator' : 'password')}>
            {way === 'password' ? 'Use a code from the authenticator' : 'Use the password'}
          </button>
        )}
      </form>
    </div>
  );
}
