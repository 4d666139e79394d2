import { z } from 'zod';
import type { JobDefinition } from './job-definition.ts';

const Rework = z.strictObject({ reworkId: z.uuid() });

/** Works out again what rested on a fact. Goes on where an earlier try stopped, so what one try gets done is never done again. */
export const runRework = {
  name: 'run-rework',
  payload: Rework,
  retryLimit: 4,
  retryDelay: 5,
  expireInSeconds: 900,
  deadLetter: 'give-up-rework',
} as const satisfies JobDefinition;

/** Notes that a rework failed for good, for moderators to see. */
export const giveUpRework = {
  name: 'give-up-rework',
  payload: Rework,
  retryLimit: 10,
  retryDelay: 30,
  expireInSeconds: 30,
} as const satisfies JobDefinition;
