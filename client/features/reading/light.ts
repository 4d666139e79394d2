import { clamp } from './stage-geometry.ts';
import type { Point } from './stage-geometry.ts';

/** Where a lamp shines from on the stage, in degrees: clockwise from the top, and how high above the surface. */
export type Light = { readonly azimuth: number; readonly elevation: number };

/** A lamp lower than this leaves nearly all in shadow. */
export const LOWEST_LIGHT = 10;
export const HIGHEST_LIGHT = 90;
/** From here up it shines on the face of the iron and from no side. */
const OVERHEAD = 78;

/** Low from the upper left, where a light on a bench most often stands. */
export const FIRST_LIGHT: Light = { azimuth: 315, elevation: 30 };

const SIDES = ['the top', 'upper right', 'the right', 'lower right', 'the bottom', 'lower left', 'the left', 'upper left'] as const;

/** The side the light comes from: `upper left`. */
export function saySide({ azimuth, elevation }: Light): string {
  if (elevation >= OVERHEAD) return 'straight in front';
  return SIDES[Math.round(normalAzimuth(azimuth) / 45) % SIDES.length] ?? SIDES[0];
}

/** How high it stands: `low, 30° above the surface`. */
export function sayHeight({ elevation }: Light): string {
  const word = elevation < 20 ? 'grazing' : elevation < 45 ? 'low' : elevation < OVERHEAD ? 'high' : 'overhead';
  return `${word}, ${Math.round(elevation)}° above the surface`;
}

/** The unit vector towards the lamp: right and down on the stage, and out of it towards the reader. */
export function lightVector({ azimuth, elevation }: Light): readonly [right: number, down: number, out: number] {
  const around = radians(azimuth);
  const up = radians(elevation);
  return [Math.cos(up) * Math.sin(around), -Math.cos(up) * Math.cos(around), Math.sin(up)];
}

/** The lamp on the dial: a dome over the iron seen from the front, its rim the surface; from -1 to 1 right and down from its middle. */
export function onDial(light: Light): Point {
  const [x, y] = lightVector(light);
  return { x, y };
}

/** The light that stands at a place of the dial; off the dial, at its rim. */
export function lightAt({ x, y }: Point): Light {
  const out = Math.min(1, Math.hypot(x, y));
  const elevation = clamp(degrees(Math.acos(out)), LOWEST_LIGHT, HIGHEST_LIGHT);
  return { azimuth: normalAzimuth(degrees(Math.atan2(x, -y))), elevation };
}

/** From 0 up to 360, which is not among them. */
export function normalAzimuth(azimuth: number): number {
  return ((azimuth % 360) + 360) % 360;
}

function radians(angle: number): number {
  return (angle * Math.PI) / 180;
}

function degrees(angle: number): number {
  return (angle * 180) / Math.PI;
}
