import type { MeasureUnit } from '#domain/vocabulary.ts';

/** Exactly, by definition (international yard and pound agreement of 1959). */
const MILLIMETRES_IN_AN_INCH = 25.4;

const SIGNS: Readonly<Record<MeasureUnit, string>> = { mm: 'mm', in: 'in', degree: '°', gram: 'g', 'newton-metre': 'N\u00a0m' };

/** A size in its own unit, and a length in the other one as well: `101.6 mm (4.000 in)`. */
export function saySize(value: number, unit: MeasureUnit): string {
  const own = `${plain(value)}${unit === 'degree' ? '' : '\u00a0'}${SIGNS[unit]}`;
  if (unit === 'mm') return `${own} (${(value / MILLIMETRES_IN_AN_INCH).toFixed(3)}\u00a0in)`;
  if (unit === 'in') return `${own} (${(value * MILLIMETRES_IN_AN_INCH).toFixed(3)}\u00a0mm)`;
  return own;
}

/** What a new part measures: one size, or from the smallest to the largest. */
export function saySizes({ from, to }: { readonly from: number; readonly to: number | null }, unit: MeasureUnit): string {
  return to === null || to === from ? saySize(from, unit) : `${saySize(from, unit)} to ${saySize(to, unit)}`;
}

function plain(value: number): string {
  return String(value).replace('-', '−');
}
