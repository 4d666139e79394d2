import { z } from 'zod';
import { SignInAnswer } from './accounts.ts';
import { Id } from './common.ts';
import { endpoint } from './endpoint.ts';
import { Done, PEOPLE_LIMITS } from './people.ts';

const Code = z.string().trim().regex(/^\d{6}$/, 'Six digits');
/** Options and answers of the Web Authentication API (W3C), passed through as its own JSON; the library checks them. */
const WebAuthnJson = z.record(z.string(), z.json());

export const startAuthenticator = endpoint({
  method: 'POST',
  path: '/me/authenticator',
  summary: 'Begin adding an authenticator (RFC 6238): its secret, address and QR code',
  answer: z.object({ secret: z.string(), uri: z.string(), qr: z.string() }),
});
export const confirmAuthenticator = endpoint({
  method: 'POST',
  path: '/me/authenticator/confirm',
  summary: 'Finish adding it with a first code; answers recovery codes, shown once',
  body: z.strictObject({ code: Code }),
  answer: z.object({ recoveryCodes: z.array(z.string()) }),
});
export const removeAuthenticator = endpoint({ method: 'DELETE', path: '/me/authenticator', summary: 'Remove the authenticator', answer: Done });
export const renewRecoveryCodes = endpoint({
  method: 'POST',
  path: '/me/recovery-codes',
  summary: 'New recovery codes; the old ones stop working',
  answer: z.object({ recoveryCodes: z.array(z.string()) }),
});

export const PasskeyItem = z.object({
  id: Id,
  name: z.string(),
  addedAt: z.iso.datetime({ offset: true }),
  lastUsedAt: z.iso.datetime({ offset: true }).nullable(),
});
export const listPasskeys = endpoint({
  method: 'GET',
  path: '/me/passkeys',
  summary: 'Your passkeys',
  answer: z.object({ items: z.array(PasskeyItem) }),
});
export const startPasskey = endpoint({
  method: 'POST',
  path: '/me/passkeys/options',
  summary: 'Begin adding a passkey',
  answer: WebAuthnJson,
});
export const addPasskey = endpoint({
  method: 'POST',
  path: '/me/passkeys',
  status: 201,
  summary: 'Finish adding a passkey',
  body: z.strictObject({ name: z.string().trim().min(1, 'Give it a name').max(PEOPLE_LIMITS.passkeyName), response: WebAuthnJson }),
  answer: z.object({ passkey: PasskeyItem, recoveryCodes: z.array(z.string()) }),
});
export const removePasskey = endpoint({
  method: 'DELETE',
  path: '/me/passkeys/:id',
  summary: 'Remove a passkey',
  params: z.strictObject({ id: Id }),
  answer: Done,
});
/** Both for signing in with a passkey alone and for the second step after a password. */
export const startPasskeySignIn = endpoint({
  method: 'POST',
  path: '/sign-in/passkey/options',
  summary: 'Begin signing in with a passkey',
  answer: WebAuthnJson,
});
export const finishPasskeySignIn = endpoint({
  method: 'POST',
  path: '/sign-in/passkey',
  summary: 'Finish signing in with a passkey',
  body: z.strictObject({ response: WebAuthnJson }),
  answer: SignInAnswer,
});
