import type { Knex } from 'knex';
import { Secret, TOTP } from 'otpauth';
import { toDataURL } from 'qrcode';
import { Authenticator } from '#db/models/authenticator.ts';
import { requireRecentProof } from '#server/policies/identity.ts';
import type { MemberViewer } from '#server/policies/viewer.ts';
import { ProblemError } from '#server/services/problem-error.ts';
import { withTransaction } from '#server/services/transaction.ts';
import { AUTHENTICATOR } from './check-authenticator-code.ts';
import { lockSelf } from './lock-self.ts';
import { SITE_NAME } from './site-name.ts';

/** 160 bits, as long as the hash that is made with it: what RFC 4226, section 4, R6 recommends. */
const SECRET_BYTES = 20;

export type StartedAuthenticator = {
  /** Base32 (RFC 4648), to be typed where nothing can be scanned. */
  readonly secret: string;
  /** `otpauth:` address. */
  readonly uri: string;
  /** The address as a QR code: a PNG image as a `data:` URL. */
  readonly qr: string;
};

/**
 * Begins adding an authenticator: a new secret, which takes the place of one that was never confirmed. It counts for nothing before a first
 * code is given.
 *
 * @throws ProblemError `identity-not-confirmed`; `conflict` where there is an authenticator already.
 */
export async function startAuthenticator(viewer: MemberViewer, knex: Knex): Promise<StartedAuthenticator> {
  requireRecentProof(viewer);
  const secret = new Secret({ size: SECRET_BYTES });
  const label = await withTransaction(
    knex,
    async (trx) => {
      const member = await lockSelf(viewer, trx);
      if (await Authenticator.query(trx).findById(viewer.id).whereNotNull('confirmedAt')) {
        throw new ProblemError('conflict', 'Your account has an authenticator. Remove it first, then add the new one.');
      }
      await Authenticator.query(trx).deleteById(viewer.id);
      await Authenticator.query(trx).insert({ memberId: viewer.id, secret: secret.base32 });
      return member.email ?? member.displayName;
    },
    { actorId: viewer.id },
  );
  const uri = new TOTP({ ...AUTHENTICATOR, issuer: SITE_NAME, label, secret }).toString();
  return { secret: secret.base32, uri, qr: await toDataURL(uri, { type: 'image/png', errorCorrectionLevel: 'M', scale: 6 }) };
}
