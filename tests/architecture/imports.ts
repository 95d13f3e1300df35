/** Reads the import lines of the sources, for the tests of the arrows. */
import { readdirSync, readFileSync } from 'node:fs'
import { dirname, join, posix, relative, resolve } from 'node:path'
import { fileURLToPath } from 'node:url'

export const root = resolve(dirname(fileURLToPath(import.meta.url)), '../..')

export interface ImportLine {
  /** File that imports, relative to the root, with slashes. */
  from: string
  /** What it names, as written. */
  specifier: string
  /** Target relative to the root without extension, or undefined for a package. */
  target: string | undefined
  isTypeOnly: boolean
}

/** Source files below a folder of the root, relative to the root. */
export function filesBelow(folder: string, extensions: readonly string[] = ['.ts', '.vue']): string[] {
  return readdirSync(join(root, folder), { recursive: true, withFileTypes: true })
    .filter(entry => entry.isFile() && extensions.some(extension => entry.name.endsWith(extension)))
    .map(entry => relative(root, join(entry.parentPath, entry.name)).split('\\').join('/'))
    .sort()
}

/** The text with comments blanked out; texts in quotes are kept, since the import lines hold them. */
export function withoutComments(text: string): string {
  return text.replace(/\/\*[\s\S]*?\*\/|(?<![:'"`\w/])\/\/[^\n]*/g, '')
}

function targetOf(from: string, specifier: string): string | undefined {
  if (specifier.startsWith('#shared/')) return `shared/${specifier.slice('#shared/'.length)}`
  if (/^(~~|@@)\//.test(specifier)) return specifier.slice(3)
  if (/^[~@]\//.test(specifier)) return `app/${specifier.slice(2)}`
  if (specifier.startsWith('.')) return posix.normalize(posix.join(posix.dirname(from), specifier))
  return undefined
}

/** `import … from`, `export … from`, `import '…'` and `import('…')` of one file. */
export function importsOf(from: string): ImportLine[] {
  const text = withoutComments(readFileSync(join(root, from), 'utf8'))
  const statement = /\b(import|export)\s+(type\s+)?(?:[\w*{][^'"`;]*?\sfrom\s+)?(['"])([^'"]+)\3|\bimport\(\s*(['"`])([^'"`]+)\5/g
  return [...text.matchAll(statement)].map((match) => {
    const specifier = match[4] ?? match[6] ?? ''
    return { from, specifier, target: targetOf(from, specifier), isTypeOnly: match[2] !== undefined }
  })
}
