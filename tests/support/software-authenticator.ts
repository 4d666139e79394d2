import { createHash, generateKeyPairSync, randomBytes, sign } from 'node:crypto';
import { z } from 'zod';

/** Where a browser would say it is, and what a device would say of itself; a test bends these. */
export type Bend = {
  readonly origin?: string;
  readonly rpId?: string;
  readonly challenge?: string;
  readonly userVerified?: boolean;
  readonly counter?: number;
  /** `null`: left out. */
  readonly userHandle?: string | null;
  readonly type?: string;
  /** The format and statement of the attestation, CBOR. */
  readonly attestation?: { readonly format: string; readonly statement: Buffer };
};

/** Browser and device in one: makes one passkey (Web Authentication, ES256, no attestation) and signs with it. */
export type SoftwareAuthenticator = {
  readonly credentialId: string;
  /** What a browser answers to options for a new passkey. */
  readonly register: (options: unknown, bend?: Bend) => Record<string, unknown>;
  /** What a browser answers to options for signing in. */
  readonly assert: (options: unknown, bend?: Bend) => Record<string, unknown>;
};

const NewOptions = z.object({ challenge: z.string(), rp: z.object({ id: z.string() }), user: z.object({ id: z.string() }) });
const SignInOptions = z.object({ challenge: z.string(), rpId: z.string() });
const PublicJwk = z.object({ x: z.string(), y: z.string() });

const PRESENT = 0x01;
const VERIFIED = 0x04;
const ATTESTED = 0x40;

export function softwareAuthenticator(origin: string): SoftwareAuthenticator {
  const { privateKey, publicKey } = generateKeyPairSync('ec', { namedCurve: 'P-256' });
  const id = randomBytes(32);
  const credentialId = id.toString('base64url');
  let counter = 0;
  let user = '';

  const authenticatorData = (rpId: string, bend: Bend, attested?: Buffer): Buffer => {
    counter = bend.counter ?? counter + 1;
    const count = Buffer.alloc(4);
    count.writeUInt32BE(counter);
    const flags = PRESENT | (bend.userVerified === false ? 0 : VERIFIED) | (attested ? ATTESTED : 0);
    return Buffer.concat([sha256(bend.rpId ?? rpId), Buffer.from([flags]), count, attested ?? Buffer.alloc(0)]);
  };
  const clientData = (type: string, challenge: string, bend: Bend): Buffer =>
    Buffer.from(JSON.stringify({ type: bend.type ?? type, challenge: bend.challenge ?? challenge, origin: bend.origin ?? origin, crossOrigin: false }));
  const answer = (response: Record<string, unknown>): Record<string, unknown> => ({
    id: credentialId,
    rawId: credentialId,
    type: 'public-key',
    clientExtensionResults: {},
    response,
  });

  return {
    credentialId,
    register: (options, bend = {}) => {
      const { challenge, rp, user: given } = NewOptions.parse(options);
      user = given.id;
      const length = Buffer.alloc(2);
      length.writeUInt16BE(id.length);
      const key = coseKey(PublicJwk.parse(publicKey.export({ format: 'jwk' })));
      const data = authenticatorData(rp.id, bend, Buffer.concat([Buffer.alloc(16), length, id, key]));
      const { format, statement } = bend.attestation ?? { format: 'none', statement: cborMap([]) };
      const attestationObject = cborMap([
        [cborText('fmt'), cborText(format)],
        [cborText('attStmt'), statement],
        [cborText('authData'), cborBytes(data)],
      ]);
      return answer({
        clientDataJSON: clientData('webauthn.create', challenge, bend).toString('base64url'),
        attestationObject: attestationObject.toString('base64url'),
        transports: ['internal'],
      });
    },
    assert: (options, bend = {}) => {
      const { challenge, rpId } = SignInOptions.parse(options);
      const data = authenticatorData(rpId, bend);
      const client = clientData('webauthn.get', challenge, bend);
      const userHandle = bend.userHandle === undefined ? user : bend.userHandle;
      return answer({
        clientDataJSON: client.toString('base64url'),
        authenticatorData: data.toString('base64url'),
        signature: sign('sha256', Buffer.concat([data, sha256(client)]), privateKey).toString('base64url'),
        ...(userHandle === null ? {} : { userHandle }),
      });
    },
  };
}

/** A statement that brings certificates, as a device attested by its maker sends. */
export function statementWithCertificate(): Buffer {
  return cborMap([
    [cborText('alg'), cborInteger(-7)],
    [cborText('sig'), cborBytes(Buffer.alloc(8))],
    [cborText('x5c'), cborHead(4, 1), cborBytes(Buffer.alloc(8))],
  ]);
}

/** RFC 9052 key of an ES256 signature: kty 2 (EC2), alg -7, crv 1 (P-256), x, y. */
function coseKey({ x, y }: z.infer<typeof PublicJwk>): Buffer {
  return cborMap([
    [cborInteger(1), cborInteger(2)],
    [cborInteger(3), cborInteger(-7)],
    [cborInteger(-1), cborInteger(1)],
    [cborInteger(-2), cborBytes(Buffer.from(x, 'base64url'))],
    [cborInteger(-3), cborBytes(Buffer.from(y, 'base64url'))],
  ]);
}

function sha256(data: string | Buffer): Buffer {
  return createHash('sha256').update(data).digest();
}

/** CBOR (RFC 8949, 3): major type and argument, as far as is needed here. */
function cborHead(major: number, argument: number): Buffer {
  if (argument < 24) return Buffer.from([(major << 5) | argument]);
  return argument < 256 ? Buffer.from([(major << 5) | 24, argument]) : Buffer.from([(major << 5) | 25, argument >> 8, argument & 255]);
}

function cborInteger(value: number): Buffer {
  return value < 0 ? cborHead(1, -1 - value) : cborHead(0, value);
}

function cborBytes(bytes: Buffer): Buffer {
  return Buffer.concat([cborHead(2, bytes.length), bytes]);
}

function cborText(text: string): Buffer {
  return Buffer.concat([cborHead(3, Buffer.byteLength(text)), Buffer.from(text)]);
}

function cborMap(entries: readonly (readonly Buffer[])[]): Buffer {
  return Buffer.concat([cborHead(5, entries.length), ...entries.flat()]);
}
