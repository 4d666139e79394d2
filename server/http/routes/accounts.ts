import type { Router } from 'express';
import * as contract from '#contract/accounts.ts';
import { signedIn } from '#server/policies/viewer.ts';
import { presentMe, presentMine, presentSession, presentSignIn } from '#server/presenters/people.ts';
import { changeEmail } from '#server/services/people/change-email.ts';
import { changeName } from '#server/services/people/change-name.ts';
import { changePassword } from '#server/services/people/change-password.ts';
import { closeAccount } from '#server/services/people/close-account.ts';
import { confirmIdentity } from '#server/services/people/confirm-identity.ts';
import { endOtherSessions, endSession } from '#server/services/people/end-session.ts';
import { exportMine } from '#server/services/people/export-mine.ts';
import { forgotPassword } from '#server/services/people/forgot-password.ts';
import { readMe } from '#server/services/people/read-me.ts';
import { resetPassword } from '#server/services/people/reset-password.ts';
import { listOpenSessions } from '#server/services/people/sessions.ts';
import { signIn } from '#server/services/people/sign-in.ts';
import { signOut } from '#server/services/people/sign-out.ts';
import { signUp } from '#server/services/people/sign-up.ts';
import { verifyEmail } from '#server/services/people/verify-email.ts';
import type { ApiDependencies } from '../dependencies.ts';
import { serve } from '../serve.ts';

const DONE = { done: true } as const;

export function mountAccounts(router: Router, { knex, demoSignIns }: ApiDependencies): void {
  serve(router, contract.signUp, async ({ body }, context) => {
    await signUp(body, context, knex);
    return DONE;
  });
  serve(router, contract.verifyEmail, async ({ body }, context) => {
    await verifyEmail(body.token, context, knex);
    return DONE;
  });
  serve(router, contract.signIn, async ({ body }, context) => presentSignIn(await signIn(body, context, { demoSignIns }, knex)));
  serve(router, contract.signOut, async (_input, context) => {
    await signOut(context, knex);
    return DONE;
  });
  serve(router, contract.forgotPassword, async ({ body }, context) => {
    await forgotPassword(body.email, context, knex);
    return DONE;
  });
  serve(router, contract.resetPassword, async ({ body }, context) => {
    await resetPassword(body, context, knex);
    return DONE;
  });

  serve(router, contract.readMe, async (_input, { viewer }) => ({
    me: viewer.kind === 'visitor' ? null : presentMe(await readMe(viewer.id, viewer.strength, knex)),
  }));
  serve(router, contract.changeName, async ({ body }, context) =>
    presentMe(await changeName(signedIn(context.viewer), body.displayName, context, knex)),
  );
  serve(router, contract.changePassword, async ({ body }, context) => {
    await changePassword(signedIn(context.viewer), body, context, knex);
    return DONE;
  });
  serve(router, contract.changeEmail, async ({ body }, context) => {
    await changeEmail(signedIn(context.viewer), body, context, knex);
    return DONE;
  });
  serve(router, contract.confirmIdentity, async ({ body }, context) => {
    await confirmIdentity(signedIn(context.viewer), body, context, knex);
    return DONE;
  });
  serve(router, contract.closeAccount, async ({ body }, context) => {
    await closeAccount(signedIn(context.viewer), body.password, context, knex);
    return DONE;
  });
  serve(router, contract.exportMine, async (_input, context) => presentMine(await exportMine(signedIn(context.viewer), context, knex)));

  serve(router, contract.listSessions, async (_input, context) => {
    const { id, sessionId } = signedIn(context.viewer);
    return { items: (await listOpenSessions(id, knex)).map((session) => presentSession(session, sessionId)) };
  });
  serve(router, contract.endSession, async ({ params }, context) => {
    await endSession(signedIn(context.viewer), params.id, context, knex);
    return DONE;
  });
  serve(router, contract.endOtherSessions, async (_input, context) => {
    await endOtherSessions(signedIn(context.viewer), context, knex);
    return DONE;
  });
}
