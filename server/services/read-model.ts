import type { Knex } from 'knex';
import { Anchor } from '#db/models/anchor.ts';
import { Fitment } from '#db/models/fitment.ts';
import { MachineModel } from '#db/models/machine-model.ts';
import { Position } from '#db/models/position.ts';
import { SerialRange } from '#db/models/serial-range.ts';
import { Series } from '#db/models/series.ts';
import { factRecords } from './fact-records.ts';
import type { FactRecords } from './fact-records.ts';

export type ModelOnRecord = {
  readonly model: MachineModel;
  readonly positions: readonly Position[];
  readonly fitments: readonly Fitment[];
  readonly series: readonly Series[];
  readonly ranges: readonly SerialRange[];
  readonly anchors: readonly Anchor[];
  readonly records: FactRecords;
};

/** @throws NotFoundError where no model has the slug. */
export async function readModel(slug: string, knex: Knex): Promise<ModelOnRecord> {
  const model = await MachineModel.query(knex).findOne({ slug }).withGraphFetched('maker').throwIfNotFound();
  const positions = await Position.query(knex).where({ modelId: model.id }).modify('asChecklist').withGraphFetched('partType');
  const fitments = await Fitment.query(knex).where({ modelId: model.id }).withGraphFetched('casting');
  const series = await Series.query(knex)
    .where({ modelId: model.id })
    .orderBy(['prefix', 'label', 'id'])
    .withGraphFetched('[model, works, seriesAccounts]');
  const seriesIds = series.map(({ id }) => id);
  const ranges = await SerialRange.query(knex).whereIn('seriesId', seriesIds).orderBy(['numbers', 'id']).withGraphFetched('account');
  const anchors = await Anchor.query(knex).whereIn('seriesId', seriesIds).orderBy(['number', 'id']);
  const facts = [model, ...positions, ...series, ...ranges, ...anchors];
  return { model, positions, fitments, series, ranges, anchors, records: await factRecords(facts.map(({ id }) => id), knex) };
}
