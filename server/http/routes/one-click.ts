import type { Express } from 'express';
import type { Knex } from 'knex';
import * as contract from '#contract/notices.ts';
import { ProblemError } from '#server/services/problem-error.ts';
import { unsubscribe } from '#server/services/notices/unsubscribe.ts';

/**
 * The button to unsubscribe of a mail program (RFC 8058): one POST to the very address that a person's browser opens as a page, with no
 * cookie, no redirection, and a body that says nothing the address does not, so that it is not read. To open the page changes nothing:
 * programs that look into letters follow their links.
 */
export function mountOneClick(app: Express, knex: Knex): void {
  app.post('/unsubscribe/:token', async (request, response) => {
    const params = contract.unsubscribe.params.safeParse(request.params);
    if (!params.success) throw new ProblemError('not-found', 'This link is not one of ours.');
    await unsubscribe(params.data.token, knex);
    response.set('Cache-Control', 'no-store').type('text/plain').send('We send you no more letters of this kind.\n');
  });
}
