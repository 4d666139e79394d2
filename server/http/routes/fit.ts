import type { Router } from 'express';
import { judgeFitOfPart } from '#contract/fit.ts';
import { presentFit } from '#server/presenters/fit.ts';
import { judgePart } from '#server/services/judge-part.ts';
import { serve } from '../serve.ts';

export function mountFit(router: Router): void {
  serve(router, judgeFitOfPart, ({ body }) => presentFit(judgePart(body)));
}
