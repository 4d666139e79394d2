import { z } from 'zod';
import { MEMBER_ROLES } from '#domain/vocabulary.ts';
import { Id, Named } from './common.ts';

/** Sign-up, sign-in and what a member says about themselves. */

export const Role = z.enum(MEMBER_ROLES);
export type Role = z.infer<typeof Role>;

/** NIST SP 800-63B-4: 15 where the password is the only factor, 8 beside a second one, no rules of composition. */
export const PASSWORD_LIMITS = { alone: 15, withSecondFactor: 8, most: 128 } as const;

export const PEOPLE_LIMITS = { displayName: 60, email: 254, suspensionReason: 500, passkeyName: 60 } as const;

/** One address: no list, no display name, no quoting, so that a mailer can't read it as anything else. */
export const Email = z
  .string()
  .trim()
  .max(PEOPLE_LIMITS.email)
  .regex(/^[^\s@,;:<>"()[\]\\\p{Cc}]+@[A-Za-z0-9](?:[A-Za-z0-9.-]*[A-Za-z0-9])?\.[A-Za-z]{2,}$/u, 'Not an e-mail address we can write to')
  .meta({ format: 'email' });

/** A password being chosen. What depends on the member (second factor, own name, the list of common ones) the server adds. */
export const NewPassword = z
  .string()
  .min(PASSWORD_LIMITS.withSecondFactor, `At least ${PASSWORD_LIMITS.withSecondFactor} characters`)
  .refine((text) => [...text].length <= PASSWORD_LIMITS.most, `At most ${PASSWORD_LIMITS.most} characters`);

/** A password being given; never judged, only compared. */
export const GivenPassword = z.string().min(1, 'Type your password').max(1024);

export const DisplayName = z
  .string()
  .trim()
  .min(2, 'At least 2 characters')
  .max(PEOPLE_LIMITS.displayName)
  .regex(/^[^\p{Cc}\p{Cf}<>]+$/u, 'Letters, digits and ordinary signs only');

/** The secret half of a link sent by e-mail. */
export const LinkToken = z.string().regex(/^[A-Za-z0-9_-]{43}$/, 'Not a link of ours');

/** Nothing to tell but that it was done. */
export const Done = z.object({ done: z.literal(true) });

/** What the viewer may do at all; services ask the same predicates again before each act. */
export const ViewerCan = z.object({
  decideContributions: z.boolean(),
  seeMembers: z.boolean(),
  seeAudit: z.boolean(),
});

export const Me = z.object({
  id: Id,
  displayName: z.string(),
  email: z.string(),
  role: Role,
  /** Makers a moderator decides for; null = all. Empty for everybody else. */
  moderates: z.array(Named).nullable(),
  secondFactors: z.object({ authenticator: z.boolean(), passkeys: z.number().int(), recoveryCodesLeft: z.number().int() }),
  /** A moderator or registrar without a second factor must add one before acting. */
  secondFactorOwed: z.boolean(),
  unreadNotices: z.number().int(),
  can: ViewerCan,
});
export type Me = z.infer<typeof Me>;
