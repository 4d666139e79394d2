import { describe, expect, it } from 'vitest';
import { DeskDraft, newDeskDraft, withRegion, withView } from '#client/features/reading/desk-draft.ts';
import { sayStanding } from '#client/features/reading/desk-words.ts';
import { AT_REST, paceAfterFrame, paceAtDrawing } from '#client/features/reading/drawing-pace.ts';
import { renditionsToShow, sizeToLoad } from '#client/features/reading/load-picture.ts';
import { regionAfterKey, viewAfterKey } from '#client/features/reading/stage-keys.ts';
import { questionOf } from '#client/features/reading/use-desk-decoding.ts';
import { firstView } from '#client/features/reading/view.ts';
import { blindDesk, desk, NO_RENDITIONS, photo, placed } from './samples.ts';

const STAGE = { width: 800, height: 400 };
const PICTURE = photo();
const VIEW = { ...firstView(placed(), STAGE), zoom: 4 };

describe('what is loaded of a photo', () => {
  it('is a page first, then every pixel', () => {
    expect(renditionsToShow(photo()).map(({ width }) => width)).toEqual([1600, 4000]);
  });
  it('is what there is while it is being made ready', () => {
    const { thumb, page } = photo().renditions;
    expect(renditionsToShow(photo({ renditions: NO_RENDITIONS }))).toEqual([]);
    expect(renditionsToShow(photo({ renditions: { ...NO_RENDITIONS, thumb } }))).toEqual([thumb]);
    expect(renditionsToShow(photo({ renditions: { ...NO_RENDITIONS, thumb, page } }))).toEqual([page]);
  });
  it('is not loaded twice where the page has every pixel already', () => {
    const { page } = photo().renditions;
    expect(renditionsToShow(photo({ renditions: { ...NO_RENDITIONS, page, full: page } }))).toEqual([page]);
  });
  it('is scaled down to what can be drawn, and never up', () => {
    expect(sizeToLoad({ width: 4000, height: 3000 }, 8192)).toEqual({ width: 4000, height: 3000 });
    expect(sizeToLoad({ width: 4000, height: 3000 }, 2048)).toEqual({ width: 2048, height: 1536 });
    const large = sizeToLoad({ width: 8192, height: 6144 }, 16384);
    expect(large.width * large.height).toBeLessThanOrEqual(24_000_000);
    expect(sizeToLoad({ width: 30_000, height: 1 }, 4096)).toEqual({ width: 4096, height: 1 });
  });
});

describe('keys on the photo', () => {
  it('move it, enlarge it, turn it', () => {
    expect(viewAfterKey('ArrowRight', VIEW, PICTURE, STAGE)?.centre.x).toBeGreaterThan(0.5);
    expect(viewAfterKey('+', VIEW, PICTURE, STAGE)?.zoom).toBeGreaterThan(4);
    expect(viewAfterKey('-', VIEW, PICTURE, STAGE)?.zoom).toBeLessThan(4);
    expect(viewAfterKey('0', VIEW, PICTURE, STAGE)).toMatchObject({ zoom: 1 });
    expect(viewAfterKey('.', VIEW, PICTURE, STAGE)).toMatchObject({ turn: 15 });
    expect(viewAfterKey(',', VIEW, PICTURE, STAGE)).toMatchObject({ turn: -15 });
    expect(viewAfterKey('r', VIEW, PICTURE, STAGE)).toMatchObject({ turn: 90 });
    expect(viewAfterKey('m', VIEW, PICTURE, STAGE)).toMatchObject({ mirrored: true });
    expect(viewAfterKey('t', { ...VIEW, asTaken: false, relief: true }, PICTURE, STAGE)).toMatchObject({ asTaken: true, relief: true });
  });
  it('that mean nothing do nothing', () => {
    expect(viewAfterKey('x', VIEW, PICTURE, STAGE)).toBeNull();
    expect(regionAfterKey('x', false, { left: 0, top: 0, width: 1, height: 1 }, VIEW, PICTURE, STAGE)).toBeNull();
  });

  const REGION = { left: 0.4, top: 0.4, width: 0.2, height: 0.2 };
  it('move the outline as it is seen, whatever the turn', () => {
    expect(regionAfterKey('ArrowRight', false, REGION, VIEW, PICTURE, STAGE)?.left).toBeGreaterThan(0.4);
    const turned = regionAfterKey('ArrowRight', false, REGION, { ...VIEW, turn: 90 }, PICTURE, STAGE);
    expect(turned?.left).toBeCloseTo(0.4, 9);
    expect(turned?.top).toBeLessThan(0.4);
  });
  it('with shift make it wider, narrower, higher and lower as it is seen', () => {
    const size = (key: string, turn = 0) => regionAfterKey(key, true, REGION, { ...VIEW, turn }, PICTURE, STAGE) ?? REGION;
    expect(size('ArrowRight').width).toBeGreaterThan(0.2);
    expect(size('ArrowLeft').width).toBeLessThan(0.2);
    expect(size('ArrowDown').height).toBeGreaterThan(0.2);
    expect(size('ArrowUp').height).toBeLessThan(0.2);
    // Turned by a quarter, what is right on the stage is up on the picture.
    expect(size('ArrowRight', 90).height).toBeGreaterThan(0.2);
    expect(size('ArrowRight', 90).top).toBeLessThan(0.4);
  });
});

describe('the pace of drawing', () => {
  const slow = paceAfterFrame(paceAtDrawing(AT_REST, 0), 120);
  it('lags once a frame after a drawing takes long, to the end of the movement', () => {
    expect(slow.lags).toBe(true);
    expect(paceAtDrawing(slow, 300).lags).toBe(true);
    expect(paceAtDrawing(paceAtDrawing(slow, 300), 1_200).lags).toBe(true);
  });
  it('does not lag at the first drawing, with quick frames, nor after a rest', () => {
    expect(paceAtDrawing(AT_REST, 0).lags).toBe(false);
    expect(paceAfterFrame(paceAtDrawing(AT_REST, 0), 17).lags).toBe(false);
    expect(paceAtDrawing(slow, 1_500).lags).toBe(false);
  });
});

describe('what the decoder is asked', () => {
  const { narrowing } = desk();
  it('is narrowed by the part', () => {
    expect(questionOf('LL?CB', narrowing)).toEqual({ mark: 'LL?CB', makerId: narrowing?.makerId, limits: { from: '1938-07-01', to: '1944-03-31' } });
    expect(questionOf('LLKCB', { makerId: null, from: null, to: '1944-03-31' })).toEqual({ mark: 'LLKCB', limits: { to: '1944-03-31' } });
    expect(questionOf('LLKCB', { makerId: null, from: null, to: null })).toEqual({ mark: 'LLKCB' });
  });
  it('is nothing for whoever reads blind, nor while the mark is not whole', () => {
    expect(questionOf('LLKCB', blindDesk().narrowing)).toBeNull();
    expect(questionOf('LL[K', narrowing)).toBeNull();
    expect(questionOf('', narrowing)).toBeNull();
  });
});

describe('what a desk keeps', () => {
  it('begins bare, or with the reader’s own reading', () => {
    expect(newDeskDraft(desk()).text).toBe('');
    expect(newDeskDraft(desk({ mine: { id: desk().id, text: 'LLKCB', at: '2026-03-02T10:00:00Z' } })).text).toBe('LLKCB');
  });
  it('is views and outlines photo by photo, as storage brings them back', () => {
    const region = { left: 0.1, top: 0.1, width: 0.2, height: 0.2 };
    const kept = withRegion(withView(newDeskDraft(desk()), 'a', VIEW), 'b', region);
    expect(DeskDraft.parse(JSON.parse(JSON.stringify(kept)))).toEqual(kept);
    expect(withRegion(kept, 'b', null).regions).toEqual({});
    expect(withRegion(kept, 'a', null).regions).toEqual({ b: region });
  });
});

describe('whose reading it is', () => {
  it('is said to the first, to a second who reads blind, to one who reads again, to the holder', () => {
    expect(sayStanding(desk())).toMatchObject({ title: 'Yours is the first reading', body: expect.stringContaining('Whoever reads it next') as string });
    expect(sayStanding(desk({ blind: true, isHolder: false }))).toMatchObject({ title: 'Yours is the first reading', body: expect.stringContaining('only the iron speaks') as string });
    expect(sayStanding(blindDesk()).body).toContain('without seeing what others read');
    expect(sayStanding(desk({ first: false, mine: { id: desk().id, text: 'L', at: '2026-03-02T10:00:00Z' } })).body).toContain('Your reading of 2 Mar 2026');
    expect(sayStanding(desk({ first: false })).body).toContain('it confirms nothing');
    expect(sayStanding(desk({ first: false, isHolder: false })).body).toContain('does not count as independent');
  });
});
