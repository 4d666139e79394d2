import type { MarkPage, ReadingInForce, ReadingShown } from '#contract/marks.ts';
import type { MarkPhoto } from '#contract/parts.ts';
import type { Photo } from '#contract/photos.ts';
import { CIPHER, id } from '../moderation/samples.ts';

/** A photo of 1,600 by 1,200 with its renditions, or some of them. */
export function photo(number: number, over: Partial<Photo> = {}): Photo {
  const files = (name: string, width: number, height: number) => [
    { url: `/photos/address/${name}-${width}.webp`, width, height, type: 'image/webp' as const },
    { url: `/photos/address/${name}-${width}.avif`, width, height, type: 'image/avif' as const },
  ];
  const rendition = (name: string, width: number, height: number) => {
    const all = files(name, width, height);
    return { ...all[0]!, files: all };
  };
  return {
    id: id(number),
    state: 'ready',
    failure: null,
    width: 1600,
    height: 1200,
    name: `photo-${number}.jpg`,
    takenOn: null,
    renditions: { thumb: rendition('thumb', 640, 480), page: rendition('page', 1600, 1200), full: rendition('full', 1600, 1200), relief: null },
    ...over,
  };
}

export const NO_RENDITIONS: Photo['renditions'] = { thumb: null, page: null, full: null, relief: null };

export function markPhoto(number: number, over: Partial<MarkPhoto> = {}): MarkPhoto {
  return { photo: photo(number), region: { left: 0.25, top: 0.5, width: 0.5, height: 0.25 }, turn: 0, mirrored: false, ...over };
}

export function reading(number: number, over: Partial<ReadingShown> = {}): ReadingShown {
  return {
    id: id(number),
    text: 'B[OD]-BO-CB',
    by: 'Harrow Lane',
    isMine: false,
    at: '2026-03-01T10:00:00Z',
    independent: true,
    asHolder: false,
    takenBackAt: null,
    replaced: false,
    ...over,
  };
}

/** Four readers, one of whom sees an 8 in the first place: Wilson's limits of 3 of 4 are 0.3006 and 0.9544. */
export const DISPUTED: ReadingInForce = {
  text: 'BO',
  whole: { agree: 3, readers: 4, low: 0.3006, high: 0.9544 },
  places: [
    { settled: 'B', position: 0, agree: 3, readers: 4, low: 0.3006, high: 0.9544, said: [{ text: 'B', by: ['Harrow Lane', 'Una', 'Tom'] }, { text: '8', by: ['Esme'] }] },
    { settled: 'O', position: 1, agree: 4, readers: 4, low: 0.5101, high: 1, said: [{ text: 'O', by: ['Harrow Lane', 'Una', 'Tom', 'Esme'] }] },
  ],
};

export function mark(over: Partial<MarkPage> = {}): MarkPage {
  return {
    id: id(70),
    kind: 'date-code',
    technique: 'cast',
    revision: 1,
    hidden: false,
    evidence: 'photographed',
    wantsReading: true,
    photos: [],
    reading: 'B[OD]-BO-CB',
    inForce: null,
    readings: [reading(80)],
    part: { id: id(71), title: 'Gear case' },
    maker: { slug: 'brackwater-tractor-works', name: 'Brackwater Tractor Works' },
    casting: { id: id(21), kind: 'casting', slug: 'brackwater-b4406', title: 'B4406, first pattern' },
    machine: { model: { slug: 'brackwater-30-crawler', name: '30 Crawler' }, serial: '3C 12••' },
    dates: {
      status: 'several',
      cipher: CIPHER,
      cipherVersion: 2,
      candidates: [
        { from: '1941-01-13', to: '1941-01-13', share: 0.5 },
        { from: '1941-11-03', to: '1941-11-03', share: 0.5 },
      ],
      total: 2,
    },
    workingOut: false,
    can: { read: true, change: false, remove: false },
    ...over,
  };
}
