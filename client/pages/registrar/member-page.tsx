import { useMutation, useQuery } from '@tanstack/react-query';
import { Link, useParams } from 'react-router-dom';
import { endMemberSessions } from '#contract/admin.ts';
import type { MemberPage } from '#contract/admin.ts';
import { NotFoundPage } from '../../app/error-page.tsx';
import { ActTrouble, SecondFactorOwed } from '../../features/people/act-trouble.tsx';
import { AddressText } from '../../features/people/address-text.tsx';
import { InlineStep } from '../../features/people/inline-step.tsx';
import { sayRole } from '../../features/people/say-role.ts';
import { MemberState } from '../../features/registrar/members-table.tsx';
import { RegistrarLinks } from '../../features/registrar/registrar-links.tsx';
import { RegistrarOnly } from '../../features/registrar/registrar-only.tsx';
import { memberPage } from '../../features/registrar/registrar-queries.ts';
import { RoleForm } from '../../features/registrar/role-form.tsx';
import { SuspensionForm } from '../../features/registrar/suspension-form.tsx';
import { useMemberChanged } from '../../features/registrar/use-member-changed.ts';
import { call } from '../../lib/call.ts';
import { paths } from '../../lib/paths.ts';
import { ProblemError } from '../../lib/problem-error.ts';
import { sayMoment } from '../../lib/say-date.ts';
import { sayInstant } from '../../lib/say-instant.ts';
import { Button } from '../../ui/button.tsx';
import { FailureNote } from '../../ui/failure-note.tsx';
import { Block, PageGrid } from '../../ui/page-grid.tsx';
import { PageTitle } from '../../ui/page-title.tsx';
import { PartingLine } from '../../ui/parting-line.tsx';
import { Skeleton } from '../../ui/skeleton.tsx';
import { FactList } from '../catalogue/fact-list.tsx';

export function Component() {
  const { id = '' } = useParams();
  return (
    <RegistrarOnly can="seeMembers">
      <MemberOf key={id} id={id} />
    </RegistrarOnly>
  );
}

function MemberOf({ id }: { readonly id: string }) {
  const { data: member, error, refetch } = useQuery(memberPage(id));
  if (member !== undefined) return <Member member={member} />;
  // An id that is none is nothing at an address, like one nobody has.
  if (error instanceof ProblemError && (error.kind === 'not-found' || error.kind === 'invalid')) return <NotFoundPage />;
  if (error instanceof ProblemError && error.kind === 'second-factor-owed') return <SecondFactorOwed />;
  return <div className="pt-8">{error === null ? <Skeleton lines={6} label="Loading the member" /> : <FailureNote error={error} onAgain={() => void refetch()} />}</div>;
}

function Member({ member }: { readonly member: MemberPage }) {
  const { id, displayName, suspension, can } = member;
  const nothingToDo = !can.changeRole && !can.suspend && !can.unsuspend && !can.endSessions;
  return (
    <>
      <PageTitle title={displayName} above={<RegistrarLinks />} below={sayRole(member)}>
        {displayName}
      </PageTitle>
      <PartingLine />
      <div className="pt-8">
        <PageGrid>
          <Block
            heading="On record"
            margin={
              <div className="space-y-2">
                <p>
                  <Link to={paths.registrarAudit(`?actor=${id}`)} className="inline-flex min-h-11 items-center">
                    What they did
                  </Link>
                </p>
                <p>
                  <Link to={paths.registrarAudit(`?subject=${id}`)} className="inline-flex min-h-11 items-center">
                    What was done to them
                  </Link>
                </p>
              </div>
            }
          >
            <Facts member={member} />
          </Block>
          {suspension !== null && (
            <Block heading="Suspended">
              <p className="max-w-measure wrap-anywhere">“{suspension.reason}”</p>
              <p className="mb-3 text-[15px] text-slag">
                By {suspension.by}, {sayInstant(suspension.at)}.
              </p>
            </Block>
          )}
          <Block heading="Role, sessions, suspension">
            {nothingToDo ? <p>There is nothing you can change here.</p> : <Deeds member={member} />}
          </Block>
        </PageGrid>
      </div>
    </>
  );
}

function Facts({ member }: { readonly member: MemberPage }) {
  const { email, state, secondFactor, joinedAt, lastSeenAt } = member;
  return (
    <FactList
      facts={[
        { name: 'Address', value: email === null ? 'none' : <AddressText email={email} /> },
        { name: 'State', value: <MemberState state={state} /> },
        { name: 'Second factor', value: secondFactor ? 'yes' : 'no' },
        { name: 'Joined', value: sayMoment(joinedAt) },
        { name: 'Last seen', value: lastSeenAt === null ? 'not lately' : sayInstant(lastSeenAt) },
      ]}
    />
  );
}

/** What the register lets this registrar do to this member, and nothing else. */
function Deeds({ member }: { readonly member: MemberPage }) {
  const { can } = member;
  return (
    <div className="space-y-4">
      {can.changeRole && <InlineStep label="Change the role">{(close) => <RoleForm key={member.version} member={member} onDone={close} />}</InlineStep>}
      {can.endSessions && <EndSessions member={member} />}
      {can.suspend && <InlineStep label="Suspend">{(close) => <SuspensionForm member={member} deed="suspend" onDone={close} />}</InlineStep>}
      {can.unsuspend && (
        <InlineStep label="Lift the suspension">{(close) => <SuspensionForm member={member} deed="unsuspend" onDone={close} />}</InlineStep>
      )}
    </div>
  );
}

function EndSessions({ member }: { readonly member: MemberPage }) {
  const changed = useMemberChanged();
  const end = useMutation({ mutationFn: () => call(endMemberSessions, { params: { id: member.id } }), onSuccess: changed });
  return (
    <div>
      <ActTrouble act={end} />
      <Button disabled={end.isPending} onClick={() => end.mutate()}>
        End all their sessions
      </Button>
      <span role="status" className="ml-3 text-[15px] text-slag">
        {end.isSuccess && 'Ended.'}
      </span>
    </div>
  );
}
