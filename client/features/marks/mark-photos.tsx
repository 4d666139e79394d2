import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { placeMark, takePhotoOffMark } from '#contract/marks.ts';
import type { MarkPage } from '#contract/marks.ts';
import type { MarkPhoto } from '#contract/parts.ts';
import { call } from '../../lib/call.ts';
import { sayDay } from '../../lib/say-date.ts';
import { Button } from '../../ui/button.tsx';
import { partKeys } from '../parts/parts-queries.ts';
import { ActTrouble } from '../people/act-trouble.tsx';
import { PhotoImage } from '../photos/photo-image.tsx';
import { photoKeys } from '../photos/photo-queries.ts';
import { markPage } from './marks-queries.ts';

/** A mark's photos, each with the place where the mark stands outlined. */
export function MarkPhotos({ mark: { id, photos, can } }: { readonly mark: Pick<MarkPage, 'id' | 'photos' | 'can'> }) {
  const queryClient = useQueryClient();
  const [taken, setTaken] = useState<MarkPhoto | null>(null);
  const show = (answer: MarkPage): void => {
    queryClient.setQueryData(markPage(id).queryKey, answer);
    void queryClient.invalidateQueries({ queryKey: partKeys.all });
    void queryClient.invalidateQueries({ queryKey: photoKeys.unused });
  };
  const takeOff = useMutation({
    mutationFn: ({ photo }: MarkPhoto) => call(takePhotoOffMark, { params: { id, photoId: photo.id } }),
    onSuccess: (answer, photo) => {
      setTaken(photo);
      show(answer);
    },
  });
  const putBack = useMutation({
    mutationFn: ({ photo, region, turn, mirrored }: MarkPhoto) => call(placeMark, { params: { id, photoId: photo.id }, body: { region, turn, mirrored } }),
    onSuccess: (answer) => {
      setTaken(null);
      show(answer);
    },
  });
  return (
    <>
      {photos.length === 0 && <p className="border-y border-rule py-4 text-slag">There is no photo of it. It can only be read where it is.</p>}
      <ul className="space-y-6">
        {photos.map((markPhoto, place) => (
          <li key={markPhoto.photo.id}>
            <Outlined markPhoto={markPhoto} name={photos.length === 1 ? 'The mark' : `The mark, photo ${place + 1} of ${photos.length}`} />
            {can.change && (
              <Button className="no-print mt-2" disabled={takeOff.isPending} onClick={() => takeOff.mutate(markPhoto)}>
                Take this photo off the mark
              </Button>
            )}
          </li>
        ))}
      </ul>
      <ActTrouble act={takeOff} />
      {taken !== null && (
        <div className="mt-3">
          <p role="status" className="flex flex-wrap items-center gap-3">
            The photo is off the mark; the photo itself stays.
            <Button disabled={putBack.isPending} onClick={() => putBack.mutate(taken)}>
              Put it back
            </Button>
          </p>
          <ActTrouble act={putBack} />
        </div>
      )}
    </>
  );
}

function Outlined({ markPhoto: { photo, region, turn, mirrored }, name }: { readonly markPhoto: MarkPhoto; readonly name: string }) {
  const whole = photo.renditions.full;
  const said = [
    region === null ? 'Nobody has drawn yet where the mark stands.' : 'Where the mark stands is outlined.',
    ...(turn === 0 ? [] : [`Turned by ${Math.round(turn)}° to be read.`]),
    ...(mirrored ? ['Read in the mirror.'] : []),
    ...(photo.takenOn === null ? [] : [`Taken ${sayDay(photo.takenOn)}.`]),
  ];
  return (
    <figure className="max-w-[760px]">
      <div className="relative">
        <PhotoImage photo={photo} alt={name} size="page" sizes="min(100vw, 760px)" />
        {region !== null && (
          <span
            aria-hidden="true"
            className="absolute border-2 border-relief-lit outline-1 outline-relief-shade"
            style={{ left: share(region.left), top: share(region.top), width: share(region.width), height: share(region.height) }}
          />
        )}
      </div>
      <figcaption className="mt-1 text-[15px] leading-snug text-slag">
        {said.join(' ')}
        {whole !== null && (
          <>
            {' '}
            <a href={whole.url} className="no-print inline-flex min-h-11 items-center">
              The whole photo, {whole.width} × {whole.height}
            </a>
          </>
        )}
      </figcaption>
    </figure>
  );
}

function share(part: number): string {
  return `${part * 100}%`;
}
