/** The load path of a selected member: everything that it carries and everything that carries it. */

export interface Bearing { mark: string, carriedBy: readonly string[], carries: readonly string[] }

export interface LoadPath {
  /** Marks that bring load to the selected member, directly or through others. */
  carries: Set<string>
  /** Marks that take its load on, down to the columns. */
  carriedBy: Set<string>
}

export function loadPath(members: ReadonlyMap<string, Bearing>, selected: string | null): LoadPath {
  if (selected === null || !members.has(selected)) return { carries: new Set(), carriedBy: new Set() }
  return {
    carries: reach(members, selected, member => member.carries),
    carriedBy: reach(members, selected, member => member.carriedBy),
  }
}

function reach(
  members: ReadonlyMap<string, Bearing>, start: string, next: (member: Bearing) => readonly string[],
): Set<string> {
  const reached = new Set<string>()
  const open = [start]
  while (open.length > 0) {
    const member = members.get(open.pop() ?? '')
    if (!member) continue
    for (const mark of next(member)) {
      if (mark === start || reached.has(mark)) continue
      reached.add(mark)
      open.push(mark)
    }
  }
  return reached
}
