/** A directed graph: for each node, what it leads to. */
export type Graph = ReadonlyMap<string, ReadonlySet<string>>;

/**
 * The groups of nodes that reach one another, each in order; none when there is no cycle. A node that leads to itself
 * is a group of one. Tarjan, "Depth-first search and linear graph algorithms", SIAM J. Comput. 1 (1972).
 */
export function cycles(graph: Graph): readonly (readonly string[])[] {
  const found: (readonly string[])[] = [];
  const order = new Map<string, number>();
  const lowest = new Map<string, number>();
  const open: string[] = [];
  const isOpen = new Set<string>();

  const visit = (node: string): number => {
    let low = order.size;
    const mine = low;
    order.set(node, mine);
    open.push(node);
    isOpen.add(node);
    for (const next of graph.get(node) ?? []) {
      const seen = order.get(next);
      if (seen === undefined) low = Math.min(low, visit(next));
      else if (isOpen.has(next)) low = Math.min(low, seen);
    }
    lowest.set(node, low);
    if (low === mine) {
      const group = open.splice(open.indexOf(node));
      for (const member of group) isOpen.delete(member);
      if (group.length > 1 || graph.get(node)?.has(node) === true) found.push(group.sort());
    }
    return low;
  };

  for (const node of graph.keys()) if (!order.has(node)) visit(node);
  return found;
}
