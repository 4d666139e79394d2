import type { Request, RequestHandler } from 'express';
import { ProblemError } from '#server/services/problem-error.ts';

const SAFE_METHODS = new Set(['GET', 'HEAD', 'OPTIONS']);

/** A mail program unsubscribes with one POST and no origin (RFC 8058); the token in the address is all the authority there is. */
const ONE_CLICK = /^\/unsubscribe\/[^/]+$/;

/**
 * Refuses a change that another site's page asks for in a visitor's name. A browser says where a request is from in `Sec-Fetch-Site`
 * or, if it is old or the wire is plain, in `Origin`. A program that is no browser says neither, and is let through where it brings no
 * cookie, so that there is nobody's name to act in.
 */
export function refuseForgery(publicOrigin: string): RequestHandler {
  return (request, response, next) => {
    if (SAFE_METHODS.has(request.method) || ONE_CLICK.test(request.path)) {
      next();
      return;
    }
    response.vary('Sec-Fetch-Site').vary('Origin');
    if (!isOurs(request, publicOrigin)) {
      throw new ProblemError('not-allowed', 'This was asked for by a page that is not of this site.');
    }
    next();
  };
}

function isOurs({ headers }: Request, publicOrigin: string): boolean {
  const site = headers['sec-fetch-site'];
  if (site !== undefined) return site === 'same-origin';
  if (headers.origin !== undefined) return headers.origin === publicOrigin;
  return headers.cookie === undefined;
}
