/** Mutants that change nothing that anyone could see, and why. */
export const equivalents: readonly { readonly why: string; readonly keys: readonly string[] }[] = [
  {
    why: 'There are exactly two, as is asked beside it: the question is for the type checker.',
    keys: [
      'src/codes/npc/one-trap.ts: left out: first === undefined',
      'src/codes/npc/one-trap.ts: left out: second === undefined',
    ],
  },
  {
    why: 'Of two that carry the same load it is all one which of them counts.',
    keys: ['src/codes/npc/one-trap.ts: < as <=: fixtures[first]!.load < fixtures[second]!.load'],
  },
  {
    why: 'Table 2.4.10.6.-C holds every load that Table -B holds: where it has no size, Table -B has none.',
    keys: ['src/codes/npc/drain-rules.ts: always: asBranch.size === null'],
  },
  {
    why: 'Table 11 goes on above DN 70: a next size is always there.',
    keys: ['src/codes/en12056/stack-rules.ts: never: size === undefined'],
  },
  {
    why: 'No kind that counts further pieces has two rows to tell apart in any of our tables.',
    keys: [
      'src/codes/rules/open-details.ts: not in the list: ...(found.get(more.fact) ?? [])',
      'src/codes/rules/open-details.ts: not in the list: more.beyond',
      'src/codes/rules/open-details.ts: not in the list: more.beyond + 1',
    ],
  },
];
