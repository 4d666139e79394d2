const NUMBERS = ['no', 'one', 'two', 'three', 'four', 'five', 'six', 'seven', 'eight', 'nine', 'ten', 'eleven', 'twelve'] as const;
const ORDINALS = ['first', 'second', 'third', 'fourth', 'fifth', 'sixth', 'seventh', 'eighth', 'ninth', 'tenth', 'eleventh', 'twelfth'] as const;

/** In words up to twelve, in figures beyond: `two`, `27`, `1,204`. */
export function sayCount(count: number): string {
  return NUMBERS[count] ?? sayFigure(count);
}

/** A whole number in figures, its thousands apart. */
export function sayFigure(count: number): string {
  return String(count).replace(/\B(?=(?:\d{3})+$)/g, ',');
}

/** The place of a glyph counted from 0: `first`, `13th`. */
export function sayPlace(position: number): string {
  const number = position + 1;
  return ORDINALS[position] ?? `${number}${number % 100 >= 11 && number % 100 <= 13 ? 'th' : (['th', 'st', 'nd', 'rd'][number % 10] ?? 'th')}`;
}

/** `a`, `a or b`, `a, b or c`. */
export function sayList(words: readonly string[], last: 'and' | 'or'): string {
  if (words.length < 2) return words.join('');
  return `${words.slice(0, -1).join(', ')} ${last} ${words.at(-1) ?? ''}`;
}

export function capital(sentence: string): string {
  return sentence.charAt(0).toUpperCase() + sentence.slice(1);
}
