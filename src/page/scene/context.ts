import { Group, LineSegments, Mesh } from 'three';
import type { Building } from '../building.ts';
import type { Rgb, Theme } from '../colours.ts';
import { fabricShape } from './fabric-shape.ts';
import { fixtureShape } from './fixture-shape.ts';
import { lineGeometry } from './mesh-draft.ts';
import type { SharedUniforms } from './pipe-material.ts';
import { lineMaterial, type SolidMaterial, solidMaterial } from './solid-material.ts';

/** The quiet building round the piping: walls, floors, fixtures. */
export interface Context {
  readonly group: Group;
  show(theme: Theme, shown: boolean, chosenFixture: number | null): void;
  /** While the eye moves on a slow machine, large translucent faces are left out and edges stay. */
  setCheap(cheap: boolean): void;
  dispose(): void;
}

/** More fixtures, or bodies with their edges, than this are left out while the eye moves on a slow machine. */
const manyFixtures = 300;
const manyBodies = 600;

export function contextOf(building: Building, shared: SharedUniforms): Context {
  const group = new Group();
  const fabric = fabricShape(building);
  const walls = new Mesh(fabric.walls.geometry(), solidMaterial(shared, true));
  const floors = new Mesh(fabric.floors.geometry(), solidMaterial(shared, true));
  const edges = new LineSegments(lineGeometry(fabric.edges), lineMaterial(shared));
  const fixtures = new Mesh(undefined, solidMaterial(shared, false));
  const chosen = new Mesh(undefined, solidMaterial(shared, false));
  chosen.renderOrder = 1; // over the same fixture in white
  floors.renderOrder = 5;
  walls.renderOrder = 6;
  edges.renderOrder = 7;
  for (const mesh of [fixtures, chosen, floors, walls, edges]) {
    mesh.frustumCulled = false;
    group.add(mesh);
  }
  let [shownFixture, built] = [null as number | null, false];
  chosen.visible = false;
  return {
    group,
    show(theme, shown, fixture) {
      tint(walls.material, theme.wall, theme.name === 'light' ? 0.22 : 0.07);
      tint(floors.material, theme.wall, theme.name === 'light' ? 0.16 : 0.05);
      tint(edges.material, theme.edge, theme.name === 'light' ? 0.34 : 0.3);
      tint(fixtures.material, theme.fixture, 1);
      tint(chosen.material, theme.chosen, 1);
      walls.visible = floors.visible = edges.visible = shown;
      if (fixture === shownFixture) return;
      shownFixture = fixture;
      chosen.geometry.dispose();
      chosen.geometry = fixtureShape(building, (row) => row === fixture).geometry();
      chosen.visible = fixture !== null;
    },
    setCheap(cheap) {
      walls.material.visible = !cheap;
      floors.material.visible = !cheap;
      edges.material.visible = !cheap || building.data.scene.fabric.kind.length <= manyBodies;
      fixtures.visible = !cheap || building.result.fixtures.length <= manyFixtures;
      if (!fixtures.visible || built) return;
      built = true;
      fixtures.geometry = fixtureShape(building, () => true).geometry();
    },
    dispose() {
      for (const mesh of [walls, floors, edges, fixtures, chosen]) {
        mesh.geometry.dispose();
        mesh.material.dispose();
      }
    },
  };
}

function tint(material: SolidMaterial, colour: Rgb, alpha: number): void {
  material.uniforms.colour.value.setRGB(colour[0] / 255, colour[1] / 255, colour[2] / 255);
  material.uniforms.alpha.value = alpha;
}
