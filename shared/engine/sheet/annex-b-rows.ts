import { interactionAnnexB } from '../ec3'
import type { Axis } from '../ec3'
import type { LengthResistance } from './column-rows'
import { num, quantity, row } from './format'
import type { ColumnSheetInput, ColumnSheetLength, SheetRow } from './types'

interface AnnexB { ny: number, nz: number, kyy: number, kyz: number, kzy: number, kzz: number, eq661: number, eq662: number }

function annexB({ choice }: ColumnSheetInput, r: LengthResistance, { NEd, MyEd, MzEd, Cmy, Cmz, CmLT }: ColumnSheetLength): AnnexB {
  const found = interactionAnnexB({
    NEd, MyEd, MzEd, Cmy, Cmz, CmLT,
    NRk: r.section.A * r.fy, MyRk: r.Wy * r.fy, MzRk: r.Wz * r.fy,
    chiY: r.y.chi, chiZ: r.z.chi, chiLT: r.chiLT, lambdaY: r.y.lambda, lambdaZ: r.z.lambda,
    gammaM1: choice.gammaM1, sectionClass: r.sectionClass,
  })
  return { ...found, ny: NEd / r.y.NbRd, nz: NEd / r.z.NbRd }
}

/** kyy and kzz with both of their forms, the smaller of which counts. */
function factorRow(axis: Axis, plastic: boolean, Cm: number, lambda: number, n: number, value: number): SheetRow {
  const [a, b] = axis === 'y' ? ['λ̄_{y} − 0.2', `${num(lambda, 4)} − 0.2`] : ['2 λ̄_{z} − 0.6', `2 × ${num(lambda, 4)} − 0.6`]
  const most = plastic ? (axis === 'y' ? 0.8 : 1.4) : 0.6
  const first = plastic ? `(${b})` : `0.6 × ${num(lambda, 4)}`
  return row({
    clause: 'Table B.1', check: `k_{${axis}${axis}}, the smaller`,
    expression: `C_{m${axis}} (1 + ${plastic ? `(${a})` : `0.6 λ̄_{${axis}}`} n_{${axis}}) ≤ C_{m${axis}} (1 + ${most} n_{${axis}})`,
    substituted: `${num(Cm, 3)} (1 + ${first} × ${num(n, 4)}) = ${num(Cm * (1 + (plastic ? (axis === 'y' ? lambda - 0.2 : 2 * lambda - 0.6) : 0.6 * lambda) * n), 4)}; `
      + `${num(Cm, 3)} (1 + ${most} × ${num(n, 4)}) = ${num(Cm * (1 + most * n), 4)}`,
    resistance: `k_{${axis}${axis}} ${num(value, 4)}`,
  })
}

function kzyRow(plastic: boolean, lambda: number, nz: number, CmLT: number, value: number): SheetRow {
  const c = plastic ? 0.1 : 0.05
  const short = plastic && lambda < 0.4
  const slope = c / (CmLT - 0.25)
  const limit = short ? 0.6 + lambda : 1 - slope * nz
  return row({
    clause: 'Table B.2', check: short ? 'k_{zy}, λ̄_{z} < 0.4, the smaller' : 'k_{zy}, the larger',
    expression: short
      ? `0.6 + λ̄_{z} ≤ 1 − ${c} λ̄_{z} n_{z} / (C_{mLT} − 0.25)`
      : `1 − ${c} λ̄_{z} n_{z} / (C_{mLT} − 0.25) ≥ 1 − ${c} n_{z} / (C_{mLT} − 0.25)`,
    substituted: `1 − ${c} × ${num(lambda, 4)} × ${num(nz, 4)} / (${num(CmLT, 3)} − 0.25) = ${num(1 - slope * lambda * nz, 4)}; `
      + (short ? `0.6 + ${num(lambda, 4)} = ${num(limit, 4)}` : `1 − ${c} × ${num(nz, 4)} / (${num(CmLT, 3)} − 0.25) = ${num(limit, 4)}`),
    resistance: `k_{zy} ${num(value, 4)}`,
  })
}

/** 6.3.3 with Annex B, and the section by 6.2.1(7). */
export function annexBRows(input: ColumnSheetInput, r: LengthResistance, length: ColumnSheetLength): SheetRow[] {
  const { NEd, MyEd, MzEd, Cmy, Cmz, CmLT } = length
  const { ny, nz, kyy, kyz, kzy, kzz, eq661, eq662 } = annexB(input, r, length)
  const { gammaM0, gammaM1 } = input.choice
  const plastic = r.sectionClass <= 2
  const MzRd = r.Wz * r.fy / gammaM1
  const expression = (n: number, y: number, z: number) =>
    `${num(n, 4)} + ${num(y, 4)} × ${num(MyEd / 1e6, 3)} / ${num(r.MbRd / 1e6, 3)} + ${num(z, 4)} × ${num(MzEd / 1e6, 3)} / ${num(MzRd / 1e6, 3)}`
  const parts = (n: number, y: number, z: number) => [n, y * MyEd / r.MbRd, z * MzEd / MzRd].map(part => num(part, 3)).join(' + ')
  const NRd = r.section.A * r.fy / gammaM0
  const MyRd = r.Wy * r.fy / gammaM0
  const section = NEd / NRd + MyEd / MyRd + MzEd / r.MczRd
  return [
    row({
      clause: 'Table B.3', check: 'Equivalent uniform moments', expression: 'C_{m} = 0.6 + 0.4 ψ ≥ 0.4; 1 where a level leaves the axis unheld',
      substituted: `C_{my} ${num(Cmy, 3)}, C_{mz} ${num(Cmz, 3)}, C_{mLT} ${num(CmLT, 3)}`,
    }),
    row({ clause: '6.3.3', check: 'Share of axial force about y', expression: 'n_{y} = N_{Ed} / N_{b,y,Rd}', substituted: `${num(NEd / 1e3, 2)} / ${num(r.y.NbRd / 1e3, 2)}`, resistance: quantity(ny, '', 4) }),
    row({ clause: '6.3.3', check: 'Share of axial force about z', expression: 'n_{z} = N_{Ed} / N_{b,z,Rd}', substituted: `${num(NEd / 1e3, 2)} / ${num(r.z.NbRd / 1e3, 2)}`, resistance: quantity(nz, '', 4) }),
    factorRow('y', plastic, Cmy, r.y.lambda, ny, kyy),
    factorRow('z', plastic, Cmz, r.z.lambda, nz, kzz),
    row({
      clause: 'Table B.1', check: 'k_{yz}', expression: plastic ? 'k_{yz} = 0.6 k_{zz}' : 'k_{yz} = k_{zz}',
      substituted: plastic ? `0.6 × ${num(kzz, 4)}` : num(kzz, 4), resistance: quantity(kyz, '', 4),
    }),
    kzyRow(plastic, r.z.lambda, nz, CmLT, kzy),
    row({
      clause: '(6.61)', check: 'Axial force with moments, about y', expression: 'n_{y} + k_{yy} M_{y,Ed} / M_{b,Rd} + k_{yz} M_{z,Ed} γ_{M1} / M_{z,Rk} ≤ 1',
      substituted: expression(ny, kyy, kyz), effect: parts(ny, kyy, kyz), resistance: quantity(eq661, '', 4), utilisation: eq661,
    }),
    row({
      clause: '(6.62)', check: 'Axial force with moments, about z', expression: 'n_{z} + k_{zy} M_{y,Ed} / M_{b,Rd} + k_{zz} M_{z,Ed} γ_{M1} / M_{z,Rk} ≤ 1',
      substituted: expression(nz, kzy, kzz), effect: parts(nz, kzy, kzz), resistance: quantity(eq662, '', 4), utilisation: eq662,
    }),
    row({
      clause: '6.2.1(7)', check: 'The section at the ends', expression: 'N_{Ed} / N_{Rd} + M_{y,Ed} / M_{c,y,Rd} + M_{z,Ed} / M_{c,z,Rd} ≤ 1',
      substituted: `${num(NEd / 1e3, 2)} / ${num(NRd / 1e3, 2)} + ${num(MyEd / 1e6, 3)} / ${num(MyRd / 1e6, 3)} + ${num(MzEd / 1e6, 3)} / ${num(r.MczRd / 1e6, 3)}`,
      resistance: quantity(section, '', 4), utilisation: section,
    }),
  ]
}
