/**
 * Strong components of a directed graph of `size` nodes (Tarjan 1972, without recursion): the number of its component for each
 * node. Linear in nodes and edges.
 */
export function components(size: number, next: (node: number) => readonly number[]): Int32Array {
  const component = new Int32Array(size).fill(-1);
  const order = new Int32Array(size).fill(-1);
  const low = new Int32Array(size);
  const open: number[] = [];
  let counter = 0;
  let found = 0;
  for (let root = 0; root < size; root++) {
    if (order[root] !== -1) continue;
    const path: { node: number; edge: number }[] = [];
    const enter = (node: number): void => {
      order[node] = low[node] = counter++;
      open.push(node);
      path.push({ node, edge: 0 });
    };
    enter(root);
    while (path.length > 0) {
      const top = path[path.length - 1]!;
      const target = next(top.node)[top.edge++];
      if (target !== undefined) {
        if (order[target] === -1) enter(target);
        else if (component[target] === -1) low[top.node] = Math.min(low[top.node]!, order[target]!);
        continue;
      }
      path.pop();
      const parent = path[path.length - 1];
      if (parent !== undefined) low[parent.node] = Math.min(low[parent.node]!, low[top.node]!);
      if (low[top.node] !== order[top.node]) continue;
      for (let member = -1; member !== top.node; ) {
        member = open.pop()!;
        component[member] = found;
      }
      found += 1;
    }
  }
  return component;
}
