import { describe, expect, it } from 'vitest';
import { isOn, isProcessed, press, sayLook, toggleAsTaken, UNTOUCHED, withBrightness, withContrast } from '#client/features/reading/look.ts';
import { firstView, View } from '#client/features/reading/view.ts';
import { placed } from './samples.ts';

const say = (look = UNTOUCHED, mirrored = false) => sayLook(look, { mirrored, hasLight: true });

describe('what is done to the picture', () => {
  it('is nothing at first, and says so', () => {
    expect(isProcessed(UNTOUCHED)).toBe(false);
    expect(say()).toBe('As taken');
    expect(say(UNTOUCHED, true)).toBe('As taken, but mirrored');
  });

  it('is said in words, all of it', () => {
    const relief = press(UNTOUCHED, 'relief');
    expect(say(relief)).toBe('Relief, light from upper left');
    expect(say(press(relief, 'invert'), true)).toBe('Relief, light from upper left, inverted, mirrored');
    expect(say(withBrightness(press(UNTOUCHED, 'contrast'), 0.5))).toBe('More contrast, darker');
    expect(say(withContrast(UNTOUCHED, 0.6))).toBe('Less contrast');
    expect(sayLook(relief, { mirrored: false, hasLight: false })).toBe('Relief, as the register made it');
  });

  it('goes off with a second press, and the last one leaves the picture as taken', () => {
    const both = press(press(UNTOUCHED, 'relief'), 'invert');
    expect(isOn(both, 'relief')).toBe(true);
    const inverted = press(both, 'relief');
    expect(say(inverted)).toBe('Inverted');
    expect(press(inverted, 'invert')).toEqual(UNTOUCHED);
  });

  it('comes back as it was after a look at the picture as taken', () => {
    const made = withContrast(press(UNTOUCHED, 'relief'), 3);
    const taken = toggleAsTaken(made);
    expect(isProcessed(taken)).toBe(false);
    expect(isOn(taken, 'relief')).toBe(false);
    expect(toggleAsTaken(taken)).toEqual(made);
    expect(press(taken, 'contrast')).toEqual(made);
  });

  it('begins anew where from the picture as taken another tool is pressed', () => {
    expect(say(press(toggleAsTaken(press(UNTOUCHED, 'relief')), 'invert'))).toBe('Inverted');
  });

  it('has nothing to bring back where nothing was set', () => {
    expect(toggleAsTaken(UNTOUCHED)).toEqual(UNTOUCHED);
  });

  it('stays within what the sliders reach', () => {
    expect(withContrast(UNTOUCHED, 99).contrast).toBe(4);
    expect(withBrightness(UNTOUCHED, -1).brightness).toBe(0.3);
  });
});

describe('the view a photo opens with', () => {
  const STAGE = { width: 800, height: 400 };
  it('is all of it as taken where nobody has said where the mark stands', () => {
    expect(firstView(placed(), STAGE)).toMatchObject({ zoom: 1, turn: 0, mirrored: false, asTaken: true });
    expect(firstView(placed({ turn: 90, mirrored: true }), STAGE)).toMatchObject({ zoom: 1, turn: 90, mirrored: true });
  });
  it('is framed on the mark where somebody has, and may be kept as it is', () => {
    const view = firstView(placed({ region: { left: 0.6, top: 0.6, width: 0.1, height: 0.1 }, turn: -20 }), STAGE);
    expect(view.zoom).toBeGreaterThan(3);
    expect(view.centre.x).toBeCloseTo(0.65, 9);
    expect(View.parse(view)).toEqual(view);
  });
});
