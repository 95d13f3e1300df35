/** One published value beside the engine's own, computed live. */
export interface PublishedCheck {
  id: string
  /** Full reference with place. */
  source: string
  /** How the value was obtained: read in the text, quoted by another text, from memory, computed independently. */
  standing: 'read' | 'quoted' | 'from memory' | 'computed independently'
  what: string
  expected: number
  computed: number
  /** Absolute, in the unit of the value. */
  tolerance: number
  /** Why it is that wide. */
  toleranceReason: string
  unit: string
  /** computed / expected − 1. */
  deviation: number
  passes: boolean
  /** A deviation that is shown, not an equality that is asked (published approximation). */
  shown?: boolean
}
