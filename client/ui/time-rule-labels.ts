/** A label that wants to stand beside a mark. Lengths in pixels. */
type LabelWish = {
  readonly key: string;
  /** Left and right edge of the mark itself; no label may cover it. */
  readonly left: number;
  readonly right: number;
  readonly text: string;
  /** The greater, the sooner it is placed. */
  readonly weight: number;
};

type PlacedLabel = { readonly key: string; readonly text: string; readonly x: number; readonly anchor: 'start' | 'end'; readonly row: number };

/** Wide enough for any letter of the rule's type: labels are kept apart by what they could take, so they never touch. */
const LETTER_WIDTH = 7.9;
const AIR = 6;

export function labelWidth(text: string): number {
  return text.length * LETTER_WIDTH;
}

type Stretch = { readonly from: number; readonly to: number };

/**
 * Places labels to the right of their marks, else to the left, on the first of `rows` rows with room; the heavier ones first.
 * A label that finds no room is left out: its date stands in the table. Labels never overlap each other, other marks, or the ends;
 * they keep off `guides` as long as there is room elsewhere.
 */
export function placeLabels(wishes: readonly LabelWish[], width: number, rows: number, guides: readonly Stretch[] = []): PlacedLabel[] {
  const taken: (Stretch & { readonly row: number })[] = wishes.map(({ left, right }) => ({ row: 0, from: left, to: right }));
  const isClear = (stretch: Stretch, other: Stretch) => stretch.to + AIR <= other.from || stretch.from - AIR >= other.to;
  const isFree = ({ row, from, to }: Spot, avoid: readonly Stretch[]) =>
    from >= 0 && to <= width && taken.every((other) => other.row !== row || isClear({ from, to }, other)) && avoid.every((other) => isClear({ from, to }, other));

  return wishes
    .map((wish, place) => ({ wish, place }))
    .sort((a, b) => b.wish.weight - a.wish.weight || a.place - b.place)
    .flatMap(({ wish }) => {
      const spots = spotsFor(wish, rows);
      const spot = spots.find((one) => isFree(one, guides)) ?? spots.find((one) => isFree(one, []));
      if (spot === undefined) return [];
      taken.push(spot);
      const { row, from, to, anchor } = spot;
      return [{ key: wish.key, text: wish.text, x: anchor === 'start' ? from : to, anchor, row }];
    });
}

type Spot = Stretch & { readonly row: number; readonly anchor: 'start' | 'end' };

/** Where a label would like to be, best first. */
function spotsFor({ left, right, text }: LabelWish, rows: number): Spot[] {
  const long = labelWidth(text);
  return Array.from({ length: rows }, (_, row) => row).flatMap((row): Spot[] => [
    { row, anchor: 'start', from: right + AIR, to: right + AIR + long },
    { row, anchor: 'end', from: left - AIR - long, to: left - AIR },
  ]);
}

type AxisLabel = { readonly key: number; readonly text: string; /** Its middle. */ readonly x: number };

/** Labels under the long marks of a rule `width` long: centred, drawn in at the ends, and left out where they would touch the one before. */
export function axisLabels(marks: readonly { readonly at: number; readonly text: string }[], width: number): AxisLabel[] {
  const placed: AxisLabel[] = [];
  let free = 0;
  for (const { at, text } of marks) {
    const long = labelWidth(text);
    const x = Math.min(Math.max(at, long / 2), width - long / 2);
    if (x - long / 2 < free) continue;
    placed.push({ key: at, text, x });
    free = x + long / 2 + AIR;
  }
  return placed;
}
