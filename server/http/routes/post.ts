import type { Router } from 'express';
import * as contract from '#contract/post.ts';
import { listLocalPost, readLocalPost } from '#server/mail/local-post.ts';
import { ProblemError } from '#server/services/problem-error.ts';
import { serve } from '../serve.ts';

/** The letters of the local post. Whoever reads them can sign in as anybody, so a server for strangers never mounts this. */
export function mountPost(router: Router, folder: string): void {
  serve(router, contract.listPost, async () => ({ items: [...(await listLocalPost(folder))] }));
  serve(router, contract.readPost, async ({ params }) => {
    const letter = await readLocalPost(folder, params.id);
    if (!letter) throw new ProblemError('not-found', 'The local post holds no such letter.');
    return letter;
  });
}
