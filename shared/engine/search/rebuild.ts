/** A scheme rebuilt from its key. */
import { EngineError } from '../errors'
import { sizeOffered } from './offered'
import type { PreparedStudy } from './prepare'
import { parseSchemeKey } from './rows'
import { type Scheme, frameForSizing, isNoScheme, sizeScheme } from './schemes'

/** @throws EngineError `unknown-reference` where the key names no scheme of the study. */
export function rebuildScheme(study: PreparedStudy, key: string): Scheme {
  return rebuildWith(study, key, sizeOffered)
}

/** The same without the range's limit on the number of different sections. */
export function rebuildUnlimited(study: PreparedStudy, key: string): Scheme {
  return rebuildWith(study, key, sizeScheme)
}

function rebuildWith(study: PreparedStudy, key: string, size: typeof sizeOffered): Scheme {
  const parsed = parseSchemeKey(key)
  if (!parsed || parsed.number > study.total) {
    throw new EngineError('unknown-reference', `There is no scheme ${key} in this study.`, 'key')
  }
  const arrangement = study.arrangements.at(parsed.number)
  const prepared = frameForSizing(study, arrangement)
  const scheme = isNoScheme(prepared) ? prepared : size(study, arrangement, prepared, parsed.depthCap)
  if (isNoScheme(scheme)) {
    throw new EngineError('unknown-reference', `Arrangement ${parsed.number} gives no scheme: ${scheme.detail}`, 'key')
  }
  return scheme
}
