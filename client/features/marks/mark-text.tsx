import { parseReading } from '#domain/marks/reading.ts';
import { MarkPlate } from '../../ui/mark-plate.tsx';

type Props = { readonly text: string; readonly size?: 'line' | 'plate' };

/** A reading on its plate; text that is no reading as it stands. */
export function MarkText({ text, size = 'line' }: Props) {
  const parsed = parseReading(text);
  return parsed.ok ? <MarkPlate reading={parsed.value} size={size} /> : <span className="font-mono">{text}</span>;
}
