import exifReader from 'exif-reader';
import { parseDay } from '#domain/dates/day.ts';

/**
 * The day on which the camera says it took the picture (Exif 2.32, DateTimeOriginal: local time without a zone), as ISO 8601; `null`
 * where it says nothing, or nothing that makes sense.
 */
export function captureDay(exif: Buffer): string | null {
  const taken = momentIn(exif);
  if (taken === undefined || Number.isNaN(taken.getTime())) return null;
  // The reader takes the local time for UTC, and so gives back the day as it was noted; a day there is not, it turns into one there is.
  const [day = '', time = ''] = taken.toISOString().split(/[T.]/);
  return exif.includes(`${day.replaceAll('-', ':')} ${time}`) && parseDay(day).ok ? day : null;
}

function momentIn(exif: Buffer): Date | undefined {
  try {
    return exifReader(exif).Photo?.DateTimeOriginal ?? undefined;
  } catch {
    return undefined;
  }
}

/** How a TIFF file begins whose first directory follows at once, in either byte order: what every camera writes. */
const TIFF_HEADS = [Buffer.from('II*\0\u0008\0\0\0', 'latin1'), Buffer.from('MM\0*\0\0\0\u0008', 'latin1')];
/** What stands before it in HEIC (ISO/IEC 23008-12, A.2.1): an offset of none, or the header that JPEG has. */
const BEFORE = [Buffer.from('\0\0\0\0', 'latin1'), Buffer.from('Exif\0\0', 'latin1')];

/** The Exif block of a HEIC file, which keeps it as one item among others, without a place of its own. */
export function exifOfHeic(file: Buffer): Buffer | undefined {
  for (const head of TIFF_HEADS) {
    for (let at = file.indexOf(head); at !== -1; at = file.indexOf(head, at + 1)) {
      if (BEFORE.some((before) => file.subarray(at - before.length, at).equals(before))) return file.subarray(at);
    }
  }
  return undefined;
}
