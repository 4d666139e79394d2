import { createReadStream } from 'node:fs';
import { stat } from 'node:fs/promises';
import { Readable } from 'node:stream';
import {
  DeleteObjectCommand,
  GetObjectCommand,
  PutObjectCommand,
  S3Client,
  S3ServiceException,
  paginateListObjectsV2,
} from '@aws-sdk/client-s3';
import { isStoreKey, partsOfKey, PhotoStoreError } from './photo-store.ts';
import type { PhotoStore, StoredFile, StoreEntry, StoreFault, StoreSource } from './photo-store.ts';

export type BucketSettings = {
  readonly bucket: string;
  readonly region: string;
  /** Scheme and host of the service; none: the one the region names. */
  readonly endpoint: string | undefined;
  /** Whether the bucket is named in the path instead of the host. */
  readonly pathStyle: boolean;
  readonly accessKeyId: string;
  readonly secretAccessKey: string;
};

/** Milliseconds until a connection stands, until an answer comes on it, and between two pieces of either. */
const TIMEOUTS = { connectionTimeout: 3_000, requestTimeout: 20_000, socketTimeout: 10_000 };
const MOST_ATTEMPTS = 3;

const PROBE = 'probe';

const FAULTS: Readonly<Record<number, StoreFault>> = { 404: 'missing', 507: 'full' };
/** What services that keep to the same interface answer a digest that does not fit, and a bucket whose room is used up. */
const NAMED_FAULTS: Readonly<Record<string, StoreFault>> = {
  BadDigest: 'corrupt',
  InvalidDigest: 'corrupt',
  XAmzContentChecksumMismatch: 'corrupt',
  XAmzContentSHA256Mismatch: 'corrupt',
  QuotaExceeded: 'full',
  NoSuchBucket: 'away',
};

/**
 * Photos in a bucket of any service that speaks the S3 interface. The digest of each file goes along, for the service to check.
 *
 * @param timeouts shorter ones, for tests.
 */
export function createBucketStore(settings: BucketSettings, timeouts: Partial<typeof TIMEOUTS> = {}): PhotoStore {
  const { bucket: Bucket, region, endpoint, pathStyle, accessKeyId, secretAccessKey } = settings;
  const client = new S3Client({
    region,
    ...(endpoint === undefined ? {} : { endpoint }),
    forcePathStyle: pathStyle,
    credentials: { accessKeyId, secretAccessKey },
    maxAttempts: MOST_ATTEMPTS,
    // Not every service knows the package's own checksums.
    requestChecksumCalculation: 'WHEN_REQUIRED',
    responseChecksumValidation: 'WHEN_REQUIRED',
    // Left to itself the package only warns of a request that takes too long.
    requestHandler: { ...TIMEOUTS, ...timeouts, throwOnRequestTimeout: true },
  });

  const put = async (Key: string, source: StoreSource, sha256: Buffer): Promise<void> => {
    const ContentLength = source instanceof Uint8Array ? source.byteLength : (await stat(source.path)).size;
    await client.send(
      new PutObjectCommand({
        Bucket,
        Key,
        Body: source instanceof Uint8Array ? source : createReadStream(source.path),
        ContentLength,
        ContentType: 'application/octet-stream',
        ChecksumSHA256: sha256.toString('base64'),
      }),
    );
  };

  const get = async (Key: string): Promise<StoredFile> => {
    const { Body, ContentLength } = await client.send(new GetObjectCommand({ Bucket, Key }));
    if (!(Body instanceof Readable) || ContentLength === undefined) throw new PhotoStoreError('away', 'The bucket answered without a body');
    return { bytes: ContentLength, stream: Body };
  };

  const list = async function* (): AsyncGenerator<StoreEntry> {
    const pages = paginateListObjectsV2({ client }, { Bucket })[Symbol.asyncIterator]();
    for (;;) {
      const { value: page, done } = await guarded(() => pages.next());
      if (done === true) return;
      for (const { Key = '', LastModified } of page.Contents ?? []) {
        // A bucket may hold other things: they are nobody's business here.
        if (isStoreKey(Key.split('/', 1)[0] ?? '')) yield { key: Key, modifiedAt: LastModified ?? new Date(0) };
      }
    }
  };

  return {
    put: (key, source, { sha256 }) => guarded(() => put(checked(key), source, sha256)),
    get: (key) => guarded(() => get(checked(key))),
    remove: (key) =>
      guarded(async () => {
        await client.send(new DeleteObjectCommand({ Bucket, Key: checked(key) }));
      }),
    list,
    isWritable: async () => {
      try {
        await client.send(new PutObjectCommand({ Bucket, Key: PROBE, Body: 'probe' }));
        return true;
      } catch {
        return false;
      }
    },
  };
}

function checked(key: string): string {
  return partsOfKey(key).join('/');
}

async function guarded<Answer>(work: () => Promise<Answer>): Promise<Answer> {
  try {
    return await work();
  } catch (error) {
    if (error instanceof PhotoStoreError || error instanceof RangeError) throw error;
    const name = error instanceof Error ? error.name : typeof error;
    throw new PhotoStoreError(faultOf(error), `The bucket failed with ${name}`, { cause: error });
  }
}

function faultOf(error: unknown): StoreFault {
  if (!(error instanceof S3ServiceException)) return 'away';
  return NAMED_FAULTS[error.name] ?? FAULTS[error.$metadata.httpStatusCode ?? 0] ?? 'away';
}
