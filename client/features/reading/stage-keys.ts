import type { Region } from '#contract/parts.ts';
import { toggleAsTaken } from './look.ts';
import { mirror, moveRegion, shift, stretchRegion, turnBy, wayOnPicture, WHOLE, zoomAbout } from './stage-geometry.ts';
import type { Point, Size } from './stage-geometry.ts';
import type { View } from './view.ts';

/** A step of the zoom, and of a key that moves: CSS pixels. */
export const ZOOM_STEP = 1.35;
const PAN_STEP = 48;
const REGION_STEP = 8;

const WAYS: Readonly<Record<string, Point>> = {
  ArrowLeft: { x: -1, y: 0 },
  ArrowRight: { x: 1, y: 0 },
  ArrowUp: { x: 0, y: -1 },
  ArrowDown: { x: 0, y: 1 },
};

/** The view after a key on the picture; null for a key that means nothing there. */
export function viewAfterKey(key: string, view: View, picture: Size, stage: Size): View | null {
  const way = WAYS[key];
  if (way !== undefined) return shift(view, picture, stage, { x: -way.x * PAN_STEP, y: -way.y * PAN_STEP });
  const middle = { x: stage.width / 2, y: stage.height / 2 };
  switch (key) {
    case '+':
    case '=':
      return zoomAbout(view, picture, stage, middle, ZOOM_STEP);
    case '-':
      return zoomAbout(view, picture, stage, middle, 1 / ZOOM_STEP);
    case '0':
      return { ...view, zoom: WHOLE.zoom, centre: WHOLE.centre };
    case ',':
      return turnBy(view, -15);
    case '.':
      return turnBy(view, 15);
    case 'r':
      return turnBy(view, 90);
    case 'm':
      return mirror(view);
    case 't':
      return toggleAsTaken(view);
    default:
      return null;
  }
}

/** The region after an arrow key: moved as seen on the stage, or with shift its right or lower edge moved; null for another key. */
export function regionAfterKey(key: string, isShifted: boolean, region: Region, view: View, picture: Size, stage: Size): Region | null {
  const way = WAYS[key];
  if (way === undefined) return null;
  if (!isShifted) return moveRegion(region, wayOnPicture(view, picture, stage, { x: way.x * REGION_STEP, y: way.y * REGION_STEP }));
  const outwards = { x: Math.abs(way.x) * REGION_STEP, y: Math.abs(way.y) * REGION_STEP };
  return stretchRegion(region, wayOnPicture(view, picture, stage, outwards), way.x + way.y > 0 ? 'out' : 'in');
}
