import { mkdtemp, readdir, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { Knex } from 'knex';
import type supertest from 'supertest';
import { createPhotoMeans } from '#server/files/photo-means.ts';
import type { PhotoMeans } from '#server/files/photo-means.ts';
import { sessionOf } from './people.ts';
import type { TestPeople } from './people.ts';

export type PhotoFolder = PhotoMeans & {
  /** Every file in it, received, half kept or kept, by its path there. */
  readonly files: () => Promise<readonly string[]>;
  readonly directory: string;
  readonly remove: () => Promise<void>;
};

/** A photo store in a folder of its own. */
export async function photoFolder(): Promise<PhotoFolder> {
  const directory = await mkdtemp(join(tmpdir(), 'pourbook-photos-'));
  return {
    ...createPhotoMeans({ directory, bucket: undefined }),
    directory,
    files: async () => {
      const all = await readdir(directory, { recursive: true, withFileTypes: true });
      return all.filter((one) => one.isFile()).map((one) => join(one.parentPath, one.name).slice(directory.length + 1)).sort();
    },
    remove: () => rm(directory, { recursive: true, force: true }),
  };
}

type Sent = { readonly name?: string; readonly type?: string; readonly keepDate?: boolean };

/** Sends a file as a page does. */
export function upload(browser: supertest.Agent, file: Buffer, { name = 'block.jpg', type = '', keepDate }: Sent = {}): supertest.Test {
  const call = browser.post('/api/photos');
  if (keepDate !== undefined) void call.field('keepDate', String(keepDate));
  return call.attach('photo', file, { filename: name, contentType: type === '' ? 'application/octet-stream' : type });
}

/** How many rows there are of photos, pictures and their files. */
export async function rowsOf(knex: Knex): Promise<Readonly<Record<string, number>>> {
  const count = async (table: string): Promise<number> => Number((await knex(table).count({ count: '*' }))[0]?.['count']);
  return { photos: await count('photos'), pictures: await count('pictures'), files: await count('picture_files') };
}

export type PhotoPerson = { readonly browser: supertest.Agent; readonly memberId: string; readonly cookie: string };

/** People of a test file by what they are there, each signed in once, with a browser over the app of the moment. */
export function usePhotoPeople(people: TestPeople): (who: string) => Promise<PhotoPerson> {
  const known = new Map<string, { readonly memberId: string; readonly cookie: string }>();
  return async (who) => {
    let person = known.get(who);
    if (person === undefined) {
      const member = await people.addMember();
      person = { memberId: member.id, cookie: `session=${sessionOf(await people.signedIn(member)) ?? ''}` };
      known.set(who, person);
    }
    return { ...person, browser: people.browser().set('Cookie', person.cookie) };
  };
}
