import type { CipherDefinition, DigitsSet } from '#domain/ciphers/definition.ts';

export const KEY: DigitsSet = {
  kind: 'digits',
  symbols: { B: '1', L: '2', O: '3', C: '4', K: '5', P: '6', R: '7', I: '8', N: '9', T: '0' },
};

/** *ten* of the worked examples. */
export const TEN: CipherDefinition = {
  fields: [
    { field: 'month', symbols: 'key', width: [1, 2] },
    { field: 'day', symbols: 'key', width: [1, 2] },
    { field: 'year', symbols: 'key', width: 2 },
  ],
  symbolSets: { key: KEY },
  usedFrom: '1928-01-01',
  usedTo: '1954-12-31',
};
