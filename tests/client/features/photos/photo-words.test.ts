// @vitest-environment node
import { describe, expect, it } from 'vitest';
import { cropOf } from '#client/features/photos/crop-of.ts';
import { faultOfFile } from '#client/features/photos/photo-files.ts';
import { sayBytes, sayBytesOf } from '#client/lib/say-bytes.ts';
import { PHOTO_LIMITS } from '#contract/photos.ts';
import { markPhoto } from '../marks/samples.ts';

describe('faultOfFile', () => {
  it.each([
    ['a.jpg', 'image/jpeg'],
    ['a.png', 'image/png'],
    ['a.webp', 'image/webp'],
    ['a.heic', 'image/heic'],
    // A device that knows no HEIC gives no type.
    ['a.HEIC', ''],
    // Pasted, or shared from another program.
    ['image', 'image/png'],
  ])('sends %s declared as "%s"', (name, type) => expect(faultOfFile({ name, type, size: 10 })).toBeNull());
  it.each([
    ['a.svg', 'image/svg+xml'],
    ['a.gif', 'image/gif'],
    ['a.zip', ''],
    ['a', ''],
    ['toString', ''],
    ['a.jpg', 'toString'],
  ])('does not send %s declared as "%s"', (name, type) => expect(faultOfFile({ name, type, size: 10 })).toMatch(/^Only JPEG/));
  it('sends what is just as large as a photo may be', () => {
    expect(faultOfFile({ name: 'a.jpg', type: 'image/jpeg', size: PHOTO_LIMITS.file })).toBeNull();
  });
});

describe('sayBytes', () => {
  it.each([
    [12, '12 bytes'],
    [640 * 1024, '640 KB'],
    [3.4 * 1024 * 1024, '3.4 MB'],
    [25 * 1024 * 1024, '25 MB'],
  ])('says %d', (bytes, said) => expect(sayBytes(bytes)).toBe(said));
  it('says how far, in the unit of the whole', () => {
    expect(sayBytesOf(1.2 * 1024 * 1024, 3.4 * 1024 * 1024)).toBe('1.2 of 3.4 MB');
    expect(sayBytesOf(0, 500 * 1024)).toBe('0 of 500 KB');
  });
});

describe('cropOf', () => {
  // The mark takes 800 by 300 pixels of 1,600 by 1,200; with its air it is 928 wide, 348 high.
  it('fits the mark with some air into its room, and shows what is around it', () => {
    const { frame, picture, enlarged } = cropOf(markPhoto(1), 2);
    expect(frame).toMatchObject({ width: '86.207%', aspectRatio: 800 / 300 });
    expect(picture).toEqual({ left: '-50%', top: '-200%', width: '200%', height: '400%' });
    expect(enlarged).toBeCloseTo(1600 / 928, 6);
  });
  it('makes room for a mark turned on its side', () => {
    // Turned by a right angle it is 300 wide and 800 high: a room twice as wide as high is 1,600 of its pixels, and the air.
    expect(cropOf(markPhoto(1, { turn: 90 }), 2).enlarged).toBeCloseTo(1600 / (1600 * 1.16), 6);
  });
  it('mirrors the picture before it turns it', () => {
    expect(cropOf(markPhoto(1, { turn: 12, mirrored: true }), 2).frame.transform).toBe('translate(-50%, -50%) rotate(12deg) scaleX(-1)');
  });
  it('shows the whole photo where nobody has drawn the place', () => {
    const { enlarged, picture } = cropOf(markPhoto(1, { region: null, turn: 180 }), 4 / 3);
    expect(enlarged).toBeCloseTo(1, 9);
    expect(picture).toEqual({ left: '0%', top: '0%', width: '100%', height: '100%' });
  });
});
