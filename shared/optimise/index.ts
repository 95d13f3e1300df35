export { MOST_ROWS, proposeSections, rowsOf } from './integerProgramme'
