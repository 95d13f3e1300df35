import { EngineError } from '../errors'
import { DE, FR, IE, NL, SE } from './choices-other'
import { EN } from './choices-en'
import { UK } from './choices-uk'
import type { ChoiceCode, NationalChoice } from './types'

const CHOICES: Record<ChoiceCode, NationalChoice> = { EN, UK, IE, DE, FR, NL, SE }

export const CHOICE_CODES: readonly ChoiceCode[] = ['EN', 'UK', 'IE', 'DE', 'FR', 'NL', 'SE']

/** The national choice of that code. Throws where there is none. */
export function nationalChoice(code: ChoiceCode): NationalChoice {
  const choice = Object.hasOwn(CHOICES, code) ? CHOICES[code] : undefined
  if (!choice) throw new EngineError('unknown-choice', `There is no national choice "${String(code)}".`, 'nationalChoice')
  return choice
}
