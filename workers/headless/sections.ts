import { z } from 'zod'
import { CATALOGUE } from '#shared/engine/sections'

const SectionsSchema = z.strictObject({})

/** The `sections` command: the whole catalogue with its properties. */
export function sections(document: unknown): unknown[] {
  SectionsSchema.parse(document)
  return CATALOGUE.map(({ catalogueIndex: _, ...section }) => section)
}
