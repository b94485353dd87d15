import { Color, GLSL3, Group, Mesh, RawShaderMaterial } from 'three';
import type { Building } from '../building.ts';
import type { Rgb, Theme } from '../colours.ts';
import type { Follow } from '../state.ts';
import type { SharedUniforms } from './pipe-material.ts';
import { jointPoint, lengthOf, type Point, type Polyline } from './polylines.ts';
import { type Tube, tubeGeometry } from './tubes.ts';

/** The way of one fixture's water to the sewer, or of its trap's air to the sky, section by section. */
export interface Way {
  readonly sections: readonly number[];
  /** Points of each section in the order of the way. */
  readonly points: readonly (readonly Point[])[];
  /** Metres from the start of the way to the start of each section; one more at the end. */
  readonly start: readonly number[];
  /** Air: false where the way stops short of open air. */
  readonly whole: boolean;
}

export function wayOf(building: Building, polylines: readonly (Polyline | null)[], follow: Follow): Way {
  const air = building.air(follow.fixture);
  const sections = follow.what === 'water' ? building.water(follow.fixture) : [...air.arm, ...air.through, ...air.dry];
  const points: Point[][] = [];
  const start = [0];
  let last: Point | null = null;
  sections.forEach((section, place) => {
    const own = [...(polylines[section]?.points ?? [])];
    if (own.length > 1 && turned(building, section, own, last, sections[place + 1])) own.reverse();
    points.push(own);
    start.push(start[place]! + lengthOf(own));
    last = own.at(-1) ?? last;
  });
  return { sections, points, start, whole: follow.what === 'water' || air.vented };
}

/** Whether the way runs against the order of the section's points. */
function turned(
  building: Building,
  section: number,
  own: readonly Point[],
  last: Point | null,
  next: number | undefined,
): boolean {
  const { pipes } = building.data.scene;
  const ends = [pipes.jointA[section]!, pipes.jointB[section]!] as const;
  if (next !== undefined) {
    const after = [pipes.jointA[next]!, pipes.jointB[next]!];
    const [a, b] = [after.includes(ends[0]), after.includes(ends[1])];
    if (a !== b) return a;
  }
  if (last !== null) {
    const gap = (point: Point): number => Math.hypot(point[0] - last[0], point[1] - last[1], point[2] - last[2]);
    return gap(own.at(-1)!) < gap(own[0]!);
  }
  return building.data.scene.paths.flow[section] === -1;
}

export interface Route {
  readonly group: Group;
  show(way: Way | null, what: Follow['what'], step: number, theme: Theme): void;
  /** Seconds; moves the marks along. */
  setTime(seconds: number): void;
  dispose(): void;
}

/** Draws a way: what the pipe must be as a solid core, what is modelled as a shell, marks running along it. */
export function routeOf(building: Building, shared: SharedUniforms): Route {
  const group = new Group();
  const core = new Mesh(undefined, routeMaterial(shared, 1));
  const small = new Mesh(undefined, routeMaterial(shared, 1));
  const shell = new Mesh(undefined, routeMaterial(shared, 0.22));
  const marker = new Mesh(undefined, routeMaterial(shared, 1));
  const meshes = [core, small, shell, marker];
  meshes.forEach((mesh, order) => {
    mesh.frustumCulled = false;
    mesh.renderOrder = 30 + order;
    mesh.visible = false;
    group.add(mesh);
  });
  return {
    group,
    show(way, what, step, theme) {
      for (const mesh of meshes) mesh.visible = way !== null && way.sections.length > 0;
      if (way === null) return;
      const colour: Rgb = what === 'water' ? theme.water : theme.air;
      const tube = (wanted: (section: number) => boolean, radius: (section: number) => number): Tube[] =>
        way.sections.flatMap((section, place) => {
          const points = way.points[place]!;
          return points.length < 2 || !wanted(section)
            ? []
            : [{ section, points, radius: radius(section), alongFrom: way.start[place]! }];
        });
      const isSmall = (section: number): boolean =>
        what === 'water' && building.state(section)?.verdict === 'undersized';
      const width = (section: number): number =>
        (what === 'water' ? building.needRadius[section]! : building.radius[section]!) * 0.94;
      replace(
        core,
        tube((section) => !isSmall(section), width),
      );
      replace(small, tube(isSmall, width));
      replace(
        shell,
        tube(
          () => true,
          (section) => building.radius[section]! * 1.3,
        ),
      );
      const at = way.points[step]?.at(-1) ?? way.points.at(-1)?.at(-1);
      const radius = (building.radius[way.sections[step] ?? -1] ?? 0.05) * 2.1;
      marker.geometry.dispose();
      marker.geometry = tubeGeometry([], at === undefined ? [] : [{ section: 0, at, radius }], round);
      marker.visible = at !== undefined;
      for (const mesh of meshes) {
        const { uniforms } = mesh.material;
        const [r, g, b] = mesh === small ? theme.undersized : colour;
        uniforms.colour!.value.setRGB(r / 255, g / 255, b / 255);
        uniforms.marks!.value = mesh === core || mesh === small ? 1 : 0;
        uniforms.reached!.value = way.start[step + 1] ?? way.start.at(-1) ?? 0;
      }
    },
    setTime(seconds) {
      for (const mesh of [core, small]) mesh.material.uniforms.time!.value = seconds;
    },
    dispose() {
      for (const mesh of meshes) {
        mesh.geometry.dispose();
        mesh.material.dispose();
      }
    },
  };
}

/** Where the trap of a fixture sits, or where its outlet is. */
export function trapPoint(building: Building, fixture: number): Point | null {
  const joint = building.data.scene.paths.trapJoint[fixture] ?? -1;
  return joint < 0 ? null : jointPoint(building, joint);
}

const round = { tube: 14, ball: 16 };

function replace(mesh: Mesh, tubes: readonly Tube[]): void {
  mesh.geometry.dispose();
  mesh.geometry = tubeGeometry(tubes, [], round);
}

function routeMaterial(shared: SharedUniforms, alpha: number): RawShaderMaterial {
  return new RawShaderMaterial({
    glslVersion: GLSL3,
    vertexShader: routeVertex,
    fragmentShader: routeFragment,
    transparent: true,
    depthWrite: alpha === 1,
    depthTest: true,
    uniforms: {
      ...shared,
      colour: { value: new Color() },
      alpha: { value: alpha },
      marks: { value: 0 },
      reached: { value: 0 },
      time: { value: 0 },
    },
  });
}

const routeVertex = /* glsl */ `
precision highp float;
in vec3 position; in vec4 normal; in float radius; in float along;
uniform mat4 modelViewMatrix, projectionMatrix;
uniform mat3 normalMatrix;
uniform float pixel;
out vec3 vNormal; out float vAlong; out float vDepth;
void main() {
  vec4 axis = modelViewMatrix * vec4(position, 1.0);
  vNormal = normalize(normalMatrix * normal.xyz);
  float r = max(radius, 2.0 * pixel * max(0.05, -axis.z));
  vec4 place = axis + vec4(vNormal * r, 0.0);
  vAlong = along;
  vDepth = -place.z;
  gl_Position = projectionMatrix * place;
}`;

// The marks are comets: bright head, fading tail, so that even a still picture tells which way things run.
const routeFragment = /* glsl */ `
precision highp float;
in vec3 vNormal; in float vAlong; in float vDepth;
uniform vec3 colour;
uniform float alpha, marks, reached, time, pixel, light;
out vec4 outColour;
void main() {
  vec3 n = normalize(vNormal);
  float shade = 0.66 + 0.4 * (0.5 + 0.5 * dot(n, normalize(vec3(-0.35, 0.65, 0.67))));
  vec3 tone = colour;
  if (marks > 0.5) {
    float length = max(0.5, 46.0 * pixel * vDepth);
    float comet = fract(vAlong / length - time);
    tone = mix(colour * (light > 0.5 ? 0.72 : 0.45), mix(colour, vec3(1.0), 0.42), comet * comet * comet);
    if (vAlong > reached) tone = mix(tone, vec3(light > 0.5 ? 0.93 : 0.12), 0.62);
  }
  outColour = vec4(tone * min(shade, 1.1), alpha);
}`;
