const VULGAR: readonly (readonly [part: number, of: number, sign: string])[] = [
  [1, 2, '½'],
  [1, 3, '⅓'],
  [2, 3, '⅔'],
  [1, 4, '¼'],
  [3, 4, '¾'],
  [1, 5, '⅕'],
  [2, 5, '⅖'],
  [3, 5, '⅗'],
  [4, 5, '⅘'],
  [1, 6, '⅙'],
  [5, 6, '⅚'],
  [1, 8, '⅛'],
  [3, 8, '⅜'],
  [5, 8, '⅝'],
  [7, 8, '⅞'],
];
/** A share that is a fraction differs from it by rounding only. */
const ROUNDING = 1e-9;

/** A share of the probability: a fraction where it is exactly one, else per cent. `½`, `⅓`, `10 %`, `3.7 %`, `under 0.1 %`. */
export function sayShare(share: number): string {
  const vulgar = VULGAR.find(([part, of]) => Math.abs(share - part / of) < ROUNDING);
  if (vulgar !== undefined) return vulgar[2];
  if (Math.abs(share - 1) < ROUNDING) return '1';
  if (share < ROUNDING) return '0';
  const percent = share * 100;
  if (percent < 0.1) return 'under 0.1 %';
  if (percent > 99.9) return 'over 99.9 %';
  return `${percent < 10 || percent > 90 ? percent.toFixed(1).replace(/\.0$/, '') : percent.toFixed(0)} %`;
}

/** The same for a screen reader: signs like ⅖ are not read well everywhere. */
export function sayShareAloud(share: number): string {
  const vulgar = VULGAR.find(([part, of]) => Math.abs(share - part / of) < ROUNDING);
  return vulgar === undefined ? sayShare(share) : `${vulgar[0]} in ${vulgar[1]}`;
}
