import { writeSerial } from '#domain/serials/serial.ts';
import type { Machine } from '#db/models/machine.ts';

/** Last digits that are not shown. */
const MASKED = 2;
const MASK = '•';

/** A machine’s serial as others may see it: without its last digits unless its owner shows them. */
export function shownSerial({ prefix, number, suffix, serialShown }: Pick<Machine, 'prefix' | 'number' | 'suffix' | 'serialShown'>): string {
  if (serialShown) return writeSerial({ prefix, digits: number, suffix });
  const shown = number.slice(0, Math.max(0, number.length - MASKED));
  return writeSerial({ prefix, digits: shown.padEnd(number.length, MASK), suffix });
}
