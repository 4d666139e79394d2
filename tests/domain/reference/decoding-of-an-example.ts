import { compileCipher } from '#domain/ciphers/compile.ts';
import { decode } from '#domain/ciphers/decode.ts';
import type { Decoding } from '#domain/ciphers/decoding.ts';
import type { CipherDefinition } from '#domain/ciphers/definition.ts';
import { parseDay, type Day } from '#domain/dates/day.ts';
import { parseReading } from '#domain/marks/reading.ts';
import { AS_OF } from '#fixtures/reference/reference-table.ts';

export type Asked = {
  readonly asOf?: string | undefined;
  readonly limits?: { readonly from: string; readonly to: string } | undefined;
};

/** Decodes a mark of the reference; a fixture that does not parse or compile throws. */
export function decodeText(text: string, definition: CipherDefinition, asked: Asked = {}): Decoding {
  const reading = parseReading(text);
  if (!reading.ok) throw new Error(`${text}: ${reading.fault.code}`);
  const cipher = compileCipher(definition);
  if (!cipher.ok) throw new Error(`${text}: ${cipher.fault.map((fault) => fault.message).join(', ')}`);
  const { limits } = asked;
  return decode(reading.value, cipher.value, {
    asOf: dayFrom(asked.asOf ?? AS_OF),
    ...(limits === undefined ? {} : { limits: { from: dayFrom(limits.from), to: dayFrom(limits.to) } }),
  });
}

function dayFrom(iso: string): Day {
  const day = parseDay(iso);
  if (!day.ok) throw new Error(day.fault.message);
  return day.value;
}
