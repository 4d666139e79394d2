// @vitest-environment node
import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { IRON, THEMES } from '../../tailwind.config.ts';

/** Relative luminance and contrast ratio as WCAG 2.2 defines them (https://www.w3.org/TR/WCAG22/#dfn-contrast-ratio). */
function luminance(hex: string): number {
  const [red = 0, green = 0, blue = 0] = [1, 3, 5].map((at) => {
    const value = Number.parseInt(hex.slice(at, at + 2), 16) / 255;
    return value <= 0.04045 ? value / 12.92 : ((value + 0.055) / 1.055) ** 2.4;
  });
  return 0.2126 * red + 0.7152 * green + 0.0722 * blue;
}

function contrast(one: string, other: string): number {
  const [dark = 0, light = 0] = [luminance(one), luminance(other)].sort((a, b) => a - b);
  return (light + 0.05) / (dark + 0.05);
}

describe('the contrast formula', () => {
  it('gives the ratios the recommendation names', () => {
    expect(contrast('#000000', '#FFFFFF')).toBeCloseTo(21, 10);
    expect(contrast('#777777', '#FFFFFF')).toBeCloseTo(4.48, 2);
  });
});

const TEXT = ['graphite', 'slag', 'oxide', 'verdigris', 'straw', 'temper', 'scale'] as const;
const GROUNDS = ['sand', 'bed', 'paper'] as const;

describe.each(['light', 'dark'] as const)('the %s theme', (name) => {
  const theme = THEMES[name];
  it.each(TEXT.flatMap((text) => GROUNDS.map((ground) => [text, ground] as const)))('%s on %s is AA for text', (text, ground) => {
    expect(contrast(theme[text], theme[ground])).toBeGreaterThanOrEqual(4.5);
  });
  it('writes on the action colour in AA', () => {
    expect(contrast(theme.chalk, theme.oxide)).toBeGreaterThanOrEqual(4.5);
  });
  it.each(GROUNDS)('outlines fields and buttons visibly on %s (1.4.11)', (ground) => {
    expect(contrast(theme.edge, theme[ground])).toBeGreaterThanOrEqual(3);
  });
  it('has every token', () => {
    expect(Object.keys(theme)).toEqual(Object.keys(THEMES.light));
  });
});

describe('the plate', () => {
  const faces = [IRON['iron-lit'], IRON.iron, IRON['iron-deep']];
  it.each(faces)('shows figures, remarks and the lit tile on %s', (face) => {
    for (const written of [IRON.relief, IRON.scribe, IRON.lamp]) expect(contrast(written, face)).toBeGreaterThanOrEqual(4.5);
  });
});

describe('the client', () => {
  const files = readdirSync(new URL('../../client', import.meta.url), { recursive: true, withFileTypes: true })
    .filter((entry) => entry.isFile() && /\.(?:tsx?|css|svg)$/.test(entry.name))
    .map((entry) => join(entry.parentPath, entry.name));

  it('names no colour outside the tokens', () => {
    const known = new Set<string>([...Object.values(THEMES.light), ...Object.values(THEMES.dark), ...Object.values(IRON)]);
    const strange = files.flatMap((file) => (readFileSync(file, 'utf8').match(/#[0-9A-Fa-f]{6}\b|\b(?:rgb|hsl|oklch)a?\(/g) ?? []).filter((colour) => !known.has(colour)));
    expect(files.length).toBeGreaterThan(40);
    expect(strange).toEqual([]);
  });
});
