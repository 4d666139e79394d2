import { parseReading, writeReading } from '#domain/marks/reading.ts';
import { wrongValue } from '#server/services/wrong-value.ts';

/**
 * What somebody typed in the mark notation, written the one way the record keeps it.
 *
 * @throws ProblemError `invalid` at the field.
 */
export function typedReading(text: string, field: string): string {
  const reading = parseReading(text);
  if (!reading.ok) throw wrongValue([field], reading.fault.message);
  return writeReading(reading.value);
}
