import type { Router } from 'express';
import { giveSecondFactor as giveSecondFactorEndpoint } from '#contract/accounts.ts';
import * as contract from '#contract/second-factors.ts';
import { signedIn } from '#server/policies/viewer.ts';
import { presentPasskey, presentPasskeyOptions } from '#server/presenters/passkey.ts';
import { presentSignIn } from '#server/presenters/people.ts';
import { addPasskey } from '#server/services/second-factors/add-passkey.ts';
import { confirmAuthenticator } from '#server/services/second-factors/confirm-authenticator.ts';
import { finishPasskeySignIn } from '#server/services/second-factors/finish-passkey-sign-in.ts';
import { giveSecondFactor } from '#server/services/second-factors/give-second-factor.ts';
import { listPasskeys } from '#server/services/second-factors/list-passkeys.ts';
import { passkeySite } from '#server/services/second-factors/passkey-site.ts';
import { removeAuthenticator } from '#server/services/second-factors/remove-authenticator.ts';
import { removePasskey } from '#server/services/second-factors/remove-passkey.ts';
import { renewRecoveryCodes } from '#server/services/second-factors/renew-recovery-codes.ts';
import { startAuthenticator } from '#server/services/second-factors/start-authenticator.ts';
import { startPasskeySignIn } from '#server/services/second-factors/start-passkey-sign-in.ts';
import { startPasskey } from '#server/services/second-factors/start-passkey.ts';
import type { ApiDependencies } from '../dependencies.ts';
import { serve } from '../serve.ts';

const DONE = { done: true } as const;

export function mountSecondFactors(router: Router, { knex, demoSignIns, publicOrigin }: ApiDependencies): void {
  const site = passkeySite(publicOrigin);

  serve(router, contract.startAuthenticator, async (_input, { viewer }) => startAuthenticator(signedIn(viewer), knex));
  serve(router, contract.confirmAuthenticator, async ({ body }, context) => ({
    recoveryCodes: [...(await confirmAuthenticator(signedIn(context.viewer), body.code, context, knex))],
  }));
  serve(router, contract.removeAuthenticator, async (_input, context) => {
    await removeAuthenticator(signedIn(context.viewer), context, knex);
    return DONE;
  });
  serve(router, contract.renewRecoveryCodes, async (_input, context) => ({
    recoveryCodes: [...(await renewRecoveryCodes(signedIn(context.viewer), context, knex))],
  }));

  serve(router, contract.listPasskeys, async (_input, { viewer }) => ({
    items: (await listPasskeys(signedIn(viewer).id, knex)).map(presentPasskey),
  }));
  serve(router, contract.startPasskey, async (_input, { viewer }) =>
    presentPasskeyOptions(await startPasskey(signedIn(viewer), site, knex)),
  );
  serve(router, contract.addPasskey, async ({ body }, context) => {
    const { passkey, recoveryCodes } = await addPasskey(signedIn(context.viewer), body, context, site, knex);
    return { passkey: presentPasskey(passkey), recoveryCodes: [...recoveryCodes] };
  });
  serve(router, contract.removePasskey, async ({ params }, context) => {
    await removePasskey(signedIn(context.viewer), params.id, context, knex);
    return DONE;
  });

  serve(router, giveSecondFactorEndpoint, async ({ body }, context) =>
    presentSignIn({ state: 'signed-in', me: await giveSecondFactor(body, context, knex) }),
  );
  serve(router, contract.startPasskeySignIn, async (_input, context) =>
    presentPasskeyOptions(await startPasskeySignIn(context, site, knex)),
  );
  serve(router, contract.finishPasskeySignIn, async ({ body }, context) =>
    presentSignIn({ state: 'signed-in', me: await finishPasskeySignIn(body.response, context, { site, demoSignIns }, knex) }),
  );
}
