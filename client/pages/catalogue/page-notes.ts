import type { FactSource, Provenance } from '#contract/common.ts';

/** A fact on a page and where it comes from. */
export type SourcedFact = { readonly key: string; readonly provenance: Provenance };

/** One numbered note of a page: a source (null where none is on record), who entered the fact, when, in which version. */
export type SourceNote = Pick<Provenance, 'version' | 'enteredBy' | 'enteredAt'> & {
  readonly number: number;
  readonly source: FactSource | null;
};

export type PageNotes<Block extends string> = {
  /** The notes that stand beside a block: those its facts are the first to point to. */
  readonly beside: (block: Block) => readonly SourceNote[];
  /** The numbers a fact points to. */
  readonly numbersOf: (key: string) => readonly number[];
};

/**
 * Numbers the sources behind a whole page, block by block from the top. A source cited at one place, entered by one member on one day,
 * has one number however many facts point to it. A fact without a source gets a note that says so.
 */
export function pageNotes<Block extends string>(
  blocks: readonly { readonly block: Block; readonly facts: readonly SourcedFact[] }[],
): PageNotes<Block> {
  const known = new Map<string, SourceNote>();
  const beside = new Map<Block, SourceNote[]>();
  const numbers = new Map<string, number[]>();
  for (const { block, facts } of blocks) {
    const own: SourceNote[] = [];
    for (const { key, provenance } of facts) {
      const { version, enteredBy, enteredAt, sources } = provenance;
      for (const source of sources.length > 0 ? sources : [null]) {
        const identity = JSON.stringify([
          source?.source.slug,
          source?.locator,
          source?.note,
          enteredBy,
          enteredAt.slice(0, 10),
          version,
        ]);
        const note = known.get(identity) ?? { number: known.size + 1, source, version, enteredBy, enteredAt };
        if (!known.has(identity)) own.push(note);
        known.set(identity, note);
        numbers.set(key, [...new Set([...(numbers.get(key) ?? []), note.number])]);
      }
    }
    beside.set(block, own);
  }
  return { beside: (block) => beside.get(block) ?? [], numbersOf: (key) => numbers.get(key) ?? [] };
}

/**
 * The part of a fact's provenance that stands behind one field of it: the sources that name the field, or, where none does,
 * those that stand behind the whole.
 */
export function provenanceOfField(provenance: Provenance, field: string): Provenance {
  const sources = provenance.sources.filter((source) => isBehind(source, field));
  return { ...provenance, sources: sources.length > 0 ? sources : provenance.sources.filter((source) => source.field === null) };
}

/** A source of `tells` stands behind `tells.2` too. */
function isBehind(source: FactSource, field: string): boolean {
  return source.field === field || (source.field !== null && field.startsWith(`${source.field}.`));
}

/** Notes from one source stand together, in the order the sources are first met. */
export function bySource(notes: readonly SourceNote[]): SourceNote[][] {
  const groups = new Map<string, SourceNote[]>();
  for (const note of notes) {
    const key = note.source?.source.slug ?? '';
    groups.set(key, [...(groups.get(key) ?? []), note]);
  }
  return [...groups.values()];
}
