import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useSearchParams } from 'react-router-dom';
import { verifyEmail } from '#contract/accounts.ts';
import { DeadLink, isDeadLink } from '../../features/people/dead-link.tsx';
import { FormPage } from '../../features/people/form-page.tsx';
import { Outcome } from '../../features/people/outcome.tsx';
import { me } from '../../features/people/people-queries.ts';
import { call } from '../../lib/call.ts';
import { paths } from '../../lib/paths.ts';
import { Button, ButtonLink } from '../../ui/button.tsx';
import { FailureNote } from '../../ui/failure-note.tsx';

/** Confirms an address when asked to by a press, so that a program which follows the links of letters does not use one up. */
export function Component() {
  const [params] = useSearchParams();
  const token = params.get('token');
  const queryClient = useQueryClient();
  const { data: viewer } = useQuery(me());
  const confirm = useMutation({
    mutationFn: (given: string) => call(verifyEmail, { body: { token: given } }),
    onSuccess: () => queryClient.invalidateQueries({ queryKey: me().queryKey }),
  });
  const press = () => {
    if (token !== null) confirm.mutate(token);
  };
  return (
    <FormPage title="Confirm your address">
      {token === null || isDeadLink(confirm.error) ? (
        <DeadLink
          lasts="24 hours"
          action={
            <>
              <ButtonLink to={paths.signIn()}>Sign in</ButtonLink>
              <ButtonLink to={paths.signUp()}>Ask for a new link by opening the account again</ButtonLink>
            </>
          }
        />
      ) : confirm.isSuccess ? (
        <Outcome
          title="The address is confirmed"
          action={viewer ? <ButtonLink to={paths.account()}>Go to your account</ButtonLink> : <ButtonLink weight="primary" to={paths.signIn()}>Sign in</ButtonLink>}
        >
          <p>{viewer ? 'Letters go there from now on.' : 'You can sign in with it now.'}</p>
        </Outcome>
      ) : (
        <div className="max-w-measure space-y-6">
          <p>You came here by a link in a letter of ours. Confirm that the address it was sent to is yours.</p>
          {confirm.error !== null && <FailureNote error={confirm.error} onAgain={press} />}
          <Button weight="primary" disabled={confirm.isPending} onClick={press}>
            Confirm the address
          </Button>
        </div>
      )}
    </FormPage>
  );
}
