import type { PartPage } from '#contract/parts.ts';
import { id } from '../moderation/samples.ts';
import { photo } from '../marks/samples.ts';

/** A gear case of one's own, on the bench. */
export function part(over: Partial<PartPage> = {}): PartPage {
  return {
    id: id(71),
    title: 'Gear case',
    partType: { slug: 'gear-case', name: 'Gear case' },
    partTypeId: id(72),
    maker: { slug: 'brackwater-tractor-works', name: 'Brackwater Tractor Works' },
    makerId: id(73),
    casting: null,
    number: 'B4406',
    visibility: 'private',
    recordedAt: '2026-03-01T10:00:00Z',
    photo: photo(1),
    photos: [photo(1), photo(2)],
    marks: [],
    fittedTo: null,
    condition: 'One ear cracked',
    revision: 3,
    called: null,
    foundOn: { modelId: id(74), model: { slug: 'brackwater-30-crawler', name: '30 Crawler' }, serial: '3C 1204' },
    note: 'Under the bench',
    isMine: true,
    can: { change: true, remove: true, addMark: true },
    workingOut: false,
    ...over,
  };
}
