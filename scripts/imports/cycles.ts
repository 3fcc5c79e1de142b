/** Every group of files that import each other in a ring (Tarjan's strongly connected components), each as a ring. */
export function findCycles(graph: ReadonlyMap<string, readonly string[]>): string[][] {
  const index = new Map<string, number>();
  const low = new Map<string, number>();
  const stack: string[] = [];
  const groups: Set<string>[] = [];

  const visit = (file: string): void => {
    index.set(file, index.size);
    low.set(file, index.get(file) ?? 0);
    stack.push(file);
    for (const next of graph.get(file) ?? []) {
      if (!index.has(next)) visit(next);
      if (!stack.includes(next)) continue;
      low.set(file, Math.min(low.get(file) ?? 0, low.get(next) ?? 0));
    }
    if (low.get(file) !== index.get(file)) return;
    const group = new Set(stack.splice(stack.indexOf(file)));
    if (group.size > 1 || graph.get(file)?.includes(file)) groups.push(group);
  };

  for (const file of graph.keys()) if (!index.has(file)) visit(file);
  return groups.map((group) => ringIn(group, graph));
}

/** The shortest way from the group's first file back to itself. */
function ringIn(group: ReadonlySet<string>, graph: ReadonlyMap<string, readonly string[]>): string[] {
  const [start = ""] = [...group].sort();
  const cameFrom = new Map<string, string>();
  const queue = [start];
  for (const file of queue) {
    for (const next of graph.get(file) ?? []) {
      if (next === start) {
        const ring = [start];
        for (let at = file; at !== start; at = cameFrom.get(at) ?? start) ring.splice(1, 0, at);
        return ring;
      }
      if (!group.has(next) || cameFrom.has(next)) continue;
      cameFrom.set(next, file);
      queue.push(next);
    }
  }
  return [start];
}
