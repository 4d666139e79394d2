import { parseReading } from '#domain/marks/reading.ts';
import { capital } from '../../lib/say-number.ts';

/** What is wrong with a mark as typed, for saying so; nothing is wrong with a bare plate or a bracket being filled. */
export function faultOfMark(mark: string): string | null {
  const parsed = parseReading(mark);
  if (parsed.ok || parsed.fault.code === 'empty' || parsed.fault.code === 'open-bracket' || parsed.fault.code === 'empty-bracket') return null;
  return capital(parsed.fault.message);
}
