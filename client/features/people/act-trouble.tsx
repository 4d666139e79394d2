import type { UseMutationResult } from '@tanstack/react-query';
import { ProblemError } from '../../lib/problem-error.ts';
import { paths } from '../../lib/paths.ts';
import { ButtonLink } from '../../ui/button.tsx';
import { Caution } from '../../ui/caution.tsx';
import { FailureNote } from '../../ui/failure-note.tsx';
import { ConfirmIdentity } from './confirm-identity.tsx';
import { wantsProof } from './form-trouble.tsx';

type Props<Answer, Input> = {
  readonly act: UseMutationResult<Answer, Error, Input>;
  /** Only the proof, where a form says the rest itself. */
  readonly proofOnly?: boolean;
};

/** What keeps an act from being done. Where the register wants a proof first, it is asked for here, and the act goes on. */
export function ActTrouble<Answer, Input>({ act, proofOnly = false }: Props<Answer, Input>) {
  const { error } = act;
  if (!act.isError) return null;
  const again = () => act.mutate(act.variables);
  if (wantsProof(error)) return <ConfirmIdentity onProven={again} onGiveUp={act.reset} />;
  if (proofOnly) return null;
  if (error instanceof ProblemError && error.kind === 'second-factor-owed') return <SecondFactorOwed />;
  return <FailureNote error={error} onAgain={again} />;
}

/** Moderators and registrars act only with a second factor: why, and the way to one. */
export function SecondFactorOwed() {
  return (
    <Caution title="A second factor is needed first">
      <p>
        Moderators and registrars act only when they signed in with a second factor, so that a password alone, found out or guessed, changes nothing of
        others’. Add one to your account; if it has one, sign out and sign in with it.
      </p>
      <p className="mt-2">
        <ButtonLink to={paths.account('second-factors')}>Go to your second factors</ButtonLink>
      </p>
    </Caution>
  );
}
