/**
 * The choice of few sections as an integer programme for javascript-lp-solver. What it answers is a
 * proposal: the caller counts its cost anew and has a bound of its own.
 */
import solver, { type Model, type SolveResult } from 'javascript-lp-solver'
import type { SelectionProblem } from '#shared/engine/selection'

/** Rows beyond which it is not asked: README.md has what was measured. */
export const MOST_ROWS = 1500
/** ms; it may overrun this, so it runs only where it can be ended from outside. */
const TIME_LIMIT = 500

/** Rows of the programme: one for each group, one for each passing section of it, one for the number of sections. */
export function rowsOf({ groups }: SelectionProblem): number {
  return groups.reduce((rows, group) => rows + 1 + group.passing.length, 1)
}

/** Sections of an integral answer; null where it is too large to ask, or no such answer came. */
export function proposeSections(problem: SelectionProblem, most: number): number[] | null {
  if (rowsOf(problem) > MOST_ROWS) return null
  const answer = solver.Solve(programme(problem, most))
  // It may stop early, or answer with its relaxation: nothing but a whole answer counts.
  if (!isAnswer(answer) || !answer.feasible || answer.isIntegral !== true) return null
  const chosen = problem.masses.flatMap((_, s) => Number(answer[`y${s}`] ?? 0) > 0.5 ? [s] : [])
  return chosen.length <= most && servesEveryGroup(problem, chosen) ? chosen : null
}

/** x = 1: the group takes the section; y = 1: the section is used. Each x ≤ its y: added up per section it answers wrongly. */
export function programme({ masses, groups }: SelectionProblem, most: number): Model {
  const constraints: Model['constraints'] = { sections: { max: most } }
  const variables: Model['variables'] = {}
  const binaries: NonNullable<Model['binaries']> = {}
  masses.forEach((_, s) => {
    variables[`y${s}`] = { cost: 0, sections: 1 }
    binaries[`y${s}`] = 1
  })
  groups.forEach(({ weight, passing }, g) => {
    constraints[`group${g}`] = { equal: 1 }
    for (const s of passing) {
      const link = `link${g}-${s}`
      constraints[link] = { max: 0 }
      variables[`x${g}-${s}`] = { cost: weight * masses[s]!, [`group${g}`]: 1, [link]: 1 }
      variables[`y${s}`]![link] = -1
    }
  })
  return { optimize: 'cost', opType: 'min', constraints, variables, binaries, options: { timeout: TIME_LIMIT } }
}

function isAnswer(answer: unknown): answer is SolveResult {
  return typeof answer === 'object' && answer !== null && 'feasible' in answer
}

function servesEveryGroup({ groups }: SelectionProblem, chosen: readonly number[]): boolean {
  return groups.every(({ passing }) => passing.some(s => chosen.includes(s)))
}
