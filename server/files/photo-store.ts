import type { Readable } from 'node:stream';

/**
 * Why the store did not do as it was asked. `missing`: it holds no such file. `full`: there is no room. `corrupt`: the bytes that came are
 * not those that were announced. `away`: it could not be reached, refused, or took too long.
 */
export const STORE_FAULTS = ['missing', 'full', 'corrupt', 'away'] as const;
export type StoreFault = (typeof STORE_FAULTS)[number];

export class PhotoStoreError extends Error {
  readonly fault: StoreFault;

  constructor(fault: StoreFault, message: string, options?: ErrorOptions) {
    super(message, options);
    this.name = 'PhotoStoreError';
    this.fault = fault;
  }
}

/** Bytes, or the path of a local file that holds them. */
export type StoreSource = Uint8Array | { readonly path: string };

export type StoredFile = { readonly bytes: number; readonly stream: Readable };

export type StoreEntry = { readonly key: string; readonly modifiedAt: Date };

/**
 * Where the files of photos are kept. A key is `<32 small letters or digits>/<name>`. Whatever goes wrong is a PhotoStoreError; a file is there
 * whole or not at all.
 */
export type PhotoStore = {
  /** Keeps a file, in place of one that has the key already; durable once it resolves. */
  readonly put: (key: string, source: StoreSource, expected: { readonly sha256: Buffer }) => Promise<void>;
  readonly get: (key: string) => Promise<StoredFile>;
  /** What is not there is removed already. */
  readonly remove: (key: string) => Promise<void>;
  /** Every file there is, in no particular order. */
  readonly list: () => AsyncIterable<StoreEntry>;
  /** Whether a file could be kept now. */
  readonly isWritable: () => Promise<boolean>;
};

const STORE_KEY = /^[a-z0-9]{32}$/;
const FILE_NAME = /^[a-z][a-z0-9.-]{0,39}$/;

/** Of a picture, the name its files' keys begin with. */
export function isStoreKey(text: string): boolean {
  return STORE_KEY.test(text);
}

/**
 * The two halves of a key.
 *
 * @throws RangeError for anything else, so that no path is ever made of it.
 */
export function partsOfKey(key: string): readonly [storeKey: string, name: string] {
  const [storeKey = '', name = '', ...more] = key.split('/');
  if (more.length > 0 || !isStoreKey(storeKey) || !FILE_NAME.test(name)) throw new RangeError('Not the key of a file in the photo store');
  return [storeKey, name];
}

/** The name of the file as it was sent. */
export const ORIGINAL = 'original';

export function keyOf(storeKey: string, name: string): string {
  return `${storeKey}/${name}`;
}
