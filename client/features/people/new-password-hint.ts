import { PASSWORD_LIMITS } from '#contract/people.ts';

/** Beside every box for a new password; the register judges what is typed. */
export const NEW_PASSWORD_HINT = `At least ${PASSWORD_LIMITS.alone} characters, or ${PASSWORD_LIMITS.withSecondFactor} beside a second factor. A few words do well; spaces count.`;
