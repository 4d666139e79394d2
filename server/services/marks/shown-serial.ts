import { parseSerial, writeSerial } from '#domain/serials/serial.ts';
import type { Machine } from '#db/models/machine.ts';

/** Last digits that are not shown. */
const MASKED = 2;
/** Glyphs shown of what can’t be read as a serial. */
const SHOWN = 2;
const MASK = '•';

/** A machine’s serial as others may see it: without its last digits unless its owner shows them. */
export function shownSerial({ prefix, number, suffix, serialShown }: Pick<Machine, 'prefix' | 'number' | 'suffix' | 'serialShown'>): string {
  return serialShown ? writeSerial({ prefix, digits: number, suffix }) : masked({ prefix, digits: number, suffix });
}

/** A serial that somebody typed, of a machine that need not be on record, as others may see it. */
export function maskedSerial(asStamped: string): string {
  const serial = parseSerial(asStamped, []);
  if (serial.ok) return masked(serial.value);
  const glyphs = Array.from(asStamped);
  return glyphs.map((glyph, place) => (place < SHOWN ? glyph : MASK)).join('');
}

function masked({ prefix, digits, suffix }: Parameters<typeof writeSerial>[0]): string {
  const shown = digits.slice(0, Math.max(0, digits.length - MASKED));
  return writeSerial({ prefix, digits: shown.padEnd(digits.length, MASK), suffix });
}
