import type { FieldFault } from '#contract/problem.ts';
import type { CipherDefinition } from '#domain/ciphers/definition.ts';
import { capital, sayPlace } from '../../lib/say-number.ts';

/** Where on the bench a fault lies, as it is called in a list apart from it: `Second field`, `“key”`, `First exception`. */
export function sayWhere({ path: [part, key] }: FieldFault, { fields }: CipherDefinition): string {
  switch (part) {
    case 'fields':
      return typeof key === 'number' && key < fields.length ? capital(`${sayPlace(key)} field`) : 'Layout';
    case 'symbolSets':
      return key === undefined ? 'Symbols' : `“${key}”`;
    case 'exceptions':
      return typeof key === 'number' ? capital(`${sayPlace(key)} exception`) : 'Exceptions';
    case 'usedFrom':
      return 'First day in use';
    case 'usedTo':
      return 'Last day in use';
    case 'yearStart':
      return 'Start of the year';
    case undefined:
    default:
      return 'Layout';
  }
}
