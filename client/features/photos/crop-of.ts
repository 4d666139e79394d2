import type { CSSProperties } from 'react';
import type { MarkPhoto } from '#contract/parts.ts';

export type Crop = {
  /** Where the mark's place lies in its room, turned; the picture is positioned in it. */
  readonly frame: CSSProperties;
  readonly picture: CSSProperties;
  /** How many times wider than the room the whole picture is drawn. */
  readonly enlarged: number;
};

/** Air around the mark, as a share of its own size. */
const AIR = 1.16;

/**
 * Lays out the part of a photo where a mark stands so that it fits a room `aspect` times as wide as high, turned by the photo's own turn.
 * What lies around the mark fills the rest of the room.
 */
export function cropOf({ photo, region, turn, mirrored }: MarkPhoto, aspect: number): Crop {
  const { left, top, width, height } = region ?? { left: 0, top: 0, width: 1, height: 1 };
  const wide = width * photo.width;
  const high = height * photo.height;
  const angle = (turn * Math.PI) / 180;
  const [along, across] = [Math.abs(Math.cos(angle)), Math.abs(Math.sin(angle))];
  const turnedWide = wide * along + high * across;
  const turnedHigh = wide * across + high * along;
  const air = region === null ? 1 : AIR;
  /** The room's width, in pixels of the photo. */
  const room = Math.max(turnedWide, turnedHigh * aspect) * air;
  return {
    frame: {
      left: '50%',
      top: '50%',
      width: percent(wide / room),
      aspectRatio: wide / high,
      transform: `translate(-50%, -50%) rotate(${turn}deg)${mirrored ? ' scaleX(-1)' : ''}`,
    },
    picture: { left: percent(-left / width), top: percent(-top / height), width: percent(1 / width), height: percent(1 / height) },
    enlarged: photo.width / room,
  };
}

function percent(share: number): string {
  return `${Number((share * 100).toFixed(3))}%`;
}
