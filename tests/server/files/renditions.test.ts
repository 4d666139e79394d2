import { mkdtemp, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import sharp from 'sharp';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { captureDay, exifOfHeic } from '#server/files/capture-day.ts';
import { decodeHeic } from '#server/files/heic.ts';
import { endingOf, nameAsText } from '#server/files/photo-name.ts';
import { fileNameOf, parseFileName } from '#server/files/rendition-names.ts';
import { makeRendition, planRenditions, weightOf } from '#server/files/renditions.ts';
import { bitFlipped, isUpright, jpeg, taggedHeic, taggedJpeg, tracesIn } from '#tests/support/photo-files.ts';

let directory: string;
beforeAll(async () => {
  directory = await mkdtemp(join(tmpdir(), 'pourbook-renditions-'));
});
afterAll(() => rm(directory, { recursive: true, force: true }));

async function written(file: Buffer): Promise<{ readonly path: string }> {
  const path = join(directory, 'file');
  await writeFile(path, file);
  return { path };
}

describe('what is made of a picture', () => {
  test('of 12 megapixels: the sizes that pages ask for, in the order in which they are wanted', () => {
    expect(planRenditions({ width: 4_000, height: 3_000 }).map((one) => `${fileNameOf(one)} ${one.height}`)).toEqual([
      'thumb-320.webp 240', 'thumb-640.webp 480', 'page-960.webp 720', 'page-960.avif 720', 'page-1600.webp 1200', 'page-1600.avif 1200', 'full-4000.webp 3000',
      'relief-2400.webp 1800',
    ]);
  });

  test('by its longer side, so that one that stands is no larger than one that lies', () => {
    expect(planRenditions({ width: 3_000, height: 4_000 }).map(fileNameOf)).toContain('page-720.webp');
    expect(planRenditions({ width: 9_000, height: 7_000 }).find(({ rendition }) => rendition === 'full')).toMatchObject({ width: 8_192, height: 6_372 });
  });

  test('that is small is never larger than it is, and nothing is made twice', () => {
    expect(planRenditions({ width: 500, height: 400 }).map(fileNameOf)).toEqual(['thumb-320.webp', 'thumb-500.webp', 'page-500.webp', 'page-500.avif', 'full-500.webp', 'relief-500.webp']);
    expect(planRenditions({ width: 1, height: 60_000 }).every(({ width, height }) => width === 1 && height >= 320)).toBe(true);
  });

  test('alone where it is large', () => {
    expect([weightOf({ width: 6_000, height: 4_000 }), weightOf({ width: 6_000, height: 4_001 })]).toEqual([1, 2]);
  });
});

describe('a rendition', () => {
  const PLANNED = { rendition: 'page', width: 48, height: 32, type: 'image/webp' } as const;

  test.each([1, 2, 3, 4, 5, 6, 7, 8])('of a picture of orientation %i is upright', async (orientation) => {
    // Drawn so that it is upright once its orientation is heeded: sharp turns it back.
    const turned = await sharp(await jpeg({ width: 48, height: 32 })).autoOrient().toBuffer();
    const source = await written(await asStored(turned, orientation));
    expect(await isUpright(await makeRendition(source, PLANNED))).toBe(true);
  });

  test.each(['thumb', 'page', 'full', 'relief'] as const)('%s holds nothing of what the camera wrote', async (rendition) => {
    const file = await taggedJpeg();
    expect(tracesIn(file)).toEqual(expect.arrayContaining(['CANARYMAKE', 'CANARYARTIST', 'CANARYXMP', 'Exif', '2024:05:17']));
    expect((await sharp(file).metadata()).exif).toBeDefined();
    for (const type of ['image/webp', 'image/avif'] as const) {
      const made = await makeRendition(await written(file), { ...PLANNED, rendition, type });
      expect(tracesIn(made)).toEqual([]);
      // The library opens no AVIF here.
      if (type === 'image/avif') continue;
      const { exif, xmp, iptc, icc, orientation } = await sharp(made).metadata();
      expect({ exif, xmp, iptc, icc, orientation }).toEqual({ exif: undefined, xmp: undefined, iptc: undefined, icc: undefined, orientation: undefined });
    }
  });

  test('of HEIC is upright and holds nothing of what the camera wrote', async () => {
    const source = await decodeHeic((await written(await taggedHeic())).path);
    const made = await makeRendition(source, { ...PLANNED, width: 96, height: 64 });
    expect(await isUpright(made)).toBe(true);
    expect(tracesIn(made)).toEqual([]);
  });

  test('in relief is grey and reaches from black to white', async () => {
    const made = await makeRendition(await written(await jpeg({ width: 200, height: 150 })), { rendition: 'relief', width: 200, height: 150, type: 'image/webp' });
    const { channels, isOpaque } = await sharp(made).stats();
    expect(isOpaque).toBe(true);
    expect(Math.max(...channels.map(({ max }) => max)) - Math.min(...channels.map(({ min }) => min))).toBeGreaterThan(200);
    const { data } = await sharp(made).raw().toBuffer({ resolveWithObject: true });
    for (let at = 0; at < 3_000; at += 3) expect(Math.abs((data[at] ?? 0) - (data[at + 1] ?? 0))).toBeLessThan(4);
  });

  test('of a damaged file, or of one that is no photo, is not made', async () => {
    const damaged = await written(bitFlipped(await jpeg({ width: 400, height: 300 })));
    await expect(makeRendition(damaged, PLANNED)).rejects.toMatchObject({ name: 'UnusablePictureError', unusable: 'content' });
    const svg = await written(Buffer.from('<svg xmlns="http://www.w3.org/2000/svg" width="48" height="32"/>'));
    await expect(makeRendition(svg, PLANNED)).rejects.toMatchObject({ name: 'UnusablePictureError' });
  });
});

/** The picture as a camera held that way would have stored it. EXIF 2.32 says of each number how the stored picture is to be turned or mirrored. */
async function asStored(upright: Buffer, orientation: number): Promise<Buffer> {
  const picture = sharp(upright);
  const stored = [
    () => picture,
    () => picture.flop(),
    () => picture.rotate(180),
    () => picture.flip(),
    () => picture.rotate(90),
    () => picture.rotate(270),
    () => picture.rotate(270),
    () => picture.rotate(90),
  ][orientation - 1]!();
  const turned = await stored.png().toBuffer();
  const pixels = orientation === 5 || orientation === 7 ? await sharp(turned).flop().toBuffer() : turned;
  return sharp(pixels).withMetadata({ orientation }).jpeg({ quality: 95 }).toBuffer();
}

describe('the name of a file', () => {
  test.each(['thumb-320.webp', 'page-1600.avif', 'full-8192.webp', 'relief-1.webp'])('%s is read as it is written', (name) => {
    expect(fileNameOf(parseFileName(name)!)).toBe(name);
  });

  test.each(['original', 'thumb-0.webp', 'thumb-0320.webp', 'thumb-320.png', 'other-320.webp', 'thumb-320.webp/', '../thumb-320.webp', 'THUMB-320.webp', 'thumb--1.webp', ''])('%j is none', (name) => {
    expect(parseFileName(name)).toBeNull();
  });

  test.each([
    ['', null],
    ['   ', null],
    ['\u0000\u0007', null],
    ['photos/', null],
    ['e\u0301.jpg', 'é.jpg'],
    ['👷'.repeat(130), '👷'.repeat(120)],
  ])('that was sent, %j, is kept as %j', (given, kept) => {
    expect(nameAsText(given)).toBe(kept);
  });

  test.each([
    ['a.JPG', 'jpg'],
    ['a.jpg.html', 'html'],
    ['.htaccess', null],
    ['12.5', null],
    ['a.', null],
    ['photo', null],
    [null, null],
  ])('that was sent, %j, says %j of its kind', (name, ending) => {
    expect(endingOf(name)).toBe(ending);
  });
});

describe('the day the camera noted', () => {
  test('is the day where it was, whatever the hour', async () => {
    const { exif } = await sharp(await taggedJpeg()).metadata();
    expect(captureDay(exif!)).toBe('2024-05-17');
  });

  test('is found in HEIC', async () => {
    expect(captureDay(exifOfHeic(await taggedHeic())!)).toBe('2024-05-17');
    expect(exifOfHeic(await jpeg())).toBeUndefined();
  });

  test.each(['0000:00:00 00:00:00', '2024:13:45 10:00:00', 'yesterday'])('is none where it says %s', async (text) => {
    const file = await sharp(await jpeg()).withExif({ IFD2: { DateTimeOriginal: text } }).jpeg().toBuffer();
    const { exif } = await sharp(file).metadata();
    expect(captureDay(exif!)).toBeNull();
  });

  test('is none where there is no EXIF that can be read', () => {
    expect(captureDay(Buffer.from('Exif\0\0nonsense'))).toBeNull();
    expect(captureDay(Buffer.alloc(0))).toBeNull();
  });
});
