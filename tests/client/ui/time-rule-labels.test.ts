// @vitest-environment node
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { axisLabels, labelWidth, placeLabels } from '#client/ui/time-rule-labels.ts';

const wish = fc.record({ left: fc.integer({ min: 0, max: 690 }), text: fc.constantFrom('13 Jan 1941', '3 Nov 1941', '10–16 Feb 1919'), weight: fc.double({ min: 0, max: 1, noNaN: true }) });
const wishes = fc.array(wish, { maxLength: 40 }).map((all) => all.map((one, place) => ({ ...one, right: one.left + 9, key: String(place) })));

function extent(label: { x: number; anchor: 'start' | 'end'; text: string }): { from: number; to: number } {
  const long = labelWidth(label.text);
  return label.anchor === 'start' ? { from: label.x, to: label.x + long } : { from: label.x - long, to: label.x };
}

describe('placeLabels', () => {
  it('never lets two labels touch, nor a label a mark or an end', () => {
    fc.assert(
      fc.property(wishes, fc.integer({ min: 1, max: 3 }), (all, rows) => {
        const placed = placeLabels(all, 700, rows);
        for (const label of placed) {
          const { from, to } = extent(label);
          expect(from).toBeGreaterThanOrEqual(0);
          expect(to).toBeLessThanOrEqual(700);
          const others = placed.filter((other) => other !== label && other.row === label.row).map(extent);
          const marks = label.row === 0 ? all.map(({ left, right }) => ({ from: left, to: right })) : [];
          for (const other of [...others, ...marks]) expect(to <= other.from || from >= other.to).toBe(true);
        }
      }),
    );
  });
  it('places the heaviest first', () => {
    const crowded = Array.from({ length: 30 }, (_, place) => ({ key: String(place), left: 300 + place * 2, right: 309 + place * 2, text: '13 Jan 1941', weight: place === 7 ? 1 : 0.1 }));
    expect(placeLabels(crowded, 400, 2).map(({ key }) => key)).toContain('7');
  });
  it('keeps off the guides while there is room elsewhere, and gives way when there is none', () => {
    const one = [{ key: 'a', left: 300, right: 309, text: '13 Jan 1941', weight: 1 }];
    expect(placeLabels(one, 700, 1)[0]?.anchor).toBe('start');
    expect(placeLabels(one, 700, 1, [{ from: 330, to: 350 }])[0]?.anchor).toBe('end');
    expect(placeLabels(one, 700, 1, [{ from: 0, to: 700 }])).toHaveLength(1);
  });
});

describe('axisLabels', () => {
  it('keeps labels apart and inside', () => {
    fc.assert(
      fc.property(fc.uniqueArray(fc.integer({ min: 0, max: 400 }), { maxLength: 20 }), (places) => {
        const placed = axisLabels(places.sort((a, b) => a - b).map((at) => ({ at, text: '1941' })), 400);
        placed.forEach(({ x, text }, place) => {
          const half = labelWidth(text) / 2;
          expect(x - half).toBeGreaterThanOrEqual(0);
          expect(x + half).toBeLessThanOrEqual(400);
          const before = placed[place - 1];
          if (before !== undefined) expect(x - half).toBeGreaterThanOrEqual(before.x + half);
        });
        if (places.length > 0) expect(placed.length).toBeGreaterThan(0);
      }),
    );
  });
});
