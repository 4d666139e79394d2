import { z } from 'zod';
import type { PasskeyItem as PasskeyAnswer } from '#contract/second-factors.ts';
import type { Passkey } from '#db/models/passkey.ts';

type PasskeyItem = z.infer<typeof PasskeyAnswer>;

const PlainJson = z.record(z.string(), z.json());

/** Not its key: of that the browser needs nothing. */
export function presentPasskey({ id, name, addedAt, lastUsedAt }: Passkey): PasskeyItem {
  return { id, name, addedAt, lastUsedAt };
}

/** Options of the Web Authentication API as the plain JSON they are made of; what is not set is left out. */
export function presentPasskeyOptions(options: object): z.infer<typeof PlainJson> {
  return PlainJson.parse(JSON.parse(JSON.stringify(options)));
}
