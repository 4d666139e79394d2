import { z } from 'zod';
import type { MarkPhoto } from '#contract/parts.ts';
import { HIGHEST_LIGHT, LOWEST_LIGHT } from './light.ts';
import { BRIGHTNESS_RANGE, CONTRAST_RANGE, MOST_SMOOTHING, UNTOUCHED } from './look.ts';
import { frameOf, WHOLE } from './stage-geometry.ts';
import type { Size } from './stage-geometry.ts';

/** How a photo is looked at: how it lies on the stage, and what is done to it. */
export const View = z.object({
  zoom: z.number().min(1),
  centre: z.object({ x: z.number().min(0).max(1), y: z.number().min(0).max(1) }),
  turn: z.number().min(-180).max(180),
  mirrored: z.boolean(),
  asTaken: z.boolean(),
  relief: z.boolean(),
  light: z.object({ azimuth: z.number().min(0).max(360), elevation: z.number().min(LOWEST_LIGHT).max(HIGHEST_LIGHT) }),
  smoothing: z.number().min(0).max(MOST_SMOOTHING),
  contrast: z.number().min(CONTRAST_RANGE.least).max(CONTRAST_RANGE.most),
  brightness: z.number().min(BRIGHTNESS_RANGE.least).max(BRIGHTNESS_RANGE.most),
  inverted: z.boolean(),
});
export type View = z.infer<typeof View>;

/** The view a photo opens with: as taken, turned and mirrored as the mark was placed on it, and framed on where it stands. */
export function firstView({ photo, region, turn, mirrored }: MarkPhoto, stage: Size): View {
  return { ...UNTOUCHED, ...(region === null ? { ...WHOLE, turn, mirrored } : frameOf(region, { turn, mirrored }, photo, stage)) };
}
