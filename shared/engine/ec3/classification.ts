import type { Section } from '../sections'

export type SectionClass = 1 | 2 | 3 | 4

/** ε = √(235/fy). EN 1993-1-1:2005 Table 5.2. fy N/mm². */
export function epsilon(fy: number): number {
  return Math.sqrt(235 / fy)
}

/** Straight depth of the web, mm: c_web = h − 2tf − 2r. */
export function webStraightDepth({ h, tf, r }: Section): number {
  return h - 2 * tf - 2 * r
}

/** Straight outstand of the flange, mm: c_flange = (b − tw − 2r)/2. */
export function flangeOutstand({ b, tw, r }: Section): number {
  return (b - tw - 2 * r) / 2
}

function classBy(ratio: number, limits: readonly [number, number, number], eps: number): SectionClass {
  if (ratio <= limits[0] * eps) return 1
  if (ratio <= limits[1] * eps) return 2
  return ratio <= limits[2] * eps ? 3 : 4
}

/** Limits of c/t by ε for classes 1, 2, 3. EN 1993-1-1:2005 Table 5.2. */
export const CLASS_LIMITS = {
  outstandFlange: [9, 10, 14],
  webInBending: [72, 83, 124],
  webInCompression: [33, 38, 42],
} as const

/** Class of the outstand flange in compression. EN 1993-1-1:2005 Table 5.2, sheet 2. fy N/mm². */
export function flangeClass(section: Section, fy: number): SectionClass {
  return classBy(flangeOutstand(section) / section.tf, CLASS_LIMITS.outstandFlange, epsilon(fy))
}

/** Class of the web in bending. EN 1993-1-1:2005 Table 5.2, sheet 1. fy N/mm². */
export function webClassInBending(section: Section, fy: number): SectionClass {
  return classBy(webStraightDepth(section) / section.tw, CLASS_LIMITS.webInBending, epsilon(fy))
}

/** Class of the web in uniform compression. EN 1993-1-1:2005 Table 5.2, sheet 1. fy N/mm². */
export function webClassInCompression(section: Section, fy: number): SectionClass {
  return classBy(webStraightDepth(section) / section.tw, CLASS_LIMITS.webInCompression, epsilon(fy))
}

function larger(a: SectionClass, b: SectionClass): SectionClass {
  return a > b ? a : b
}

/** Class of the section bent about its major axis. EN 1993-1-1:2005 5.5.2(6), Table 5.2. fy N/mm². */
export function classInBending(section: Section, fy: number): SectionClass {
  return larger(flangeClass(section, fy), webClassInBending(section, fy))
}

/** Class of the section in uniform compression. EN 1993-1-1:2005 5.5.2(6), Table 5.2. fy N/mm². */
export function classInCompression(section: Section, fy: number): SectionClass {
  return larger(flangeClass(section, fy), webClassInCompression(section, fy))
}
