import type { Knex } from 'knex';
import type { PartForm } from '#contract/parts.ts';
import { MachineModel } from '#db/models/machine-model.ts';
import { Maker } from '#db/models/maker.ts';
import { PartPhoto } from '#db/models/part-photo.ts';
import { PartType } from '#db/models/part-type.ts';
import type { Part } from '#db/models/part.ts';
import { wrongValue } from '#server/services/wrong-value.ts';
import { requireOwnPhotos } from './own-photos.ts';

type PartColumns = Pick<Part, 'partTypeId' | 'called' | 'makerId' | 'foundModelId' | 'foundSerial' | 'condition' | 'note' | 'visibility'>;

/**
 * What a holder says of a part, as the columns have it.
 *
 * @throws ProblemError `invalid` at what names a fact that is not in the catalogue, or a photo that is not the holder's.
 */
export async function checkedPart(form: PartForm, holderId: string, trx: Knex.Transaction): Promise<PartColumns> {
  const { partTypeId, makerId, foundModelId, visibility, photoIds } = form;
  if (partTypeId !== null && !(await PartType.query(trx).findById(partTypeId))) throw wrongValue(['partTypeId'], 'No part type in the catalogue has this id');
  if (makerId !== null && !(await Maker.query(trx).findById(makerId))) throw wrongValue(['makerId'], 'No maker in the catalogue has this id');
  if (foundModelId !== null && !(await MachineModel.query(trx).findById(foundModelId))) throw wrongValue(['foundModelId'], 'No model in the catalogue has this id');
  await requireOwnPhotos(holderId, photoIds, (place) => ['photoIds', place], trx);
  return {
    partTypeId,
    makerId,
    foundModelId,
    visibility,
    called: orNothing(form.called),
    foundSerial: orNothing(form.foundSerial),
    condition: orNothing(form.condition),
    note: orNothing(form.note),
  };
}

/** The photos of a part are these and no others, in this order. */
export async function writePartPhotos(partId: string, photoIds: readonly string[], trx: Knex.Transaction): Promise<void> {
  await PartPhoto.query(trx).delete().where({ partId });
  if (photoIds.length > 0) await PartPhoto.query(trx).insert(photoIds.map((photoId, ordinal) => ({ partId, photoId, ordinal })));
}

function orNothing(text: string | null): string | null {
  return text === '' ? null : text;
}
