import type { CipherFault } from '#domain/ciphers/cipher-fault.ts';
import { compileCipher } from '#domain/ciphers/compile.ts';
import type { CompiledCipher } from '#domain/ciphers/compiled-cipher.ts';
import type { CipherDefinition } from '#domain/ciphers/definition.ts';

/** Versions kept compiled: more than the register has ciphers, so that trying them all evicts none. */
const MOST_KEPT = 4_096;

/** One version of a stored cipher; versions never change, so what was compiled of one holds for ever. */
export type CipherKey = { readonly cipherId: string; readonly version: number };

/** Compiled ciphers, the least lately used given up first. Belongs to one app. */
export type CipherCache = {
  /** `null`: known not to compile. */
  readonly get: (key: CipherKey) => CompiledCipher | null | undefined;
  readonly add: (key: CipherKey, definition: CipherDefinition) => CompiledCipher | null;
};

export type CipherCacheOptions = {
  /**
   * Told once of a stored version that does not compile. It was checked before it was entered, so this is a fault of ours; it must not
   * keep anybody from decoding under the others.
   */
  readonly onUnusable: (key: CipherKey, faults: readonly CipherFault[]) => void;
  readonly mostKept?: number;
};

export function createCipherCache({ onUnusable, mostKept = MOST_KEPT }: CipherCacheOptions): CipherCache {
  const kept = new Map<string, CompiledCipher | null>();
  const keep = (name: string, compiled: CompiledCipher | null): CompiledCipher | null => {
    kept.delete(name);
    kept.set(name, compiled);
    const [oldest] = kept.keys();
    if (kept.size > mostKept && oldest !== undefined) kept.delete(oldest);
    return compiled;
  };
  return {
    get: (key) => {
      const compiled = kept.get(nameOf(key));
      return compiled === undefined ? undefined : keep(nameOf(key), compiled);
    },
    add: (key, definition) => {
      const compiled = compileCipher(definition);
      if (!compiled.ok) onUnusable(key, compiled.fault);
      return keep(nameOf(key), compiled.ok ? compiled.value : null);
    },
  };
}

function nameOf({ cipherId, version }: CipherKey): string {
  return `${cipherId}:${version}`;
}
