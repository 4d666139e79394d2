import { startAuthentication, startRegistration } from '@simplewebauthn/browser';
import { z } from 'zod';
import { addPasskey, finishPasskeySignIn, startPasskey, startPasskeySignIn } from '#contract/second-factors.ts';
import { call } from '../../lib/call.ts';
import { ProblemError, UnreachableError } from '../../lib/problem-error.ts';

/** The parts of the Web Authentication API's JSON (W3C, Level 3, 5.1) that the register sends and the browser's device is asked with. */
const Credentials = z.array(z.object({ id: z.string(), type: z.literal('public-key') }));
const Verification = z.enum(['discouraged', 'preferred', 'required']);
const CreationOptions = z.object({
  rp: z.object({ name: z.string(), id: z.string().exactOptional() }),
  user: z.object({ id: z.string(), name: z.string(), displayName: z.string() }),
  challenge: z.string(),
  pubKeyCredParams: z.array(z.object({ alg: z.number(), type: z.literal('public-key') })),
  timeout: z.number().exactOptional(),
  excludeCredentials: Credentials.exactOptional(),
  authenticatorSelection: z
    .object({
      residentKey: Verification.exactOptional(),
      requireResidentKey: z.boolean().exactOptional(),
      userVerification: Verification.exactOptional(),
    })
    .exactOptional(),
  attestation: z.enum(['none', 'direct', 'enterprise', 'indirect']).exactOptional(),
});
const RequestOptions = z.object({
  challenge: z.string(),
  timeout: z.number().exactOptional(),
  rpId: z.string().exactOptional(),
  allowCredentials: Credentials.exactOptional(),
  userVerification: Verification.exactOptional(),
});
const Json = z.record(z.string(), z.json());

/** Has the device make a passkey and the register keep it under `name`. */
export async function makePasskey(name: string) {
  const optionsJSON = CreationOptions.parse(await call(startPasskey, {}));
  const response = await startRegistration({ optionsJSON });
  return call(addPasskey, { body: { name, response: asJson(response) } });
}

/** Has the device answer with a passkey: alone, or as the second step after a password, whichever the register is waiting for. */
export async function signInWithPasskey() {
  const optionsJSON = RequestOptions.parse(await call(startPasskeySignIn, {}));
  const response = await startAuthentication({ optionsJSON });
  return call(finishPasskeySignIn, { body: { response: asJson(response) } });
}

/** What the device itself would not do, in words; null when it was the register that refused or could not be reached. */
export function sayDeviceFailure(error: Error): string | null {
  if (error instanceof ProblemError || error instanceof UnreachableError) return null;
  if (error.name === 'InvalidStateError') return 'This device holds a passkey for your account already.';
  return 'The passkey was not used: it was called off, took too long, or this device holds none for this site. Nothing was changed; try again when you like.';
}

/** As it travels: parts that are undefined are left out. */
function asJson(response: object) {
  return Json.parse(JSON.parse(JSON.stringify(response)));
}
