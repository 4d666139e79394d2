import type { Router } from 'express';
import { decodeMark } from '#contract/decode.ts';
import { presentDecodedMark } from '#server/presenters/decoding.ts';
import { decodeMark as decodeStoredMark } from '#server/services/decode-mark.ts';
import type { ApiDependencies } from '../dependencies.ts';
import { serve } from '../serve.ts';

export function mountDecode(router: Router, dependencies: ApiDependencies): void {
  serve(router, decodeMark, async ({ body }) => presentDecodedMark(await decodeStoredMark(body, dependencies)));
}
