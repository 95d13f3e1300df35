/** The caution that stands where results stand: the same words on screen, in print and in each export. */
export const CAUTION: readonly string[] = [
  'Preliminary sizing for scheme comparison; not for construction.',
  'Beams are bare steel without composite action; the frame is taken as braced; torsion of edge beams, webs under local load and the slabs themselves are not checked.',
  'Connections, lateral stability, temporary works, fire engineering, disproportionate collapse beyond tie forces, foundations and floor response beyond the stated checks are outside.',
  'Local codes, the national annex in force and a licensed engineer’s judgement govern.',
]

export const CAUTION_TEXT = CAUTION.join(' ')
