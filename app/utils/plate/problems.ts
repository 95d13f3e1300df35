/** What stands in the way of framing the plate as drawn, with the steps that would mend it. */
import { checkPlate } from '#shared/engine/plate'
import { PlateSchema, type Plate } from '#shared/schemas/plate'
import { columnPositions, type ColumnPosition } from './columns'
import { placeArea, toggleColumn } from './elements'
import { addGridLine } from './grid'
import type { Box } from './outline'
import type { Outcome } from './steps'
import { formatMm } from './words'

export interface Mending { label: string, step: (plate: Plate) => Outcome }

export interface Problem {
  /** The finding in short, and how it is mended. */
  title: string
  detail: string
  path: string
  at: [number, number] | null
  offers: Mending[]
  /** True where no study can be run at all; false where one on another grid could. */
  isBlocking: boolean
}

export function problemsOf(plate: Plate): Problem[] {
  const malformed = schemaProblems(plate)
  if (malformed.length > 0) return malformed
  const onAnyGrid = new Set(checkPlate(plate, 'free').map(problem => problem.path + problem.message))
  const found = checkPlate(plate).map(({ message, path, at, offers = [] }): Problem => {
    const [title = message, ...rest] = message.split(/(?<=\.)\s+/)
    return {
      title: title.replace(/\.$/, ''), detail: rest.join(' '), path, at: at ?? null,
      isBlocking: onAnyGrid.has(path + message),
      offers: offers.map(({ label, addGridLine: line }) => ({
        label, step: document => addGridLine(document, line.axis, line.at),
      })),
    }
  })
  return [...found, ...columnsInKeepClear(plate)]
}

function schemaProblems(plate: Plate): Problem[] {
  const parsed = PlateSchema.safeParse(plate)
  if (parsed.success) return []
  return parsed.error.issues.map(issue => ({
    title: issue.message, detail: `In ${issue.path.join('.')}.`, path: issue.path.join('.'), at: null, offers: [], isBlocking: true,
  }))
}

/** A study leaves arrangements with such a column out; on the drawn grid it can be seen at once. */
function columnsInKeepClear(plate: Plate): Problem[] {
  const columns = columnPositions(plate).filter(column => !column.isOmitted)
  return plate.keepClear.flatMap((zone, index) => columns
    .filter(({ at: [x, y] }) => x > zone.x && x < zone.x + zone.width && y > zone.y && y < zone.y + zone.height)
    .map(column => columnProblem(plate, column, index, zone)))
}

function columnProblem(plate: Plate, { x, y, at }: ColumnPosition, index: number, zone: Box & { name: string }): Problem {
  const labels: [string, string] = [plate.gridX[x]?.label ?? '', plate.gridY[y]?.label ?? '']
  const place = labels.join('/')
  const edges = [
    { reach: at[0] - zone.x, box: { x: at[0], width: zone.x + zone.width - at[0] } },
    { reach: zone.x + zone.width - at[0], box: { width: at[0] - zone.x } },
    { reach: at[1] - zone.y, box: { y: at[1], height: zone.y + zone.height - at[1] } },
    { reach: zone.y + zone.height - at[1], box: { height: at[1] - zone.y } },
  ].sort((a, b) => a.reach - b.reach)
  const [nearest] = edges
  const reach = nearest?.reach ?? 0
  return {
    title: `Column ${place} stands ${formatMm(reach)} inside a keep-clear zone`,
    detail: `${zone.name} is to be free of columns; a column on its edge is allowed.`,
    path: `keepClear[${index}]`, at, isBlocking: false,
    offers: [
      { label: `Draw the edge in by ${formatMm(reach)}`, step: document => placeArea(document, 'keepClear', index, nearest?.box ?? {}) },
      { label: `Omit column ${place}`, step: document => toggleColumn(document, ...labels) },
    ],
  }
}
