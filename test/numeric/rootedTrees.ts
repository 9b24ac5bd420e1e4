/** A rooted tree, given by the subtrees on its root. */
export type RootedTree = readonly RootedTree[];

/** All rooted trees with up to `most` vertices, by number of vertices: 1, 1, 2, 4, 9, 20 ... */
export function rootedTrees(most: number): RootedTree[][] {
  const bySize: RootedTree[][] = [[], [[]]];
  for (let size = 2; size <= most; size++) {
    bySize.push(forests(bySize, size - 1, size - 1, Number.POSITIVE_INFINITY));
  }
  return bySize;
}

/** Multisets of trees with `vertices` in all, none after tree number `last` of those with `largest`. */
function forests(bySize: RootedTree[][], vertices: number, largest: number, last: number): RootedTree[] {
  if (vertices === 0) return [[]];
  const all: RootedTree[] = [];
  for (let size = Math.min(vertices, largest); size >= 1; size--) {
    bySize[size].forEach((tree, index) => {
      if (size === largest && index > last) return;
      for (const rest of forests(bySize, vertices - size, size, index)) all.push([tree, ...rest]);
    });
  }
  return all;
}

/** Number of vertices. */
export function vertices(tree: RootedTree): number {
  return tree.reduce((sum, branch) => sum + vertices(branch), 1);
}

/** Product of the numbers of vertices of the tree and all its subtrees: the denominator of its order condition. */
export function density(tree: RootedTree): number {
  return tree.reduce((product, branch) => product * density(branch), vertices(tree));
}

/** The tree in brackets, for the name of a test. */
export function drawn(tree: RootedTree): string {
  return `[${tree.map(drawn).join("")}]`;
}
