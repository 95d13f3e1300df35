/** Names and figures on the plan, each where it covers neither another one nor a void. */
import { formatNumber } from '#shared/utils/format'
import { screenBox } from '../hit'
import { toScreen } from '../view'
import { text, textWidth, type Pen, type Rect } from './pen'
import type { PlanScene } from './plan'

/** Figures as they stand on the drawing: as many decimals as needed, one at least. */
export function loadText(value: number): string {
  return formatNumber(value, Number.isInteger(value * 10) ? 1 : 2)
}

const ROW = 15

interface Label { words: string[], colour: string, second?: string }

export function drawLabels(pen: Pen, scene: PlanScene) {
  const { plate, view, palette } = scene
  const taken: Rect[] = []
  const voids = plate.voids.map(each => screenBox(view, each))
  plate.voids.forEach((each, i) => {
    const floors = each.floors === undefined ? [] : [`lowest ${each.floors} of ${plate.storeys} floors`]
    const box = voids[i]
    if (box) put(pen, scene, box, { words: [each.name, ...floors], colour: palette.ink, second: palette.ink2 }, taken)
  })
  taken.push(...voids)
  for (const zone of plate.keepClear) {
    put(pen, scene, screenBox(view, zone), { words: [zone.name, 'keep clear of columns'], colour: palette.ink, second: palette.ink2 }, taken)
  }
  for (const zone of plate.zones) {
    const load = `${loadText(zone.permanent)} + ${loadText(zone.variable)}\u00A0kN/m²`
    put(pen, scene, screenBox(view, zone), { words: [zone.name, load], colour: palette.galv }, taken)
  }
  for (const region of plate.regions) {
    const box = screenBox(view, region)
    text(pen, region.name, box.x + 8, box.y + 12, { colour: palette.galv, align: 'left', weight: 600, knockOut: palette.sheet })
  }
  drawLineLoadLabels(pen, scene, taken)
}

function overlaps(a: Rect, b: Rect): boolean {
  return a.x < b.x + b.width && b.x < a.x + a.width && a.y < b.y + b.height && b.y < a.y + a.height
}

/** Middle first, then out along both sides, in shares of the room. */
const SHARES = [0.5, 0.25, 0.75, 0.375, 0.625, 0.125, 0.875]

/** The label in the rectangle; lines that do not fit, or find no free place, are left to the table. */
function put(pen: Pen, { palette }: PlanScene, box: Rect, label: Label, taken: Rect[]) {
  const fitting = label.words.filter(each => textWidth(pen, each) <= box.width - 8).slice(0, Math.floor(box.height / 16))
  if (fitting.length === 0) return
  const width = Math.max(...fitting.map(each => textWidth(pen, each))) + 8
  const height = fitting.length * ROW + 2
  const place = freePlace(box, width, height, taken)
  if (!place) return
  taken.push(place)
  const first = place.y + height / 2 - ((fitting.length - 1) * ROW) / 2
  fitting.forEach((each, i) => {
    text(pen, each, place.x + width / 2, first + i * ROW, {
      colour: i > 0 && label.second ? label.second : label.colour,
      knockOut: palette.sheet, weight: each === label.words[0] ? 600 : 400,
    })
  })
}

function freePlace(box: Rect, width: number, height: number, taken: readonly Rect[]): Rect | null {
  for (const y of SHARES) {
    for (const x of SHARES) {
      const place = {
        x: box.x + (box.width - width) * x, y: box.y + (box.height - height) * y, width, height,
      }
      if (!taken.some(other => overlaps(other, place))) return place
      if (box.width < width * 1.5) break
    }
    if (box.height < height * 1.5) break
  }
  return null
}

function drawLineLoadLabels(pen: Pen, scene: PlanScene, taken: Rect[]) {
  const { plate, view, frame, palette } = scene
  const words = (name: string, permanent: number, variable: number) => {
    const sum = variable > 0 ? `${loadText(permanent)} + ${loadText(variable)}` : loadText(permanent)
    return `${name} ${sum}\u00A0kN/m`
  }
  const round = plate.lineLoads.filter(each => each.on === 'outline')
  if (round.length > 0 && frame.top - frame.bays.top > 30) {
    const label = round.map(each => words(each.name, each.permanent, each.variable)).join(', ')
    text(pen, `${label} all round`, (frame.left + frame.right) / 2, frame.top - 21, {
      colour: palette.galv, knockOut: palette.sheet,
    })
  }
  for (const { name, on, permanent, variable } of plate.lineLoads) {
    if (typeof on === 'string' || !('from' in on)) continue
    const a = toScreen(view, on.from)
    const b = toScreen(view, on.to)
    const label = words(name, permanent, variable)
    const width = textWidth(pen, label) + 8
    const isUpright = a[0] === b[0]
    const share = SHARES.find((each) => {
      const x = a[0] + (b[0] - a[0]) * each
      const y = a[1] + (b[1] - a[1]) * each
      const box = isUpright
        ? { x: x + 9, y: y - width / 2, width: 16, height: width }
        : { x: x - width / 2, y: y - 26, width, height: 16 }
      const isFree = !taken.some(other => overlaps(other, box))
      if (isFree) taken.push(box)
      return isFree
    })
    if (share === undefined) continue
    const x = a[0] + (b[0] - a[0]) * share
    const y = a[1] + (b[1] - a[1]) * share
    text(pen, label, isUpright ? x + 18 : x, isUpright ? y : y - 18, {
      colour: palette.galv, knockOut: palette.sheet, turned: isUpright,
    })
  }
}
