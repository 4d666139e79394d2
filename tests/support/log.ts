import { Writable } from 'node:stream';
import type { Logger } from 'pino';
import { z } from 'zod';
import { createLogger } from '#server/http/logging.ts';

const Line = z.looseObject({ level: z.number(), msg: z.string() });
export type LogLine = z.infer<typeof Line>;

const ERROR = 50;

/** A log that is kept instead of printed. */
export type KeptLog = {
  readonly logger: Logger;
  /** Every line so far, as written. */
  readonly text: () => string;
  readonly lines: () => readonly LogLine[];
  /** The errors so far, which are then forgotten: what nobody takes was not expected. */
  readonly takeErrors: () => readonly LogLine[];
};

export function keptLog(): KeptLog {
  let written: string[] = [];
  const destination = new Writable({
    write: (chunk: Buffer, _encoding, done) => {
      written.push(chunk.toString());
      done();
    },
  });
  const parsed = (): { readonly text: string; readonly line: LogLine }[] => written.map((text) => ({ text, line: Line.parse(JSON.parse(text)) }));
  return {
    logger: createLogger('debug', destination),
    text: () => written.join(''),
    lines: () => parsed().map(({ line }) => line),
    takeErrors: () => {
      const all = parsed();
      written = all.filter(({ line }) => line.level < ERROR).map(({ text }) => text);
      return all.filter(({ line }) => line.level >= ERROR).map(({ line }) => line);
    },
  };
}
