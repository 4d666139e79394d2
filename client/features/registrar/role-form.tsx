import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { changeRole } from '#contract/admin.ts';
import type { MemberPage } from '#contract/admin.ts';
import { Role } from '#contract/people.ts';
import { MEMBER_ROLES } from '#domain/vocabulary.ts';
import { call } from '../../lib/call.ts';
import { capital } from '../../lib/say-number.ts';
import { useContractForm } from '../../lib/use-contract-form.ts';
import { Button } from '../../ui/button.tsx';
import { CheckField } from '../../ui/check-field.tsx';
import { FailureNote } from '../../ui/failure-note.tsx';
import { SelectField } from '../../ui/select-field.tsx';
import { Skeleton } from '../../ui/skeleton.tsx';
import { makersToChoose } from '../decode/decode-queries.ts';
import { ActTrouble } from '../people/act-trouble.tsx';
import { FormTrouble } from '../people/form-trouble.tsx';
import { ROLE_WORDS } from './member-words.ts';
import { useMemberChanged } from './use-member-changed.ts';

/** A member's role and, for a moderator, the makers they decide for. */
export function RoleForm({ member, onDone }: { readonly member: MemberPage; readonly onDone: () => void }) {
  const [role, setRole] = useState<Role>(member.role);
  const [allMakers, setAllMakers] = useState(member.role === 'moderator' && member.moderates === null);
  const changed = useMemberChanged();
  const form = useContractForm({
    schema: changeRole.body,
    fields: { role: 'Role', moderates: 'Decides for' },
    read: (data) => ({
      role: data.get('role'),
      moderates: role !== 'moderator' ? [] : allMakers ? null : data.getAll('moderates'),
      version: member.version,
    }),
    send: (body) => call(changeRole, { params: { id: member.id }, body }),
    onDone: (answer) => {
      onDone();
      changed(answer);
    },
  });
  return (
    <>
      <p className="mb-3">Their sessions end, so that the new role begins with a new sign-in; a letter tells them.</p>
      <ActTrouble act={form.act} proofOnly />
      <form {...form.form}>
        <FormTrouble form={form} title="The role was not changed" />
        <SelectField
          {...form.field('role')}
          label="Role"
          value={role}
          onChange={({ target }) => setRole(Role.parse(target.value))}
          className="max-w-[320px]"
        >
          {MEMBER_ROLES.map((one) => (
            <option key={one} value={one}>
              {capital(ROLE_WORDS[one])}
            </option>
          ))}
        </SelectField>
        {role === 'moderator' && (
          <fieldset id={form.field('moderates').id} tabIndex={-1} className="mb-4 outline-none">
            <legend className="mb-1 text-slag">Decides for</legend>
            {form.field('moderates').error !== null && <p className="text-[15px] font-semibold text-scale">{form.field('moderates').error}</p>}
            <CheckField label="All makers" checked={allMakers} onChange={({ target }) => setAllMakers(target.checked)} />
            {!allMakers && <MakerBoxes chosen={member.moderates?.map(({ slug }) => slug) ?? []} />}
          </fieldset>
        )}
        <Button type="submit" disabled={form.busy}>
          Give this role
        </Button>
      </form>
    </>
  );
}

function MakerBoxes({ chosen }: { readonly chosen: readonly string[] }) {
  const { data, error, refetch } = useQuery(makersToChoose());
  if (error !== null) return <FailureNote error={error} onAgain={() => void refetch()} />;
  if (data === undefined) return <Skeleton lines={3} label="Loading the makers" />;
  return (
    <div className="grid border-l border-rule pl-4 roomy:grid-cols-2">
      {data.map(({ slug, name }) => (
        <CheckField key={slug} name="moderates" value={slug} label={name} defaultChecked={chosen.includes(slug)} />
      ))}
    </div>
  );
}
