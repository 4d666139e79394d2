import { useEffect, useEffectEvent, useRef, useState } from 'react';
import type { Photo, Rendition } from '#contract/photos.ts';
import { AT_REST, paceAfterFrame, paceAtDrawing } from './drawing-pace.ts';
import { loadPicture, renditionsToShow } from './load-picture.ts';
import { createPainter } from './picture-painter.ts';
import type { Painter } from './picture-painter.ts';
import type { Size } from './stage-geometry.ts';
import type { View } from './view.ts';

/** Beyond it more pixels are drawn than an eye can tell apart. */
const MOST_PIXEL_RATIO = 2;
/** Share of the pixels, across and down, that are drawn while a movement lags behind the hand. */
const COARSE = 0.5;
/** What a drawing costs is seen by the frames after it. */
const FRAMES_WATCHED = 3;
/** After it, what was drawn coarsely is drawn finely. */
const REST_MS = 200;

/** Why the picture is not drawn here: there is no WebGL, it was taken away, or the picture did not come. */
export type CanvasTrouble = 'none' | 'lost' | 'not-loaded';

type Props = {
  readonly photo: Photo;
  readonly view: View;
  readonly stage: Size;
  readonly label: string;
  readonly onTrouble: (trouble: CanvasTrouble) => void;
};

/**
 * The photo drawn through WebGL: taken up once for each rendition, drawn when something about it changed and not otherwise. A slow machine
 * draws it coarsely while it moves, and finely once it rests.
 */
export function PictureCanvas({ photo, view, stage, label, onTrouble }: Props) {
  const canvas = useRef<HTMLCanvasElement>(null);
  const [painter, setPainter] = useState<Painter | null>(null);
  const [shown, setShown] = useState<string | null>(null);
  const pace = useRef(AT_REST);
  const tell = useEffectEvent(onTrouble);

  useEffect(() => {
    const element = canvas.current;
    if (element === null) return;
    const made = createPainter(element);
    setPainter(made);
    if (made === null) {
      tell('none');
      return;
    }
    const lose = () => tell('lost');
    element.addEventListener('webglcontextlost', lose);
    return () => {
      element.removeEventListener('webglcontextlost', lose);
      made.letGo();
    };
  }, []);

  useEffect(() => {
    if (painter === null) return;
    const stopping = new AbortController();
    const { signal } = stopping;
    showInTurn(painter, renditionsToShow(photo), signal, setShown).catch(() => {
      if (!signal.aborted) tell('not-loaded');
    });
    return () => stopping.abort();
  }, [painter, photo]);

  useEffect(() => {
    if (painter === null || shown === null) return;
    const draw = (share: number) => painter.draw(view, photo, stage, share * Math.min(window.devicePixelRatio, MOST_PIXEL_RATIO));
    let finish: number | undefined;
    const watch = (frames: number, since: number) =>
      requestAnimationFrame(() => {
        const now = performance.now();
        pace.current = paceAfterFrame(pace.current, now - since);
        if (frames > 1) watch(frames - 1, now);
      });
    const frame = requestAnimationFrame(() => {
      const now = performance.now();
      pace.current = paceAtDrawing(pace.current, now);
      const isCoarse = pace.current.lags;
      draw(isCoarse ? COARSE : 1);
      if (isCoarse) finish = window.setTimeout(() => draw(1), REST_MS);
      watch(FRAMES_WATCHED, now);
    });
    return () => {
      cancelAnimationFrame(frame);
      window.clearTimeout(finish);
    };
  }, [painter, shown, view, photo, stage]);

  return <canvas ref={canvas} role="img" aria-label={label} aria-busy={shown === null} className="absolute inset-0 size-full" />;
}

/** Hands the renditions to the painter one after the other. Throws when none of them can be had; a smaller one does where a larger can't. */
async function showInTurn(painter: Painter, renditions: readonly Rendition[], signal: AbortSignal, onShown: (url: string) => void): Promise<void> {
  let failure: Error | null = null;
  let isShown = false;
  for (const rendition of renditions) {
    try {
      const picture = await loadPicture(rendition, painter.longestSide, signal);
      if (signal.aborted) return;
      painter.takePicture(picture);
      picture.close();
      isShown = true;
      onShown(rendition.url);
    } catch (error) {
      failure = error instanceof Error ? error : new Error('The picture could not be drawn', { cause: error });
    }
  }
  if (!isShown && failure !== null) throw failure;
}
