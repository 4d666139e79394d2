import type { Router } from 'express';
import * as contract from '#contract/marks.ts';
import { presentMark } from '#server/presenters/mark.ts';
import { readMark } from '#server/services/marks/read-mark.ts';
import type { ApiDependencies } from '../dependencies.ts';
import { serve } from '../serve.ts';

export function mountMarks(router: Router, { knex }: ApiDependencies): void {
  serve(router, contract.readMark, async ({ params }) => presentMark(await readMark(params.id, knex)));
}
