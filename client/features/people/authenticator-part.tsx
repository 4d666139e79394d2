import { useMutation, useQueryClient } from '@tanstack/react-query';
import { confirmAuthenticator, removeAuthenticator, startAuthenticator } from '#contract/second-factors.ts';
import type { AnswerOf } from '#contract/endpoint.ts';
import type { Me } from '#contract/people.ts';
import { call } from '../../lib/call.ts';
import { useContractForm } from '../../lib/use-contract-form.ts';
import { Button } from '../../ui/button.tsx';
import { ActTrouble } from './act-trouble.tsx';
import { CodeField } from './code-field.tsx';
import { FormTrouble } from './form-trouble.tsx';
import { InlineStep } from './inline-step.tsx';
import { peopleKeys } from './people-queries.ts';

type Props = { readonly viewer: Me; /** Codes to be shown this once. */ readonly onCodes: (codes: readonly string[]) => void };

/** An application that shows six digits, new ones every half minute (RFC 6238). */
export function AuthenticatorPart({ viewer, onCodes }: Props) {
  const inUse = viewer.secondFactors.authenticator;
  return (
    <div className="space-y-3">
      <h3 className="font-semibold">Authenticator</h3>
      <p className="max-w-measure">
        {inUse
          ? 'In use. After your password it is asked for six digits.'
          : 'An application on your phone that shows six digits, new ones every half minute. Any that follows the open standard will do.'}
      </p>
      {inUse ? (
        <InlineStep key="remove" label="Remove the authenticator">
          {(close) => <RemoveAuthenticator onDone={close} />}
        </InlineStep>
      ) : (
        <InlineStep key="add" label="Add an authenticator">
          {() => <AddAuthenticator onCodes={onCodes} />}
        </InlineStep>
      )}
    </div>
  );
}

function AddAuthenticator({ onCodes }: Pick<Props, 'onCodes'>) {
  const start = useMutation({ mutationFn: () => call(startAuthenticator, {}), gcTime: 0 });
  if (start.data !== undefined) return <FirstCode started={start.data} onCodes={onCodes} />;
  return (
    <div className="space-y-3">
      <p>You need the phone with the application at hand. You scan a square with it and type the digits it then shows.</p>
      <ActTrouble act={start} />
      <Button disabled={start.isPending} onClick={() => start.mutate()}>
        Show the square
      </Button>
    </div>
  );
}

function FirstCode({ started, onCodes }: { readonly started: AnswerOf<typeof startAuthenticator>; readonly onCodes: Props['onCodes'] }) {
  const queryClient = useQueryClient();
  const form = useContractForm({
    schema: confirmAuthenticator.body,
    fields: { code: 'Code' },
    send: (body) => call(confirmAuthenticator, { body }),
    onDone: ({ recoveryCodes }) => {
      void queryClient.invalidateQueries({ queryKey: peopleKeys.me });
      void queryClient.invalidateQueries({ queryKey: peopleKeys.sessions });
      if (recoveryCodes.length > 0) onCodes(recoveryCodes);
    },
  });
  return (
    <div className="space-y-4">
      {/* White under the square in the dark as well: cameras want dark on light. */}
      <img src={started.qr} width="220" height="220" alt="QR code with the secret below, for an authenticator to scan" className="block border border-rule" />
      <p>
        Or type this secret into it:{' '}
        <code className="block font-mono text-[19px] wrap-anywhere">
          {inFours(started.secret)}
        </code>
      </p>
      <p>
        <a href={started.uri} className="inline-flex min-h-11 items-center">
          Open the application on this device
        </a>
      </p>
      <ActTrouble act={form.act} proofOnly />
      <form {...form.form}>
        <FormTrouble form={form} title="The authenticator was not added yet" />
        <CodeField {...form.field('code')} label="Six digits it shows now" />
        <Button type="submit" disabled={form.busy}>
          Add the authenticator
        </Button>
      </form>
    </div>
  );
}

function RemoveAuthenticator({ onDone }: { readonly onDone: () => void }) {
  const queryClient = useQueryClient();
  const remove = useMutation({
    mutationFn: () => call(removeAuthenticator, {}),
    gcTime: 0,
    onSuccess: () => {
      onDone();
      void queryClient.invalidateQueries({ queryKey: peopleKeys.me });
    },
  });
  return (
    <div className="space-y-3">
      <p>From then on your account is as safe as the password and the passkeys that are left. To use it again you scan a new square.</p>
      <ActTrouble act={remove} />
      <Button disabled={remove.isPending} onClick={() => remove.mutate()}>
        Remove it
      </Button>
    </div>
  );
}

/** `ABCD EFGH …`, as one reads a secret from a screen. */
export function inFours(secret: string): string {
  return secret.replace(/(.{4})(?=.)/g, '$1 ');
}
