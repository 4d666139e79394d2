import { useMutation, useQueryClient } from '@tanstack/react-query';
import { Link, useNavigate } from 'react-router-dom';
import { lookUpReadings } from '#contract/marks.ts';
import type { ReadingDesk } from '#contract/marks.ts';
import type { Photo } from '#contract/photos.ts';
import { call } from '../../lib/call.ts';
import { paths } from '../../lib/paths.ts';
import { sayDay, sayOpenSpan } from '../../lib/say-date.ts';
import { Button } from '../../ui/button.tsx';
import { FailureNote } from '../../ui/failure-note.tsx';
import { MarginNotes } from '../../ui/margin-notes.tsx';
import type { Note } from '../../ui/margin-notes.tsx';
import { markKeys } from '../marks/marks-queries.ts';
import { InlineStep } from '../people/inline-step.tsx';
import { UploadCautions } from '../photos/upload-cautions.tsx';
import { sayStanding } from './desk-words.ts';
import { isProcessed } from './look.ts';
import type { Look } from './look.ts';
import { readingDesk } from './reading-queries.ts';

type Props = {
  readonly desk: ReadingDesk;
  /** The photo that is looked at, and what is done to it; null where there is none. */
  readonly photo: Photo | null;
  readonly look: Look | null;
};

/** Beside the photo: whose reading this is, what part it is on, what the picture is, and the caution. */
export function DeskMargin({ desk, photo, look }: Props) {
  const standing = sayStanding(desk);
  const notes: Note[] = [
    { number: null, heading: `${standing.title}.`, body: standing.body },
    ...(desk.part === null ? [] : [{ number: null, heading: 'The part.', body: <PartWords part={desk.part} /> }]),
    ...(photo === null || photo.state === 'failed' ? [] : [{ number: null, heading: 'The picture.', body: sayPicture(photo, look) }]),
  ];
  return (
    <>
      <MarginNotes notes={notes} />
      {desk.blind && !desk.first && <LookUp id={desk.id} />}
      <UploadCautions />
    </>
  );
}

function PartWords({ part: { id, title, casting, made, maker } }: { readonly part: NonNullable<ReadingDesk['part']> }) {
  return (
    <>
      <Link to={paths.part(id)}>{title}</Link>
      {maker !== null && `, ${maker.name}`}
      {casting !== null && (
        <>
          , casting {casting.slug === null ? casting.title : <Link to={paths.casting(casting.slug)}>{casting.title}</Link>}
        </>
      )}
      {made !== null && `, made ${sayOpenSpan(made)}`}.
    </>
  );
}

/** What the picture is worth as a witness. Relief is honest about what it does: it has only the brightness to go by. */
function sayPicture({ takenOn }: Photo, look: Look | null): string {
  const taken = takenOn === null ? '' : `Taken on ${sayDay(takenOn)}. `;
  if (look === null || !isProcessed(look)) return `${taken}As the camera saw it; where it was taken is removed from it.`;
  const relief = look.relief ? 'Relief goes by brightness alone: paint, rust and stains look raised or sunk too. ' : '';
  return `${taken}This view is processed. ${relief}Judge a doubtful stroke on the picture as taken.`;
}

/** The quiet way out of reading blind, with what it costs said before. */
function LookUp({ id }: { readonly id: string }) {
  const navigate = useNavigate();
  const queryClient = useQueryClient();
  const look = useMutation({
    mutationFn: () => call(lookUpReadings, { params: { id } }),
    onSuccess: async (mark) => {
      queryClient.setQueryData(markKeys.page(id), mark);
      await navigate(paths.mark(id));
      queryClient.removeQueries({ queryKey: readingDesk(id).queryKey });
    },
  });
  return (
    <InlineStep label="Show me what others read">
      {(close) => (
        <div className="space-y-3 text-[15px] leading-snug">
          <p>Then a reading you make of this mark no longer counts as independent, for good. What you typed here is kept meanwhile.</p>
          {look.isError && <FailureNote error={look.error} onAgain={() => look.mutate()} />}
          <div className="flex flex-wrap gap-2">
            <Button disabled={look.isPending} onClick={() => look.mutate()}>
              Show all of it
            </Button>
            <Button onClick={close}>Read on</Button>
          </div>
        </div>
      )}
    </InlineStep>
  );
}
