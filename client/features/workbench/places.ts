import type { FieldFault } from '#contract/problem.ts';
import type { CipherDefinition } from '#domain/ciphers/definition.ts';

type Path = readonly (string | number)[];

/** Where on the bench a path stands: the id of its control, and what is wrong there. */
export type Places = {
  readonly id: (...path: Path) => string;
  readonly fault: (...path: Path) => string | null;
};

/** A fault with the control it is shown beside. */
export type PlacedFault = FieldFault & { readonly controlId: string };

/**
 * Finds each fault the control that can mend it: the figure's box for a symbol of a key, the field or set as a whole where there is no
 * nearer one. `id` stands before every id.
 */
export function placesOf(id: string, definition: CipherDefinition, faults: readonly FieldFault[]): { readonly places: Places; readonly placed: readonly PlacedFault[] } {
  const idOf = (path: Path) => [id, ...path.map(plain)].join('-');
  const placed = faults.map((fault) => ({ ...fault, controlId: idOf(controlPath(definition, fault.path)) }));
  return {
    placed,
    places: {
      id: (...path) => idOf(path),
      fault: (...path) => placed.find(({ controlId }) => controlId === idOf(path))?.message ?? null,
    },
  };
}

const FIELD_PARTS = ['symbols', 'width', 'week', 'name', 'text'];
const EXCEPTION_PARTS = ['from', 'to'];

/** The path of the control for a path of the definition. */
function controlPath(definition: CipherDefinition, [part, key, inner, deeper]: Path): Path {
  switch (part) {
    case 'fields':
      if (key === undefined) return ['fields'];
      return inner !== undefined && FIELD_PARTS.includes(String(inner)) ? ['fields', key, inner] : ['fields', key];
    case 'symbolSets': {
      const set = key === undefined ? undefined : definition.symbolSets[key];
      if (key === undefined || set === undefined) return ['fields'];
      if (inner === 'repeater' || inner === 'repeatsEvery') return ['symbolSets', key, inner];
      if (inner !== 'symbols' || deeper === undefined) return ['symbolSets', key];
      if (set.kind === 'values') return deeper in set.symbols ? ['symbolSets', key, 'symbols', deeper] : ['symbolSets', key];
      const digit = set.symbols[deeper] ?? '';
      return /^\d$/.test(digit) ? ['symbolSets', key, 'digit', digit] : ['symbolSets', key];
    }
    case 'exceptions':
      if (key === undefined) return ['exceptions'];
      if (inner === 'fields' && deeper !== undefined) return ['exceptions', key, 'fields', deeper];
      return EXCEPTION_PARTS.includes(String(inner)) ? ['exceptions', key, String(inner)] : ['exceptions', key];
    case 'yearStart':
    case 'usedFrom':
    case 'usedTo':
      return [part];
    case undefined:
    default:
      return ['fields'];
  }
}

/** A step of a path as part of an id: letters and figures as they are, the rest by number. */
function plain(step: string | number): string {
  return String(step).replace(/[^A-Za-z0-9]/g, (character) => `_${(character.codePointAt(0) ?? 0).toString(16)}`);
}
