/** What differs between two documents of one plate, in words, for the reader who has to choose. */
import type { LineLoad, Plate, Slab } from '#shared/schemas/plate'
import { thousands } from './words'

export interface Difference { what: string, mine: string, theirs: string }

const NONE = 'none'

type Described = Map<string, string>

function linesOf(plate: Plate): Described {
  return new Map([...plate.gridX, ...plate.gridY].map(each => [
    `Line ${each.label}`, `${thousands(each.at)} mm${each.pinned ? ', pinned' : ''}`,
  ]))
}

function boxText(box: { x: number, y: number, width: number, height: number }): string {
  return `${thousands(box.width)} × ${thousands(box.height)} mm at ${thousands(box.x)}, ${thousands(box.y)}`
}

function loadText(load: { permanent: number, variable: number }, unit: string): string {
  return `${load.permanent} + ${load.variable} ${unit}`
}

function placeText({ on }: LineLoad): string {
  if (typeof on === 'string') return 'on the outline'
  if ('void' in on) return `on void ${on.void}`
  return `from ${on.from.map(thousands).join(', ')} to ${on.to.map(thousands).join(', ')}`
}

function slabText(slab: Slab): string {
  const parts = [
    slab.name ?? slab.system, `${slab.depth} mm`, slab.weight === undefined ? '' : `${slab.weight} kN/m²`,
    `spans ${slab.span === 'free' ? 'either way' : `along ${slab.span}`} to ${thousands(slab.maxSpan)} mm`,
    slab.fixedToTopFlange ? 'fixed to the flange' : 'not fixed to the flange',
  ]
  return parts.filter(part => part !== '').join(', ')
}

function elementsOf(plate: Plate): Described {
  const found: Described = new Map()
  for (const each of plate.voids) found.set(`Void ${each.name}`, boxText(each) + (each.floors ? `, ${each.floors} floors` : ''))
  for (const each of plate.keepClear) found.set(`Keep clear ${each.name}`, boxText(each))
  for (const each of plate.regions) found.set(`Region ${each.name}`, boxText(each))
  for (const each of plate.zones) {
    const extra = `${each.category}${each.reducible ? ', reducible' : ''}${each.slab ? `, ${slabText(each.slab)}` : ''}`
    found.set(`Load zone ${each.name}`, `${loadText(each, 'kN/m²')} ${extra}, ${boxText(each)}`)
  }
  for (const each of plate.omittedColumns) found.set(`Column ${each.x}/${each.y}`, `omitted, line along ${each.line}`)
  plate.lineLoads.forEach((each) => {
    found.set(`Line load ${each.name}`, `${loadText(each, 'kN/m')} ${placeText(each)}`)
  })
  return found
}

function measuresOf(plate: Plate): Described {
  return new Map([
    ['Name', plate.name],
    ['Outline', `${plate.outline.length} corners: ${plate.outline.map(([x, y]) => `${x}, ${y}`).join('; ')}`],
    ['Slab', slabText(plate.slab)],
    ['Floor load', `${loadText(plate.floorLoad, 'kN/m²')}, category ${plate.floorLoad.category}`],
    ['Roof', plate.roof ? loadText(plate.roof, 'kN/m²') : NONE],
    ['Storeys', String(plate.storeys)],
    ['Storey height', `${thousands(plate.storeyHeight)} mm`],
    ['Overhang limit', `${thousands(plate.overhang)} mm`],
    ['Services zone', `${thousands(plate.servicesZone)} mm`],
    ['Ceiling', `${thousands(plate.ceiling)} mm`],
    ['Finish', `${thousands(plate.finish)} mm`],
  ])
}

export function differencesOf(mine: Plate, theirs: Plate): Difference[] {
  return [measuresOf, linesOf, elementsOf].flatMap((describe) => {
    const a = describe(mine)
    const b = describe(theirs)
    return [...new Set([...a.keys(), ...b.keys()])]
      .map(what => ({ what, mine: a.get(what) ?? NONE, theirs: b.get(what) ?? NONE }))
      .filter(each => each.mine !== each.theirs)
  })
}
