import type { Router } from 'express';
import * as contract from '#contract/ciphers.ts';
import { presentCipher, presentCipherItem } from '#server/presenters/cipher.ts';
import { presentPage } from '#server/presenters/common.ts';
import { presentCipherHistory } from '#server/presenters/history.ts';
import { listCiphers } from '#server/services/list-ciphers.ts';
import { readCipher } from '#server/services/read-cipher.ts';
import { readCipherHistory } from '#server/services/read-history.ts';
import type { ApiDependencies } from '../dependencies.ts';
import { serve } from '../serve.ts';

export function mountCiphers(router: Router, { knex }: ApiDependencies): void {
  serve(router, contract.listCiphers, async ({ query }) => presentPage(await listCiphers(query, knex), presentCipherItem));
  serve(router, contract.readCipher, async ({ params }) => presentCipher(await readCipher(params.slug, knex)));
  serve(router, contract.readCipherHistory, async ({ params }) => presentCipherHistory(await readCipherHistory(params.slug, knex)));
}
