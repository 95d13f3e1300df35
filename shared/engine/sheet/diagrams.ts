import { sagAt } from '../statics'
import type { Basics } from './basics'
import type { SheetDiagrams } from './types'

/** Parts of each interval between stations that are drawn. */
const PARTS = 12

/** Shear on both sides of every station, without repeating equal values, kN. */
function shearFigures({ x, total }: Basics['shown']): { x: number, value: number }[] {
  const figures: { x: number, value: number }[] = []
  for (let i = 0; i < x.length - 1; i++) {
    figures.push({ x: x[i]!, value: total.V[i]! / 1000 })
    figures.push({ x: x[i + 1]!, value: (total.V[i]! - total.q[i]! * (x[i + 1]! - x[i]!)) / 1000 })
  }
  return figures.filter((figure, i) => {
    const last = figures[i - 1]
    return !last || last.x !== figure.x || Math.abs(last.value - figure.value) > 1e-9 * Math.abs(figure.value)
  })
}

/** Polylines for drawing: shear, moment, deflection on one axis, jumps as two equal x. */
export function diagramsOf(basics: Basics): SheetDiagrams {
  const { shown, variable, characteristic, resistances: { EIy }, verified } = basics
  const { x, total } = shown
  const service = basics.cases[0]!.x
  const diagrams: SheetDiagrams = {
    x: [], shear: [], moment: [], deflectionVariable: [], deflectionTotal: [],
    largest: {
      shear: shearFigures(shown),
      moment: { x: shown.verified.MEdAt, value: shown.verified.MEd / 1e6 },
      deflectionVariable: { x: verified.deflection.atVariable, value: verified.deflection.variable },
      deflectionTotal: { x: verified.deflection.atTotal, value: verified.deflection.total },
    },
  }
  for (let i = 0; i < x.length - 1; i++) {
    const h = x[i + 1]! - x[i]!
    for (let k = 0; k <= PARTS; k++) {
      const s = h * k / PARTS
      const place = k === PARTS ? x[i + 1]! : x[i]! + s
      diagrams.x.push(place)
      diagrams.shear.push((total.V[i]! - total.q[i]! * s) / 1000)
      diagrams.moment.push((total.M[i]! + s * (total.V[i]! - total.q[i]! * s / 2)) / 1e6)
      diagrams.deflectionVariable.push(sagAt(service, variable, place) / EIy)
      diagrams.deflectionTotal.push(sagAt(service, characteristic, place) / EIy)
    }
  }
  return diagrams
}
