import { Photo, uploadPhoto } from '#contract/photos.ts';
import { addressOf } from '../../lib/call.ts';
import { ProblemError, problemFrom, problemOfKind, UnreachableError } from '../../lib/problem-error.ts';

export type Sending = {
  readonly keepDate: boolean;
  /** Bytes that have gone out so far; the form's own few bytes are among them. */
  readonly onProgress: (bytes: number) => void;
  readonly signal: AbortSignal;
};

/** It was given up before it ended. */
function givenUp(): Error {
  return new DOMException('The sending was given up', 'AbortError');
}

/** Nothing has moved for this long: the line is dead. A large photo over a thin line may take minutes, and does move. */
const STILL_MS = 45_000;

/**
 * Sends one photo. By XMLHttpRequest, since `fetch` tells nobody how far the sending is. Rejects with `ProblemError` when the register
 * answers with a problem, `UnreachableError` when no answer comes, and an `AbortError` when it was given up.
 */
export function sendPhoto(file: File, { keepDate, onProgress, signal }: Sending): Promise<Photo> {
  return new Promise((resolve, reject: (reason: Error) => void) => {
    const request = new XMLHttpRequest();
    let timer: ReturnType<typeof setTimeout> | undefined;
    const giveUp = (): void => request.abort();
    const watch = (): void => {
      clearTimeout(timer);
      timer = setTimeout(() => {
        settle(() => reject(new UnreachableError('timeout', null)));
        request.abort();
      }, STILL_MS);
    };
    const settle = (end: () => void): void => {
      clearTimeout(timer);
      signal.removeEventListener('abort', giveUp);
      end();
    };

    request.upload.addEventListener('progress', ({ loaded }) => {
      watch();
      onProgress(loaded);
    });
    request.addEventListener('abort', () => settle(() => reject(givenUp())));
    request.addEventListener('error', () => settle(() => reject(new UnreachableError(navigator.onLine ? 'no-answer' : 'offline', null))));
    request.addEventListener('load', () => settle(() => void answerOf(request).then(resolve, reject)));

    if (signal.aborted) {
      reject(givenUp());
      return;
    }
    signal.addEventListener('abort', giveUp);
    request.open(uploadPhoto.method, addressOf(uploadPhoto.path, {}, {}));
    request.setRequestHeader('Accept', 'application/json');
    watch();
    request.send(formOf(file, keepDate));
  });
}

/** The fields go before the file, so that the register has them when it comes. */
function formOf(file: File, keepDate: boolean): FormData {
  const form = new FormData();
  form.set('keepDate', String(keepDate));
  form.set('photo', file);
  return form;
}

async function answerOf(request: XMLHttpRequest): Promise<Photo> {
  const retryAfter = request.getResponseHeader('Retry-After');
  const response = new Response(request.responseText, { status: request.status, ...(retryAfter === null ? {} : { headers: { 'Retry-After': retryAfter } }) });
  if (!response.ok) throw await problemFrom(response);
  const photo = Photo.safeParse(await response.json().catch(() => null));
  if (!photo.success) throw problemOfKind('internal');
  return photo.data;
}

/** Whether sending the same file again may end otherwise: not where the register has looked at it and refused it. */
export function isWorthAnotherTry(error: unknown): boolean {
  if (!(error instanceof ProblemError)) return true;
  return ['internal', 'unavailable', 'too-many-requests', 'not-signed-in', 'no-room', 'conflict'].includes(error.kind);
}
