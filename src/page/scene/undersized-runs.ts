import type { Building } from '../building.ts';

/** Undersized sections that hang together and share drawn and needed size: one run, one label. Sections rise within. */
export function undersizedRuns(building: Building): readonly (readonly number[])[] {
  const { jointA, jointB } = building.data.scene.pipes;
  const key = (section: number): string | null => {
    const state = building.state(section);
    return state?.verdict === 'undersized' ? `${state.modelled?.label} ${state.required?.most?.label}` : null;
  };
  const parent = new Map<string, string>();
  const root = (name: string): string => {
    let at = name;
    while (parent.get(at) !== undefined && parent.get(at) !== at) at = parent.get(at)!;
    return at;
  };
  const sections: number[] = [];
  for (let section = 0; section < building.sectionCount; section++) {
    const size = key(section);
    if (size === null) continue;
    sections.push(section);
    const [a, b] = [`${jointA[section]} ${size}`, `${jointB[section]} ${size}`];
    parent.set(a, parent.get(a) ?? a);
    parent.set(b, parent.get(b) ?? b);
    parent.set(root(a), root(b));
  }
  const runs = new Map<string, number[]>();
  for (const section of sections) {
    const name = root(`${jointA[section]} ${key(section)}`);
    const run = runs.get(name);
    if (run === undefined) runs.set(name, [section]);
    else run.push(section);
  }
  return [...runs.values()];
}
