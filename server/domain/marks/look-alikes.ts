/**
 * Which glyphs a seen glyph may truly be, on rough or worn iron.
 *
 * Directional: the key is what is seen, the letters are what may have been cast. Common practice in the trade, no source:
 * - groups whose members are taken for one another: 0 O D Q C G, 1 I L 7 T, 2 Z, 5 S 6, 8 B 3 6 9, 6 G C, 4 A H, U V Y, K X;
 * - worn one way only, as thin and closed strokes go first: R is seen as P then F, E as F then I, B as P, 8 as 3
 *   (so a seen P may be an R or a B, but a seen R is no worn P);
 * - turned over with the part: 6 and 9, M and W, N and Z.
 */
export const LOOK_ALIKES: Readonly<Partial<Record<string, string>>> = {
  0: 'ODQCG',
  1: 'IL7T',
  2: 'Z',
  3: '8B69',
  4: 'AH',
  5: 'S6',
  6: '5SGCB89',
  7: '1ILT',
  8: 'B69',
  9: '86B',
  A: '4H',
  B: '869',
  C: '0ODQG6',
  D: '0OQCG',
  F: 'PRE',
  G: '0ODQC6',
  H: '4A',
  I: '1L7TFE',
  K: 'X',
  L: '1I7T',
  M: 'W',
  N: 'Z',
  O: '0DQCG',
  P: 'RB',
  Q: '0ODCG',
  S: '56',
  T: '1IL7',
  U: 'VY',
  V: 'UY',
  W: 'M',
  X: 'K',
  Y: 'UV',
  Z: '2N',
};

/** What the glyph seen may truly be, itself left out; empty where nothing is taken for it. */
export function lookAlikesOf(seen: string): string {
  return LOOK_ALIKES[seen] ?? '';
}
