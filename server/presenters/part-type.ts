import type { PartTypeItem, PartTypePage } from '#contract/part-types.ts';
import type { CountedPartType } from '#server/services/list-part-types.ts';
import type { PartTypeOnRecord } from '#server/services/read-part-type.ts';
import { presentNamed, presentProvenance } from './common.ts';

export function presentPartTypeItem({ partType, castings }: CountedPartType): PartTypeItem {
  return { id: partType.id, slug: partType.slug, name: partType.name, castings };
}

export function presentPartType(onRecord: PartTypeOnRecord): PartTypePage {
  const { partType, models, records } = onRecord;
  return {
    ...presentPartTypeItem(onRecord),
    note: partType.note,
    caution: partType.caution,
    models: models.map(presentNamed),
    provenance: presentProvenance(records.of(partType.id)),
  };
}
