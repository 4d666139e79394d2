import { useEffect, useState } from 'react';
import type { ReactNode } from 'react';
import { useLocation } from 'react-router-dom';
import type { Me } from '#contract/people.ts';
import { NoticeChoicesPart } from '../../features/notices/notice-choices-part.tsx';
import { AccountSection } from '../../features/people/account-section.tsx';
import { SecondFactorOwed } from '../../features/people/act-trouble.tsx';
import { AddressText } from '../../features/people/address-text.tsx';
import { AuthenticatorPart } from '../../features/people/authenticator-part.tsx';
import { CloseForm } from '../../features/people/close-form.tsx';
import { EmailForm } from '../../features/people/email-form.tsx';
import { ExportPart } from '../../features/people/export-part.tsx';
import { InlineStep } from '../../features/people/inline-step.tsx';
import { NameForm } from '../../features/people/name-form.tsx';
import { PasskeysPart } from '../../features/people/passkeys-part.tsx';
import { PasswordForm } from '../../features/people/password-form.tsx';
import { RecoveryCodesSheet } from '../../features/people/recovery-codes-sheet.tsx';
import { RecoveryPart } from '../../features/people/recovery-part.tsx';
import { sayRole } from '../../features/people/say-role.ts';
import { SessionsPart } from '../../features/people/sessions-part.tsx';
import { SignedInOnly } from '../../features/people/signed-in-only.tsx';
import { PageTitle } from '../../ui/page-title.tsx';
import { PartingLine } from '../../ui/parting-line.tsx';

export function Component() {
  return <SignedInOnly title="Your account">{(viewer) => <Account key={viewer.id} viewer={viewer} />}</SignedInOnly>;
}

function Account({ viewer }: { readonly viewer: Me }) {
  const [codes, setCodes] = useState<readonly string[] | null>(null);
  useHashFocus(codes === null);
  if (codes !== null) return <RecoveryCodesSheet codes={codes} onKept={() => setCodes(null)} />;
  const { authenticator, passkeys } = viewer.secondFactors;
  return (
    <>
      <PageTitle title="Your account" below={sayRole(viewer)}>
        {viewer.displayName}
      </PageTitle>
      <PartingLine />
      <div className="space-y-10 pt-8 wide:max-w-[860px]">
        {viewer.secondFactorOwed && <SecondFactorOwed />}
        <AccountSection id="name" heading="Name">
          <Fact>{viewer.displayName}</Fact>
          <InlineStep label="Change the name">{(close) => <NameForm viewer={viewer} onDone={close} />}</InlineStep>
        </AccountSection>
        <AccountSection id="address" heading="E-mail address">
          <Fact>
            <AddressText email={viewer.email} />
          </Fact>
          <InlineStep label="Change the address">{() => <EmailForm />}</InlineStep>
        </AccountSection>
        <AccountSection id="password" heading="Password">
          <InlineStep label="Change the password">{() => <PasswordForm viewer={viewer} />}</InlineStep>
        </AccountSection>
        <AccountSection id="second-factors" heading="Second factors">
          <div className="space-y-8">
            <p className="max-w-measure">Something you have, beside the password you know: whoever finds out the one still lacks the other.</p>
            <AuthenticatorPart viewer={viewer} onCodes={setCodes} />
            <PasskeysPart onCodes={setCodes} />
            {(authenticator || passkeys > 0) && <RecoveryPart viewer={viewer} onCodes={setCodes} />}
          </div>
        </AccountSection>
        <AccountSection id="sessions" heading="Where you are signed in">
          <SessionsPart />
        </AccountSection>
        <AccountSection id="notices" heading="Notices by e-mail">
          <NoticeChoicesPart />
        </AccountSection>
        <AccountSection id="data" heading="Your data">
          <ExportPart />
        </AccountSection>
        <AccountSection id="close" heading="Close the account">
          <p className="mb-3 max-w-measure">
            What you entered for everybody stays, under “a former member”. Your name, address, password, second factors, sessions, notices and what you
            kept for yourself go at once.
          </p>
          <InlineStep label="Close the account">{() => <CloseForm />}</InlineStep>
        </AccountSection>
      </div>
    </>
  );
}

function Fact({ children }: { readonly children: ReactNode }) {
  return <p className="mb-3 text-[19px] wrap-anywhere">{children}</p>;
}

/** A link to a part of the page leads there, also when the page was drawn after it was followed. */
function useHashFocus(drawn: boolean): void {
  const { hash } = useLocation();
  useEffect(() => {
    if (!drawn || hash === '') return;
    const part = document.getElementById(hash.slice(1));
    part?.scrollIntoView();
    part?.focus({ preventScroll: true });
  }, [hash, drawn]);
}
