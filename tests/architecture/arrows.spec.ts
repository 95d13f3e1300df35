import { readFileSync } from 'node:fs'
import { join } from 'node:path'
import { describe, expect, it } from 'vitest'
import { filesBelow, importsOf, root, withoutComments } from './imports'
import type { ImportLine } from './imports'

/** From left to right; a room imports from those to its left, and rooms of one list do not know each other. */
const rooms = [
  ['materials'], ['sections'], ['actions'], ['statics', 'ec3'], ['members'], ['sheet'], ['plate'], ['framing'], ['columns'],
  ['quantities'], ['selection'], ['search'], ['verification'],
]
const positionOf = new Map(rooms.flatMap((names, position) => names.map(name => [name, position] as const)))

const engineFiles = filesBelow('shared/engine')
const engineImports = engineFiles.flatMap(importsOf)

/** The room that a file or an import target lies in; undefined for files beside the rooms, such as errors.ts. */
function roomOf(path: string): string | undefined {
  if (engineFiles.includes(`${path}.ts`) && path.split('/').length === 3) return undefined
  return /^shared\/engine\/([^/.]+)\//.exec(`${path}/`)?.[1]
}

function written(lines: ImportLine[]): string[] {
  return lines.map(line => `${line.from} -> ${line.specifier}`)
}

function importsBelow(folder: string): ImportLine[] {
  return filesBelow(folder).flatMap(importsOf)
}

function leaving(folder: string, allowed: RegExp): string[] {
  return written(importsBelow(folder).filter(({ target }) => target !== undefined && !allowed.test(target)))
}

describe('the reader of import lines', () => {
  it('finds named, bare, dynamic and type-only imports over several lines', () => {
    const found = importsOf('tests/architecture/example.txt')
    expect(found.map(line => [line.specifier, line.isTypeOnly])).toEqual([
      ['node:fs', false], ['./near', true], ['../../shared/engine/ec3', false], ['zod', false], ['#shared/schemas/plate', true],
    ])
    expect(found.map(line => line.target)).toEqual([
      undefined, 'tests/architecture/near', 'shared/engine/ec3', undefined, 'shared/schemas/plate',
    ])
  })

  it('sees the engine', () => {
    expect(engineFiles.length).toBeGreaterThan(20)
    expect(engineImports.length).toBeGreaterThan(20)
  })
})

describe('the engine', () => {
  it('has only rooms whose place is known', () => {
    const unknown = engineFiles.map(roomOf).filter(room => room !== undefined && !positionOf.has(room))
    expect([...new Set(unknown)]).toEqual([])
  })

  it('imports no package', () => {
    expect(written(engineImports.filter(({ target }) => target === undefined))).toEqual([])
  })

  it('imports from the engine, and types from the schemas', () => {
    const outside = engineImports.filter(({ target }) => target !== undefined && !target.startsWith('shared/engine'))
    expect(written(outside.filter(({ target, isTypeOnly }) => !target?.startsWith('shared/schemas/') || !isTypeOnly))).toEqual([])
  })

  it('has rooms that import only from those to their left', () => {
    const wrong = engineImports.filter(({ from, target }) => {
      const [importer, imported] = [roomOf(from), roomOf(target ?? '')]
      if (importer === undefined || imported === undefined || importer === imported) return false
      return (positionOf.get(imported) ?? Infinity) >= (positionOf.get(importer) ?? -1)
    })
    expect(written(wrong)).toEqual([])
  })

  it('enters another room by its one door', () => {
    const inside = engineImports.filter(({ from, target }) => {
      const [importer, imported] = [roomOf(from), roomOf(target ?? '')]
      if (imported === undefined || importer === imported) return false
      return !new RegExp(`^shared/engine/${imported}(/index|/types)?$`).test(target ?? '')
    })
    expect(written(inside)).toEqual([])
  })

  it.each([
    ['the clock', /\bnew Date\b|\bDate\.now\b|\bperformance\.now\b/],
    ['random', /\bMath\.random\b|\bcrypto\.(getRandomValues|randomUUID)\b/],
    ['the console', /\bconsole\.\w/],
    ['the environment', /\bprocess\.\w|\bglobalThis\b|\bimport\.meta\b/],
  ])('does not read %s', (_, pattern) => {
    const readers = engineFiles.filter(file => pattern.test(withoutComments(readFileSync(join(root, file), 'utf8'))))
    expect(readers).toEqual([])
  })

  it('has a door and a README in each room', () => {
    const names = new Set(engineFiles.map(roomOf).filter(room => room !== undefined))
    const readmes = new Set(filesBelow('shared/engine', ['README.md']))
    const without = [...names].filter(room =>
      !engineFiles.includes(`shared/engine/${room}/index.ts`) || !readmes.has(`shared/engine/${room}/README.md`))
    expect(without).toEqual([])
  })
})

describe('the arrows between the top rooms', () => {
  it('app imports from app and shared', () => {
    expect(leaving('app', /^(app|shared)\//)).toEqual([])
  })

  it('shared imports from shared', () => {
    expect(leaving('shared', /^shared\//)).toEqual([])
  })

  it('server imports from server and shared', () => {
    expect(leaving('server', /^(server|shared)\//)).toEqual([])
  })

  it('workers import from workers, shared and server/database', () => {
    expect(leaving('workers', /^(workers|shared|server\/database)(\/|$)/)).toEqual([])
  })

  it('server/database knows neither Nitro nor the routes', () => {
    const lines = importsBelow('server/database')
    expect(leaving('server/database', /^(server\/database|shared)\//)).toEqual([])
    expect(written(lines.filter(({ specifier }) => /^(#imports|nitropack|h3|nuxt)/.test(specifier)))).toEqual([])
  })
})
