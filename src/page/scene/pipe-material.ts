import { DataTexture, GLSL3, NearestFilter, NormalBlending, RawShaderMaterial, RGBAFormat, Vector3 } from 'three';

/** Values that all materials of the scene share by reference: the section box and the size of a pixel. */
export interface SharedUniforms {
  readonly clipMin: { value: Vector3 };
  readonly clipMax: { value: Vector3 };
  /** Metres that one pixel covers at one metre from the eye. */
  readonly pixel: { value: number };
  /** Metres between two marks of a pattern. */
  readonly period: { value: number };
  readonly light: { value: number };
}

export const sharedUniforms = (): SharedUniforms => ({
  clipMin: { value: new Vector3(-1e9, -1e9, -1e9) },
  clipMax: { value: new Vector3(1e9, 1e9, 1e9) },
  pixel: { value: 0.001 },
  period: { value: 0.3 },
  light: { value: 1 },
});

const paintWidth = 1024;

/** Colour and pattern of each section: one texel in a texture, so that a new colouring rewrites no geometry. */
export interface Paint {
  readonly texture: DataTexture;
  /** `rgb` 0 to 255; hidden sections are not drawn at all. */
  set(section: number, rgb: readonly [number, number, number], pattern: number, hidden: boolean): void;
  commit(): void;
}

export function paintOf(count: number): Paint {
  const height = Math.max(1, Math.ceil(count / paintWidth));
  const bytes = new Uint8Array(paintWidth * height * 4);
  const texture = new DataTexture(bytes, paintWidth, height, RGBAFormat);
  texture.magFilter = NearestFilter;
  texture.minFilter = NearestFilter;
  texture.needsUpdate = true;
  return {
    texture,
    set(section, rgb, pattern, hidden) {
      const at = section * 4;
      bytes[at] = rgb[0];
      bytes[at + 1] = rgb[1];
      bytes[at + 2] = rgb[2];
      // The fourth byte is no opacity: 0 hides, else it is the pattern's number plus one.
      bytes[at + 3] = hidden ? 0 : pattern + 1;
    },
    commit() {
      texture.needsUpdate = true;
    },
  };
}

export interface TubeLook {
  /** Times the pipe's own radius. */
  readonly grow: number;
  /** Never thinner on the screen than so many pixels (radius). */
  readonly leastPixels: number;
  /** Pixels added to the radius. */
  readonly morePixels: number;
  readonly alpha: number;
  /** Fades toward the outline, as light around a wire does. */
  readonly halo: boolean;
}

/** Tubes coloured by the paint texture. `look` makes the plain pipe, the lit core or the light around it. */
export function pipeMaterial(paint: Paint, shared: SharedUniforms, look: TubeLook): RawShaderMaterial {
  const clear = look.alpha < 1 || look.halo;
  return new RawShaderMaterial({
    glslVersion: GLSL3,
    vertexShader,
    fragmentShader,
    side: look.halo ? 0 : 2,
    transparent: clear,
    depthWrite: !clear,
    blending: NormalBlending,
    uniforms: {
      ...shared,
      paint: { value: paint.texture },
      grow: { value: look.grow },
      leastPixels: { value: look.leastPixels },
      morePixels: { value: look.morePixels },
      alpha: { value: look.alpha },
      halo: { value: look.halo ? 1 : 0 },
    },
  });
}

/** The same colours on plain lines, for models so large that tubes would stutter while the eye moves. */
export function pipeLineMaterial(paint: Paint, shared: SharedUniforms): RawShaderMaterial {
  return new RawShaderMaterial({
    glslVersion: GLSL3,
    vertexShader: lineVertexShader,
    fragmentShader: lineFragmentShader,
    uniforms: { ...shared, paint: { value: paint.texture } },
  });
}

const lineVertexShader = /* glsl */ `
precision highp float;
precision highp int;
in vec3 position; in float section;
uniform mat4 modelViewMatrix, projectionMatrix;
uniform highp sampler2D paint;
out vec3 vPlace; flat out vec3 vColour;
void main() {
  int row = int(section + 0.5);
  vec4 colour = texelFetch(paint, ivec2(row % ${paintWidth}, row / ${paintWidth}), 0);
  vColour = colour.rgb;
  vPlace = position;
  gl_Position = colour.a == 0.0 ? vec4(2.0, 2.0, 2.0, 1.0) : projectionMatrix * modelViewMatrix * vec4(position, 1.0);
}`;

const lineFragmentShader = /* glsl */ `
precision highp float;
in vec3 vPlace; flat in vec3 vColour;
uniform vec3 clipMin, clipMax;
out vec4 outColour;
void main() {
  if (any(lessThan(vPlace, clipMin)) || any(greaterThan(vPlace, clipMax))) discard;
  outColour = vec4(vColour, 1.0);
}`;

const vertexShader = /* glsl */ `
precision highp float;
precision highp int;
in vec3 position; in vec4 normal; in float radius; in float along; in float section;
uniform mat4 modelViewMatrix, projectionMatrix, modelMatrix;
uniform mat3 normalMatrix;
uniform highp sampler2D paint;
uniform float grow, leastPixels, morePixels, pixel;
out vec3 vNormal; out vec3 vPlace; out float vAlong; out float vDepth;
flat out vec3 vColour; flat out int vPattern;
void main() {
  int row = int(section + 0.5);
  vec4 colour = texelFetch(paint, ivec2(row % ${paintWidth}, row / ${paintWidth}), 0);
  int code = int(colour.a * 255.0 + 0.5);
  if (code == 0) {
    gl_Position = vec4(2.0, 2.0, 2.0, 1.0);
    return;
  }
  vColour = colour.rgb;
  vPattern = code - 1;
  vec4 axis = modelViewMatrix * vec4(position, 1.0);
  float perPixel = pixel * max(0.05, -axis.z);
  float r = max(radius * grow, leastPixels * perPixel) + morePixels * perPixel;
  vNormal = normalize(normalMatrix * normal.xyz);
  vec4 place = axis + vec4(vNormal * r, 0.0);
  vPlace = position + normalize(normal.xyz) * radius;
  vAlong = along;
  vDepth = -place.z;
  gl_Position = projectionMatrix * place;
}`;

// Patterns are the second sign beside colour: 1 dashes, 2 rings, 3 dots, 4 long and short.
const fragmentShader = /* glsl */ `
precision highp float;
precision highp int;
in vec3 vNormal; in vec3 vPlace; in float vAlong; in float vDepth;
flat in vec3 vColour; flat in int vPattern;
uniform vec3 clipMin, clipMax;
uniform float alpha, halo, period, pixel, light;
out vec4 outColour;
void main() {
  if (any(lessThan(vPlace, clipMin)) || any(greaterThan(vPlace, clipMax))) discard;
  vec3 n = normalize(vNormal);
  float facing = abs(n.z);
  if (halo > 0.5) {
    outColour = vec4(vColour, alpha * facing * facing * facing);
    return;
  }
  vec3 colour = vColour;
  float t = fract(vAlong / period);
  // Where a mark would be thinner than two pixels it would only flicker.
  float clear = clamp(period / (pixel * vDepth) / 8.0 - 0.5, 0.0, 1.0);
  vec3 other = mix(colour, vec3(light > 0.5 ? 1.0 : 0.06), 0.62);
  float mark = 0.0;
  if (vPattern == 1) mark = step(0.55, t);
  else if (vPattern == 2) mark = step(0.8, t);
  else if (vPattern == 3) mark = step(0.5, fract(t * 3.0));
  else if (vPattern == 4) mark = step(0.5, t) * (1.0 - step(0.62, t)) + step(0.76, t) * (1.0 - step(0.88, t));
  colour = mix(colour, other, mark * clear);
  float sun = 0.5 + 0.5 * dot(n, normalize(vec3(-0.35, 0.65, 0.67)));
  float shade = 0.62 + 0.44 * sun;
  if (!gl_FrontFacing) shade *= 0.6;
  outColour = vec4(colour * min(shade, 1.08), alpha);
}`;
