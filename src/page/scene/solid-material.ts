import { Color, GLSL3, RawShaderMaterial } from 'three';
import type { SharedUniforms } from './pipe-material.ts';

export interface SolidMaterial extends RawShaderMaterial {
  readonly uniforms: { readonly colour: { value: Color }; readonly alpha: { value: number } };
}

/** Lit from the eye's left shoulder, one colour; cut by the section box like everything else. */
export function solidMaterial(shared: SharedUniforms, clear: boolean): SolidMaterial {
  return new RawShaderMaterial({
    glslVersion: GLSL3,
    vertexShader: solidVertex,
    fragmentShader: solidFragment,
    side: 2,
    transparent: clear,
    depthWrite: !clear,
    uniforms: { ...shared, colour: { value: new Color() }, alpha: { value: 1 } },
  }) as SolidMaterial;
}

/** Plain lines of one colour. */
export function lineMaterial(shared: SharedUniforms): SolidMaterial {
  return new RawShaderMaterial({
    glslVersion: GLSL3,
    vertexShader: lineVertex,
    fragmentShader: lineFragment,
    transparent: true,
    depthWrite: false,
    uniforms: { ...shared, colour: { value: new Color() }, alpha: { value: 1 } },
  }) as SolidMaterial;
}

const solidVertex = /* glsl */ `
precision highp float;
in vec3 position, normal;
uniform mat4 modelViewMatrix, projectionMatrix;
uniform mat3 normalMatrix;
out vec3 vNormal; out vec3 vPlace;
void main() {
  vNormal = normalMatrix * normal;
  vPlace = position;
  gl_Position = projectionMatrix * modelViewMatrix * vec4(position, 1.0);
}`;

const solidFragment = /* glsl */ `
precision highp float;
in vec3 vNormal; in vec3 vPlace;
uniform vec3 clipMin, clipMax, colour;
uniform float alpha;
out vec4 outColour;
void main() {
  if (any(lessThan(vPlace, clipMin)) || any(greaterThan(vPlace, clipMax))) discard;
  vec3 n = normalize(vNormal);
  if (!gl_FrontFacing) n = -n;
  float sun = 0.5 + 0.5 * dot(n, normalize(vec3(-0.35, 0.65, 0.67)));
  outColour = vec4(colour * min(0.55 + 0.47 * sun, 1.0), alpha);
}`;

const lineVertex = /* glsl */ `
precision highp float;
in vec3 position;
uniform mat4 modelViewMatrix, projectionMatrix;
out vec3 vPlace;
void main() {
  vPlace = position;
  gl_Position = projectionMatrix * modelViewMatrix * vec4(position, 1.0);
}`;

const lineFragment = /* glsl */ `
precision highp float;
in vec3 vPlace;
uniform vec3 clipMin, clipMax, colour;
uniform float alpha;
out vec4 outColour;
void main() {
  if (any(lessThan(vPlace, clipMin)) || any(greaterThan(vPlace, clipMax))) discard;
  outColour = vec4(colour, alpha);
}`;
