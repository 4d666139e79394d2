import type { PartTypeItem, PartTypePage, WearLimit } from '#contract/part-types.ts';
import type { WearLimit as WearLimitRow } from '#db/models/wear-limit.ts';
import type { FactRecords } from '#server/services/fact-records.ts';
import type { CountedPartType } from '#server/services/list-part-types.ts';
import type { PartTypeOnRecord } from '#server/services/read-part-type.ts';
import { presentNamed, presentProvenance } from './common.ts';

export function presentPartTypeItem({ partType, castings }: CountedPartType): PartTypeItem {
  return { id: partType.id, slug: partType.slug, name: partType.name, castings };
}

export function presentPartType(onRecord: PartTypeOnRecord): PartTypePage {
  const { partType, models, wearLimits, records } = onRecord;
  return {
    ...presentPartTypeItem(onRecord),
    note: partType.note,
    caution: partType.caution,
    models: models.map(presentNamed),
    wearLimits: wearLimits.map((limit) => presentWearLimit(limit, records)),
    provenance: presentProvenance(records.of(partType.id)),
  };
}

function presentWearLimit(row: WearLimitRow, records: FactRecords): WearLimit {
  const { id, model, measure, unit, asBuiltFrom, asBuiltTo, direction, wearsTo, method, note } = row;
  return {
    id,
    model: model ? presentNamed(model) : null,
    measure,
    unit,
    asBuilt: asBuiltFrom === null ? null : { from: asBuiltFrom, to: asBuiltTo },
    direction,
    limit: wearsTo,
    method,
    note,
    provenance: presentProvenance(records.of(id)),
  };
}
