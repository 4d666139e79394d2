import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useEffect, useEffectEvent, useRef, useState } from 'react';
import type { ReactNode } from 'react';
import { useDropzone } from 'react-dropzone';
import { PHOTO_LIMITS, removePhoto } from '#contract/photos.ts';
import type { Photo } from '#contract/photos.ts';
import { call } from '../../lib/call.ts';
import { ProblemError } from '../../lib/problem-error.ts';
import { sayBytes } from '../../lib/say-bytes.ts';
import { sayDay } from '../../lib/say-date.ts';
import { sayCount } from '../../lib/say-number.ts';
import { Button } from '../../ui/button.tsx';
import { CheckField } from '../../ui/check-field.tsx';
import { FailureNote } from '../../ui/failure-note.tsx';
import { Live } from '../../ui/live.tsx';
import { SkeletonBar } from '../../ui/skeleton.tsx';
import { ActTrouble } from '../people/act-trouble.tsx';
import { InlineStep } from '../people/inline-step.tsx';
import { ACCEPTED } from './photo-files.ts';
import { PhotoImage } from './photo-image.tsx';
import { photoById, photoKeys, unusedPhotos } from './photo-queries.ts';
import { UploadCautions } from './upload-cautions.tsx';
import { UploadRows } from './upload-rows.tsx';
import type { Uploads } from './use-uploads.ts';

type Change = (change: (ids: readonly string[]) => readonly string[]) => void;

type Props = {
  readonly uploads: Uploads;
  /** The photos chosen, in their order. */
  readonly ids: readonly string[];
  readonly onChange: Change;
  /** How many there may be. */
  readonly most: number;
  /** So that a fault can point here. */
  readonly id: string;
  readonly error?: string | null;
  /** Photos offered besides those not used yet. */
  readonly beside?: { readonly heading: string; readonly photos: readonly Photo[] };
};

const TILES = 'grid grid-cols-2 gap-4 roomy:grid-cols-3 wide:grid-cols-4';
const TILE_WIDTH = '240px';

/** Puts a photo that arrived among those chosen, unless it is there already. */
export function withPhoto(ids: readonly string[], id: string): readonly string[] {
  return ids.includes(id) ? ids : [...ids, id];
}

/** Photos for a part or a mark: dropped, chosen, pasted or taken; those sent before and not used yet are offered too. */
export function PhotoPicker({ uploads, ids, onChange, most, id, error = null, beside }: Props) {
  const { list, underWay } = uploads;
  const unused = useQuery(unusedPhotos());
  const isOpen = (photo: Photo): boolean => !ids.includes(photo.id);
  const also = beside?.photos.filter(isOpen) ?? [];
  const offered = (unused.data?.items ?? []).filter((photo) => isOpen(photo) && !also.some((other) => other.id === photo.id));
  const offer = { isFull: ids.length >= most, onUse: (photoId: string) => onChange((now) => withPhoto(now, photoId)) };
  return (
    <div>
      <UploadCautions />
      <div className="mt-4" id={id} tabIndex={-1}>
        <Entrance list={list} room={most - ids.length - underWay} most={most} />
      </div>
      {error !== null && <p className="mt-2 text-[15px] font-semibold text-scale">{error}</p>}
      <UploadRows uploads={uploads.uploads} list={list} />
      <Live>{underWay > 0 ? `${underWay} on their way` : ''}</Live>
      <Chosen ids={ids} onChange={onChange} fileOf={uploads.fileOf} />
      {unused.isError && (
        <div className="mt-6">
          <FailureNote error={unused.error} onAgain={() => void unused.refetch()} />
        </div>
      )}
      {beside !== undefined && also.length > 0 && <Offered heading={beside.heading} photos={also} {...offer} />}
      {offered.length > 0 && (
        <Offered
          heading="Sent before, and not used yet"
          note={`Only you see them. They are kept for ${PHOTO_LIMITS.unused} days.`}
          photos={offered}
          {...offer}
          deeds={({ id: photoId }) => <ThrowAway id={photoId} />}
        />
      )}
    </div>
  );
}

function Entrance({ list, room, most }: { readonly list: Uploads['list']; readonly room: number; readonly most: number }) {
  const [keepDate, setKeepDate] = useState(false);
  const [left, setLeft] = useState(0);
  const camera = useRef<HTMLInputElement>(null);
  const take = (files: readonly File[]): void => {
    setLeft(Math.max(0, files.length - room));
    list.add(files.slice(0, Math.max(0, room)), keepDate);
  };
  const pasted = useEffectEvent((event: ClipboardEvent) => {
    const files = [...(event.clipboardData?.files ?? [])];
    if (files.length === 0) return;
    event.preventDefault();
    take(files);
  });
  useEffect(() => {
    const onPaste = (event: ClipboardEvent): void => pasted(event);
    document.addEventListener('paste', onPaste);
    return () => document.removeEventListener('paste', onPaste);
  }, []);
  const { getRootProps, getInputProps, isDragActive, open } = useDropzone({
    accept: ACCEPTED,
    noClick: true,
    noKeyboard: true,
    // What it would leave out is shown with the reason, like the rest.
    onDrop: (accepted, refused) => take([...accepted, ...refused.map(({ file }) => file)]),
  });
  return (
    <>
      <div {...getRootProps({ role: 'group', 'aria-label': 'Add photos' })} className={`border border-dashed px-4 py-5 roomy:px-6 ${isDragActive ? 'border-oxide bg-bed' : 'border-edge bg-paper'}`}>
        <input {...getInputProps({ 'aria-label': 'Photos from this device' })} />
        <input
          ref={camera}
          type="file"
          accept="image/*"
          capture="environment"
          aria-label="Photo from the camera"
          hidden
          onChange={({ currentTarget }) => {
            take([...(currentTarget.files ?? [])]);
            currentTarget.value = '';
          }}
        />
        <div className="flex flex-wrap items-center gap-3">
          <span className="hidden pointer-coarse:block">
            <Button onClick={() => camera.current?.click()}>Take a photo</Button>
          </span>
          <Button onClick={open}>Choose photos</Button>
          <p className="text-slag pointer-coarse:hidden">{isDragActive ? 'Let go here' : 'or drop them here, or paste them'}</p>
        </div>
        <p className="mt-3 max-w-measure text-[15px] leading-snug text-slag">
          JPEG, PNG, WebP or HEIC, up to {sayBytes(PHOTO_LIMITS.file)} each. Where a photo was taken is always removed from it, with everything else the camera noted.
        </p>
        <CheckField label="Keep the day the camera noted" checked={keepDate} onChange={({ target }) => setKeepDate(target.checked)} hint="Only the day. It is for photos sent from now on." />
      </div>
      {left > 0 && (
        <p role="alert" className="mt-2 text-[15px] font-semibold text-scale">
          {left === 1 ? 'One photo was' : `${sayCount(left)} photos were`} left out: there may be {most} here at most.
        </p>
      )}
    </>
  );
}

type Taken = { readonly id: string; readonly place: number };

function Chosen({ ids, onChange, fileOf }: { readonly ids: readonly string[]; readonly onChange: Change; readonly fileOf: Uploads['fileOf'] }) {
  const [taken, setTaken] = useState<Taken | null>(null);
  const takeOff = (id: string, place: number): void => {
    onChange((now) => now.filter((one) => one !== id));
    setTaken({ id, place });
  };
  const putBack = ({ id, place }: Taken): void => {
    onChange((now) => (now.includes(id) ? now : [...now.slice(0, place), id, ...now.slice(place)]));
    setTaken(null);
  };
  return (
    <div className="mt-6">
      {ids.length > 0 && (
        <ul aria-label="Photos chosen" className={TILES}>
          {ids.map((id, place) => (
            <ChosenPhoto
              key={id}
              id={id}
              place={place}
              file={fileOf(id)}
              onTakeOff={() => takeOff(id, place)}
              onPutFirst={() => onChange((now) => [id, ...now.filter((one) => one !== id)])}
            />
          ))}
        </ul>
      )}
      {taken !== null && !ids.includes(taken.id) && (
        <p role="status" className="mt-3 flex flex-wrap items-center gap-3">
          The photo is taken off.
          <Button onClick={() => putBack(taken)}>Put it back</Button>
        </p>
      )}
    </div>
  );
}

type ChosenProps = { readonly id: string; readonly place: number; readonly file: File | null; readonly onTakeOff: () => void; readonly onPutFirst: () => void };

function ChosenPhoto({ id, place, file, onTakeOff, onPutFirst }: ChosenProps) {
  const { data: photo, error, refetch } = useQuery(photoById(id));
  const name = <span className="sr-only"> photo {place + 1}</span>;
  const isGone = error instanceof ProblemError && error.kind === 'not-found';
  return (
    <li className="min-w-0">
      {photo !== undefined ? (
        <Tile photo={photo} file={file} place={place} />
      ) : error === null ? (
        <SkeletonBar width="aspect-[4/3] h-auto w-full" />
      ) : isGone ? (
        <p className="text-[15px] leading-snug text-scale">This photo is no longer on record.</p>
      ) : (
        <FailureNote error={error} onAgain={() => void refetch()} />
      )}
      <div className="mt-2 flex flex-wrap gap-2 text-[15px]">
        <Button className="px-3" onClick={onTakeOff}>
          Take off{name}
        </Button>
        {place > 0 && (
          <Button className="px-3" onClick={onPutFirst}>
            Put first{name}
          </Button>
        )}
      </div>
    </li>
  );
}

function Tile({ photo, file, place }: { readonly photo: Photo; readonly file: File | null; readonly place: number | null }) {
  const said = [...(photo.name === null ? [] : [photo.name]), ...(photo.takenOn === null ? [] : [`taken ${sayDay(photo.takenOn)}`])];
  return (
    <>
      <PhotoImage photo={photo} alt={place === null ? (photo.name ?? 'A photo not used yet') : `Photo ${place + 1}`} sizes={TILE_WIDTH} aspect={4 / 3} file={file} />
      <Caption>{said.join(', ')}</Caption>
      {photo.state === 'failed' && <p className="text-[15px] leading-snug font-semibold text-scale">{photo.failure ?? 'No picture could be made of it.'}</p>}
    </>
  );
}

function Caption({ children }: { readonly children: ReactNode }) {
  return <p className="truncate text-[15px] text-slag">{children}</p>;
}

type OfferedProps = {
  readonly heading: string;
  readonly note?: string;
  readonly photos: readonly Photo[];
  readonly isFull: boolean;
  readonly onUse: (id: string) => void;
  readonly deeds?: (photo: Photo) => ReactNode;
};

/** Photos that are on record already and may be used here. */
function Offered({ heading, note, photos, isFull, onUse, deeds }: OfferedProps) {
  return (
    <div className="mt-8">
      <h3 className="font-semibold">{heading}</h3>
      {note !== undefined && <p className="max-w-measure text-[15px] leading-snug text-slag">{note}</p>}
      <ul aria-label={heading} className={`mt-3 ${TILES}`}>
        {photos.map((photo, place) => (
          <li key={photo.id} className="min-w-0">
            <Tile photo={photo} file={null} place={null} />
            <div className="mt-2 space-y-2 text-[15px]">
              <Button className="px-3" disabled={isFull} onClick={() => onUse(photo.id)}>
                Use it<span className="sr-only"> {photo.name ?? `photo ${place + 1}`}</span>
              </Button>
              {deeds?.(photo)}
            </div>
          </li>
        ))}
      </ul>
    </div>
  );
}

function ThrowAway({ id }: { readonly id: string }) {
  const queryClient = useQueryClient();
  const remove = useMutation({
    mutationFn: () => call(removePhoto, { params: { id } }),
    onSuccess: () => queryClient.invalidateQueries({ queryKey: photoKeys.unused }),
  });
  return (
    <InlineStep label="Throw it away">
      {(close) => (
        <>
          <p className="mb-2">It can’t be had back.</p>
          <ActTrouble act={remove} />
          <div className="flex flex-wrap gap-2">
            <Button disabled={remove.isPending} onClick={() => remove.mutate()}>
              Throw it away for good
            </Button>
            <Button onClick={close}>Keep it</Button>
          </div>
        </>
      )}
    </InlineStep>
  );
}
