import { useMutation } from '@tanstack/react-query';
import { useParams } from 'react-router-dom';
import { unsubscribe } from '#contract/notices.ts';
import { NOTICE_NAMES } from '../../features/notices/notice-words.ts';
import { isDeadLink } from '../../features/people/dead-link.tsx';
import { FormPage } from '../../features/people/form-page.tsx';
import { Outcome } from '../../features/people/outcome.tsx';
import { call } from '../../lib/call.ts';
import { paths } from '../../lib/paths.ts';
import { ProblemError } from '../../lib/problem-error.ts';
import { Button, ButtonLink } from '../../ui/button.tsx';
import { FailureNote } from '../../ui/failure-note.tsx';

/** Stops letters of one kind, by a press and without signing in. */
export function Component() {
  const { token = '' } = useParams();
  const stop = useMutation({ mutationFn: () => call(unsubscribe, { params: { token } }) });
  const dead = isDeadLink(stop.error) || (stop.error instanceof ProblemError && stop.error.kind === 'not-found');
  return (
    <FormPage title="Fewer letters">
      {stop.isSuccess ? (
        <Outcome title="These letters have stopped" action={<ButtonLink to={paths.account('notices')}>Choose which come</ButtonLink>}>
          <p>No more letters come about {NOTICE_NAMES[stop.data.kind]}. The notices still stand in the register when you sign in.</p>
        </Outcome>
      ) : dead ? (
        <div role="alert" className="max-w-measure border-l-4 border-scale bg-bed px-4 py-3">
          <p className="font-semibold text-scale">This link is none of ours</p>
          <p>It was cut short, or its account is closed. Signed in, you choose on your account’s page which letters come.</p>
          <div className="mt-4 mb-1">
            <ButtonLink to={paths.account('notices')}>Choose which come</ButtonLink>
          </div>
        </div>
      ) : (
        <div className="max-w-measure space-y-6">
          <p>You came here by a letter of ours. Press, and letters of its kind stop. It can be undone on your account’s page.</p>
          {stop.error !== null && <FailureNote error={stop.error} onAgain={() => stop.mutate()} />}
          <Button weight="primary" disabled={stop.isPending} onClick={() => stop.mutate()}>
            Stop these letters
          </Button>
        </div>
      )}
    </FormPage>
  );
}
