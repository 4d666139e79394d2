import type { Knex } from 'knex';
import { Authenticator } from '#db/models/authenticator.ts';
import { Passkey } from '#db/models/passkey.ts';
import { RecoveryCode } from '#db/models/recovery-code.ts';

export type SecondFactors = {
  /** Added and confirmed with a first code. */
  readonly authenticator: boolean;
  readonly passkeys: number;
  readonly recoveryCodesLeft: number;
};

/** What a member has to sign in with besides the password. */
export async function readSecondFactors(memberId: string, knex: Knex): Promise<SecondFactors> {
  return {
    authenticator: (await Authenticator.query(knex).where({ memberId }).whereNotNull('confirmedAt').resultSize()) > 0,
    passkeys: await Passkey.query(knex).where({ memberId }).resultSize(),
    recoveryCodesLeft: await RecoveryCode.query(knex).where({ memberId }).whereNull('usedAt').resultSize(),
  };
}

/** Recovery codes alone are no second factor: they stand in for one that was lost. */
export function hasSecondFactor({ authenticator, passkeys }: SecondFactors): boolean {
  return authenticator || passkeys > 0;
}
