export { calculationSheet } from './sheet'
export { columnSheet } from './column-sheet'
export type {
  CalculationSheet, ColumnSheet, ColumnSheetInput, ColumnSheetLength, ColumnSheetLift, ColumnSheetLiftShown, ColumnSheetMoment, ColumnSheetTerm, Quantity, SheetContext, SheetDiagrams, SheetGroup, SheetLineLoad, SheetPointLoad, SheetProperty,
  SheetReaction, SheetRow, SheetSegment,
} from './types'
export { checkName } from './words'
