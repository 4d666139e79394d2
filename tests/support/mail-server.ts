import { buffer } from 'node:stream/consumers';
import { simpleParser } from 'mailparser';
import type { ParsedMail } from 'mailparser';
import { SMTPServer } from 'smtp-server';

/** One letter a mail server took. */
export type TakenMail = {
  readonly from: string;
  /** Whom the envelope names, which alone decides who gets it. */
  readonly to: readonly string[];
  readonly raw: string;
  readonly mail: ParsedMail;
};

/** How a mail server treats letters: takes them, says "later" or "never" at a step, or says nothing any more. */
export type Manners = 'take' | 'later' | 'never-to-them' | 'never-from-us' | 'hang-up' | 'hang-at-greeting' | 'hang-at-end';

export type MailServer = {
  readonly url: string;
  /** Every letter it took, in order. */
  readonly taken: readonly TakenMail[];
  /** Connections it was asked for so far, also in vain. */
  readonly calls: () => number;
  readonly behave: (manners: Manners) => void;
  /** Called when a letter was read, before the server says that it takes it. */
  readonly beforeTaking: (work: (() => Promise<void>) | undefined) => void;
  readonly stop: () => Promise<void>;
};

const REFUSAL = { later: 451, 'never-to-them': 550, 'never-from-us': 550 } as const;

/** A real mail server on a free port of loopback. */
export async function startMailServer(): Promise<MailServer> {
  const taken: TakenMail[] = [];
  let manners: Manners = 'take';
  let calls = 0;
  let before: (() => Promise<void>) | undefined;

  const server = new SMTPServer({
    disabledCommands: ['AUTH', 'STARTTLS'],
    disableReverseLookup: true,
    closeTimeout: 1,
    onConnect: (_session, callback) => {
      calls += 1;
      if (manners === 'hang-at-greeting') return;
      if (manners === 'hang-up') callback(refusal(421));
      else callback();
    },
    onMailFrom: (_address, _session, callback) => callback(manners === 'never-from-us' ? refusal(REFUSAL[manners]) : null),
    onRcptTo: (_address, _session, callback) => callback(manners === 'never-to-them' || manners === 'later' ? refusal(REFUSAL[manners]) : null),
    onData: (stream, { envelope }, callback) => {
      void buffer(stream).then(async (bytes) => {
        if (manners === 'hang-at-end') return;
        await before?.();
        const from = envelope.mailFrom === false ? '' : envelope.mailFrom.address;
        taken.push({ from, to: envelope.rcptTo.map(({ address }) => address), raw: bytes.toString('utf8'), mail: await simpleParser(bytes) });
        callback();
      });
    },
  });
  // Clients that break off are what some tests are about.
  server.on('error', () => undefined);
  const port = await new Promise<number>((resolve, reject) => {
    const listener = server.listen(0, '127.0.0.1', () => {
      const address = listener.address();
      if (address === null || typeof address === 'string') reject(new TypeError('No port'));
      else resolve(address.port);
    });
  });
  return {
    url: `smtp://127.0.0.1:${port}`,
    taken,
    calls: () => calls,
    behave: (next) => {
      manners = next;
    },
    beforeTaking: (work) => {
      before = work;
    },
    stop: () => new Promise((resolve) => server.close(() => resolve())),
  };
}

function refusal(responseCode: number): Error {
  return Object.assign(new Error('the mail server of this test says so'), { responseCode });
}
