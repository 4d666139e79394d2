import { MarkPage, ReadingDesk } from '#contract/marks.ts';
import { PartPage } from '#contract/parts.ts';
import type { Mark } from '#db/models/mark.ts';
import { addPhoto } from '#tests/support/factories/record.ts';
import type { SomeoneSignedIn } from './contributing.ts';
import type { TestPeople } from './people.ts';

/** What a holder says of a part who says nothing. */
export const BARE_PART = {
  partTypeId: null, called: null, makerId: null, foundModelId: null, foundSerial: null, condition: null, note: null, visibility: 'public', photoIds: [],
} as const;

type PartGiven = Partial<Record<keyof typeof BARE_PART | 'number', unknown>>;

export async function recordPart({ browser }: SomeoneSignedIn, given: PartGiven = {}): Promise<PartPage> {
  return PartPage.parse((await browser.post('/api/parts').send({ ...BARE_PART, number: null, ...given }).expect(201)).body);
}

type MarkGiven = { readonly kind?: Mark['kind']; readonly photoIds?: readonly string[]; readonly reading?: string | null };

export async function recordMark({ browser }: SomeoneSignedIn, partId: string, { kind = 'date-code', photoIds = [], reading = null }: MarkGiven = {}): Promise<MarkPage> {
  const photos = photoIds.map((photoId) => ({ photoId, region: null }));
  return MarkPage.parse((await browser.post(`/api/parts/${partId}/marks`).send({ kind, technique: 'cast', photos, reading }).expect(201)).body);
}

/** A mark with a photo on a public part, so that it wants readings. */
export async function wantedMark(people: TestPeople, holder: SomeoneSignedIn, { part = {}, ...mark }: MarkGiven & { readonly part?: PartGiven } = {}): Promise<MarkPage> {
  const { id: partId } = await recordPart(holder, part);
  const photo = await addPhoto(holder.id, people.knex);
  return recordMark(holder, partId, { photoIds: [photo.id], ...mark });
}

export async function readBy({ browser }: SomeoneSignedIn, mark: Pick<MarkPage, 'id'>, text: string): Promise<MarkPage> {
  return MarkPage.parse((await browser.post(`/api/marks/${mark.id}/readings`).send({ text, photoId: null }).expect(201)).body);
}

export async function markSeenBy({ browser }: Pick<SomeoneSignedIn, 'browser'>, { id }: Pick<MarkPage, 'id'>): Promise<MarkPage> {
  return MarkPage.parse((await browser.get(`/api/marks/${id}`).expect(200)).body);
}

export async function deskOf({ browser }: SomeoneSignedIn, { id }: Pick<MarkPage, 'id'>): Promise<ReadingDesk> {
  return ReadingDesk.parse((await browser.get(`/api/marks/${id}/desk`).expect(200)).body);
}
