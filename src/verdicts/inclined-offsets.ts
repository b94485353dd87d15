import type { CheckedStack } from '../codes/check.ts';
import type { ElementId } from '../model/model.ts';
import type { Network } from '../network/network.ts';
import type { Paths } from '../paths/paths.ts';
import type { Stack } from '../roles/find-stacks.ts';

/** Plumb within this of its height in plan: drawings are not truer. */
const plumb = 0.1;

/** Where a stack steps aside without running level, from the top: each run of inclined pipes with its two heights. */
export function inclinedOffsets(network: Network, paths: Paths, { pipes }: Stack): CheckedStack['inclined'] {
  const found: { elements: ElementId[]; top: number; bottom: number }[] = [];
  let before = false;
  for (const pipe of pipes) {
    const { element, ends } = network.pipes[pipe]!;
    const [from, to] = ends.map((joint) => network.joints[joint]!.at);
    // Links between fittings lie in whatever they join.
    if (element === null || from == null || to == null) continue;
    const plan = Math.hypot(to[0] - from[0], to[1] - from[1]);
    const inclined = paths.vertical[pipe] === true && plan > plumb * Math.abs(to[2] - from[2]);
    if (inclined) {
      const [top, bottom] = [Math.max(from[2], to[2]), Math.min(from[2], to[2])];
      const last = before ? found.at(-1) : undefined;
      if (last === undefined) found.push({ elements: [element], top, bottom });
      else found[found.length - 1] = { elements: [...last.elements, element], top: last.top, bottom };
    }
    before = inclined;
  }
  return found;
}
