import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { wilsonLimits } from '#domain/marks/wilson.ts';

describe('the 95 % limits on a share', () => {
  // E. B. Wilson's interval (JASA 22, 1927) for these counts, worked out once for the design from its formula with z = 1.959964.
  test.each([
    [3, 3, 0.4385, 1],
    [8, 10, 0.4902, 0.9433],
    [9, 10, 0.5958, 0.9821],
  ])('%i of %i: %f to %f', (agree, readers, low, high) => {
    const limits = wilsonLimits(agree, readers);
    expect(limits.low).toBeCloseTo(low, 4);
    expect(limits.high).toBeCloseTo(high, 4);
  });

  test('of no readers say nothing', () => {
    expect(wilsonLimits(0, 0)).toEqual({ low: 0, high: 1 });
  });

  const counts = fc.integer({ min: 1, max: 200 }).chain((readers) => fc.tuple(fc.integer({ min: 0, max: readers }), fc.constant(readers)));

  test('hold the share between them, and mirror those of its opposite', () => {
    fc.assert(
      fc.property(counts, ([agree, readers]) => {
        const { low, high } = wilsonLimits(agree, readers);
        expect(low).toBeGreaterThanOrEqual(0);
        expect(high).toBeLessThanOrEqual(1);
        expect(low).toBeLessThanOrEqual(agree / readers + 1e-12);
        expect(high).toBeGreaterThanOrEqual(agree / readers - 1e-12);
        const opposite = wilsonLimits(readers - agree, readers);
        expect(opposite.low).toBeCloseTo(1 - high, 12);
        expect(opposite.high).toBeCloseTo(1 - low, 12);
      }),
    );
  });

  test('are the roots of the equation they come from', () => {
    fc.assert(
      fc.property(counts, ([agree, readers]) => {
        // (p − x/n)² = z² p (1 − p) / n, from which Wilson sets out.
        for (const limit of Object.values(wilsonLimits(agree, readers))) {
          expect((limit - agree / readers) ** 2).toBeCloseTo((1.959964 ** 2 * limit * (1 - limit)) / readers, 10);
        }
      }),
    );
  });
});
