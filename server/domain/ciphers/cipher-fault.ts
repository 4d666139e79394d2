export const CIPHER_FAULTS = [
  'no-fields',
  'too-many-fields',
  'too-many-sets',
  'too-many-symbols',
  'too-many-values',
  'too-many-exceptions',
  'no-date-field',
  'same-field-twice',
  'unknown-set',
  'numerals-redefined',
  'not-a-symbol',
  'not-a-digit',
  'not-a-value',
  'same-symbol-twice',
  'missing-digit',
  'impossible-width',
  'impossible-cycle',
  'cycle-on-other-field',
  'misplaced-week-rule',
  'impossible-literal',
  'impossible-name',
  'not-a-day',
  'outside-years',
  'ends-before-it-starts',
  'exception-without-field',
  'exception-names-absent-field',
  'exception-names-absent-symbol',
] as const;

/** Why a definition is refused, and where: the path leads from the definition to the value at fault. */
export type CipherFault = {
  readonly path: readonly (string | number)[];
  readonly code: (typeof CIPHER_FAULTS)[number];
  readonly message: string;
};

/** Takes note of a fault; the checks go on, so that all faults are told at once. */
export type Report = (code: CipherFault['code'], path: CipherFault['path'], message: string) => void;
