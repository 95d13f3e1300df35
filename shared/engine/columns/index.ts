export { liftChoices, liftWithoutSection } from './choices'
export { explainColumn } from './explain'
export { columnSizer, type ColumnSizer } from './size'
export type { BeamEnd, ColumnDemand, ColumnLength, ColumnLift, ColumnRules, SizedColumn } from './types'
