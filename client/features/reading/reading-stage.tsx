import { useGesture } from '@use-gesture/react';
import { useEffect, useEffectEvent, useId, useState } from 'react';
import type { KeyboardEvent } from 'react';
import type { MarkPhoto, Region } from '#contract/parts.ts';
import { Button } from '../../ui/button.tsx';
import { Skeleton } from '../../ui/skeleton.tsx';
import { LightDial } from './light-dial.tsx';
import { isOn, isProcessed, sayLook, toggleAsTaken } from './look.ts';
import { PictureCanvas } from './picture-canvas.tsx';
import type { CanvasTrouble } from './picture-canvas.tsx';
import { PlainPicture } from './plain-picture.tsx';
import { RegionOutline } from './region-outline.tsx';
import { regionAfterKey, viewAfterKey, ZOOM_STEP } from './stage-keys.ts';
import { regionBetween, regionInSight, shift, WHOLE, zoomAbout } from './stage-geometry.ts';
import type { Point, Size } from './stage-geometry.ts';
import { useSize } from './use-size.ts';
import { firstView } from './view.ts';
import type { View } from './view.ts';
import { ViewTools } from './view-tools.tsx';

/** Taken for the stage's size until it is measured. */
const USUAL: Size = { width: 840, height: 420 };
/** How far a turn of the wheel by one CSS pixel enlarges. */
const WHEEL = 0.0016;
/** The view is kept once it rests. */
const REST_MS = 250;

/** A region as it is drawn: kept until it is saved or given up. */
export type Drawing = {
  readonly region: Region | null;
  readonly draw: (region: Region) => void;
  readonly leave: () => void;
  /** Saves the region, and how the picture is turned for it. */
  readonly save: (region: Region, placed: Pick<View, 'turn' | 'mirrored'>) => void;
  readonly saving: boolean;
};

type Props = {
  /** The photo, and how the mark was placed on it. */
  readonly place: MarkPhoto;
  /** `Photo 1 of 2`. */
  readonly label: string;
  /** The view this photo was left with; null: the one it opens with. */
  readonly kept: View | null;
  readonly onKeep: (view: View) => void;
  /** Null for whoever may not say where the mark stands. */
  readonly drawing: Drawing | null;
};

/** The photo on its stage, with everything that can be done to see it better. */
export function ReadingStage({ place, label, kept, onKeep, drawing }: Props) {
  const { photo } = place;
  const [surface, stage] = useSize<HTMLDivElement>(USUAL);
  const [changed, setChanged] = useState(kept);
  const [trouble, setTrouble] = useState<CanvasTrouble | null>(null);
  const [attempt, setAttempt] = useState(0);
  const keysId = useId();
  const view = changed ?? firstView(place, stage);
  const region = drawing?.region ?? null;

  const keep = useEffectEvent(() => {
    if (changed !== null && changed !== kept) onKeep(changed);
  });
  useEffect(() => {
    const timer = window.setTimeout(() => keep(), REST_MS);
    return () => window.clearTimeout(timer);
  }, [changed]);

  const amend = (change: (now: View) => View) => setChanged((now) => change(now ?? firstView(place, stage)));
  const placeOf = ([x, y]: readonly [number, number]): Point => {
    const room = surface.current?.getBoundingClientRect();
    return { x: x - (room?.left ?? 0), y: y - (room?.top ?? 0) };
  };
  useGesture(
    {
      onDrag: ({ xy, initial, delta: [x, y], pinching, cancel }) => {
        if (pinching === true) {
          cancel();
        } else if (region === null || drawing === null) {
          amend((now) => shift(now, photo, stage, { x, y }));
        } else {
          const drawn = regionBetween(view, photo, stage, placeOf(initial), placeOf(xy));
          if (drawn !== null) drawing.draw(drawn);
        }
      },
      onPinch: ({ origin, offset: [scale], lastOffset: [before], first, memo }) => {
        const last = first || typeof memo !== 'number' ? before : memo;
        amend((now) => zoomAbout(now, photo, stage, placeOf(origin), scale / last));
        return scale;
      },
      onWheel: ({ event, delta: [, down] }) => {
        // With the control key it is a pinch on a touch pad, and handled as one.
        if (event.ctrlKey) return;
        event.preventDefault();
        amend((now) => zoomAbout(now, photo, stage, placeOf([event.clientX, event.clientY]), Math.exp(-down * WHEEL)));
      },
    },
    { target: surface, eventOptions: { passive: false }, drag: { filterTaps: true, pointer: { keys: false } }, pinch: { preventDefault: true } },
  );

  const onKeyDown = (event: KeyboardEvent<HTMLDivElement>) => {
    if (event.ctrlKey || event.metaKey || event.altKey) return;
    if (region !== null && drawing !== null) {
      const next = regionAfterKey(event.key, event.shiftKey, region, view, photo, stage);
      if (next !== null) drawing.draw(next);
      else if (event.key === 'Enter') drawing.save(region, view);
      else if (event.key === 'Escape') drawing.leave();
      if (next !== null || event.key === 'Enter' || event.key === 'Escape') {
        event.preventDefault();
        return;
      }
    }
    const next = viewAfterKey(event.key, view, photo, stage);
    if (next === null) return;
    event.preventDefault();
    setChanged(next);
  };
  const beginDrawing = (by: Drawing) => {
    by.draw(place.region ?? regionInSight(view, photo, stage));
    surface.current?.focus();
  };
  const zoomBy = (factor: number) => () => amend((now) => zoomAbout(now, photo, stage, { x: stage.width / 2, y: stage.height / 2 }, factor));

  const hasPicture = photo.renditions.thumb !== null || photo.renditions.page !== null || photo.renditions.full !== null;
  const said = sayLook(view, { mirrored: view.mirrored, hasLight: trouble === null });
  const picture = `${label}, ${said.toLowerCase()}`;
  const outlined = region ?? place.region;
  return (
    <div>
      <div className="relative">
        <div
          ref={surface}
          role="group"
          tabIndex={0}
          aria-label="The photo of the mark"
          aria-describedby={keysId}
          onKeyDown={onKeyDown}
          className={`relative aspect-[3/2] overflow-hidden rounded bg-iron-deep select-none roomy:aspect-[2/1] ${region === null ? 'cursor-grab active:cursor-grabbing' : 'cursor-crosshair'} ${view.zoom > 1 || region !== null ? 'touch-none' : 'touch-pan-y'}`}
        >
          {hasPicture && trouble === null && <PictureCanvas key={attempt} photo={photo} view={view} stage={stage} label={picture} onTrouble={setTrouble} />}
          {hasPicture && trouble !== null && <PlainPicture photo={photo} view={view} stage={stage} label={picture} />}
          {outlined !== null && hasPicture && <RegionOutline region={outlined} view={view} picture={photo} stage={stage} drawing={region !== null} />}
          {!hasPicture && <NoPictureYet photo={photo} />}
        </div>
        {hasPicture && (
          <>
            <p className="absolute top-3 left-3 max-w-[calc(100%-116px)] rounded bg-iron-deep px-3 py-1 text-[15px] leading-snug text-relief roomy:max-w-[calc(100%-140px)]">
              {said}
              {isProcessed(view) && (
                <>
                  {' · '}
                  <button type="button" className="no-print -my-2 min-h-11 cursor-pointer underline underline-offset-2" onClick={() => setChanged(toggleAsTaken(view))}>
                    show as taken
                  </button>
                </>
              )}
            </p>
            {isOn(view, 'relief') && trouble === null && <LightDial light={view.light} onChange={(light) => setChanged({ ...view, light })} />}
            <div role="group" aria-label="Zoom" className="no-print absolute right-3 bottom-3 flex gap-1">
              <OnPicture name="Smaller" onClick={zoomBy(1 / ZOOM_STEP)}>
                −
              </OnPicture>
              <OnPicture name="Larger" onClick={zoomBy(ZOOM_STEP)}>
                +
              </OnPicture>
              <OnPicture name="All of the photo" onClick={() => setChanged({ ...view, zoom: WHOLE.zoom, centre: WHOLE.centre })}>
                All
              </OnPicture>
            </div>
          </>
        )}
      </div>
      <p id={keysId} className="sr-only">
        {region === null
          ? 'Arrow keys move the photo, plus and minus enlarge, zero shows all of it. Comma and full stop turn it by 15 degrees, R by 90; M mirrors it; T shows it as taken.'
          : 'Arrow keys move the outline, with shift they move its right or lower edge. Enter keeps it, Escape leaves it.'}
      </p>
      {hasPicture && trouble !== null && (
        <WithoutWebGl
          trouble={trouble}
          onAgain={() => {
            setTrouble(null);
            setAttempt(attempt + 1);
          }}
        />
      )}
      {region !== null && drawing !== null && <DrawingBar drawing={drawing} onSave={() => drawing.save(region, view)} />}
      {hasPicture && <ViewTools view={view} onChange={setChanged} hasLight={trouble === null} onDraw={drawing === null || region !== null ? null : () => beginDrawing(drawing)} />}
    </div>
  );
}

function OnPicture({ name, children, onClick }: { readonly name: string; readonly children: string; readonly onClick: () => void }) {
  return (
    <button
      type="button"
      aria-label={name}
      onClick={onClick}
      className="min-h-11 min-w-11 cursor-pointer rounded border border-scribe bg-iron-deep px-3 text-[19px] leading-none text-relief hover:border-relief-lit"
    >
      {children}
    </button>
  );
}

function NoPictureYet({ photo: { state, failure } }: Pick<MarkPhoto, 'photo'>) {
  if (state === 'failed') {
    return (
      <p className="absolute inset-0 grid place-items-center p-6 text-center text-relief" role="alert">
        No picture could be made of this photo. {failure} What stands on the iron can be typed all the same.
      </p>
    );
  }
  return (
    <div className="absolute inset-0 grid place-items-center p-6 text-center text-relief">
      <div>
        <Skeleton lines={1} label="The picture is being made ready" />
        <p aria-hidden="true">The picture is being made ready. You can type meanwhile.</p>
      </div>
    </div>
  );
}

const TROUBLES: Readonly<Record<CanvasTrouble, string>> = {
  none: 'This browser draws no WebGL. The light can’t be moved here: Relief shows the picture the register made, and the other tools work as far as a style sheet goes.',
  lost: 'The browser took the drawing of the picture away. Until it is drawn again the light can’t be moved; Relief shows the picture the register made.',
  'not-loaded': 'The picture could not be loaded for drawing. It is shown plainly if it comes at all; Relief shows the picture the register made.',
};

function WithoutWebGl({ trouble, onAgain }: { readonly trouble: CanvasTrouble; readonly onAgain: () => void }) {
  return (
    <div role="status" className="mt-3 flex max-w-measure flex-wrap items-center gap-3 border-l-2 border-straw pl-3 text-[15px] leading-snug">
      <p>{TROUBLES[trouble]}</p>
      {trouble !== 'none' && <Button onClick={onAgain}>Draw it again</Button>}
    </div>
  );
}

function DrawingBar({ drawing, onSave }: { readonly drawing: Drawing; readonly onSave: () => void }) {
  return (
    <div className="no-print mt-3 flex flex-wrap items-center gap-3 border-l-2 border-lamp pl-3" role="group" aria-label="Where it stands">
      <p className="max-w-measure text-[15px] leading-snug">
        Draw round the mark. By keyboard: arrows move the outline, shift and arrows its right and lower edge. How the photo is turned and mirrored now is kept with it.
      </p>
      <Button disabled={drawing.saving} onClick={onSave}>
        {drawing.saving ? 'Being kept' : 'Keep it here'}
      </Button>
      <Button onClick={drawing.leave}>Leave it as it was</Button>
    </div>
  );
}
