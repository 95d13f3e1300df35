/** Bays as the trade writes them. Lengths in mm, shown in metres. */

/** 7500 -> "7.5", 6000 -> "6.0", 6250 -> "6.25", 7333 -> "7.333". */
export function metres(mm: number): string {
  const three = (mm / 1000).toFixed(3)
  return three.replace(/0{1,2}$/, '')
}

/** [9000 × 6] -> "6 @ 9.0"; [7500, 7500, 6000, 7500, 7500] -> "2 @ 7.5, 6.0, 2 @ 7.5". */
export function baysInWords(bays: readonly number[]): string {
  const runs: { length: number, times: number }[] = []
  for (const length of bays) {
    const last = runs.at(-1)
    if (last && last.length === length) last.times += 1
    else runs.push({ length, times: 1 })
  }
  return runs.map(run => run.times === 1 ? metres(run.length) : `${run.times} @ ${metres(run.length)}`).join(', ')
}

/** Positions of the lines that bays make from a first line, mm. */
export function linesOfBays(bays: readonly number[], first = 0): number[] {
  const lines = [first]
  let at = first
  for (const bay of bays) {
    at += bay
    lines.push(at)
  }
  return lines
}

/** "9.0 × 7.5 m bays"; "mostly 9.0 × 7.5 m bays" where some differ: the commonest bay of each direction. */
export function typicalBay(baysX: readonly number[], baysY: readonly number[]): string {
  const areAllAlike = new Set(baysX).size === 1 && new Set(baysY).size === 1
  return `${areAllAlike ? '' : 'mostly '}${metres(commonest(baysX))} × ${metres(commonest(baysY))} m bays`
}

/** The length that stands most often; of equals the longer. */
export function commonest(bays: readonly number[]): number {
  const times = new Map<number, number>()
  for (const bay of bays) times.set(bay, (times.get(bay) ?? 0) + 1)
  let best = 0
  let most = 0
  for (const [bay, count] of times) {
    if (count > most || (count === most && bay > best)) {
      best = bay
      most = count
    }
  }
  return best
}

/** "UB 457x191x67" -> { family: "UB", size: "457×191×67" }; "IPE A 300" -> { family: "IPE A", size: "300" }. */
export function designationParts(designation: string): { family: string, size: string } {
  const match = /^(.*?)\s*([0-9][0-9x×.]*.*)$/.exec(designation)
  if (!match) return { family: '', size: designation }
  return { family: match[1] ?? '', size: (match[2] ?? '').replaceAll('x', '×') }
}

export function designationInWords(designation: string): string {
  const { family, size } = designationParts(designation)
  return family ? `${family} ${size}` : size
}
