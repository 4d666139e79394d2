import { useMutation, useQueryClient } from '@tanstack/react-query';
import { renewRecoveryCodes } from '#contract/second-factors.ts';
import type { Me } from '#contract/people.ts';
import { call } from '../../lib/call.ts';
import { capital, sayCount } from '../../lib/say-number.ts';
import { Button } from '../../ui/button.tsx';
import { ActTrouble } from './act-trouble.tsx';
import { InlineStep } from './inline-step.tsx';
import { peopleKeys } from './people-queries.ts';

type Props = { readonly viewer: Me; readonly onCodes: (codes: readonly string[]) => void };

/** What is left of the codes that stand in for a second factor. */
export function RecoveryPart({ viewer, onCodes }: Props) {
  const left = viewer.secondFactors.recoveryCodesLeft;
  return (
    <div className="space-y-3">
      <h3 className="font-semibold">Recovery codes</h3>
      <p className="max-w-measure">
        {left === 0 ? 'None left.' : `${capital(sayCount(left))} left.`} Each signs you in once after the password, when
        nothing else is at hand.
      </p>
      <InlineStep label="Make new ones">{() => <RenewCodes onCodes={onCodes} />}</InlineStep>
    </div>
  );
}

function RenewCodes({ onCodes }: Pick<Props, 'onCodes'>) {
  const queryClient = useQueryClient();
  const renew = useMutation({
    mutationFn: () => call(renewRecoveryCodes, {}),
    gcTime: 0,
    onSuccess: ({ recoveryCodes }) => {
      void queryClient.invalidateQueries({ queryKey: peopleKeys.me });
      onCodes(recoveryCodes);
    },
  });
  return (
    <div className="space-y-3">
      <p>The ones you have stop working at once.</p>
      <ActTrouble act={renew} />
      <Button disabled={renew.isPending} onClick={() => renew.mutate()}>
        Make new codes
      </Button>
    </div>
  );
}
