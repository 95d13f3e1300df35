/**
 * Least total cost of labels under order rules: every variable takes one of K rising labels, and
 * for each rule (low, high) the label of `high` is not below that of `low`. Solved exactly as a
 * minimum cut (labels as cuts in a chain; Ishikawa 2003), by Dinic's method.
 */

export interface OrderedLabelling {
  /** `costs[variable][label]`; Infinity forbids a label. */
  costs: readonly (readonly number[])[]
  rules: readonly { low: number, high: number }[]
}

interface Network { heads: number[], capacity: number[], next: number[], first: number[] }

/** Label of every variable, or null where the rules allow none. */
export function leastCostLabels({ costs, rules }: OrderedLabelling): number[] | null {
  const labels = costs[0]?.length ?? 0
  if (labels === 0) return null
  const perVariable = labels - 1
  const [source, sink] = [costs.length * perVariable, costs.length * perVariable + 1]
  const network: Network = { heads: [], capacity: [], next: [], first: new Array<number>(sink + 1).fill(-1) }
  const node = (variable: number, k: number) => k < 0 ? source : k >= perVariable ? sink : variable * perVariable + k
  costs.forEach((cost, variable) => cost.forEach((value, k) => {
    addArc(network, node(variable, k - 1), node(variable, k), value, k > 0 && k < perVariable ? Infinity : 0)
  }))
  for (const { low, high } of rules) {
    for (let k = 0; k < perVariable; k++) addArc(network, node(low, k), node(high, k), Infinity, 0)
  }
  if (maximumFlow(network, source, sink) === Infinity) return null
  const reached = reachable(network, source)
  const chosen = costs.map((_, variable) => {
    let k = 0
    while (k < perVariable && reached[node(variable, k)]) k++
    return k
  })
  return chosen.every((k, variable) => Number.isFinite(costs[variable]![k])) ? chosen : null
}

function addArc(network: Network, from: number, to: number, forth: number, back: number): void {
  for (const [tail, head, capacity] of [[from, to, forth], [to, from, back]] as const) {
    network.heads.push(head)
    network.capacity.push(capacity)
    network.next.push(network.first[tail]!)
    network.first[tail] = network.heads.length - 1
  }
}

/** Below this a capacity left over is rounding. */
const SMALL = 1e-9

function levelsFrom(network: Network, source: number): Int32Array {
  const level = new Int32Array(network.first.length).fill(-1)
  const queue = [source]
  level[source] = 0
  for (let n = 0; n < queue.length; n++) {
    for (let arc = network.first[queue[n]!]!; arc >= 0; arc = network.next[arc]!) {
      const head = network.heads[arc]!
      if (network.capacity[arc]! <= SMALL || level[head]! >= 0) continue
      level[head] = level[queue[n]!]! + 1
      queue.push(head)
    }
  }
  return level
}

function reachable(network: Network, source: number): boolean[] {
  return Array.from(levelsFrom(network, source), level => level >= 0)
}

function maximumFlow(network: Network, source: number, sink: number): number {
  let flow = 0
  for (;;) {
    const level = levelsFrom(network, source)
    if (level[sink]! < 0) return flow
    const at = [...network.first]
    for (;;) {
      const pushed = augment(network, level, at, source, sink)
      if (pushed === Infinity) return Infinity
      if (pushed <= SMALL) break
      flow += pushed
    }
  }
}

/** One augmenting path in the level graph, walked without recursion. */
function augment(network: Network, level: Int32Array, at: number[], source: number, sink: number): number {
  const path: number[] = []
  let node = source
  while (node !== sink) {
    const arc = at[node]!
    if (arc < 0) {
      const last = path.pop()
      if (last === undefined) return 0
      node = network.heads[last ^ 1]!
      at[node] = network.next[at[node]!]!
      continue
    }
    const head = network.heads[arc]!
    if (network.capacity[arc]! > SMALL && level[head] === level[node]! + 1) {
      path.push(arc)
      node = head
    } else {
      at[node] = network.next[arc]!
    }
  }
  const pushed = path.reduce((least, arc) => Math.min(least, network.capacity[arc]!), Infinity)
  if (pushed === Infinity) return Infinity
  for (const arc of path) {
    network.capacity[arc]! -= pushed
    network.capacity[arc ^ 1]! += pushed
  }
  return pushed
}
