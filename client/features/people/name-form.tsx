import { useQueryClient } from '@tanstack/react-query';
import { changeName } from '#contract/accounts.ts';
import type { Me } from '#contract/people.ts';
import { call } from '../../lib/call.ts';
import { useContractForm } from '../../lib/use-contract-form.ts';
import { Button } from '../../ui/button.tsx';
import { TextField } from '../../ui/text-field.tsx';
import { FormTrouble } from './form-trouble.tsx';
import { me } from './people-queries.ts';

/** The name that stands beside what a member entered. */
export function NameForm({ viewer, onDone }: { readonly viewer: Me; readonly onDone: () => void }) {
  const queryClient = useQueryClient();
  const form = useContractForm({
    schema: changeName.body,
    fields: { displayName: 'Name' },
    send: (body) => call(changeName, { body }),
    onDone: (answer) => {
      queryClient.setQueryData(me().queryKey, answer);
      onDone();
    },
  });
  return (
    <form {...form.form}>
      <FormTrouble form={form} title="The name was not changed" />
      <TextField {...form.field('displayName')} label="Name" defaultValue={viewer.displayName} autoComplete="nickname" hint="Everybody sees it beside what you enter." />
      <Button type="submit" disabled={form.busy}>
        Keep this name
      </Button>
    </form>
  );
}
