import type { Router } from 'express';
import { tryCipher } from '#contract/cipher-workbench.ts';
import { presentTriedCipher } from '#server/presenters/tried-cipher.ts';
import { tryCipher as tryOnRecord } from '#server/services/ciphers/try-cipher.ts';
import type { ApiDependencies } from '../dependencies.ts';
import { serve } from '../serve.ts';

export function mountCipherWorkbench(router: Router, { knex }: ApiDependencies): void {
  serve(router, tryCipher, async ({ body }, { viewer }) => presentTriedCipher(await tryOnRecord(viewer, body, knex)));
}
