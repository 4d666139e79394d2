import { browserSupportsWebAuthn } from '@simplewebauthn/browser';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { addPasskey, removePasskey } from '#contract/second-factors.ts';
import { call } from '../../lib/call.ts';
import { sayMoment } from '../../lib/say-date.ts';
import { useContractForm } from '../../lib/use-contract-form.ts';
import { Button } from '../../ui/button.tsx';
import { DataTable } from '../../ui/data-table.tsx';
import { FailureNote } from '../../ui/failure-note.tsx';
import { TextField } from '../../ui/text-field.tsx';
import { FormTrouble } from './form-trouble.tsx';
import { InlineStep } from './inline-step.tsx';
import { makePasskey } from './passkey-calls.ts';
import { PasskeyTrouble } from './passkey-trouble.tsx';
import { passkeysList, peopleKeys } from './people-queries.ts';

type Props = { readonly onCodes: (codes: readonly string[]) => void };

/** Keys held by a device, which signs in by finger, face or its own code. */
export function PasskeysPart({ onCodes }: Props) {
  const { data, error, refetch } = useQuery(passkeysList());
  const queryClient = useQueryClient();
  const remove = useMutation({
    mutationFn: (id: string) => call(removePasskey, { params: { id } }),
    onSuccess: () => {
      void queryClient.invalidateQueries({ queryKey: peopleKeys.passkeys });
      void queryClient.invalidateQueries({ queryKey: peopleKeys.me });
    },
  });
  const rows = data?.items ?? null;
  return (
    <div className="space-y-3">
      <h3 className="font-semibold">Passkeys</h3>
      <p className="max-w-measure">A key kept by your phone, computer or a security key. It signs you in by itself, or as the second step after the password.</p>
      {error !== null && <FailureNote error={error} onAgain={() => void refetch()} />}
      <PasskeyTrouble act={remove} />
      {error === null && rows?.length !== 0 && (
        <DataTable
          caption="Passkeys"
          rows={rows}
          skeletonRows={1}
          rowKey={({ id }) => id}
          columns={[
            { key: 'name', header: 'Name', rowHeader: true, cell: ({ name }) => name },
            { key: 'added', header: 'added', cell: ({ addedAt }) => sayMoment(addedAt) },
            { key: 'used', header: 'last used', cell: ({ lastUsedAt }) => (lastUsedAt === null ? 'not yet' : sayMoment(lastUsedAt)) },
            {
              key: 'remove',
              header: 'remove',
              bare: true,
              cell: ({ id, name }) => (
                <Button disabled={remove.isPending} onClick={() => remove.mutate(id)}>
                  Remove<span className="sr-only"> {name}</span>
                </Button>
              ),
            },
          ]}
        />
      )}
      {browserSupportsWebAuthn() ? (
        <InlineStep label="Add a passkey">{(close) => <AddPasskey onDone={close} onCodes={onCodes} />}</InlineStep>
      ) : (
        <p className="text-slag">This browser knows no passkeys, or the connection is not a secure one.</p>
      )}
    </div>
  );
}

const PasskeyName = addPasskey.body.pick({ name: true });

function AddPasskey({ onDone, onCodes }: Props & { readonly onDone: () => void }) {
  const queryClient = useQueryClient();
  const form = useContractForm({
    schema: PasskeyName,
    fields: { name: 'Name' },
    send: ({ name }) => makePasskey(name),
    onDone: ({ recoveryCodes }) => {
      onDone();
      void queryClient.invalidateQueries({ queryKey: peopleKeys.passkeys });
      void queryClient.invalidateQueries({ queryKey: peopleKeys.me });
      void queryClient.invalidateQueries({ queryKey: peopleKeys.sessions });
      if (recoveryCodes.length > 0) onCodes(recoveryCodes);
    },
  });
  return (
    <>
      {form.faults.length === 0 && <PasskeyTrouble act={form.act} />}
      <form {...form.form} className="mt-3">
        {form.failure === null && <FormTrouble form={form} title="The passkey was not added" />}
        <TextField {...form.field('name')} label="A name for it" hint="So that you know it again: the phone, the key on the ring" autoComplete="off" />
        <Button type="submit" disabled={form.busy}>
          {form.busy ? 'Waiting for the device' : 'Make the passkey'}
        </Button>
      </form>
    </>
  );
}
