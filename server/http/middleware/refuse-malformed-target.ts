import type { RequestHandler } from 'express';
import { ProblemError } from '#server/services/problem-error.ts';
import { isPlainText } from '../plain-text.ts';

/** Refuses an address that is not percent-encoded UTF-8, or that holds a NUL, before any route or the database sees it. */
export const refuseMalformedTarget: RequestHandler = (request, _response, next) => {
  let text: string;
  try {
    text = decodeURIComponent(request.url.replaceAll('+', ' '));
  } catch (cause) {
    throw new ProblemError('malformed', 'The address is not percent-encoded UTF-8.', { cause });
  }
  if (!isPlainText(text)) throw new ProblemError('malformed', 'The address holds a NUL character.');
  next();
};
