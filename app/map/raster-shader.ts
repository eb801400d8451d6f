/**
 * Colours one-byte cells by a palette of 256, on the graphics card: a new frame is one upload of its bytes, a new
 * theme one upload of 1 kB. Cells whose ground byte is 0 are painted as water with a shoreline. Where cells are smaller
 * than pixels, several are averaged as colours, so that creeks do not break up.
 */
export const rasterVertex = `#version 300 es
precision highp float;
in vec2 aPosition;
in vec2 aUV;
out vec2 vCell;
out vec2 vPlace;
uniform mat3 uProjectionMatrix;
uniform mat3 uWorldTransformMatrix;
uniform mat3 uTransformMatrix;
void main() {
  mat3 toClip = uProjectionMatrix * uWorldTransformMatrix * uTransformMatrix;
  gl_Position = vec4((toClip * vec3(aPosition, 1.0)).xy, 0.0, 1.0);
  vCell = aUV; // in cells of this tile
  vPlace = aPosition; // in cells of the grid
}`;

export const rasterFragment = `#version 300 es
precision highp float;
precision highp int;
in vec2 vCell;
in vec2 vPlace;
out vec4 finalColor;
uniform sampler2D uTexels;
uniform sampler2D uGround;
uniform sampler2D uPalette;
uniform vec4 uWater;
uniform vec4 uShore;
uniform vec4 uStanding;
uniform float uHasGround;
uniform float uCellsPerPixel; // CSS px

ivec2 cellOf(vec2 place) {
  return clamp(ivec2(floor(place)), ivec2(0), textureSize(uTexels, 0) - 1);
}
bool isWater(vec2 place) {
  return uHasGround > 0.5 && texelFetch(uGround, cellOf(place), 0).r == 0.0;
}
vec4 colourAt(vec2 place) {
  if (isWater(place)) return uWater;
  int code = int(texelFetch(uTexels, cellOf(place), 0).r * 255.0 + 0.5);
  vec4 colour = texelFetch(uPalette, ivec2(code, 0), 0);
  if (colour.a > 0.25 && colour.a < 0.75) {
    float stripe = mod((vPlace.x + vPlace.y) / uCellsPerPixel, 7.0);
    return stripe < 2.0 ? uStanding : vec4(colour.rgb, 1.0);
  }
  return vec4(colour.rgb * colour.a, colour.a);
}
void main() {
  if (uCellsPerPixel > 0.75) {
    vec2 q = vec2(0.25, -0.25) * uCellsPerPixel;
    finalColor = 0.25 * (colourAt(vCell + q.xx) + colourAt(vCell + q.xy) + colourAt(vCell + q.yx) + colourAt(vCell + q.yy));
    return;
  }
  finalColor = colourAt(vCell);
  if (uHasGround > 0.5 && finalColor == uWater) {
    vec2 d = vec2(1.1 * uCellsPerPixel, 0.0);
    if (!isWater(vCell + d.xy) || !isWater(vCell - d.xy) || !isWater(vCell + d.yx) || !isWater(vCell - d.yx))
      finalColor = uShore;
  }
}`;
