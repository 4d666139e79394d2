import { createHash } from 'node:crypto';
import { createServer } from 'node:http';
import type { IncomingMessage, Server, ServerResponse } from 'node:http';
import type { AddressInfo } from 'node:net';
import type { BucketSettings } from '#server/files/bucket-store.ts';

/** How a bucket misbehaves: refuses, takes its time for ever, breaks off in the middle of a file, fails inside, or is out of room. */
export type Mischief = 'denies' | 'hangs' | 'truncates' | 'fails' | 'is-full';

export type FakeBucket = {
  readonly settings: BucketSettings;
  /** Key → bytes. */
  readonly files: Map<string, Buffer>;
  /** Age of a file, in milliseconds, where it is not new. */
  readonly ages: Map<string, number>;
  /** From now on; `undefined`: no more. */
  readonly misbehave: (how: Mischief | undefined) => void;
  /** Requests so far, `PUT key`. */
  readonly requests: () => readonly string[];
  readonly stop: () => Promise<void>;
};

const BUCKET = 'photos';
const KEY_ID = 'bucket-key';
/** Files in one answer to a listing, so that a test need not have a thousand for a second one. */
const PAGE = 3;
const SIGNATURE = /^AWS4-HMAC-SHA256 Credential=bucket-key\/\d{8}\/[a-z0-9-]+\/s3\/aws4_request, ?SignedHeaders=[a-z0-9;-]+, ?Signature=[0-9a-f]{64}$/;

/** As much of an S3 service as the store uses, by path; it checks that requests are signed, not whether the signature holds. */
export async function startFakeBucket(): Promise<FakeBucket> {
  const files = new Map<string, Buffer>();
  const ages = new Map<string, number>();
  const requests: string[] = [];
  let mischief: Mischief | undefined;

  const server = createServer((request, response) => {
    void (async () => {
      const { pathname, searchParams } = new URL(request.url ?? '/', 'http://bucket');
      const key = decodeURIComponent(pathname.slice(`/${BUCKET}/`.length));
      requests.push(`${request.method ?? ''} ${key}`);
      const body = await bodyOf(request);
      if (mischief === 'hangs') return;
      if (!SIGNATURE.test(request.headers.authorization ?? '') || mischief === 'denies') refuse(response, 403, 'AccessDenied');
      else if (mischief === 'fails') refuse(response, 500, 'InternalError');
      else if (mischief === 'is-full' && request.method === 'PUT') refuse(response, 507, 'InsufficientStorage');
      else if (request.method === 'PUT') put(request, response, key, body);
      else if (request.method === 'DELETE') {
        files.delete(key);
        response.writeHead(204).end();
      } else if (searchParams.get('list-type') === '2') list(response, searchParams.get('continuation-token') ?? '');
      else get(response, key);
    })();
  });

  const put = (request: IncomingMessage, response: ServerResponse, key: string, body: Buffer): void => {
    const announced = request.headers['x-amz-checksum-sha256'];
    const digest = createHash('sha256').update(body).digest('base64');
    if (announced !== undefined && announced !== digest) refuse(response, 400, 'BadDigest');
    else {
      files.set(key, body);
      response.writeHead(200, { ETag: `"${createHash('md5').update(body).digest('hex')}"` }).end();
    }
  };

  const get = (response: ServerResponse, key: string): void => {
    const bytes = files.get(key);
    if (bytes === undefined) refuse(response, 404, 'NoSuchKey');
    else if (mischief === 'truncates') {
      response.writeHead(200, { 'Content-Length': bytes.length });
      response.write(bytes.subarray(0, bytes.length >> 1), () => response.destroy());
    } else response.writeHead(200, { 'Content-Length': bytes.length }).end(bytes);
  };

  const list = (response: ServerResponse, after: string): void => {
    const keys = [...files.keys()].sort().filter((key) => key > after);
    const page = keys.slice(0, PAGE);
    const more = keys.length > PAGE;
    const contents = page.map((key) => {
      const modified = new Date(Date.now() - (ages.get(key) ?? 0)).toISOString();
      return `<Contents><Key>${key}</Key><LastModified>${modified}</LastModified><Size>${files.get(key)?.length ?? 0}</Size></Contents>`;
    });
    const next = more ? `<NextContinuationToken>${page.at(-1) ?? ''}</NextContinuationToken>` : '';
    answerXml(response, 200, `<ListBucketResult><Name>${BUCKET}</Name><KeyCount>${page.length}</KeyCount><IsTruncated>${String(more)}</IsTruncated>${next}${contents.join('')}</ListBucketResult>`);
  };

  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  const { port } = server.address() as AddressInfo;
  return {
    settings: { bucket: BUCKET, region: 'us-east-1', endpoint: `http://127.0.0.1:${port}`, pathStyle: true, accessKeyId: KEY_ID, secretAccessKey: 'bucket-secret' },
    files,
    ages,
    misbehave: (how) => {
      mischief = how;
    },
    requests: () => requests,
    stop: () => stop(server),
  };
}

async function bodyOf(request: IncomingMessage): Promise<Buffer> {
  const chunks: Buffer[] = [];
  for await (const chunk of request) chunks.push(chunk as Buffer);
  return Buffer.concat(chunks);
}

function refuse(response: ServerResponse, status: number, code: string): void {
  answerXml(response, status, `<Error><Code>${code}</Code><Message>${code}</Message></Error>`);
}

function answerXml(response: ServerResponse, status: number, xml: string): void {
  response.writeHead(status, { 'Content-Type': 'application/xml' }).end(`<?xml version="1.0" encoding="UTF-8"?>${xml}`);
}

async function stop(server: Server): Promise<void> {
  server.closeAllConnections();
  await new Promise((resolve) => server.close(resolve));
}
