import { describe, expect, it } from 'vitest';
import {
  cornersOf,
  fitScale,
  frameOf,
  keepInSight,
  matrixOf,
  mirror,
  mostZoom,
  moveRegion,
  normalTurn,
  regionBetween,
  regionInSight,
  shift,
  stretchRegion,
  toPicture,
  toStage,
  turnBy,
  WHOLE,
  zoomAbout,
} from '#client/features/reading/stage-geometry.ts';
import type { Lie, Point } from '#client/features/reading/stage-geometry.ts';

const PICTURE = { width: 4000, height: 3000 };
const STAGE = { width: 800, height: 400 };
const MIDDLE = { x: 400, y: 200 };

const lie = (given: Partial<Lie> = {}): Lie => ({ ...WHOLE, ...given });
const LIES: readonly Lie[] = [0, 15, 90, -135, 180].flatMap((turn) =>
  [false, true].flatMap((mirrored) => [1, 3.7].map((zoom) => lie({ turn, mirrored, zoom, centre: zoom === 1 ? WHOLE.centre : { x: 0.3, y: 0.6 } }))),
);

function expectAt(point: Point, x: number, y: number): void {
  expect(point.x).toBeCloseTo(x, 6);
  expect(point.y).toBeCloseTo(y, 6);
}

describe('the picture on the stage', () => {
  it('is as large as fits, turned as it is', () => {
    expect(fitScale(PICTURE, STAGE, 0)).toBeCloseTo(400 / 3000, 9);
    expect(fitScale(PICTURE, STAGE, 90)).toBeCloseTo(400 / 4000, 9);
    expect(fitScale(PICTURE, STAGE, 45)).toBeCloseTo(400 / (7000 * Math.SQRT1_2), 9);
  });

  it('lies in the middle; turned clockwise its upper left corner comes to the upper right', () => {
    expectAt(toStage(lie(), PICTURE, STAGE, { x: 0, y: 0 }), 400 - 2000 * (400 / 3000), 0);
    expectAt(toStage(lie({ turn: 90 }), PICTURE, STAGE, { x: 0, y: 0 }), 400 + 150, 0);
    expectAt(toStage(lie({ mirrored: true }), PICTURE, STAGE, { x: 0, y: 0 }), 400 + 2000 * (400 / 3000), 0);
  });

  it.each(LIES)('has each place where its own way back leads to, $turn°, mirrored $mirrored, zoom $zoom', (one) => {
    for (const place of [{ x: 0, y: 0 }, { x: 0.25, y: 0.9 }, { x: 1, y: 1 }]) {
      expectAt(toPicture(one, PICTURE, STAGE, toStage(one, PICTURE, STAGE, place)), place.x, place.y);
    }
    expectAt(toStage(one, PICTURE, STAGE, one.centre), MIDDLE.x, MIDDLE.y);
  });

  it.each(LIES)('keeps its angles and lengths, $turn°, mirrored $mirrored, zoom $zoom', (one) => {
    const [a, b, c, d] = matrixOf(one, PICTURE, STAGE);
    expect(a * c + b * d).toBeCloseTo(0, 9);
    expect(Math.hypot(a, b)).toBeCloseTo(Math.hypot(c, d), 9);
    expect(Math.sign(a * d - b * c)).toBe(one.mirrored ? -1 : 1);
  });
});

describe('zoom and shift', () => {
  it.each(LIES.filter(({ zoom }) => zoom > 2))('leave the place under the finger where it is, $turn°, mirrored $mirrored', (one) => {
    const at = { x: 500, y: 150 };
    const place = toPicture(one, PICTURE, STAGE, at);
    expectAt(toPicture(zoomAbout(one, PICTURE, STAGE, at, 1.3), PICTURE, STAGE, at), place.x, place.y);
    const moved = shift(one, PICTURE, STAGE, { x: -20, y: 10 });
    expectAt(toPicture(moved, PICTURE, STAGE, { x: at.x - 20, y: at.y + 10 }), place.x, place.y);
  });

  it('go no further out than the whole picture and no further in than its pixels', () => {
    expect(zoomAbout(lie({ zoom: 2 }), PICTURE, STAGE, MIDDLE, 0.01)).toEqual(lie());
    const most = mostZoom(PICTURE, STAGE, 0);
    expect(most * fitScale(PICTURE, STAGE, 0)).toBeCloseTo(8, 9);
    expect(zoomAbout(lie({ zoom: 2 }), PICTURE, STAGE, MIDDLE, 1e6).zoom).toBe(most);
    expect(mostZoom({ width: 20, height: 20 }, STAGE, 0)).toBe(4);
  });

  it('never lose the picture', () => {
    const far = shift(lie({ zoom: 1.5 }), PICTURE, STAGE, { x: -1e6, y: 1e6 });
    expect(far.centre).toEqual({ x: 0.75, y: 0.25 });
    expect(shift(lie({ zoom: 5 }), PICTURE, STAGE, { x: -1e6, y: 1e6 }).centre).toEqual({ x: 1, y: 0 });
    expect(shift(lie(), PICTURE, STAGE, { x: 50, y: 50 })).toEqual(lie());
    expect(keepInSight(lie({ zoom: 0.2, centre: { x: 3, y: -3 } }), PICTURE, STAGE)).toEqual(lie());
  });
});

describe('turning and mirroring', () => {
  it.each([
    [0, 0],
    [180, 180],
    [-180, 180],
    [190, -170],
    [540, 180],
    [-360, 0],
    [-15, -15],
  ])('say %d° as %d°', (turn, said) => {
    expect(normalTurn(turn)).toBe(said);
  });

  it('come round after four quarters', () => {
    let now = lie();
    for (let quarter = 0; quarter < 4; quarter += 1) now = turnBy(now, 90);
    expect(now).toEqual(lie());
  });

  it('mirror what is seen from left to right, whatever the turn', () => {
    for (const one of LIES) {
      const seen = toStage(one, PICTURE, STAGE, { x: 0.4, y: 0.7 });
      expectAt(toStage(mirror(one), PICTURE, STAGE, { x: 0.4, y: 0.7 }), STAGE.width - seen.x, seen.y);
      expect(mirror(mirror(one))).toEqual(one);
    }
  });
});

describe('a region', () => {
  const REGION = { left: 0.25, top: 0.4, width: 0.5, height: 0.2 };

  it('is framed in the middle, all of it seen, with some iron round it', () => {
    for (const turn of [0, 30, 90, -170]) {
      const framed = frameOf(REGION, { turn, mirrored: true }, PICTURE, STAGE);
      expect(framed).toMatchObject({ turn, mirrored: true, centre: { x: 0.5, y: 0.5 } });
      const corners = cornersOf(REGION).map((corner) => toStage(framed, PICTURE, STAGE, corner));
      for (const { x, y } of corners) {
        expect(x).toBeGreaterThan(0);
        expect(x).toBeLessThan(STAGE.width);
        expect(y).toBeGreaterThan(0);
        expect(y).toBeLessThan(STAGE.height);
      }
      const spread = Math.max(Math.max(...corners.map(({ x }) => Math.abs(x - 400))) / 400, Math.max(...corners.map(({ y }) => Math.abs(y - 200))) / 200);
      expect(spread).toBeCloseTo(0.72, 6);
    }
  });

  it('holds what was drawn round, in whatever direction, under any lie', () => {
    for (const one of LIES) {
      const region = regionBetween(one, PICTURE, STAGE, { x: 350, y: 180 }, { x: 450, y: 230 });
      expect(regionBetween(one, PICTURE, STAGE, { x: 450, y: 180 }, { x: 350, y: 230 })).toEqual(region);
      for (const at of [{ x: 350, y: 180 }, { x: 450, y: 180 }, { x: 450, y: 230 }, { x: 350, y: 230 }]) {
        const { x, y } = toPicture(one, PICTURE, STAGE, at);
        expect(region === null ? -1 : x - region.left).toBeGreaterThanOrEqual(-1e-9);
        expect(region === null ? -1 : region.left + region.width - x).toBeGreaterThanOrEqual(-1e-9);
        expect(region === null ? -1 : y - region.top).toBeGreaterThanOrEqual(-1e-9);
        expect(region === null ? -1 : region.top + region.height - y).toBeGreaterThanOrEqual(-1e-9);
      }
    }
  });

  it('goes no further than the picture, and is none where next to nothing was drawn', () => {
    expect(regionBetween(lie(), PICTURE, STAGE, { x: -100, y: -100 }, { x: 900, y: 900 })).toEqual({ left: 0, top: 0, width: 1, height: 1 });
    expect(regionBetween(lie(), PICTURE, STAGE, { x: 400, y: 200 }, { x: 401, y: 200 })).toBeNull();
    expect(regionBetween(lie(), PICTURE, STAGE, { x: 0, y: 0 }, { x: 50, y: 400 })).toBeNull();
  });

  it('begins as the middle half of what is seen', () => {
    expect(regionInSight(lie(), PICTURE, STAGE)).toEqual({ left: 0.25, top: 0.25, width: 0.5, height: 0.5 });
    const near = regionInSight(lie({ zoom: 10, centre: { x: 1, y: 1 } }), PICTURE, STAGE);
    expect(near.left + near.width).toBeLessThan(1);
    expect(near.left).toBeGreaterThan(0.9);
  });

  it('moves up to the edge and no further', () => {
    expect(moveRegion(REGION, { x: 0.1, y: -0.1 })).toMatchObject({ left: 0.35, top: 0.30000000000000004, width: 0.5, height: 0.2 });
    expect(moveRegion(REGION, { x: 9, y: -9 })).toEqual({ left: 0.5, top: 0, width: 0.5, height: 0.2 });
  });

  it('has the edge moved that lies towards the way, outwards or inwards', () => {
    expect(stretchRegion(REGION, { x: 0.1, y: 0.01 }, 'out')).toEqual({ ...REGION, width: 0.6 });
    expect(stretchRegion(REGION, { x: 0.1, y: 0 }, 'in')).toEqual({ ...REGION, width: 0.4 });
    const wider = stretchRegion(REGION, { x: -0.1, y: 0 }, 'out');
    expect(wider.left).toBeCloseTo(0.15, 9);
    expect(wider.left + wider.width).toBeCloseTo(0.75, 9);
    expect(stretchRegion(REGION, { x: 0, y: 0.05 }, 'out').height).toBeCloseTo(0.25, 9);
    expect(stretchRegion(REGION, { x: 0, y: 0.05 }, 'out').width).toBe(0.5);
  });

  it('is never stretched off the picture nor to nothing', () => {
    expect(stretchRegion(REGION, { x: 5, y: 0 }, 'out')).toEqual({ ...REGION, width: 0.75 });
    expect(stretchRegion(REGION, { x: -5, y: 0 }, 'out')).toEqual({ ...REGION, left: 0, width: 0.75 });
    expect(stretchRegion(REGION, { x: 5, y: 0 }, 'in').width).toBeGreaterThan(0);
    expect(stretchRegion(REGION, { x: -5, y: 0 }, 'in').width).toBeGreaterThan(0);
  });
});
