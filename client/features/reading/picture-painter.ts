import { createBufferInfoFromArrays, createProgramInfo, createTexture, drawBufferInfo, setBuffersAndAttributes, setUniforms } from 'twgl.js';
import { lightVector } from './light.ts';
import { isProcessed, UNTOUCHED } from './look.ts';
import { FRAGMENT_SHADER, VERTEX_SHADER } from './picture-shaders.ts';
import { matrixOf, wayOnPicture } from './stage-geometry.ts';
import type { Matrix, Size } from './stage-geometry.ts';
import type { View } from './view.ts';

/** How steep a slope of the brightness is taken to be; by eye, on lettering lit from a side. */
const DEPTH = 7;

export type Painter = {
  /** The longest side a picture may have here, in pixels. */
  readonly longestSide: number;
  /** Takes a picture to where it is drawn from; the one before it is let go. */
  readonly takePicture: (picture: ImageBitmap) => void;
  /** Draws the picture taken last, of whatever size, as if it were `picture` pixels large; nothing before there is one. */
  readonly draw: (view: View, picture: Size, stage: Size, pixelRatio: number) => void;
  readonly letGo: () => void;
};

/** Draws a picture on a canvas through WebGL 2; null where the browser has none to give. */
export function createPainter(canvas: HTMLCanvasElement): Painter | null {
  const gl = canvas.getContext('webgl2', { alpha: true, antialias: false, depth: false });
  if (gl === null) return null;
  const program = createProgramInfo(gl, [VERTEX_SHADER, FRAGMENT_SHADER]);
  const corners = createBufferInfoFromArrays(gl, { corner: { numComponents: 2, data: [0, 0, 1, 0, 0, 1, 1, 1] } });
  let taken: { readonly texture: WebGLTexture; readonly width: number } | null = null;

  return {
    longestSide: Number(gl.getParameter(gl.MAX_TEXTURE_SIZE)),
    takePicture: (picture) => {
      if (taken !== null) gl.deleteTexture(taken.texture);
      // The coarser levels are made here, once: left to itself the library makes them twice, which for 12 megapixels can be seen.
      const texture = createTexture(gl, { src: picture, min: gl.LINEAR_MIPMAP_LINEAR, mag: gl.LINEAR, wrap: gl.CLAMP_TO_EDGE, auto: false });
      gl.bindTexture(gl.TEXTURE_2D, texture);
      gl.generateMipmap(gl.TEXTURE_2D);
      taken = { texture, width: picture.width };
    },
    draw: (view, picture, stage, pixelRatio) => {
      if (taken === null) return;
      const width = Math.round(stage.width * pixelRatio);
      const height = Math.round(stage.height * pixelRatio);
      if (canvas.width !== width || canvas.height !== height) Object.assign(canvas, { width, height });
      gl.viewport(0, 0, width, height);
      gl.clearColor(0, 0, 0, 0);
      gl.clear(gl.COLOR_BUFFER_BIT);
      gl.useProgram(program.program);
      setBuffersAndAttributes(gl, program, corners);
      setUniforms(program, { ...uniformsOf(view, picture, stage, { ofPicture: taken.width / picture.width, ofStage: pixelRatio }), picture: taken.texture });
      drawBufferInfo(gl, corners, gl.TRIANGLE_STRIP);
    },
    letGo: () => {
      if (taken !== null) gl.deleteTexture(taken.texture);
      taken = null;
      gl.deleteProgram(program.program);
    },
  };
}

/** `ofPicture`: pixels of the texture for one of the picture. `ofStage`: pixels of the screen for one of CSS. */
type Density = { readonly ofPicture: number; readonly ofStage: number };

function uniformsOf(view: View, picture: Size, stage: Size, density: Density) {
  const look = isProcessed(view) ? view : UNTOUCHED;
  const matrix = matrixOf(view, picture, stage);
  const texelsOfStage = density.ofPicture / Math.hypot(matrix[0], matrix[1]);
  // Neither finer than the texture nor finer than the screen.
  const texels = Math.max(1, texelsOfStage / density.ofStage) * 2 ** look.smoothing;
  const step = texels / texelsOfStage;
  const right = wayOnPicture(view, picture, stage, { x: step, y: 0 });
  const down = wayOnPicture(view, picture, stage, { x: 0, y: step });
  return {
    lie: clipOf(matrix, picture, stage),
    stepRight: [right.x, right.y],
    stepDown: [down.x, down.y],
    level: Math.log2(texels),
    relief: look.relief,
    light: lightVector(look.light),
    depth: DEPTH,
    brightness: look.brightness,
    contrast: look.contrast,
    inverted: look.inverted,
  };
}

/** From shares of the picture to WebGL's own square, which goes from -1 to 1 and upwards; column by column. */
function clipOf([a, b, c, d, e, f]: Matrix, picture: Size, stage: Size): number[] {
  const [x, y] = [2 / stage.width, -2 / stage.height];
  return [a * picture.width * x, b * picture.width * y, 0, c * picture.height * x, d * picture.height * y, 0, e * x - 1, f * y + 1, 1];
}
