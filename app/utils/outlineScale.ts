import type { ProjectSummary } from '#shared/schemas/api'

export interface OutlineExtent { minX: number, minY: number, width: number, height: number }

/** The rectangle around an outline, mm. */
export function outlineExtent(outline: readonly (readonly [number, number])[]): OutlineExtent {
  const x = outline.map(point => point[0])
  const y = outline.map(point => point[1])
  const minX = Math.min(...x)
  const minY = Math.min(...y)
  return { minX, minY, width: Math.max(...x) - minX, height: Math.max(...y) - minY }
}

/** One scale for all outlines of a table, px per mm, so that the largest fits the box. */
export function commonScale(projects: readonly Pick<ProjectSummary, 'outline'>[], boxWidth: number, boxHeight: number): number {
  const extents = projects.flatMap(project => project.outline ? [outlineExtent(project.outline)] : [])
  if (extents.length === 0) return 0
  return Math.min(...extents.map(({ width, height }) => Math.min(boxWidth / width, boxHeight / height)))
}

/** SVG path of an outline at a scale, y upwards in the plate and downwards on the page. */
export function outlinePath(outline: readonly (readonly [number, number])[], scale: number): string {
  const { minX, minY, height } = outlineExtent(outline)
  const points = outline.map(([x, y]) => `${round((x - minX) * scale)} ${round((minY + height - y) * scale)}`)
  return `M${points.join('L')}Z`
}

function round(value: number): number {
  return Math.round(value * 100) / 100
}
