/**
 * St Venant torsion constant of a quarter of an I section by finite differences of Prandtl's stress
 * function (∇²φ = −2, φ = 0 on the edge, It = 2 ∫ φ), independent of the engine.
 */
export function torsionByDifferences({ h, b, tw, tf, r }: { h: number, b: number, tw: number, tf: number, r: number }, step: number): number {
  const nx = Math.round(b / 2 / step)
  const ny = Math.round(h / 2 / step)
  const inside = (i: number, j: number): boolean => {
    const x = i * step
    const y = j * step
    if (x > b / 2 - step / 2 || y > h / 2 - step / 2) return false
    if (y > h / 2 - tf + step / 2 || x < tw / 2 - step / 2) return true
    const dx = tw / 2 + r - x
    const dy = y - (h / 2 - tf - r)
    return dx > 0 && dy > 0 && dx * dx + dy * dy > r * r
  }
  const width = nx + 1
  const phi = new Float64Array(width * (ny + 1))
  const cells: number[] = []
  for (let j = 0; j <= ny; j++) for (let i = 0; i <= nx; i++) if (inside(i, j)) cells.push(j * width + i)
  const omega = 1.94
  for (let sweep = 0; sweep < 6000; sweep++) {
    let change = 0
    for (const cell of cells) {
      const i = cell % width
      const j = (cell - i) / width
      const left = phi[i === 0 ? cell + 1 : cell - 1]!
      const below = phi[j === 0 ? cell + width : cell - width]!
      const next = (left + phi[cell + 1]! + below + phi[cell + width]! + 2 * step * step) / 4
      const delta = omega * (next - phi[cell]!)
      phi[cell] = phi[cell]! + delta
      change = Math.max(change, Math.abs(delta))
    }
    if (change < 1e-7) break
  }
  let sum = 0
  for (const cell of cells) {
    const i = cell % width
    const j = (cell - i) / width
    sum += phi[cell]! * (i === 0 ? 0.5 : 1) * (j === 0 ? 0.5 : 1)
  }
  return 4 * 2 * sum * step * step
}
