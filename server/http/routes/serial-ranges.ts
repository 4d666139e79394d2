import type { Router } from 'express';
import * as contract from '#contract/serial-ranges.ts';
import { presentPage } from '#server/presenters/common.ts';
import { presentHistory } from '#server/presenters/history.ts';
import { loaded } from '#server/presenters/loaded.ts';
import { presentSerialRange, presentSerialRangeItem } from '#server/presenters/serial-range.ts';
import { listSerialRanges } from '#server/services/list-serial-ranges.ts';
import { readHistory } from '#server/services/read-history.ts';
import { readSerialRange } from '#server/services/read-serial-range.ts';
import type { ApiDependencies } from '../dependencies.ts';
import { serve } from '../serve.ts';

export function mountSerialRanges(router: Router, { knex }: ApiDependencies): void {
  serve(router, contract.listSerialRanges, async ({ query }) =>
    presentPage(await listSerialRanges(query, knex), (range) => presentSerialRangeItem(range, loaded(range.series))),
  );
  serve(router, contract.readSerialRange, async ({ params }) => presentSerialRange(await readSerialRange(params.slug, knex)));
  serve(router, contract.readSerialRangeHistory, async ({ params }) =>
    presentHistory(await readHistory('serial-range', params.slug, knex)),
  );
}
