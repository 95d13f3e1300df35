import type { Section, SectionDimensions } from './types'

/** Area of the four root fillets, mm². */
function filletArea(r: number): number {
  return (4 - Math.PI) * r * r
}

/** Distance of one fillet's centroid from its corner (web face, flange face), mm. */
function filletCentroid(r: number): number {
  return r * (10 - 3 * Math.PI) / (12 - 3 * Math.PI)
}

/** Second moment of one fillet about its own centroid, mm⁴. */
function filletInertia(r: number): number {
  const area = (1 - Math.PI / 4) * r * r
  const aboutCorner = (1 - 5 * Math.PI / 16) * r ** 4
  return aboutCorner - area * filletCentroid(r) ** 2
}

/**
 * St Venant torsion constant, mm⁴, with the junctions of web and flange: the form of the British
 * tables and of the newer European ones (engineering basis, section 1). Range: rolled I and H.
 */
export function torsionConstant({ h, b, tw, tf, r }: SectionDimensions): number {
  const alpha1 = -0.042 + 0.2204 * tw / tf + 0.1355 * r / tf - 0.0865 * r * tw / (tf * tf) - 0.0725 * tw * tw / (tf * tf)
  const D1 = ((tf + r) ** 2 + (r + tw / 4) * tw) / (2 * r + tf)
  return 2 / 3 * b * tf ** 3 + (h - 2 * tf) * tw ** 3 / 3 + 2 * alpha1 * D1 ** 4 - 0.42 * tf ** 4
}

/** Second moments about the major and minor axis, mm⁴, fillets included. */
export function secondMoments({ h, b, tw, tf, r }: SectionDimensions): { Iy: number, Iz: number } {
  const hw = h - 2 * tf
  const fillet = filletArea(r)
  const own = 4 * filletInertia(r)
  const leverY = hw / 2 - filletCentroid(r)
  const leverZ = tw / 2 + filletCentroid(r)
  return {
    Iy: (b * h ** 3 - (b - tw) * hw ** 3) / 12 + own + fillet * leverY ** 2,
    Iz: (2 * tf * b ** 3 + hw * tw ** 3) / 12 + own + fillet * leverZ ** 2,
  }
}

/** Plastic moduli about the major and minor axis, mm³, fillets included. */
export function plasticModuli({ h, b, tw, tf, r }: SectionDimensions): { WplY: number, WplZ: number } {
  const hw = h - 2 * tf
  const fillet = filletArea(r)
  return {
    WplY: b * tf * (h - tf) + tw * hw * hw / 4 + fillet * (hw / 2 - filletCentroid(r)),
    WplZ: tf * b * b / 2 + hw * tw * tw / 4 + fillet * (tw / 2 + filletCentroid(r)),
  }
}

/** All properties of a section from its nominal dimensions (EN 10365:2017). */
export function sectionProperties(dimensions: SectionDimensions, catalogueIndex: number): Section {
  const { h, b, tw, tf, r } = dimensions
  const A = 2 * b * tf + (h - 2 * tf) * tw + filletArea(r)
  const { Iy, Iz } = secondMoments(dimensions)
  const { WplY, WplZ } = plasticModuli(dimensions)
  return {
    ...dimensions,
    A, Iy, Iz, WplY, WplZ,
    WelY: 2 * Iy / h,
    WelZ: 2 * Iz / b,
    iy: Math.sqrt(Iy / A),
    iz: Math.sqrt(Iz / A),
    It: torsionConstant(dimensions),
    Iw: Iz * (h - tf) ** 2 / 4,
    perimeter: 4 * b + 2 * h - 2 * tw - 2 * (4 - Math.PI) * r,
    catalogueIndex,
  }
}
