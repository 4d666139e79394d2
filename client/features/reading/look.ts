import { FIRST_LIGHT, saySide } from './light.ts';
import type { Light } from './light.ts';
import { clamp } from './stage-geometry.ts';

/** What is done to the picture before it is shown. The settings stay while it is shown as taken, so that both can be compared. */
export type Look = {
  readonly asTaken: boolean;
  readonly relief: boolean;
  readonly light: Light;
  /** How coarse a relief is looked for: 0 every grain of the iron, `MOST_SMOOTHING` only broad strokes. */
  readonly smoothing: number;
  /** Factors as in CSS: brightness multiplies, contrast stretches about the middle grey; 1 leaves both as they are. */
  readonly contrast: number;
  readonly brightness: number;
  readonly inverted: boolean;
};

export const MOST_SMOOTHING = 4;
export const CONTRAST_RANGE = { least: 0.5, most: 4 } as const;
export const BRIGHTNESS_RANGE = { least: 0.3, most: 2.5 } as const;
const FIRST_CONTRAST = 1.8;

export const UNTOUCHED: Look = { asTaken: true, relief: false, light: FIRST_LIGHT, smoothing: 1.5, contrast: 1, brightness: 1, inverted: false };

/** What a press on a tool switches. */
const TOOLS = ['relief', 'contrast', 'invert'] as const;
export type Tool = (typeof TOOLS)[number];

const NOT_SET = { relief: { relief: false }, contrast: { contrast: 1, brightness: 1 }, invert: { inverted: false } } as const satisfies Record<Tool, Partial<Look>>;

/** Whether a tool changes what is seen now. */
export function isOn(look: Look, tool: Tool): boolean {
  return !look.asTaken && isSet(look, tool);
}

/** A press on a tool: off where it is on; else on, by itself where the picture was shown as taken. */
export function press<L extends Look>(look: L, tool: Tool): L {
  if (isOn(look, tool)) return settled({ ...look, ...NOT_SET[tool] });
  const begun = look.asTaken && !isSet(look, tool) ? { ...look, ...NOT_SET.relief, ...NOT_SET.contrast, ...NOT_SET.invert } : look;
  const next = { ...begun, asTaken: false };
  switch (tool) {
    case 'relief':
      return { ...next, relief: true };
    case 'invert':
      return { ...next, inverted: true };
    case 'contrast':
      return isSet(next, 'contrast') ? next : { ...next, contrast: FIRST_CONTRAST };
  }
}

/** Shows the picture as taken, or what was made of it before. */
export function toggleAsTaken<L extends Look>(look: L): L {
  return settled({ ...look, asTaken: !look.asTaken });
}

/** Whether the picture is shown otherwise than the camera saw it. */
export function isProcessed(look: Look): boolean {
  return !look.asTaken && TOOLS.some((tool) => isSet(look, tool));
}

/**
 * Says what was done to the picture, for a line that stands on it: `Relief, light from upper left, inverted`. Without a light of one's own
 * the relief is the one the register made.
 */
export function sayLook(look: Look, { mirrored, hasLight }: { readonly mirrored: boolean; readonly hasLight: boolean }): string {
  const deeds = isProcessed(look) ? deedsOf(look, hasLight) : ['as taken'];
  const said = [...deeds, ...(mirrored ? [isProcessed(look) ? 'mirrored' : 'but mirrored'] : [])].join(', ');
  return said.charAt(0).toUpperCase() + said.slice(1);
}

function deedsOf(look: Look, hasLight: boolean): string[] {
  return [
    ...(look.relief ? ['relief', hasLight ? `light from ${saySide(look.light)}` : 'as the register made it'] : []),
    ...(look.contrast > 1 ? ['more contrast'] : look.contrast < 1 ? ['less contrast'] : []),
    ...(look.brightness > 1 ? ['brighter'] : look.brightness < 1 ? ['darker'] : []),
    ...(look.inverted ? ['inverted'] : []),
  ];
}


function isSet(look: Look, tool: Tool): boolean {
  switch (tool) {
    case 'relief':
      return look.relief;
    case 'contrast':
      return look.contrast !== 1 || look.brightness !== 1;
    case 'invert':
      return look.inverted;
  }
}

/** With nothing set the picture is as taken. */
function settled<L extends Look>(look: L): L {
  return TOOLS.some((tool) => isSet(look, tool)) ? look : { ...look, asTaken: true };
}

export function withContrast<L extends Look>(look: L, contrast: number): L {
  return { ...look, contrast: clamp(contrast, CONTRAST_RANGE.least, CONTRAST_RANGE.most), asTaken: false };
}

export function withBrightness<L extends Look>(look: L, brightness: number): L {
  return { ...look, brightness: clamp(brightness, BRIGHTNESS_RANGE.least, BRIGHTNESS_RANGE.most), asTaken: false };
}
