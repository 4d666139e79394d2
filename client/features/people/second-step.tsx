import { useMutation } from '@tanstack/react-query';
import { useEffect, useRef, useState } from 'react';
import { giveSecondFactor } from '#contract/accounts.ts';
import type { SignInAnswer } from '#contract/accounts.ts';
import type { z } from 'zod';
import { call } from '../../lib/call.ts';
import type { ProblemError } from '../../lib/problem-error.ts';
import { useContractForm } from '../../lib/use-contract-form.ts';
import { Button } from '../../ui/button.tsx';
import { TextField } from '../../ui/text-field.tsx';
import { CodeField } from './code-field.tsx';
import { FormTrouble } from './form-trouble.tsx';
import type { Explanation } from './form-trouble.tsx';
import { signInWithPasskey } from './passkey-calls.ts';
import { PasskeyTrouble } from './passkey-trouble.tsx';

export type SignInState = z.infer<typeof SignInAnswer>;
export type SecondWay = Extract<SignInState, { state: 'second-factor' }>['ways'][number];

type Props = { readonly ways: readonly SecondWay[]; readonly onAnswer: (answer: SignInState) => void; readonly onStartAgain: () => void };

const ANOTHER: Readonly<Record<SecondWay, string>> = {
  authenticator: 'Use a code from the authenticator',
  passkey: 'Use a passkey',
  'recovery-code': 'Use a recovery code',
};

/** After the password: a code, a passkey or a recovery code, whichever the member has. */
export function SecondStep({ ways, onAnswer, onStartAgain }: Props) {
  const [way, setWay] = useState<SecondWay>(ways[0] ?? 'recovery-code');
  const lead = useRef<HTMLParagraphElement>(null);
  useEffect(() => lead.current?.focus(), []);
  return (
    <div className="max-w-[460px]">
      <p ref={lead} tabIndex={-1} className="mb-5 outline-none">
        The password is right. One more step shows that it is you.
      </p>
      {way === 'passkey' ? <PasskeyStep onAnswer={onAnswer} /> : <CodeStep key={way} way={way} onAnswer={onAnswer} />}
      <div className="mt-4 flex flex-col items-start">
        {ways
          .filter((other) => other !== way)
          .map((other) => (
            <button key={other} type="button" className="min-h-11 cursor-pointer text-temper underline" onClick={() => setWay(other)}>
              {ANOTHER[other]}
            </button>
          ))}
        <button type="button" className="min-h-11 cursor-pointer text-temper underline" onClick={onStartAgain}>
          Start again with another address
        </button>
      </div>
    </div>
  );
}

function CodeStep({ way, onAnswer }: Pick<Props, 'onAnswer'> & { readonly way: 'authenticator' | 'recovery-code' }) {
  const form = useContractForm({ schema: giveSecondFactor.body, fields: { code: 'Code' }, send: (body) => call(giveSecondFactor, { body }), onDone: onAnswer });
  return (
    <form {...form.form}>
      <FormTrouble form={form} title="Not signed in yet" explain={explain} />
      <input type="hidden" name="way" value={way} />
      {way === 'authenticator' ? (
        <CodeField {...form.field('code')} label="Six digits from your authenticator" />
      ) : (
        <TextField {...form.field('code')} mono label="Recovery code" autoComplete="off" autoCapitalize="characters" spellCheck={false} hint="It works once." />
      )}
      <Button type="submit" weight="primary" disabled={form.busy}>
        Sign in
      </Button>
    </form>
  );
}

function PasskeyStep({ onAnswer }: Pick<Props, 'onAnswer'>) {
  const use = useMutation({ mutationFn: signInWithPasskey, onSuccess: onAnswer, gcTime: 0 });
  return (
    <div className="space-y-4">
      <PasskeyTrouble act={use} />
      <Button weight="primary" disabled={use.isPending} onClick={() => use.mutate()}>
        {use.isPending ? 'Waiting for the device' : 'Use the passkey'}
      </Button>
    </div>
  );
}

function explain({ kind, faults }: ProblemError): Explanation | null {
  if (kind !== 'not-signed-in' || faults.length > 0) return null;
  return { title: 'Not signed in', advice: 'The code is not right, was used before, or the time for this step is over. Try once more, or start again.' };
}
