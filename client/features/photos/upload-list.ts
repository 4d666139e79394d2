import type { Photo } from '#contract/photos.ts';
import { sayFailure } from '../../lib/say-failure.ts';
import { faultOfFile } from './photo-files.ts';
import { isWorthAnotherTry } from './send-photo.ts';
import type { Sending } from './send-photo.ts';

/** More at once only share the line between them. */
const AT_ONCE = 2;

export type UploadStage =
  /** Not worth sending: too large, or no picture. */
  | { readonly kind: 'refused'; readonly reason: string }
  | { readonly kind: 'queued' }
  /** Bytes that have gone out; as many as the file has, while the register looks at it. */
  | { readonly kind: 'sending'; readonly bytes: number }
  | { readonly kind: 'failed'; readonly reason: string; readonly again: boolean }
  /** Given up by whoever chose it. */
  | { readonly kind: 'stopped' };

/** A file that is on its way, or did not get there. One that arrived is a photo, and no longer in the list. */
export type Upload = { readonly key: string; readonly file: File; readonly stage: UploadStage };

/** What became of one sending. */
export type Outcome = { readonly kind: 'arrived'; readonly photo: Photo; readonly file: File } | { readonly kind: 'failed'; readonly error: unknown };

export type UploadList = {
  readonly subscribe: (listener: () => void) => () => void;
  readonly uploads: () => readonly Upload[];
  /** Tells of each outcome, once. */
  readonly onOutcome: (listener: (outcome: Outcome) => void) => () => void;
  readonly add: (files: readonly File[], keepDate: boolean) => void;
  /** Gives one up; it stays in the list, and can be sent after all. */
  readonly stop: (key: string) => void;
  /** Sends again what failed or was stopped: one, or all that can be. What arrived is not sent again. */
  readonly again: (key?: string) => void;
  readonly remove: (key: string) => void;
  /** Nothing more is sent: the page is left. */
  readonly end: () => void;
};

/** Files being sent, a few at a time, each by itself: one that fails keeps no other from arriving. */
export function createUploadList(send: (file: File, sending: Sending) => Promise<Photo>): UploadList {
  const listeners = new Set<() => void>();
  const waitingForOutcomes = new Set<(outcome: Outcome) => void>();
  const underWay = new Map<string, AbortController>();
  const keepsDate = new Map<string, boolean>();
  let uploads: readonly Upload[] = [];
  let made = 0;

  const set = (next: readonly Upload[]): void => {
    uploads = next;
    for (const listener of listeners) listener();
  };
  const tell = (outcome: Outcome): void => {
    for (const listener of waitingForOutcomes) listener(outcome);
  };
  const stage = (key: string, next: UploadStage): void => set(uploads.map((one) => (one.key === key ? { ...one, stage: next } : one)));

  const goOn = (): void => {
    for (const { key, file, stage: now } of uploads) {
      if (underWay.size >= AT_ONCE) return;
      if (now.kind === 'queued') void begin(key, file);
    }
  };

  const begin = async (key: string, file: File): Promise<void> => {
    const control = new AbortController();
    const { signal } = control;
    underWay.set(key, control);
    stage(key, { kind: 'sending', bytes: 0 });
    try {
      const photo = await send(file, {
        keepDate: keepsDate.get(key) ?? false,
        // The form has a few bytes more than the file.
        onProgress: (bytes) => {
          if (!signal.aborted) stage(key, { kind: 'sending', bytes: Math.min(bytes, file.size) });
        },
        signal,
      });
      if (signal.aborted) return;
      set(uploads.filter((one) => one.key !== key));
      tell({ kind: 'arrived', photo, file });
    } catch (error) {
      if (signal.aborted) return;
      stage(key, { kind: 'failed', reason: sayWhy(error), again: isWorthAnotherTry(error) });
      tell({ kind: 'failed', error });
    } finally {
      if (underWay.get(key) === control) underWay.delete(key);
      goOn();
    }
  };

  const halt = (key: string): void => {
    underWay.get(key)?.abort();
    underWay.delete(key);
  };

  return {
    subscribe: (listener) => {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
    uploads: () => uploads,
    onOutcome: (listener) => {
      waitingForOutcomes.add(listener);
      return () => waitingForOutcomes.delete(listener);
    },
    add: (files, keepDate) => {
      const added = files.map((file): Upload => {
        const fault = faultOfFile(file);
        made += 1;
        const key = `upload ${made}`;
        keepsDate.set(key, keepDate);
        return { key, file, stage: fault === null ? { kind: 'queued' } : { kind: 'refused', reason: fault } };
      });
      set([...uploads, ...added]);
      goOn();
    },
    stop: (key) => {
      halt(key);
      stage(key, { kind: 'stopped' });
      goOn();
    },
    again: (key) => {
      const isWanted = ({ stage: now, ...one }: Upload): boolean =>
        key === undefined ? now.kind === 'failed' && now.again : one.key === key && (now.kind === 'failed' || now.kind === 'stopped');
      set(uploads.map((one) => (isWanted(one) ? { ...one, stage: { kind: 'queued' } } : one)));
      goOn();
    },
    remove: (key) => {
      halt(key);
      keepsDate.delete(key);
      set(uploads.filter((one) => one.key !== key));
      goOn();
    },
    end: () => {
      uploads = [];
      for (const key of [...underWay.keys()]) halt(key);
    },
  };
}

/** Whether a file is still on its way. */
export function isUnderWay({ stage }: Upload): boolean {
  return stage.kind === 'queued' || stage.kind === 'sending';
}

/** What the register says of a file it refuses is said of that file; of anything else, what happened and what to do. */
function sayWhy(error: unknown): string {
  const { title, advice } = sayFailure(error);
  return isWorthAnotherTry(error) ? `${title}.` : advice;
}
