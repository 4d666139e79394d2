/** Takes the corners of the picture, 0 to 1, to where they lie on the stage. */
export const VERTEX_SHADER = /* glsl */ `#version 300 es
in vec2 corner;
uniform mat3 lie;
out vec2 place;

void main() {
  place = corner;
  gl_Position = vec4((lie * vec3(corner, 1.0)).xy, 0.0, 1.0);
}
`;

/**
 * The picture as taken; or its relief. For the relief the brightness of the picture is taken for the height of the iron: its slope comes from
 * a Sobel operator over a slightly blurred picture (a coarser mip level, as wide as the operator's own step), and the facet that slopes so is
 * shaded as a matt surface, by the cosine of its angle to the light (Lambert), exposed so that level iron is middle grey. Slope and light are
 * both as seen on the stage, so the light stays where it is while the picture is turned. Paint, rust and stains are brightness and
 * no height: they look raised or sunk all the same.
 *
 * Then brightness and contrast as CSS has them, and inversion.
 */
export const FRAGMENT_SHADER = /* glsl */ `#version 300 es
precision highp float;
in vec2 place;
uniform sampler2D picture;
/** One step of the operator to the right and down on the stage, in shares of the picture; and the mip level as coarse as that step. */
uniform vec2 stepRight;
uniform vec2 stepDown;
uniform float level;
uniform bool relief;
/** Towards the lamp: right, down, out of the stage. */
uniform vec3 light;
uniform float depth;
uniform float brightness;
uniform float contrast;
uniform bool inverted;
out vec4 colour;

float heightAt(vec2 by) {
  // Rec. 709 weights.
  return dot(textureLod(picture, place + by, level).rgb, vec3(0.2126, 0.7152, 0.0722));
}

float shadeOfRelief() {
  float upperLeft = heightAt(-stepRight - stepDown);
  float upper = heightAt(-stepDown);
  float upperRight = heightAt(stepRight - stepDown);
  float left = heightAt(-stepRight);
  float right = heightAt(stepRight);
  float lowerLeft = heightAt(stepDown - stepRight);
  float lower = heightAt(stepDown);
  float lowerRight = heightAt(stepRight + stepDown);
  vec2 slope = vec2(
    (upperRight + 2.0 * right + lowerRight) - (upperLeft + 2.0 * left + lowerLeft),
    (lowerLeft + 2.0 * lower + lowerRight) - (upperLeft + 2.0 * upper + upperRight)
  ) / 8.0;
  vec3 normal = normalize(vec3(-depth * slope, 1.0));
  return 0.5 * max(0.0, dot(normal, light)) / light.z;
}

void main() {
  vec3 seen = relief ? vec3(shadeOfRelief()) : texture(picture, place).rgb;
  seen = (seen * brightness - 0.5) * contrast + 0.5;
  seen = clamp(seen, 0.0, 1.0);
  colour = vec4(inverted ? 1.0 - seen : seen, 1.0);
}
`;
