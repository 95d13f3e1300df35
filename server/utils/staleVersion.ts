import type { BasisRecord, PlateRecord } from '#shared/schemas/api'
import { refusal } from './refusal'

/** 409 with the version in place, so that the page can offer both. */
export function staleVersion(what: string, version: number, current: PlateRecord | BasisRecord) {
  const by = current.savedBy === null ? '' : ` by ${current.savedBy}`
  return refusal(
    'stale-version',
    `This ${what} was saved${by} since you opened it: version ${current.version} is in place, yours began from version ${version}. Compare both and choose.`,
    { path: 'version', current },
  )
}
