import type { Request, Response } from 'express';
import type { Config } from '#server/config.ts';
import { LIFETIMES } from '#server/services/people/sessions.ts';

const SECRET = /^[A-Za-z0-9_-]{43}$/;

/** The session cookie of one installation. */
export type SessionCookie = {
  /** The secret a request carries; none where the cookie is missing, misshapen, or there twice and so not to be told apart. */
  readonly read: (request: Request) => string | null;
  readonly write: (response: Response, secret: string) => void;
  readonly clear: (response: Response) => void;
};

/**
 * `__Host-session`, which a browser takes over https alone and from this very host; on a developer's plain-http machine `session`. Not
 * for scripts, not sent by other sites but where a link leads here. When a session ends is the database's to say.
 */
export function sessionCookie({ publicOrigin, environment }: Pick<Config, 'publicOrigin' | 'environment'>): SessionCookie {
  const secure = environment === 'production' || publicOrigin.startsWith('https:');
  const name = secure ? '__Host-session' : 'session';
  const attributes = { httpOnly: true, sameSite: 'lax', path: '/', secure } as const;
  return {
    read: (request) => {
      const values = valuesOf(request.headers.cookie ?? '', name);
      const [secret] = values;
      return values.length === 1 && secret !== undefined && SECRET.test(secret) ? secret : null;
    },
    write: (response, secret) => {
      response.cookie(name, secret, { ...attributes, maxAge: LIFETIMES.member.most * 1_000 });
    },
    clear: (response) => {
      response.clearCookie(name, attributes);
    },
  };
}

/** Ours needs no decoding, so nothing another program wrote into the header can fail to decode. */
function valuesOf(header: string, name: string): string[] {
  return header.split(';').flatMap((pair) => {
    const equals = pair.indexOf('=');
    return equals !== -1 && pair.slice(0, equals).trim() === name ? [pair.slice(equals + 1).trim()] : [];
  });
}
