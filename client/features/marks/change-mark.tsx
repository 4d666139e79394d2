import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { useNavigate } from 'react-router-dom';
import { changeMark, placeMark, removeMark } from '#contract/marks.ts';
import type { MarkPage } from '#contract/marks.ts';
import { PHOTO_LIMITS } from '#contract/photos.ts';
import { call } from '../../lib/call.ts';
import { paths } from '../../lib/paths.ts';
import { ProblemError } from '../../lib/problem-error.ts';
import { Button } from '../../ui/button.tsx';
import { partKeys, partPage } from '../parts/parts-queries.ts';
import { ActTrouble } from '../people/act-trouble.tsx';
import { InlineStep } from '../people/inline-step.tsx';
import { PhotoPicker, withPhoto } from '../photos/photo-picker.tsx';
import { photoKeys } from '../photos/photo-queries.ts';
import { useUploads } from '../photos/use-uploads.ts';
import { MarkNature } from './mark-nature.tsx';
import { sayMarkKind } from './mark-words.ts';
import { markKeys, markPage } from './marks-queries.ts';

/** What the holder of a mark's part can do about it. */
export function ChangeMark({ mark }: { readonly mark: MarkPage }) {
  return (
    <div className="no-print flex flex-col items-start gap-3">
      {mark.can.change && (
        <>
          <InlineStep label="Add photos">{(close) => <AddPhotos mark={mark} onDone={close} />}</InlineStep>
          <InlineStep label="Say otherwise what it is">{(close) => <Nature mark={mark} onDone={close} />}</InlineStep>
        </>
      )}
      {mark.can.remove && <InlineStep label="Take it off the record">{(close) => <Remove mark={mark} onKeep={close} />}</InlineStep>}
    </div>
  );
}

function useShow(id: string): (answer: MarkPage) => void {
  const queryClient = useQueryClient();
  return (answer) => {
    queryClient.setQueryData(markPage(id).queryKey, answer);
    void queryClient.invalidateQueries({ queryKey: partKeys.all });
    void queryClient.invalidateQueries({ queryKey: photoKeys.unused });
  };
}

function AddPhotos({ mark: { id, photos, part }, onDone }: { readonly mark: MarkPage; readonly onDone: () => void }) {
  const show = useShow(id);
  const [ids, setIds] = useState<readonly string[]>([]);
  const uploads = useUploads((photo) => setIds((now) => withPhoto(now, photo.id)));
  const ofPart = useQuery({ ...partPage(part?.id ?? ''), enabled: part !== null }).data?.photos.filter((photo) => !photos.some((own) => own.photo.id === photo.id)) ?? [];
  const add = useMutation({
    mutationFn: async (photoIds: readonly string[]) => {
      let answer: MarkPage | null = null;
      // One after the other: each locks the mark.
      for (const photoId of photoIds) answer = await call(placeMark, { params: { id, photoId }, body: { region: null } });
      return answer;
    },
    onSuccess: (answer) => {
      if (answer !== null) show(answer);
      onDone();
    },
  });
  return (
    <>
      <PhotoPicker id="mark-photos" uploads={uploads} ids={ids} onChange={(change) => setIds(change)} most={PHOTO_LIMITS.ofMark - photos.length} beside={{ heading: 'Photos of the part', photos: ofPart }} />
      <ActTrouble act={add} />
      <div className="mt-4 flex flex-wrap gap-3">
        <Button disabled={add.isPending || ids.length === 0 || uploads.underWay > 0} onClick={() => add.mutate(ids)}>
          Put them on the mark
        </Button>
        <Button onClick={onDone}>Leave it</Button>
      </div>
    </>
  );
}

function Nature({ mark, onDone }: { readonly mark: MarkPage; readonly onDone: () => void }) {
  const { id, revision } = mark;
  const queryClient = useQueryClient();
  const show = useShow(id);
  const [nature, setNature] = useState({ kind: mark.kind, technique: mark.technique });
  const change = useMutation({
    mutationFn: (body: { readonly kind: MarkPage['kind']; readonly technique: MarkPage['technique']; readonly revision: number }) => call(changeMark, { params: { id }, body }),
    onSuccess: (answer) => {
      show(answer);
      onDone();
    },
    onError: (error) => {
      // What it is now is shown above; the next attempt is made on that.
      if (error instanceof ProblemError && error.kind === 'conflict') void queryClient.invalidateQueries({ queryKey: markKeys.page(id) });
    },
  });
  const isConflict = change.error instanceof ProblemError && change.error.kind === 'conflict';
  return (
    <>
      <MarkNature value={nature} onChange={setNature} />
      {isConflict ? (
        <p role="alert" className="mb-3 font-semibold text-scale">
          It was changed meanwhile, and is now on record as: {sayMarkKind(mark).toLowerCase()}. What you chose is kept here; save again to put it in its place.
        </p>
      ) : (
        <ActTrouble act={change} />
      )}
      <div className="flex flex-wrap gap-3">
        <Button disabled={change.isPending} onClick={() => change.mutate({ ...nature, revision })}>
          Save it
        </Button>
        <Button onClick={onDone}>Leave it</Button>
      </div>
    </>
  );
}

function Remove({ mark: { id, part }, onKeep }: { readonly mark: MarkPage; readonly onKeep: () => void }) {
  const queryClient = useQueryClient();
  const navigate = useNavigate();
  const remove = useMutation({
    mutationFn: () => call(removeMark, { params: { id } }),
    onSuccess: async () => {
      await navigate(part === null ? paths.bench() : paths.part(part.id));
      // Only now: as long as its page is shown, it would be asked for again.
      queryClient.removeQueries({ queryKey: markKeys.page(id) });
      await queryClient.invalidateQueries({ queryKey: partKeys.all });
      await queryClient.invalidateQueries({ queryKey: markKeys.all });
    },
  });
  return (
    <>
      <p className="mb-3">The mark and your readings of it can’t be had back. Its photos stay.</p>
      <RemoveTrouble act={remove} />
      <div className="flex flex-wrap gap-3">
        <Button disabled={remove.isPending} onClick={() => remove.mutate()}>
          Take it off for good
        </Button>
        <Button onClick={onKeep}>Keep it</Button>
      </div>
    </>
  );
}

/** The register keeps what others have read, and says so in its own words. */
function RemoveTrouble({ act }: { readonly act: Parameters<typeof ActTrouble<{ done: true }, void>>[0]['act'] }) {
  if (act.error instanceof ProblemError && act.error.kind === 'conflict') {
    return (
      <p role="alert" className="mb-3 font-semibold text-scale">
        {act.error.message}
      </p>
    );
  }
  return <ActTrouble act={act} />;
}
