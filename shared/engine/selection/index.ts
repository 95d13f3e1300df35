export { leastMassSelection, leastMassSelections, type SelectionOptions } from './select'
export { smallestCover } from './cover'
export { type Proposal, type Selection, type SelectionGroup, type SelectionProblem, HALF_A_GRAM } from './types'
