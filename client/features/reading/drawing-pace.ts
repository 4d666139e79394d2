/** When the picture was drawn last, in milliseconds, and whether drawing lags behind the hand. */
export type Pace = { readonly at: number; readonly lags: boolean };

export const AT_REST: Pace = { at: Number.NEGATIVE_INFINITY, lags: false };

/** Drawings further apart than this are not one movement. */
const MOVEMENT_MS = 1_000;
/** Two frames and a bit of 60 a second: where one takes longer, a movement is seen to jump. */
const LAGS_MS = 40;

/** The pace with a drawing at `now`: once a movement lags it does so to its end. */
export function paceAtDrawing(before: Pace, now: number): Pace {
  return { at: now, lags: before.lags && now - before.at <= MOVEMENT_MS };
}

/** The pace when a frame after a drawing took so many milliseconds to come: the browser holds frames back while it is busy with those before. */
export function paceAfterFrame(pace: Pace, took: number): Pace {
  return took > LAGS_MS ? { ...pace, lags: true } : pace;
}
