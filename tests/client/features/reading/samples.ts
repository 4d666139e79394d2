import type { z } from 'zod';
import { MarkPage, ReadingDesk } from '#contract/marks.ts';
import { Photo } from '#contract/photos.ts';
import type { MarkPhoto } from '#contract/parts.ts';
import { id } from '../moderation/samples.ts';

/** What the desk is told, in the contract's shapes. */

export const MARK = id(70);

const file = (name: string, width: number, height: number) => ({ url: `/photos/address/${name}-${width}.webp`, width, height, type: 'image/webp' as const });
const rendition = (name: string, width: number, height: number) => ({ ...file(name, width, height), files: [file(name, width, height)] });

export const NO_RENDITIONS = { thumb: null, page: null, full: null, relief: null };

/** Four by three, 12 megapixels, ready. */
export function photo(given: Partial<z.input<typeof Photo>> = {}): Photo {
  return Photo.parse({
    id: id(80),
    state: 'ready',
    failure: null,
    width: 4000,
    height: 3000,
    name: null,
    takenOn: null,
    renditions: { thumb: rendition('thumb', 320, 240), page: rendition('page', 1600, 1200), full: rendition('full', 4000, 3000), relief: rendition('relief', 2400, 1800) },
    ...given,
  });
}

export function placed(given: Partial<MarkPhoto> = {}): MarkPhoto {
  return { photo: photo(), region: null, turn: 0, mirrored: false, ...given };
}

/** A date mark that its holder is the first to read. */
export function desk(given: Partial<z.input<typeof ReadingDesk>> = {}): ReadingDesk {
  return ReadingDesk.parse({
    id: MARK,
    kind: 'date-code',
    technique: 'cast',
    revision: 1,
    photos: [placed()],
    blind: false,
    first: true,
    isHolder: true,
    mine: null,
    part: {
      id: id(60),
      title: 'Cylinder block',
      maker: { slug: 'brackwater', name: 'Brackwater Tractor Works' },
      casting: { kind: 'casting', id: id(61), slug: 'brackwater-b4406', title: 'B4406' },
      made: { from: '1938-07-01', to: '1944-03-31' },
    },
    narrowing: { makerId: id(62), from: '1938-07-01', to: '1944-03-31' },
    ...given,
  });
}

/** The same to whoever reads after others without having seen what they read. */
export function blindDesk(): ReadingDesk {
  return desk({ blind: true, first: false, isHolder: false, part: null, narrowing: null });
}

/** The mark's page as the register answers it after a reading. */
export function markPage(given: Partial<z.input<typeof MarkPage>> = {}): MarkPage {
  return MarkPage.parse({
    id: MARK,
    kind: 'date-code',
    technique: 'cast',
    revision: 2,
    hidden: false,
    evidence: 'photographed',
    wantsReading: true,
    photos: [placed()],
    reading: 'BBOCB',
    inForce: null,
    readings: [],
    part: null,
    maker: null,
    casting: null,
    machine: null,
    dates: null,
    workingOut: false,
    can: { read: true, change: true, remove: true },
    ...given,
  });
}
