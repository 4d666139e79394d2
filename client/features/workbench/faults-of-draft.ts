import { CipherDefinitionSchema } from '#contract/cipher.ts';
import { faultsOf } from '#contract/faults.ts';
import type { FieldFault } from '#contract/problem.ts';
import type { CipherFault } from '#domain/ciphers/cipher-fault.ts';
import { compileCipher } from '#domain/ciphers/compile.ts';
import type { CompiledCipher } from '#domain/ciphers/compiled-cipher.ts';
import type { CipherDefinition } from '#domain/ciphers/definition.ts';
import { foldCase } from '#domain/marks/glyphs.ts';
import { capital } from '../../lib/say-number.ts';

export type Checked = {
  /** Null while it makes no sense. */
  readonly compiled: CompiledCipher | null;
  readonly faults: readonly FieldFault[];
};

/** Checks a draft as the register would: first what it means, then, where that makes sense, the limits of the form it is kept in. */
export function checkDraft(definition: CipherDefinition): Checked {
  const compiled = compileCipher(definition);
  if (!compiled.ok) {
    return {
      compiled: null,
      faults: compiled.fault.map((fault) => ({ path: [...fault.path], message: sayFault(fault, definition) })),
    };
  }
  const parsed = CipherDefinitionSchema.safeParse(definition);
  return parsed.success ? { compiled: compiled.value, faults: [] } : { compiled: null, faults: faultsOf(parsed.error) };
}

/**
 * Both lists as one, what is said twice once: what the bench finds by itself, then what only the register found. The register checks as
 * the bench does: where nothing is found any more, what it said is mended.
 */
export function mergedFaults(own: readonly FieldFault[], told: readonly FieldFault[]): readonly FieldFault[] {
  if (own.length === 0) return [];
  const at = new Set(own.map(({ path }) => path.join('.')));
  return [...own, ...told.filter(({ path }) => !at.has(path.join('.')))];
}

/** A fault in the bench's words where its own rows say it better: they show each symbol in its plain spelling, and a day not said yet as blank. */
function sayFault({ path, code, message }: CipherFault, definition: CipherDefinition): string {
  if (code === 'same-symbol-twice' && path[2] === 'symbols') return `“${foldCase(String(path[3]))}” is there twice`;
  if (code === 'not-a-day' && blankDays(definition).has(path.join('.'))) return DAYS_TO_SAY[path.at(-1) ?? ''] ?? 'Say the day';
  return capital(message);
}

const DAYS_TO_SAY: Readonly<Partial<Record<string | number, string>>> = {
  usedFrom: 'Say the first day',
  usedTo: 'Say the last day',
  from: 'Say the first day',
  to: 'Say the last day',
};

/** Paths of the days not said yet. */
function blankDays({ usedFrom, usedTo, exceptions = [] }: CipherDefinition): ReadonlySet<string> {
  const days = [
    ['usedFrom', usedFrom],
    ['usedTo', usedTo],
    ...exceptions.flatMap(({ from, to }, place) => [[`exceptions.${place}.from`, from], [`exceptions.${place}.to`, to]]),
  ];
  return new Set(days.flatMap(([path, day]) => (day === '' && typeof path === 'string' ? [path] : [])));
}
