export type Family = 'UB' | 'UC' | 'IPE' | 'IPE A' | 'HEAA' | 'HEA' | 'HEB' | 'HEM'

/** Nominal dimensions of EN 10365:2017: mass kg/m, the rest mm. */
export interface SectionDimensions {
  family: Family
  designation: string
  mass: number
  h: number
  b: number
  tw: number
  tf: number
  r: number
}

/**
 * A rolled I or H section. Dimensions mm, mass kg/m, A mm², I mm⁴, W mm³, i mm, It mm⁴, Iw mm⁶,
 * perimeter mm²/mm (painted surface per length). Properties are computed with the fillets.
 */
export interface Section extends SectionDimensions {
  A: number
  Iy: number
  Iz: number
  WelY: number
  WplY: number
  WelZ: number
  WplZ: number
  iy: number
  iz: number
  It: number
  Iw: number
  perimeter: number
  /** Place in the catalogue: the last tie-break of every ordering. */
  catalogueIndex: number
}
