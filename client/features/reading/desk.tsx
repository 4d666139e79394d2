import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useEffect, useRef, useState } from 'react';
import type { SyntheticEvent } from 'react';
import { useNavigate } from 'react-router-dom';
import { makeReading, placeMark } from '#contract/marks.ts';
import type { ReadingDesk } from '#contract/marks.ts';
import { MarkText } from '#contract/decode.ts';
import type { Region } from '#contract/parts.ts';
import { call } from '../../lib/call.ts';
import { paths } from '../../lib/paths.ts';
import { ProblemError } from '../../lib/problem-error.ts';
import { capital } from '../../lib/say-number.ts';
import { useSessionDraft } from '../../lib/session-draft.ts';
import { useRequestKey } from '../../lib/use-request-key.ts';
import { Button } from '../../ui/button.tsx';
import { EmptyState } from '../../ui/empty-state.tsx';
import { MarkEntry } from '../../ui/mark-entry.tsx';
import { Block } from '../../ui/page-grid.tsx';
import { DIVISIONS_SHOWN, divisionsOf } from '../decode/divisions.ts';
import { faultOfMark } from '../decode/fault-of-mark.ts';
import { markKeys } from '../marks/marks-queries.ts';
import { sayKind } from '../marks/mark-words.ts';
import { CastingsAnswer } from './castings-answer.tsx';
import { DateAnswer } from './date-answer.tsx';
import { DeskDraft, newDeskDraft, withRegion, withView } from './desk-draft.ts';
import { DeskMargin } from './desk-margin.tsx';
import { PhotoChoice } from './photo-choice.tsx';
import { ReadingStage } from './reading-stage.tsx';
import { readingDesk, useReadyPhotos } from './reading-queries.ts';
import { SaveTrouble } from './save-trouble.tsx';
import { useDeskDecoding } from './use-desk-decoding.ts';
import type { View } from './view.ts';

type Props = { readonly desk: ReadingDesk; readonly viewerId: string };

/** Where a mark is read: the photo, and below it the plate with what it can mean beside it. */
export function Desk({ desk, viewerId }: Props) {
  const [initial] = useState(() => newDeskDraft(desk));
  const draft = useSessionDraft(`reading:${viewerId}:${desk.id}`, initial, DeskDraft);
  const { value: said, change } = draft;
  const photos = useReadyPhotos(desk.photos);
  const place = photos.find(({ photo }) => photo.id === said.photoId) ?? photos[0] ?? null;
  const readFrom = place === null || place.photo.state === 'failed' ? null : place.photo.id;

  const saving = useSaving(desk.id, draft.drop);
  const placing = usePlacing(desk.id, (photoId) => change((now) => withRegion(now, photoId, null)));
  const { text } = said;
  const type = (typed: string) => {
    saving.reset();
    change((now) => ({ ...now, text: typed }));
  };
  const told = saving.told ?? faultOfMark(text);
  const decoded = useDeskDecoding(desk.kind === 'date-code' ? text : '', desk.narrowing);
  const { inHand, stale } = decoded;
  const speaks = stale || inHand === null ? null : inHand;
  const answers = desk.narrowing !== null && (desk.kind === 'date-code' || desk.kind === 'casting-number');

  const save = () => saving.save({ text, photoId: readFrom });
  const form = useRef<HTMLFormElement>(null);
  useEffect(() => {
    if (saving.told !== null) form.current?.querySelector('input')?.focus();
  }, [saving.told]);
  const submit = (event: SyntheticEvent) => {
    event.preventDefault();
    if (!saving.isPending) save();
  };
  return (
    <Block margin={<DeskMargin desk={desk} photo={place?.photo ?? null} look={place === null ? null : (said.views[place.photo.id] ?? null)} />}>
      {place === null ? (
        <EmptyState title="No photo of it">Read it from the iron itself: type below what stands there. A photo would let others read it too.</EmptyState>
      ) : (
        <>
          {photos.length > 1 && <PhotoChoice photos={photos} chosen={place.photo.id} onChoose={(photoId) => change((now) => ({ ...now, photoId }))} />}
          <ReadingStage
            key={place.photo.id}
            place={place}
            label={photos.length > 1 ? `Photo ${photos.indexOf(place) + 1} of ${photos.length}` : 'Photo'}
            kept={said.views[place.photo.id] ?? null}
            onKeep={(view) => change((now) => withView(now, place.photo.id, view))}
            drawing={
              desk.isHolder
                ? {
                    region: said.regions[place.photo.id] ?? null,
                    draw: (region) => change((now) => withRegion(now, place.photo.id, region)),
                    leave: () => change((now) => withRegion(now, place.photo.id, null)),
                    save: (region, { turn, mirrored }) => placing.mutate({ photoId: place.photo.id, region, turn, mirrored }),
                    saving: placing.isPending,
                  }
                : null
            }
          />
          {placing.isError && <SaveTrouble error={placing.error} what="outline" kept={draft.kept} onAgain={() => placing.mutate(placing.variables)} />}
          <p role="status" className="sr-only">
            {placing.isSuccess ? 'Where the mark stands is saved.' : ''}
          </p>
        </>
      )}
      <form ref={form} onSubmit={submit} noValidate className="mt-6">
        <div className={`grid gap-x-10 gap-y-4 ${answers ? 'wide:grid-cols-2' : ''}`}>
          <div className="min-w-0">
            <MarkEntry
              label={`${sayKind(desk.kind)}, as you see it`}
              value={text}
              onChange={type}
              fault={told}
              divisions={speaks === null ? [] : divisionsOf(speaks.candidates).slice(0, DIVISIONS_SHOWN)}
              lit={speaks?.settle[0]?.position ?? null}
            />
          </div>
          {answers && (
            <div className="min-w-0">
              {desk.kind === 'date-code' ? (
                <DateAnswer decoded={decoded} text={text} isUnfinished={decoded.answer === null && !MarkText.safeParse(text).success} tried={desk.narrowing?.makerId === null ? 'all' : 'one maker'} />
              ) : (
                <CastingsAnswer text={text} maker={desk.part?.maker?.slug ?? null} />
              )}
            </div>
          )}
        </div>
        {saving.failure !== null && <SaveTrouble error={saving.failure} what="reading" kept={draft.kept} onAgain={save} />}
        <div className="mt-6 flex flex-wrap items-center gap-x-4 gap-y-2">
          <Button weight="primary" type="submit" aria-disabled={saving.isPending}>
            {saving.isPending ? 'Saving' : 'Save this reading'}
          </Button>
          <p className="text-slag" role="status">
            {draft.kept && text !== '' ? 'kept as you type' : ''}
          </p>
        </div>
      </form>
    </Block>
  );
}

type NewReading = { readonly text: string; readonly photoId: string | null };

/** Saves a reading and goes on to the mark's page, where all is shown. What is wrong with the text is told beside the plate, the rest below it. */
function useSaving(id: string, drop: () => void) {
  const navigate = useNavigate();
  const queryClient = useQueryClient();
  const [fault, setFault] = useState<string | null>(null);
  const keyOf = useRequestKey();
  const { mutate, reset, isPending, error } = useMutation({
    mutationFn: (body: NewReading) => call(makeReading, { params: { id }, body, key: keyOf(body) }),
    onSuccess: async (mark) => {
      await queryClient.invalidateQueries({ queryKey: markKeys.all, refetchType: 'none' });
      queryClient.setQueryData(markKeys.page(id), mark);
      await navigate(paths.mark(id));
      // Once the desk is left, so that it isn't seen to be cleared.
      drop();
      queryClient.removeQueries({ queryKey: readingDesk(id).queryKey });
    },
  });
  const isOfText = error instanceof ProblemError && error.faults.some(({ path }) => path[0] === 'text');
  return {
    isPending,
    /** What is wrong with the text, by our own rules or the register's. */
    told: fault ?? (isOfText ? capital(error.faults.find(({ path }) => path[0] === 'text')?.message ?? error.message) : null),
    failure: isOfText ? null : error,
    reset: () => {
      setFault(null);
      reset();
    },
    save: (reading: NewReading) => {
      const checked = MarkText.safeParse(reading.text);
      if (checked.success) mutate(reading);
      else setFault(capital(checked.error.issues[0]?.message ?? 'This can’t be read as a mark'));
    },
  };
}

type Placed = Pick<View, 'turn' | 'mirrored'> & { readonly photoId: string; readonly region: Region };

/** Saves where on a photo the mark stands; the desk then has it so. */
function usePlacing(id: string, onPlaced: (photoId: string) => void) {
  const queryClient = useQueryClient();
  return useMutation({
    mutationFn: ({ photoId, ...placed }: Placed) => call(placeMark, { params: { id, photoId }, body: placed }),
    onSuccess: (mark, { photoId }) => {
      queryClient.setQueryData(readingDesk(id).queryKey, (now) => (now === undefined ? now : { ...now, photos: mark.photos, revision: mark.revision }));
      onPlaced(photoId);
    },
  });
}
