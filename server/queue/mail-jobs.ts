import { z } from 'zod';
import type { JobDefinition } from './job-definition.ts';

const Message = z.strictObject({ messageId: z.uuid() });

/** Sends one letter. Waits from half a minute to half a day between tries, which spans a mail server's bad day: 17 to 34 hours. */
export const sendMail = {
  name: 'send-mail',
  payload: Message,
  retryLimit: 10,
  retryDelay: 30,
  expireInSeconds: 90,
  deadLetter: 'give-up-mail',
} as const satisfies JobDefinition;

/** Notes that a letter will not be sent any more. */
export const giveUpMail = {
  name: 'give-up-mail',
  payload: Message,
  retryLimit: 10,
  retryDelay: 30,
  expireInSeconds: 30,
} as const satisfies JobDefinition;
