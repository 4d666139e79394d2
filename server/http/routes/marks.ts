import type { Router } from 'express';
import * as contract from '#contract/marks.ts';
import { presentPage } from '#server/presenters/common.ts';
import { presentDesk, presentMark, presentMarkOnList, presentMarkToRead } from '#server/presenters/mark.ts';
import { changeMark } from '#server/services/marks/change-mark.ts';
import { listMarksToRead } from '#server/services/marks/list-marks-to-read.ts';
import { listMarks } from '#server/services/marks/list-marks.ts';
import { lookUpReadings } from '#server/services/marks/look-up-readings.ts';
import { makeReading } from '#server/services/marks/make-reading.ts';
import { openDesk } from '#server/services/marks/open-desk.ts';
import { placeMark } from '#server/services/marks/place-mark.ts';
import { readMark } from '#server/services/marks/read-mark.ts';
import { recordMark } from '#server/services/marks/record-mark.ts';
import { removeMark } from '#server/services/marks/remove-mark.ts';
import { takeBackReading } from '#server/services/marks/take-back-reading.ts';
import { takePhotoOffMark } from '#server/services/marks/take-photo-off-mark.ts';
import type { ApiDependencies } from '../dependencies.ts';
import { serve } from '../serve.ts';

/** Marks and who read what there. `/marks/to-read` goes before `/marks/:id`, which it would be taken for. */
export function mountMarks(router: Router, { knex, ciphers }: ApiDependencies): void {
  serve(router, contract.listMarks, async ({ query: { hasPhoto, wantsReading, ...query } }, { viewer }) => {
    const request = { ...query, hasPhoto: asSaid(hasPhoto), wantsReading: asSaid(wantsReading) };
    return presentPage(await listMarks(viewer, request, knex), ({ inView }) => presentMarkOnList(inView));
  });
  serve(router, contract.listMarksToRead, async ({ query }, { viewer }) =>
    presentPage(await listMarksToRead(viewer, query, knex), ({ inView }) => presentMarkToRead(inView)),
  );
  serve(router, contract.readMark, async ({ params }, { viewer }) => presentMark(await readMark(viewer, params.id, knex)));
  serve(router, contract.openDesk, async ({ params }, { viewer }) => presentDesk(await openDesk(viewer, params.id, knex)));

  serve(router, contract.recordMark, async ({ params, body }, context) => presentMark(await recordMark(params.id, body, context, ciphers, knex)));
  serve(router, contract.changeMark, async ({ params, body }, context) => presentMark(await changeMark(params.id, body, context, ciphers, knex)));
  serve(router, contract.removeMark, async ({ params }, context) => {
    await removeMark(params.id, context, ciphers, knex);
    return { done: true as const };
  });
  serve(router, contract.placeMark, async ({ params, body }, context) => presentMark(await placeMark(params, body, context, knex)));
  serve(router, contract.takePhotoOffMark, async ({ params }, context) => presentMark(await takePhotoOffMark(params, context, knex)));

  serve(router, contract.makeReading, async ({ params, body }, context) => presentMark(await makeReading(params.id, body, context, ciphers, knex)));
  serve(router, contract.takeBackReading, async ({ params }, context) => presentMark(await takeBackReading(params.id, context, ciphers, knex)));
  serve(router, contract.lookUpReadings, async ({ params }, context) => presentMark(await lookUpReadings(params.id, context, knex)));
}

function asSaid(word: 'true' | 'false' | undefined): boolean | undefined {
  return word === undefined ? undefined : word === 'true';
}
