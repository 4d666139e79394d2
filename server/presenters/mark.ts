import type { z } from 'zod';
import type { MarkOnList, MarkPage, MarkToRead, ReadingDesk, ReadingInForce } from '#contract/marks.ts';
import type { MarkInShort, MarkPhoto as MarkPhotoShown } from '#contract/parts.ts';
import type { Agreement, CombinedReading } from '#domain/marks/combine-readings.ts';
import type { MarkDecoding } from '#db/models/mark-decoding.ts';
import type { MarkPhoto } from '#db/models/mark-photo.ts';
import type { Machine } from '#db/models/machine.ts';
import type { Part } from '#db/models/part.ts';
import type { MarkInView } from '#server/services/marks/load-marks.ts';
import type { DeskOnRecord } from '#server/services/marks/open-desk.ts';
import type { MarkOnRecord } from '#server/services/marks/read-mark.ts';
import { shownSerial } from '#server/services/marks/shown-serial.ts';
import { partTitle } from '#server/services/parts/part-title.ts';
import type { Viewer } from '#server/policies/viewer.ts';
import { presentNamed, presentOpenSpan } from './common.ts';
import { presentFactRef } from './fact.ts';
import { loaded } from './loaded.ts';
import { presentPhoto } from './photo.ts';

type Page = z.input<typeof MarkPage>;
type Desk = z.input<typeof ReadingDesk>;
type InShort = z.input<typeof MarkInShort>;
type OnPhoto = z.input<typeof MarkPhotoShown>;

/** Likeliest dates told where a mark is one among many. */
const DATES_IN_SHORT = 10;

export function presentMark(onRecord: MarkOnRecord): Page {
  const { viewer, mark, isHidden, maker, machine, cipher, readings, isWorkedOut, inForce, can } = onRecord;
  const { id, kind, technique, revision, evidence, wantsReadingSince, decoding } = mark;
  return {
    id,
    kind,
    technique,
    revision,
    hidden: isHidden,
    evidence,
    wantsReading: wantsReadingSince !== null,
    photos: presentPhotosOf(onRecord),
    reading: isHidden ? null : mark.reading,
    inForce: isHidden ? null : presentInForce(inForce, readings),
    readings: isHidden ? [] : readings.map((reading) => presentReading(reading, viewer)),
    part: presentPart(onRecord),
    maker: maker && presentNamed(maker),
    casting: presentCasting(onRecord),
    machine: isHidden || machine === null ? null : presentMachine(machine, viewer),
    dates: isHidden || !isWorkedOut || !decoding ? null : { ...presentDates(decoding), cipher: cipher && presentFactRef(cipher), cipherVersion: decoding.cipherVersion },
    workingOut: !isWorkedOut,
    can,
  };
}

export function presentMarkInShort(inView: MarkInView): InShort {
  const { mark, isHidden, isWorkedOut } = inView;
  const { id, kind, technique, reading, evidence, wantsReadingSince, decoding } = mark;
  const [photo] = presentPhotosOf(inView);
  return {
    id,
    kind,
    technique,
    reading: isHidden ? null : reading,
    hidden: isHidden,
    evidence,
    wantsReading: wantsReadingSince !== null,
    dates: isHidden || !isWorkedOut || !decoding ? null : presentDates(decoding, DATES_IN_SHORT),
    photo: photo ?? null,
  };
}

export function presentMarkOnList(inView: MarkInView): z.input<typeof MarkOnList> {
  const { mark, maker } = inView;
  return {
    ...presentMarkInShort(inView),
    maker: maker && presentNamed(maker),
    part: presentPart(inView),
    casting: presentCasting(inView),
    readAt: mark.readAt,
  };
}

export function presentMarkToRead(inView: MarkInView): z.input<typeof MarkToRead> {
  const { id, kind, technique, wantsReadingSince } = inView.mark;
  return { id, kind, technique, photo: loaded(presentPhotosOf(inView)[0]), askedAt: loaded(wantsReadingSince) };
}

export function presentDesk({ inView, isBlind, isFirst, mine }: DeskOnRecord): Desk {
  const { mark, acquaintance, maker, casting } = inView;
  const { id, kind, technique, revision, part } = mark;
  const made = part?.casting?.made ?? null;
  return {
    id,
    kind,
    technique,
    revision,
    photos: presentPhotosOf(inView),
    blind: isBlind,
    first: isFirst,
    isHolder: acquaintance.isHolder,
    mine: mine && { id: mine.id, text: mine.text, at: mine.madeAt },
    part:
      isBlind || !part
        ? null
        : { id: part.id, title: partTitle(part), maker: maker && presentNamed(maker), casting: casting && presentFactRef(casting), made: made && presentOpenSpan(made) },
    narrowing: isBlind ? null : { makerId: maker?.id ?? null, ...presentOpenSpan(made) },
  };
}

/** A machine as the viewer may know it: its owner sees all of its serial. */
export function presentMachine(machine: Machine, viewer: Viewer): NonNullable<Page['machine']> {
  const isOwner = viewer.kind === 'member' && viewer.id === machine.ownerId;
  return { model: presentNamed(loaded(machine.model)), serial: shownSerial(isOwner ? { ...machine, serialShown: true } : machine) };
}

function presentPhotosOf({ mark, viewer }: MarkInView): OnPhoto[] {
  return loaded(mark.photos).map((photo) => presentPlacing(photo, viewer));
}

function presentPlacing({ photo, regionLeft, regionTop, regionWidth, regionHeight, turn, mirrored }: MarkPhoto, viewer: Viewer): OnPhoto {
  const isWhole = regionLeft === null || regionTop === null || regionWidth === null || regionHeight === null;
  return {
    photo: presentPhoto(loaded(photo), { isOwner: viewer.kind === 'member' && viewer.id === photo?.ownerId }),
    region: isWhole ? null : { left: regionLeft, top: regionTop, width: regionWidth, height: regionHeight },
    turn,
    mirrored,
  };
}

function presentPart({ mark: { part }, isHidden }: MarkInView): Page['part'] {
  return isHidden || !part ? null : presentPartRef(part);
}

function presentPartRef(part: Part): NonNullable<Page['part']> {
  return { id: part.id, title: partTitle(part) };
}

function presentCasting({ casting, isHidden }: MarkInView): Page['casting'] {
  return isHidden ? null : casting && presentFactRef(casting);
}

function presentReading({ reading, replaced }: MarkOnRecord['readings'][number], viewer: Viewer): Page['readings'][number] {
  const { id, text, reader, readerId, madeAt, independent, asHolder, takenBackAt } = reading;
  return {
    id,
    text,
    by: loaded(reader).displayName,
    isMine: viewer.kind === 'member' && viewer.id === readerId,
    at: madeAt,
    independent,
    asHolder,
    takenBackAt,
    replaced,
  };
}

function presentInForce(inForce: CombinedReading | null, readings: MarkOnRecord['readings']): z.input<typeof ReadingInForce> | null {
  if (inForce === null) return null;
  const names = new Map(readings.map(({ reading }) => [reading.readerId, loaded(reading.reader).displayName]));
  return {
    text: inForce.text,
    whole: presentAgreement(inForce.whole),
    places: inForce.places.map((place) => ({
      ...presentAgreement(place),
      settled: place.settled,
      position: place.position,
      said: place.said.map(({ text, readers }) => ({ text, by: readers.flatMap((id) => names.get(id) ?? []) })),
    })),
  };
}

function presentAgreement({ agree, readers, low, high }: Agreement): Agreement {
  return { agree, readers, low, high };
}

function presentDates({ status, candidates, total }: MarkDecoding, most = candidates.length): NonNullable<InShort['dates']> {
  return { status, total, candidates: candidates.slice(0, most).map(({ from, to, share }) => ({ from, to, share })) };
}
