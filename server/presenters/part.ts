import type { z } from 'zod';
import type { PartItem, PartPage } from '#contract/parts.ts';
import type { Photo } from '#db/models/photo.ts';
import type { PartInView } from '#server/services/parts/load-parts.ts';
import { partTitle } from '#server/services/parts/part-title.ts';
import type { PartOnRecord } from '#server/services/parts/read-part.ts';
import { maskedSerial } from '#server/services/marks/shown-serial.ts';
import type { Viewer } from '#server/policies/viewer.ts';
import { presentNamed } from './common.ts';
import { presentFactRef } from './fact.ts';
import { loaded } from './loaded.ts';
import { presentMachine, presentMarkInShort } from './mark.ts';
import { presentPhoto } from './photo.ts';

type Item = z.input<typeof PartItem>;
type Page = z.input<typeof PartPage>;

export function presentPartItem(inView: PartInView): Item {
  const { viewer, part, marks, isClaimHidden, casting, fitting } = inView;
  const { id, partType, visibility, recordedAt, condition } = part;
  const maker = part.casting?.maker ?? part.maker ?? null;
  const shown = [...loaded(part.photos), ...marks.flatMap(({ mark }) => loaded(mark.photos))].flatMap(({ photo }) => photo ?? []);
  const number = marks.find(({ mark }) => mark.kind === 'casting-number' && mark.reading !== null);
  return {
    id,
    // What the holder calls it may say what is read on it.
    title: partTitle(isClaimHidden ? { ...part, called: null } : part),
    partType: partType ? presentNamed(partType) : null,
    maker: maker && presentNamed(maker),
    casting: isClaimHidden ? null : casting && presentFactRef(casting),
    number: number === undefined || number.isHidden ? null : number.mark.reading,
    visibility,
    recordedAt,
    photo: shown[0] ? presentPhotoTo(viewer, shown[0]) : null,
    marks: marks.map(presentMarkInShort),
    fittedTo: isClaimHidden ? null : presentFitting(fitting, viewer),
    condition: isClaimHidden ? null : condition,
  };
}

export function presentPart({ can, ...inView }: PartOnRecord): Page {
  const { viewer, part, marks, isMine, isClaimHidden } = inView;
  return {
    ...presentPartItem(inView),
    revision: part.revision,
    called: isClaimHidden ? null : part.called,
    foundOn: isClaimHidden ? null : presentFoundOn(inView),
    note: isMine ? part.note : null,
    photos: loaded(part.photos).map(({ photo }) => presentPhotoTo(viewer, loaded(photo))),
    partTypeId: part.partTypeId,
    makerId: part.makerId,
    isMine,
    can,
    workingOut: marks.some(({ isWorkedOut }) => !isWorkedOut),
  };
}

function presentFitting(fitting: PartInView['fitting'], viewer: Viewer): Item['fittedTo'] {
  return fitting && { ...presentMachine(loaded(fitting.machine), viewer), position: loaded(fitting.position).name };
}

function presentFoundOn({ part, isMine }: PartInView): Page['foundOn'] {
  const { foundModelId, foundModel, foundSerial } = part;
  if (foundModelId === null && foundSerial === null) return null;
  return {
    modelId: foundModelId,
    model: foundModel ? presentNamed(foundModel) : null,
    serial: foundSerial === null || isMine ? foundSerial : maskedSerial(foundSerial),
  };
}

function presentPhotoTo(viewer: Viewer, photo: Photo): NonNullable<Item['photo']> {
  return presentPhoto(photo, { isOwner: viewer.kind === 'member' && viewer.id === photo.ownerId });
}
