import type { Region } from '#contract/parts.ts';

/** A place: on the stage in CSS pixels from its upper left corner; on a picture in shares of its width and height. */
export type Point = { readonly x: number; readonly y: number };
export type Size = { readonly width: number; readonly height: number };

/** How a picture lies on the stage: mirrored first, then turned clockwise by `turn` degrees, then enlarged. */
export type Lie = {
  /** 1: all of it is seen. */
  readonly zoom: number;
  /** The place on the picture that is in the middle of the stage. */
  readonly centre: Point;
  readonly turn: number;
  readonly mirrored: boolean;
};

export const WHOLE: Lie = { zoom: 1, centre: { x: 0.5, y: 0.5 }, turn: 0, mirrored: false };

/** CSS pixels a pixel of the picture is drawn at, at most: beyond it there is nothing more to see. */
const LARGEST_PIXEL = 8;
const LEAST_MOST_ZOOM = 4;
/** What of the stage a framed region fills, so that some iron is seen round it. */
const FRAMED = 0.72;
/** The least a region may be, in shares. */
const LEAST_REGION = 0.005;
const WHOLE_PICTURE: Region = { left: 0, top: 0, width: 1, height: 1 };

/** CSS pixels for one pixel of the picture when all of it is seen, turned as it is. */
export function fitScale(picture: Size, stage: Size, turn: number): number {
  const { cos, sin } = angle(turn);
  const across = Math.abs(cos) * picture.width + Math.abs(sin) * picture.height;
  const down = Math.abs(sin) * picture.width + Math.abs(cos) * picture.height;
  return Math.min(stage.width / across, stage.height / down);
}

/** The matrix of CSS and SVG, `a b c d e f`, that takes pixels of the picture to the stage. */
export type Matrix = readonly [a: number, b: number, c: number, d: number, e: number, f: number];

export function matrixOf(lie: Lie, picture: Size, stage: Size): Matrix {
  const { cos, sin } = angle(lie.turn);
  const scale = fitScale(picture, stage, lie.turn) * lie.zoom;
  const flip = lie.mirrored ? -1 : 1;
  const a = scale * cos * flip;
  const b = scale * sin * flip;
  const c = -scale * sin;
  const d = scale * cos;
  const x = lie.centre.x * picture.width;
  const y = lie.centre.y * picture.height;
  return [a, b, c, d, stage.width / 2 - a * x - c * y, stage.height / 2 - b * x - d * y];
}

/** Where on the stage a place of the picture is. */
export function toStage(lie: Lie, picture: Size, stage: Size, { x, y }: Point): Point {
  const [a, b, c, d, e, f] = matrixOf(lie, picture, stage);
  return { x: a * x * picture.width + c * y * picture.height + e, y: b * x * picture.width + d * y * picture.height + f };
}

/** A way on the stage, as a way on the picture. */
export function wayOnPicture(lie: Lie, picture: Size, stage: Size, way: Point): Point {
  const [a, b, c, d] = matrixOf(lie, picture, stage);
  const determinant = a * d - b * c;
  return { x: (d * way.x - c * way.y) / determinant / picture.width, y: (a * way.y - b * way.x) / determinant / picture.height };
}

/** The place of the picture that is seen at a place of the stage; may lie off the picture. */
export function toPicture(lie: Lie, picture: Size, stage: Size, { x, y }: Point): Point {
  const way = wayOnPicture(lie, picture, stage, { x: x - stage.width / 2, y: y - stage.height / 2 });
  return { x: lie.centre.x + way.x, y: lie.centre.y + way.y };
}

export function mostZoom(picture: Size, stage: Size, turn: number): number {
  return Math.max(LEAST_MOST_ZOOM, LARGEST_PIXEL / fitScale(picture, stage, turn));
}

/**
 * Keeps the picture in sight: zoom between all of it and its pixels as blocks, and the middle of the stage the less far from the middle of
 * the picture the more of it is seen. From twice the size on, every place of it can be brought to the middle.
 */
export function keepInSight<L extends Lie>(lie: L, picture: Size, stage: Size): L {
  const zoom = clamp(lie.zoom, 1, mostZoom(picture, stage, lie.turn));
  const reach = Math.min(0.5, (zoom - 1) / 2);
  return { ...lie, zoom, centre: { x: clamp(lie.centre.x, 0.5 - reach, 0.5 + reach), y: clamp(lie.centre.y, 0.5 - reach, 0.5 + reach) } };
}

/** Enlarges by `factor` about a place of the stage, which stays where it is. */
export function zoomAbout<L extends Lie>(lie: L, picture: Size, stage: Size, at: Point, factor: number): L {
  const zoom = clamp(lie.zoom * factor, 1, mostZoom(picture, stage, lie.turn));
  const place = toPicture(lie, picture, stage, at);
  const moved = toPicture({ ...lie, zoom }, picture, stage, at);
  return keepInSight({ ...lie, zoom, centre: { x: lie.centre.x + place.x - moved.x, y: lie.centre.y + place.y - moved.y } }, picture, stage);
}

/** Moves the picture along the stage. */
export function shift<L extends Lie>(lie: L, picture: Size, stage: Size, by: Point): L {
  const way = wayOnPicture(lie, picture, stage, by);
  return keepInSight({ ...lie, centre: { x: lie.centre.x - way.x, y: lie.centre.y - way.y } }, picture, stage);
}

/** Turned clockwise by so many degrees, said from -180 up to 180; what is in the middle stays there. */
export function turnBy<L extends Lie>(lie: L, degrees: number): L {
  return { ...lie, turn: normalTurn(lie.turn + degrees) };
}

/** As seen in a mirror beside the stage: left becomes right as it is seen now, whatever the turn. */
export function mirror<L extends Lie>(lie: L): L {
  return { ...lie, mirrored: !lie.mirrored, turn: normalTurn(-lie.turn) };
}

/** From -180, which is not among them, to 180. */
export function normalTurn(degrees: number): number {
  const turn = degrees - 360 * Math.ceil((degrees - 180) / 360);
  return Object.is(turn, -0) ? 0 : turn;
}

/** The lie that shows a region with some iron round it. */
export function frameOf(region: Region, placed: Pick<Lie, 'turn' | 'mirrored'>, picture: Size, stage: Size): Lie {
  const middle = { x: region.left + region.width / 2, y: region.top + region.height / 2 };
  const whole = { ...WHOLE, ...placed };
  const seen = extent(cornersOf(region).map((corner) => toStage(whole, picture, stage, corner)));
  const zoom = FRAMED * Math.min(stage.width / seen.width, stage.height / seen.height);
  return keepInSight({ ...whole, zoom, centre: middle }, picture, stage);
}

/** The region that holds all that is seen in a rectangle of the stage, given by two opposite corners; null where that is next to nothing. */
export function regionBetween(lie: Lie, picture: Size, stage: Size, from: Point, to: Point): Region | null {
  const corners = [from, { x: to.x, y: from.y }, to, { x: from.x, y: to.y }].map((corner) => toPicture(lie, picture, stage, corner));
  const xs = corners.map(({ x }) => clamp(x, 0, 1));
  const ys = corners.map(({ y }) => clamp(y, 0, 1));
  const [left, top] = [Math.min(...xs), Math.min(...ys)];
  const [width, height] = [Math.max(...xs) - left, Math.max(...ys) - top];
  return width < LEAST_REGION || height < LEAST_REGION ? null : { left, top, width, height };
}

/** A region to begin with: the middle half of what is seen of the picture, across and down. */
export function regionInSight(lie: Lie, picture: Size, stage: Size): Region {
  const { left, top, width, height } = regionBetween(lie, picture, stage, { x: 0, y: 0 }, { x: stage.width, y: stage.height }) ?? WHOLE_PICTURE;
  return { left: left + width / 4, top: top + height / 4, width: width / 2, height: height / 2 };
}

/** Moves a region by a way on the picture, as far as the picture goes. */
export function moveRegion(region: Region, way: Point): Region {
  return { ...region, left: clamp(region.left + way.x, 0, 1 - region.width), top: clamp(region.top + way.y, 0, 1 - region.height) };
}

/**
 * Moves one edge of a region: the edge that lies towards `towards`, a way on the picture, outwards by the length of it along the nearer
 * axis, or inwards. Never off the picture, never to nothing.
 */
export function stretchRegion(region: Region, towards: Point, sense: 'out' | 'in'): Region {
  const isAcross = Math.abs(towards.x) >= Math.abs(towards.y);
  const way = isAcross ? towards.x : towards.y;
  const by = Math.abs(way) * (sense === 'out' ? 1 : -1);
  const [start, length] = stretchSpan(isAcross ? region.left : region.top, isAcross ? region.width : region.height, way > 0, by);
  return isAcross ? { ...region, left: start, width: length } : { ...region, top: start, height: length };
}

function stretchSpan(start: number, length: number, atFarEnd: boolean, by: number): readonly [start: number, length: number] {
  if (atFarEnd) return [start, clamp(length + by, LEAST_REGION, 1 - start)];
  const end = start + length;
  const begin = clamp(start - by, 0, end - LEAST_REGION);
  return [begin, end - begin];
}

/** Upper left, upper right, lower right, lower left, on the picture. */
export function cornersOf({ left, top, width, height }: Region): readonly Point[] {
  return [
    { x: left, y: top },
    { x: left + width, y: top },
    { x: left + width, y: top + height },
    { x: left, y: top + height },
  ];
}

export function clamp(value: number, least: number, most: number): number {
  return Math.min(Math.max(value, least), most);
}

function extent(points: readonly Point[]): Size {
  const xs = points.map(({ x }) => x);
  const ys = points.map(({ y }) => y);
  return { width: Math.max(...xs) - Math.min(...xs), height: Math.max(...ys) - Math.min(...ys) };
}

function angle(degrees: number): { readonly cos: number; readonly sin: number } {
  const radians = (degrees * Math.PI) / 180;
  return { cos: Math.cos(radians), sin: Math.sin(radians) };
}
