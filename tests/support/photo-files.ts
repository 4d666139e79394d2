import { readFile } from 'node:fs/promises';
import { crc32, deflateSync } from 'node:zlib';
import sharp from 'sharp';
import type { Sharp } from 'sharp';

/** Files for the photo store's tests: whole ones, each with something that tells it from others, and hostile ones. */

/** Greenwich, as a camera notes it; no place of anybody's. */
const GPS = { GPSLatitudeRef: 'N', GPSLatitude: '51/1 28/1 40/1', GPSLongitudeRef: 'W', GPSLongitude: '0/1 0/1 5/1' };

/** What the camera of a file with metadata says of itself; nothing of it may be found in anything that is served. */
const CAMERA = { make: 'CANARYMAKE', artist: 'CANARYARTIST', xmp: 'CANARYXMP', takenOn: '2024-05-17' } as const;

let drawn = 0;

/** Pixels no other picture has: a ground with a white corner at the upper left, which says which way is up. */
function pixels(width: number, height: number): Sharp {
  drawn += 1;
  const data = Buffer.alloc(width * height * 3);
  for (let at = 0; at < data.length; at += 3) {
    const x = (at / 3) % width;
    const y = Math.floor(at / 3 / width);
    const corner = x < width / 3 && y < height / 3;
    data[at] = corner ? 255 : (drawn * 37) % 90;
    data[at + 1] = corner ? 255 : (drawn >> 4) % 90;
    data[at + 2] = corner ? 255 : (x * 3 + y) % 90;
  }
  return sharp(data, { raw: { width, height, channels: 3 } });
}

type Drawing = { readonly width?: number; readonly height?: number };

export async function jpeg({ width = 48, height = 32 }: Drawing = {}): Promise<Buffer> {
  return pixels(width, height).jpeg({ quality: 92 }).toBuffer();
}

export async function png({ width = 48, height = 32 }: Drawing = {}): Promise<Buffer> {
  return pixels(width, height).png().toBuffer();
}

export async function webp({ width = 48, height = 32 }: Drawing = {}): Promise<Buffer> {
  return pixels(width, height).webp({ quality: 92 }).toBuffer();
}

/** With GPS and a camera's date in its EXIF, and XMP; shown upright only where the orientation is heeded. */
export async function taggedJpeg({ orientation = 1, ...size }: Drawing & { readonly orientation?: number } = {}): Promise<Buffer> {
  return pixels(size.width ?? 48, size.height ?? 32)
    .withExif({
      IFD0: { Make: CAMERA.make, Artist: CAMERA.artist, Orientation: String(orientation) },
      IFD2: { DateTimeOriginal: '2024:05:17 23:30:12' },
      IFD3: GPS,
    })
    .withXmp(`<?xpacket begin=""?><x:xmpmeta xmlns:x="adobe:ns:meta/"><note>${CAMERA.xmp}</note></x:xmpmeta><?xpacket end="w"?>`)
    .withMetadata({ orientation })
    .jpeg({ quality: 92 })
    .toBuffer();
}

/** With GPS in its EXIF, made by Debian's heif-enc 1.15 from a drawn JPEG of 96 × 64 pixels with that EXIF; white at the upper left. */
export async function taggedHeic(): Promise<Buffer> {
  return readFile(new URL('../server/photos/files/gps.heic', import.meta.url));
}

/** A PNG whose header says any size, with some zeros for pixels (RFC 2083). */
export function pngOfHeader(width: number, height: number): Buffer {
  const header = Buffer.alloc(13);
  header.writeUInt32BE(width, 0);
  header.writeUInt32BE(height, 4);
  header.set([8, 2, 0, 0, 0], 8);
  const signature = Buffer.from([0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a]);
  return Buffer.concat([signature, pngChunk('IHDR', header), pngChunk('IDAT', deflateSync(Buffer.alloc(300_000))), pngChunk('IEND', Buffer.alloc(0))]);
}

/** A chunk of text before the pixels of a whole PNG. */
export function pngWithChunk(file: Buffer, type: string, content: Buffer): Buffer {
  const AFTER_HEADER = 33;
  return Buffer.concat([file.subarray(0, AFTER_HEADER), pngChunk(type, content), file.subarray(AFTER_HEADER)]);
}

function pngChunk(type: string, content: Buffer): Buffer {
  const named = Buffer.concat([Buffer.from(type, 'latin1'), content]);
  const chunk = Buffer.alloc(named.length + 8);
  chunk.writeUInt32BE(content.length, 0);
  chunk.set(named, 4);
  chunk.writeUInt32BE(crc32(named), named.length + 4);
  return chunk;
}

/** A JPEG whose frame header (ITU-T T.81, B.2.2) says another size than it has. */
export function jpegOfHeader(file: Buffer, width: number, height: number): Buffer {
  const said = Buffer.from(file);
  const frame = said.indexOf(Buffer.from([0xff, 0xc0]));
  said.writeUInt16BE(height, frame + 5);
  said.writeUInt16BE(width, frame + 7);
  return said;
}

/** A WebP of so many frames of one pixel each (RFC 9649, 2.7): small, and long to decode. */
export async function animatedWebp(frames: number): Promise<Buffer> {
  const still = await sharp({ create: { width: 1, height: 1, channels: 3, background: '#777' } }).webp({ lossless: true }).toBuffer();
  const FIRST_CHUNK = 12;
  const onePixel = Buffer.alloc(16);
  const frame = riffChunk('ANMF', Buffer.concat([onePixel, still.subarray(FIRST_CHUNK)]));
  const animated = Buffer.alloc(10);
  animated[0] = 0b10;
  const chunks = [riffChunk('VP8X', animated), riffChunk('ANIM', Buffer.alloc(6)), ...Array.from({ length: frames }, () => frame)];
  return riffChunk('RIFF', Buffer.concat([Buffer.from('WEBP', 'latin1'), ...chunks]));
}

function riffChunk(type: string, content: Buffer): Buffer {
  const length = Buffer.alloc(4);
  length.writeUInt32LE(content.length);
  return Buffer.concat([Buffer.from(type, 'latin1'), length, content, Buffer.alloc(content.length % 2)]);
}

/** Bits turned over here and there in the latter half of a file, where its pixels are. */
export function bitFlipped(file: Buffer): Buffer {
  const flipped = Buffer.from(file);
  for (let at = file.length >> 1; at < file.length - 40; at += 40) flipped[at] = (flipped[at] ?? 0) ^ 0x55;
  return flipped;
}

/** Whether the upper left of a picture is white and the lower right is not. */
export async function isUpright(file: Buffer): Promise<boolean> {
  const { data, info } = await sharp(file).greyscale().raw().toBuffer({ resolveWithObject: true });
  const at = (x: number, y: number): number => data[(Math.floor(y * info.height) * info.width + Math.floor(x * info.width)) * info.channels] ?? 0;
  return at(0.15, 0.15) > 200 && at(0.85, 0.15) < 150 && at(0.15, 0.85) < 150 && at(0.85, 0.85) < 150;
}

/** What may not be found in anything that is served: each names something that a camera or a hostile sender put in. */
export function tracesIn(file: Buffer): readonly string[] {
  const text = file.toString('latin1');
  const traces = [CAMERA.make, CAMERA.artist, CAMERA.xmp, 'Exif', 'EXIF', 'XMP ', 'ICCP', 'http://ns.adobe.com', 'Photoshop 3.0', '<html', '<?php', 'PK\u0003\u0004', 'ftypisom', '2024:05:17'];
  return traces.filter((trace) => text.includes(trace));
}
