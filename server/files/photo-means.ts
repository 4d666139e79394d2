import { join } from 'node:path';
import { createBucketStore } from './bucket-store.ts';
import type { BucketSettings } from './bucket-store.ts';
import { createGate } from './gate.ts';
import type { Gate } from './gate.ts';
import { createLocalStore } from './local-store.ts';
import type { PhotoStore } from './photo-store.ts';

export type PhotoSettings = {
  /** Where photos are kept, and received in any case. */
  readonly directory: string;
  /** Where they are kept instead. */
  readonly bucket: BucketSettings | undefined;
};

/** What work with photos needs besides the database; one for the whole process. */
export type PhotoMeans = {
  readonly store: PhotoStore;
  /** Where files are received and worked on. */
  readonly workDirectory: string;
  /** What decodes or encodes goes through here. */
  readonly gate: Gate;
};

/** Pictures worked on at once, and uploads that may wait for it. */
const AT_ONCE = 2;
const MOST_WAITING = 24;

export function createPhotoMeans({ directory, bucket }: PhotoSettings): PhotoMeans {
  const workDirectory = join(directory, 'incoming');
  return {
    store: bucket === undefined ? createLocalStore(directory, workDirectory) : createBucketStore(bucket),
    workDirectory,
    gate: createGate(AT_ONCE, MOST_WAITING),
  };
}
