import { z } from 'zod';
import type { JobDefinition } from './job-definition.ts';

const Picture = z.strictObject({ pictureId: z.uuid() });

/** Makes what is missing of a picture's renditions. Waits from five seconds to a quarter of an hour between tries: half an hour in all, which spans a store that is away for a moment. */
export const makeRenditions = {
  name: 'make-renditions',
  payload: Picture,
  retryLimit: 8,
  retryDelay: 5,
  expireInSeconds: 300,
  deadLetter: 'give-up-renditions',
} as const satisfies JobDefinition;

/** Notes that a picture's renditions will not be made any more. */
export const giveUpRenditions = {
  name: 'give-up-renditions',
  payload: Picture,
  retryLimit: 10,
  retryDelay: 30,
  expireInSeconds: 60,
} as const satisfies JobDefinition;

/** Takes away photos that stand on nothing, and files that nothing refers to. */
export const sweepPhotos = {
  name: 'sweep-photos',
  payload: z.strictObject({}),
  retryLimit: 1,
  retryDelay: 60,
  expireInSeconds: 900,
} as const satisfies JobDefinition;
