import type { ModelItem, ModelPage, Position as PositionAnswer } from '#contract/models.ts';
import type { Fitment } from '#db/models/fitment.ts';
import type { MachineModel } from '#db/models/machine-model.ts';
import type { Position } from '#db/models/position.ts';
import type { FactRecords } from '#server/services/fact-records.ts';
import type { ModelOnRecord } from '#server/services/read-model.ts';
import { presentNamed, presentOpenSpan, presentProvenance } from './common.ts';
import { loaded } from './loaded.ts';
import { presentSerialRangeItem, presentSeriesRef } from './serial-range.ts';

export function presentModelItem(model: MachineModel): ModelItem {
  return {
    id: model.id,
    slug: model.slug,
    name: model.name,
    maker: presentNamed(loaded(model.maker)),
    kindOfMachine: model.machineKind,
    made: presentOpenSpan(model.made),
  };
}

export function presentModel({ model, positions, fitments, series, ranges, anchors, records }: ModelOnRecord): ModelPage {
  return {
    ...presentModelItem(model),
    note: model.note,
    positions: positions.map((position) => presentPosition(position, fitments, records)),
    series: series.map((one) => ({
      ...presentSeriesRef(one),
      provenance: presentProvenance(records.of(one.id)),
      ranges: ranges
        .filter(({ seriesId }) => seriesId === one.id)
        .map((range) => ({ ...presentSerialRangeItem(range, one), provenance: presentProvenance(records.of(range.id)) })),
      anchors: anchors
        .filter(({ seriesId }) => seriesId === one.id)
        .map(({ id, number, built }) => ({
          id,
          number,
          built: { from: built.from, to: built.to },
          provenance: presentProvenance(records.of(id)),
        })),
    })),
    provenance: presentProvenance(records.of(model.id)),
  };
}

function presentPosition(position: Position, fitments: readonly Fitment[], records: FactRecords): PositionAnswer {
  const partType = loaded(position.partType);
  return {
    id: position.id,
    slug: position.slug,
    name: position.name,
    partType: presentNamed(partType),
    weight: position.weight,
    lead: position.lead && { least: position.lead.from ?? 0, most: position.lead.to },
    caution: partType.caution,
    castings: castingsAt(position, fitments),
    provenance: presentProvenance(records.of(position.id)),
  };
}

/** Castings that go there on some serial or other, each once. */
function castingsAt(position: Position, fitments: readonly Fitment[]): PositionAnswer['castings'] {
  const fitting = fitments.filter(({ positionId, verdict }) => positionId === position.id && verdict !== 'does-not-belong');
  const castings = new Map(fitting.map((fitment) => [fitment.castingId, loaded(fitment.casting)]));
  return [...castings.values()]
    .map(({ slug, number, pattern }) => ({ slug, number, pattern }))
    .toSorted((one, other) => (one.slug < other.slug ? -1 : 1));
}
