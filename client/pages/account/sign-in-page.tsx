import { browserSupportsWebAuthn } from '@simplewebauthn/browser';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { Link, Navigate, useSearchParams } from 'react-router-dom';
import { signIn } from '#contract/accounts.ts';
import { changeViewer } from '../../features/people/change-viewer.ts';
import { FormPage } from '../../features/people/form-page.tsx';
import { FormTrouble } from '../../features/people/form-trouble.tsx';
import type { Explanation } from '../../features/people/form-trouble.tsx';
import { signInWithPasskey } from '../../features/people/passkey-calls.ts';
import { PasskeyTrouble } from '../../features/people/passkey-trouble.tsx';
import { PasswordField } from '../../features/people/password-field.tsx';
import { me } from '../../features/people/people-queries.ts';
import { safeNext } from '../../features/people/safe-next.ts';
import { SecondStep } from '../../features/people/second-step.tsx';
import type { SecondWay, SignInState } from '../../features/people/second-step.tsx';
import { call } from '../../lib/call.ts';
import { paths } from '../../lib/paths.ts';
import type { ProblemError } from '../../lib/problem-error.ts';
import { useContractForm } from '../../lib/use-contract-form.ts';
import { Button } from '../../ui/button.tsx';
import { TextField } from '../../ui/text-field.tsx';

export function Component() {
  const queryClient = useQueryClient();
  const { data: viewer } = useQuery(me());
  const [params] = useSearchParams();
  const [ways, setWays] = useState<readonly SecondWay[] | null>(null);

  if (viewer) return <Navigate to={viewer.secondFactorOwed ? paths.account('second-factors') : safeNext(params.get('next'), paths.decode())} replace />;

  const onAnswer = (answer: SignInState) => {
    // This page stays if they sign out before the next one is there, and must then begin at its first step.
    setWays(answer.state === 'signed-in' ? null : answer.ways);
    if (answer.state === 'signed-in') changeViewer(queryClient, answer.me);
  };
  return (
    <FormPage
      title="Sign in"
      aside={
        ways === null ? (
          <>
            <p>
              <Link to={paths.passwordForgotten()}>You forgot the password</Link>
            </p>
            <p>
              You have no account? <Link to={paths.signUp()}>Open one</Link>. Decoding and the catalogue need none.
            </p>
          </>
        ) : undefined
      }
    >
      {ways === null ? <FirstStep onAnswer={onAnswer} /> : <SecondStep ways={ways} onAnswer={onAnswer} onStartAgain={() => setWays(null)} />}
    </FormPage>
  );
}

function FirstStep({ onAnswer }: { readonly onAnswer: (answer: SignInState) => void }) {
  const form = useContractForm({ schema: signIn.body, fields: { email: 'E-mail address', password: 'Password' }, send: (body) => call(signIn, { body }), onDone: onAnswer });
  const passkey = useMutation({ mutationFn: signInWithPasskey, onSuccess: onAnswer, gcTime: 0 });
  return (
    <div className="max-w-[460px]">
      <form {...form.form}>
        <FormTrouble form={form} title="Not signed in" explain={explain} />
        <TextField {...form.field('email')} type="email" label="E-mail address" autoComplete="username" spellCheck={false} />
        <PasswordField {...form.field('password')} label="Password" autoComplete="current-password" />
        <Button type="submit" weight="primary" disabled={form.busy} className="mt-2 w-full">
          {form.busy ? 'Signing in' : 'Sign in'}
        </Button>
      </form>
      {browserSupportsWebAuthn() && (
        <div className="mt-6 space-y-4 border-t border-rule pt-6">
          <PasskeyTrouble act={passkey} />
          <Button disabled={passkey.isPending} onClick={() => passkey.mutate()} className="w-full">
            {passkey.isPending ? 'Waiting for the device' : 'Sign in with a passkey'}
          </Button>
        </div>
      )}
    </div>
  );
}

/** One sentence for all the reasons, as the register gives one answer. */
function explain({ kind }: ProblemError): Explanation | null {
  if (kind !== 'not-signed-in') return null;
  return {
    title: 'Address and password do not go together',
    advice: 'One of them is mistyped, or the address was never confirmed with the link we sent. What you typed is kept.',
  };
}
