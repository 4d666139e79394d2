import { z } from 'zod';
import { Id } from './common.ts';
import { endpoint } from './endpoint.ts';
import { DisplayName, Done, Email, GivenPassword, LinkToken, Me, NewPassword } from './people.ts';

export const signUp = endpoint({
  method: 'POST',
  path: '/sign-up',
  summary: 'Open an account; the answer is the same whether the address is known or not, and a letter says the rest',
  body: z.strictObject({ displayName: DisplayName, email: Email, password: NewPassword }),
  answer: Done,
});
export const verifyEmail = endpoint({
  method: 'POST',
  path: '/email/verify',
  summary: 'Confirm an address with the link sent to it: a new account’s, or a changed one',
  body: z.strictObject({ token: LinkToken }),
  answer: Done,
});

/** After the password: signed in, or one more step owed. */
export const SignInAnswer = z.discriminatedUnion('state', [
  z.object({ state: z.literal('signed-in'), me: Me }),
  z.object({ state: z.literal('second-factor'), ways: z.array(z.enum(['authenticator', 'passkey', 'recovery-code'])) }),
]);

export const signIn = endpoint({
  method: 'POST',
  path: '/sign-in',
  summary: 'Sign in with address and password',
  body: z.strictObject({ email: Email, password: GivenPassword }),
  answer: SignInAnswer,
});
export const giveSecondFactor = endpoint({
  method: 'POST',
  path: '/sign-in/second-factor',
  summary: 'Finish signing in with a code from an authenticator or a recovery code',
  body: z.strictObject({ way: z.enum(['authenticator', 'recovery-code']), code: z.string().trim().min(6, 'Type the whole code').max(40) }),
  answer: SignInAnswer,
});
export const signOut = endpoint({ method: 'POST', path: '/sign-out', summary: 'End this session', answer: Done });

export const forgotPassword = endpoint({
  method: 'POST',
  path: '/password/forgot',
  summary: 'Ask for a link to set a new password; the answer is the same whether the address is known or not',
  body: z.strictObject({ email: Email }),
  answer: Done,
});
export const resetPassword = endpoint({
  method: 'POST',
  path: '/password/reset',
  summary: 'Set a new password with the link; ends every session and signs nobody in',
  body: z.strictObject({ token: LinkToken, password: NewPassword }),
  answer: Done,
});

/** Who is asking; `me` null for a visitor. */
export const readMe = endpoint({
  method: 'GET',
  path: '/me',
  summary: 'Who is signed in',
  answer: z.object({ me: Me.nullable() }),
});
export const changeName = endpoint({
  method: 'PUT',
  path: '/me/name',
  summary: 'Change the name shown beside what one entered',
  body: z.strictObject({ displayName: DisplayName }),
  answer: Me,
});
export const changePassword = endpoint({
  method: 'PUT',
  path: '/me/password',
  summary: 'Change the password; ends every other session',
  body: z.strictObject({ password: GivenPassword, newPassword: NewPassword }),
  answer: Done,
});
export const changeEmail = endpoint({
  method: 'PUT',
  path: '/me/email',
  summary: 'Change the address: a link goes to the new one, word to the old',
  body: z.strictObject({ password: GivenPassword, email: Email }),
  answer: Done,
});
/** Asked for again before a sensitive act when the last time is more than ten minutes ago. */
export const confirmIdentity = endpoint({
  method: 'POST',
  path: '/me/confirm',
  summary: 'Prove once more who you are, for ten minutes',
  body: z.discriminatedUnion('way', [
    z.strictObject({ way: z.literal('password'), password: GivenPassword }),
    z.strictObject({ way: z.literal('authenticator'), code: z.string().trim().min(6, 'Type the whole code').max(12) }),
  ]),
  answer: Done,
});
export const closeAccount = endpoint({
  method: 'POST',
  path: '/me/close',
  summary: 'Close the account; contributions stay under "a former member", private things go',
  body: z.strictObject({ password: GivenPassword }),
  answer: Done,
});

export const SessionItem = z.object({
  id: Id,
  current: z.boolean(),
  startedAt: z.iso.datetime({ offset: true }),
  lastSeenAt: z.iso.datetime({ offset: true }),
  /** Browser and system in plain words, as far as the browser tells. */
  device: z.string(),
  secondFactor: z.boolean(),
});
export const listSessions = endpoint({
  method: 'GET',
  path: '/me/sessions',
  summary: 'Where you are signed in',
  answer: z.object({ items: z.array(SessionItem) }),
});
export const endSession = endpoint({
  method: 'DELETE',
  path: '/me/sessions/:id',
  summary: 'End one session',
  params: z.strictObject({ id: Id }),
  answer: Done,
});
export const endOtherSessions = endpoint({ method: 'POST', path: '/me/sessions/end-others', summary: 'End every session but this one', answer: Done });

/** Everything the register holds about the member, as data. */
export const exportMine = endpoint({
  method: 'GET',
  path: '/me/export',
  summary: 'Everything on record about you',
  answer: z.record(z.string(), z.json()),
});
