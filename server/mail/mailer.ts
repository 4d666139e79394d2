import { createTransport } from 'nodemailer';
import { Email } from '#contract/people.ts';
import { htmlOf, subjectOf, textOf } from './letter.ts';
import { isLoopback } from './loopback.ts';
import type { WrittenLetter } from './mail-templates.ts';

/** Milliseconds a mail server is given: to be found, to be reached, to greet, and for each answer. */
const PATIENCE = { dnsTimeout: 10_000, connectionTimeout: 10_000, greetingTimeout: 10_000, socketTimeout: 20_000 } as const;

export type MailSettings = {
  /** `smtp://` (STARTTLS where offered) or `smtps://`, with user and password where the server asks for them. */
  readonly url: string;
  /** The address letters come from. */
  readonly from: string;
  /** Scheme, host and port that links lead to. */
  readonly origin: string;
};

export type Mailer = {
  /** Where links lead to. */
  readonly origin: string;
  /**
   * Hands one letter to the mail server. A letter of the same id has the same Message-ID, by which a reader's server knows a double.
   *
   * @throws MailError when the server did not take it, or did not say so.
   */
  readonly send: (mail: { readonly id: string; readonly to: string; readonly letter: WrittenLetter }, signal: AbortSignal) => Promise<void>;
};

/** Why a letter was not sent. Says which step failed and how, and never holds an address, a link or the server's own words. */
export class MailError extends Error {
  /** Whether the server refused this letter for good, so that another try is of no use. */
  readonly isFinal: boolean;

  constructor(message: string, isFinal: boolean) {
    super(message);
    this.name = 'MailError';
    this.isFinal = isFinal;
  }
}

/** A way to the mail server; nothing is connected until a letter is sent, and nothing is kept open after it. */
export function createMailer({ url, from, origin }: MailSettings, patience: Partial<Record<keyof typeof PATIENCE, number>> = {}): Mailer {
  const { protocol, hostname, port, username, password } = new URL(url);
  const secure = protocol === 'smtps:';
  const ourName = new URL(origin).hostname;
  const transport = createTransport({
    host: hostname.replaceAll(/^\[|\]$/g, ''),
    port: Number(port) || (secure ? 465 : 587),
    secure,
    // A password must not cross a wire in the clear because somebody on it hid the offer to encrypt.
    requireTLS: !secure && username !== '' && !isLoopback(hostname),
    ...(username === '' ? {} : { auth: { user: decodeURIComponent(username), pass: decodeURIComponent(password) } }),
    name: ourName,
    disableFileAccess: true,
    disableUrlAccess: true,
    ...PATIENCE,
    ...patience,
  });

  return {
    origin,
    send: async ({ id, to, letter }, signal) => {
      const address = Email.parse(to);
      try {
        await transport.sendMail({
          // As objects: a text would be parsed, and could be read as more than one address.
          from: { name: 'Pourbook', address: from },
          to: { name: '', address },
          envelope: { from, to: [address] },
          messageId: `<${id}@${ourName}>`,
          subject: subjectOf(letter),
          text: textOf(letter),
          html: htmlOf(letter),
          headers: { 'Auto-Submitted': 'auto-generated', ...unsubscribeHeaders(letter) },
          signal,
        });
      } catch (error) {
        throw mailErrorOf(error);
      }
    },
  };
}

/** RFC 2369 and RFC 8058: where to be rid of letters like this one, also by one click in the mail program. */
function unsubscribeHeaders({ unsubscribe }: WrittenLetter): Record<string, string> {
  if (unsubscribe === undefined) return {};
  return { 'List-Unsubscribe': `<${unsubscribe}>`, 'List-Unsubscribe-Post': 'List-Unsubscribe=One-Click' };
}

/** Steps at which a server's refusal is about this letter rather than about us. */
const ABOUT_THE_LETTER = new Set(['RCPT TO', 'DATA']);

function mailErrorOf(error: unknown): MailError {
  const told = error instanceof Error ? error : new Error();
  const code = 'code' in told && typeof told.code === 'string' ? told.code : told.name;
  const command = 'command' in told && typeof told.command === 'string' ? told.command : undefined;
  const response = 'responseCode' in told && typeof told.responseCode === 'number' ? told.responseCode : undefined;
  const isFinal = command !== undefined && ABOUT_THE_LETTER.has(command) && response !== undefined && response >= 500;
  return new MailError([code, command, response].filter((part) => part !== undefined).join(' '), isFinal);
}
