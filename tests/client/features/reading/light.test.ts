import { describe, expect, it } from 'vitest';
import { lightAt, lightVector, LOWEST_LIGHT, normalAzimuth, onDial, sayHeight, saySide } from '#client/features/reading/light.ts';

/** How bright a matt facet is that leans towards the light by `lean` degrees: the cosine between its normal and the light (Lambert). */
function brightness(azimuth: number, elevation: number, lean: number): number {
  const light = lightVector({ azimuth, elevation });
  const around = (azimuth * Math.PI) / 180;
  const tilt = (lean * Math.PI) / 180;
  const normal = [Math.sin(tilt) * Math.sin(around), -Math.sin(tilt) * Math.cos(around), Math.cos(tilt)] as const;
  return light[0] * normal[0] + light[1] * normal[1] + light[2] * normal[2];
}

describe('the light', () => {
  it.each([
    [0, 30, [0, -0.8660254, 0.5]],
    [90, 30, [0.8660254, 0, 0.5]],
    [180, 60, [0, 0.5, 0.8660254]],
    [315, 45, [-0.5, -0.5, 0.7071068]],
    [0, 90, [0, 0, 1]],
  ])('at %d° round from the top and %d° high lies towards %j', (azimuth, elevation, vector) => {
    lightVector({ azimuth, elevation }).forEach((part, at) => expect(part).toBeCloseTo(vector[at] ?? Number.NaN, 6));
  });

  // Weber contrast of a facet that leans by 10°, under Lambert's law (Photometria, 1760): (sin(e + a) - sin e) / sin e. Recomputed by hand.
  it.each([
    [10, 0.9696],
    [15, 0.6329],
    [30, 0.2856],
    [60, 0.0851],
  ])('at %d° high gives a facet leaning by 10° the contrast %d', (elevation, contrast) => {
    for (const azimuth of [0, 45, 200]) {
      const level = brightness(azimuth, elevation, 0);
      expect((brightness(azimuth, elevation, 10) - level) / level).toBeCloseTo(contrast, 4);
    }
  });

  it.each([
    [0, 'the top'],
    [22, 'the top'],
    [23, 'upper right'],
    [90, 'the right'],
    [135, 'lower right'],
    [180, 'the bottom'],
    [225, 'lower left'],
    [270, 'the left'],
    [315, 'upper left'],
    [338, 'the top'],
    [359.9, 'the top'],
    [-45, 'upper left'],
  ])('from %d° is said to come from %s', (azimuth, side) => {
    expect(saySide({ azimuth, elevation: 30 })).toBe(side);
  });

  it('comes from no side when it stands over the iron', () => {
    expect(saySide({ azimuth: 90, elevation: 85 })).toBe('straight in front');
    expect(sayHeight({ azimuth: 0, elevation: 30.4 })).toBe('low, 30° above the surface');
    expect(sayHeight({ azimuth: 0, elevation: 12 })).toBe('grazing, 12° above the surface');
  });
});

describe('the dial', () => {
  it('has the lamp where the light is put, all round and at every height', () => {
    for (let azimuth = 0; azimuth < 360; azimuth += 15) {
      for (let elevation = LOWEST_LIGHT; elevation < 90; elevation += 10) {
        const light = lightAt(onDial({ azimuth, elevation }));
        expect(light.elevation).toBeCloseTo(elevation, 6);
        expect(normalAzimuth(light.azimuth - azimuth + 180)).toBeCloseTo(180, 6);
      }
    }
  });
  it('goes no lower than the rim allows, however far off the dial the finger is', () => {
    expect(lightAt({ x: 5, y: 0 })).toEqual({ azimuth: 90, elevation: LOWEST_LIGHT });
  });
  it('stands overhead in the middle', () => {
    expect(lightAt({ x: 0, y: 0 }).elevation).toBe(90);
  });
});
