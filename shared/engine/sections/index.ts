export { CATALOGUE, FAMILIES, compareSections, findSection, sectionsOf } from './catalogue'
export { plasticModuli, secondMoments, sectionProperties, torsionConstant } from './properties'
export type { Family, Section, SectionDimensions } from './types'
