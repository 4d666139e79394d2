// @vitest-environment node
import { describe, expect, it } from 'vitest';
import { createUploadList, isUnderWay } from '#client/features/photos/upload-list.ts';
import type { Outcome } from '#client/features/photos/upload-list.ts';
import type { Sending } from '#client/features/photos/send-photo.ts';
import { ProblemError, UnreachableError } from '#client/lib/problem-error.ts';
import { PHOTO_LIMITS } from '#contract/photos.ts';
import type { Photo } from '#contract/photos.ts';
import { photo } from '../marks/samples.ts';

type Sent = Sending & { readonly name: string; readonly arrive: (photo: Photo) => void; readonly fail: (error: Error) => void };

/** A list whose sendings end when the test says so. */
function listWithSendings() {
  const sent: Sent[] = [];
  const list = createUploadList(
    (file, sending) =>
      new Promise((resolve, reject: (reason: Error) => void) => {
        sent.push({ ...sending, name: file.name, arrive: resolve, fail: reject });
        sending.signal.addEventListener('abort', () => reject(new DOMException('Given up', 'AbortError')));
      }),
  );
  const outcomes: Outcome[] = [];
  list.onOutcome((outcome) => outcomes.push(outcome));
  return { list, sent, outcomes, stages: () => list.uploads().map(({ file, stage }) => [file.name, stage.kind]) };
}

const file = (name: string, bytes = 1000, type = 'image/jpeg') => new File([new Uint8Array(bytes)], name, { type });
/** Lets what was settled be heard. */
const settle = () => new Promise((resolve) => setImmediate(resolve));
const refusal = (kind: 'unsupported-media-type' | 'unavailable', detail: string) =>
  new ProblemError({ kind, status: kind === 'unavailable' ? 503 : 415, detail, faults: [], requestId: 'r', retryAfter: null });

describe('createUploadList', () => {
  it('sends two at once and the others as room comes, each by itself', async () => {
    const { list, sent, stages, outcomes } = listWithSendings();
    list.add([file('a.jpg'), file('b.jpg'), file('c.jpg')], false);
    expect(stages()).toEqual([['a.jpg', 'sending'], ['b.jpg', 'sending'], ['c.jpg', 'queued']]);
    sent[1]?.arrive(photo(1));
    await settle();
    expect(stages()).toEqual([['a.jpg', 'sending'], ['c.jpg', 'sending']]);
    expect(outcomes).toMatchObject([{ kind: 'arrived', photo: { id: photo(1).id }, file: { name: 'b.jpg' } }]);
  });

  it('tells how many bytes have gone out, never more than the file has', () => {
    const { list, sent } = listWithSendings();
    list.add([file('a.jpg', 1000)], true);
    expect(sent[0]?.keepDate).toBe(true);
    sent[0]?.onProgress(400);
    expect(list.uploads()[0]?.stage).toEqual({ kind: 'sending', bytes: 400 });
    sent[0]?.onProgress(1180);
    expect(list.uploads()[0]?.stage).toEqual({ kind: 'sending', bytes: 1000 });
  });

  it('refuses before sending what can’t be kept, with the reason', () => {
    const { list, sent } = listWithSendings();
    list.add([file('list.csv', 10, 'text/csv'), file('none.jpg', 0), file('large.jpg', PHOTO_LIMITS.file + 1)], false);
    expect(list.uploads().map(({ stage }) => (stage.kind === 'refused' ? stage.reason : stage.kind))).toEqual([
      'Only JPEG, PNG, WebP and HEIC pictures can be kept.',
      'The file is empty.',
      'It is larger than the 25 MB a photo may have.',
    ]);
    expect(sent).toEqual([]);
  });

  it('stops one and sends it after all, without touching the others', async () => {
    const { list, sent, stages } = listWithSendings();
    list.add([file('a.jpg'), file('b.jpg')], false);
    list.stop(list.uploads()[0]!.key);
    await settle();
    expect(sent[0]?.signal.aborted).toBe(true);
    expect(stages()).toEqual([['a.jpg', 'stopped'], ['b.jpg', 'sending']]);
    sent[0]?.onProgress(10);
    expect(stages()[0]).toEqual(['a.jpg', 'stopped']);
    list.again(list.uploads()[0]!.key);
    expect(sent.map(({ name }) => name)).toEqual(['a.jpg', 'b.jpg', 'a.jpg']);
  });

  it('sends again only what failed', async () => {
    const { list, sent, stages, outcomes } = listWithSendings();
    list.add([file('a.jpg'), file('b.jpg'), file('c.jpg')], false);
    sent[0]?.fail(new UnreachableError('offline', null));
    sent[1]?.arrive(photo(1));
    await settle();
    sent[2]?.fail(refusal('unavailable', 'Away'));
    await settle();
    expect(list.uploads().map(({ stage }) => stage)).toEqual([
      { kind: 'failed', reason: 'This device is offline.', again: true },
      { kind: 'failed', reason: 'The register is away for a moment.', again: true },
    ]);
    expect(outcomes.map(({ kind }) => kind)).toEqual(['failed', 'arrived', 'failed']);
    list.again();
    expect(sent.map(({ name }) => name)).toEqual(['a.jpg', 'b.jpg', 'c.jpg', 'a.jpg', 'c.jpg']);
    expect(stages()).toEqual([['a.jpg', 'sending'], ['c.jpg', 'sending']]);
  });

  it('does not send again what the register looked at and refused', async () => {
    const { list, sent, stages } = listWithSendings();
    list.add([file('a.jpg')], false);
    sent[0]?.fail(refusal('unsupported-media-type', 'This is a drawing, not a photo.'));
    await settle();
    expect(list.uploads()[0]?.stage).toEqual({ kind: 'failed', reason: 'This is a drawing, not a photo.', again: false });
    list.again();
    expect(sent).toHaveLength(1);
    list.remove(list.uploads()[0]!.key);
    expect(stages()).toEqual([]);
  });

  it('gives up what is under way when the page is left, and tells nobody', async () => {
    const { list, sent, outcomes } = listWithSendings();
    list.add([file('a.jpg'), file('b.jpg'), file('c.jpg')], false);
    expect(list.uploads().filter(isUnderWay)).toHaveLength(3);
    list.end();
    await settle();
    expect(sent.map(({ signal }) => signal.aborted)).toEqual([true, true]);
    expect(outcomes).toEqual([]);
  });
});
