import type { IfcAPI, LocateFileHandlerFn } from 'web-ifc';
import { type Finding, finding, type WithFindings } from '../../findings/finding.ts';
import { InputError } from '../../findings/input-error.ts';
import type { Vec3 } from '../../geometry/vector.ts';

/** Triangles of one element, z up, in metres from the origin that was asked for. */
export interface ElementMesh {
  readonly stepId: number;
  /** Flat x, y, z. */
  readonly positions: Float32Array;
  /** Three corners a triangle. */
  readonly indices: Uint32Array;
}

export interface MeshOptions {
  /** World point that becomes 0, 0, 0: models far from their origin keep their millimetres. */
  readonly origin: Vec3;
  /** Corners of a circle; 12 where nothing is said. */
  readonly circleSegments?: number;
  /** Where the host keeps the wasm file; Node finds it by itself. */
  readonly locate?: LocateFileHandlerFn;
}

/**
 * Triangles of elements for pictures, in the order of `stepIds`; elements without a shape are left out. The only place
 * that loads web-ifc. Throws an InputError where the file cannot be opened; an element whose shape cannot be made
 * gives a finding, and the others go on.
 */
export async function meshesOf(
  name: string,
  bytes: Uint8Array,
  stepIds: readonly number[],
  options: MeshOptions,
): Promise<WithFindings<readonly ElementMesh[]>> {
  const meshes: ElementMesh[] = [];
  const unreadable: number[] = [];
  let next = 0;
  while (next < stepIds.length) {
    const api = await engine(options.locate);
    const model = open(api, name, bytes, options);
    try {
      for (; next < stepIds.length; next++) {
        const stepId = stepIds[next]!;
        const mesh = triangles(api, model, stepId, options.origin);
        if (mesh === 'not finite') unreadable.push(stepId);
        else if (mesh !== null) meshes.push(mesh);
      }
    } catch (error) {
      if (!isEngineFault(error)) throw error;
      // A shape that the engine breaks on leaves its memory in doubt: the rest goes on in a fresh one.
      unreadable.push(stepIds[next]!);
      next++;
      running = null;
      if (unreadable.length > mostBreaks) {
        unreadable.push(...stepIds.slice(next));
        break;
      }
    } finally {
      close(api, model);
    }
  }
  return { value: meshes, findings: unreadable.length === 0 ? [] : [unreadableShapes(name, unreadable)] };
}

/** Shapes that may break the engine before it is given up. */
const mostBreaks = 10;

/** The engine takes a twentieth of a second and a hundred megabytes to start: one serves all calls. */
let running: Promise<IfcAPI> | null = null;

function engine(locate: LocateFileHandlerFn | undefined): Promise<IfcAPI> {
  running ??= start(locate);
  return running;
}

async function start(locate: LocateFileHandlerFn | undefined): Promise<IfcAPI> {
  const { IfcAPI, LogLevel } = await import('web-ifc');
  const api = new IfcAPI();
  await api.Init(locate, true);
  api.SetLogLevel(LogLevel.LOG_LEVEL_OFF);
  return api;
}

function open(api: IfcAPI, name: string, bytes: Uint8Array, { circleSegments = 12 }: MeshOptions): number {
  const refused = 'the shapes in the file cannot be read';
  let model = -1;
  try {
    model = api.OpenModel(bytes, { CIRCLE_SEGMENTS: circleSegments });
  } catch (cause) {
    running = null;
    const isFull = !(cause instanceof TypeError);
    const problem = isFull
      ? `${refused}: it needs more memory than a picture may take`
      : `${refused}: its header is not understood`;
    throw new InputError(name, problem, { cause });
  }
  if (model < 0) throw new InputError(name, `${refused}: the text is damaged or the schema unknown`);
  return model;
}

function close(api: IfcAPI, model: number): void {
  try {
    api.CloseModel(model);
  } catch {
    // The engine is broken; `running` is null already or will be at the next call.
    running = null;
  }
}

/** What web-ifc's compiled code throws when a shape is too much for it; anything else is our own fault. */
const isEngineFault = (error: unknown): boolean =>
  error instanceof WebAssembly.RuntimeError || error instanceof WebAssembly.Exception || error instanceof RangeError;

function triangles(api: IfcAPI, model: number, stepId: number, origin: Vec3): ElementMesh | 'not finite' | null {
  // The list itself is a plain object, whatever its type says: only geometries are to be freed.
  const flat = api.GetFlatMesh(model, stepId);
  const positions: number[] = [];
  const indices: number[] = [];
  for (let k = 0; k < flat.geometries.size(); k++) {
    const placed = flat.geometries.get(k);
    const geometry = api.GetGeometry(model, placed.geometryExpressID);
    const vertices = api.GetVertexArray(geometry.GetVertexData(), geometry.GetVertexDataSize());
    const corners = api.GetIndexArray(geometry.GetIndexData(), geometry.GetIndexDataSize());
    geometry.delete();
    const first = positions.length / 3;
    const t = placed.flatTransformation;
    if (!t.every(Number.isFinite)) return 'not finite';
    for (let i = 0; i + 5 < vertices.length; i += floatsPerVertex) {
      const [x, y, z] = [vertices[i]!, vertices[i + 1]!, vertices[i + 2]!];
      // The engine's y is up: IFC's z is its y, IFC's y its -z. In doubles until the origin is taken off.
      positions.push(
        t[0]! * x + t[4]! * y + t[8]! * z + t[12]! - origin[0],
        -(t[2]! * x + t[6]! * y + t[10]! * z + t[14]!) - origin[1],
        t[1]! * x + t[5]! * y + t[9]! * z + t[13]! - origin[2],
      );
    }
    for (let i = 0; i < corners.length; i++) indices.push(first + corners[i]!);
  }
  if (indices.length === 0) return null;
  const float = Float32Array.from(positions);
  return float.every(Number.isFinite) ? { stepId, positions: float, indices: Uint32Array.from(indices) } : 'not finite';
}

/** Position and normal. */
const floatsPerVertex = 6;
const listed = 10;

function unreadableShapes(file: string, stepIds: readonly number[]): Finding {
  const ids = stepIds.slice(0, listed).map((id) => `#${id}`);
  return finding('file-damaged', [], { file, problem: 'shape-unreadable', count: stepIds.length, ids });
}
