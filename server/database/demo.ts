/** The demo: an invented practice, its accounts and its projects. No person and no building of these names exists. */
import { PlateSchema, type Plate, type PlateInput } from '#shared/schemas/plate'
import type { ProjectRole } from '#shared/schemas/api'
import type { Range } from '#shared/schemas/range'

export const DEMO_PRACTICE = 'Demonstration office'

const DEMO_PASSWORD = 'demo-2417-wharf'

export interface DemoAccount {
  name: string
  email: string
  /** Null: administrator without an engineering role. */
  projectRole: ProjectRole | null
  /** In words, for the list that `npm start` prints. */
  role: string
  password: string
}

const account = (name: string, email: string, projectRole: ProjectRole | null, role: string): DemoAccount =>
  ({ name, email, projectRole, role, password: DEMO_PASSWORD })

export const demoAccounts: DemoAccount[] = [
  account('Demo engineer', 'engineer@demo.example', 'engineer', 'scheme engineer'),
  account('Demo architect', 'architect@demo.example', 'architect', 'architect'),
  account('Demo cost planner', 'cost-planner@demo.example', 'cost-planner', 'cost planner'),
  account('Demo checker', 'checker@demo.example', 'checker', 'checker'),
  account('Demo administrator', 'administrator@demo.example', null, 'practice administrator'),
]

const lines = (labels: string, at: number[]) => at.map((position, i) => ({ label: labels[i] ?? String(i + 1), at: position }))

const numbered = (...at: number[]) => lines('123456789', at)
const lettered = (...at: number[]) => lines('ABCDEFGH', at)

const office: PlateInput = {
  format: 'baywright-plate', version: 1, name: 'Typical floor, levels 1 to 4',
  gridX: numbered(0, 9_000, 18_000, 27_000, 36_000, 45_000, 54_000),
  gridY: lettered(0, 7_500, 15_000, 21_000, 28_500, 36_000),
  outline: [[0, 0], [54_000, 0], [54_000, 36_000], [0, 36_000]],
  voids: [
    { name: 'Core west', x: 11_000, y: 15_500, width: 6_000, height: 5_000 },
    { name: 'Core east', x: 38_000, y: 15_500, width: 5_000, height: 5_000 },
  ],
  keepClear: [{ name: 'Foyer', x: 22_500, y: 15_000, width: 9_000, height: 6_000 }],
  slab: { system: 'deck', name: 'Composite deck 130/60', depth: 130, weight: 2.75, maxSpan: 3_300 },
  floorLoad: { permanent: 3.6, variable: 3.8, category: 'B' },
  lineLoads: [{ name: 'Curtain wall', on: 'outline', permanent: 4, variable: 0 }],
  storeys: 4, storeyHeight: 4_000,
  roof: { permanent: 4, variable: 0.75 },
}

const school: PlateInput = {
  format: 'baywright-plate', version: 1, name: 'Level 1',
  gridX: numbered(0, 7_200, 14_400, 21_600, 28_800, 36_000, 43_200, 50_400, 57_600),
  gridY: lettered(0, 7_500, 10_500, 18_000, 25_200, 32_400, 39_600),
  outline: [[0, 0], [57_600, 0], [57_600, 18_000], [21_600, 18_000], [21_600, 39_600], [0, 39_600]],
  voids: [
    { name: 'Stair 1', x: 28_800, y: 7_500, width: 7_200, height: 3_000 },
    { name: 'Double-height hall', x: 43_200, y: 0, width: 14_400, height: 7_500, floors: 1 },
    { name: 'Lift', x: 7_600, y: 11_000, width: 2_200, height: 2_200 },
    { name: 'Stair 2', x: 400, y: 33_000, width: 3_000, height: 6_200 },
  ],
  keepClear: [{ name: 'Hall', x: 43_300, y: 100, width: 14_200, height: 7_300 }],
  slab: { system: 'planks', name: 'Planks 200 with 50 topping', depth: 250, weight: 4.1, maxSpan: 8_500, span: 'y' },
  floorLoad: { permanent: 4.7, variable: 4, category: 'C1' },
  zones: [
    { name: 'Corridor', x: 0, y: 7_500, width: 57_600, height: 3_000, permanent: 4.7, variable: 4, category: 'C3' },
    { name: 'Book store', x: 7_200, y: 25_200, width: 7_200, height: 7_200, permanent: 4.7, variable: 7.5, category: 'E1' },
  ],
  lineLoads: [{ name: 'Masonry', on: 'outline', permanent: 6, variable: 0 }],
  storeys: 2, storeyHeight: 3_800,
  roof: { permanent: 3.5, variable: 0.75 },
}

export interface DemoProject {
  number: string
  name: string
  people: ProjectRole[]
  plate: Plate | null
  /** The range of a finished study. */
  range: Range | null
}

/** Both directions, one to five divisions, on the drawn grid. */
const drawnGrid: Range = {
  x: { kind: 'fixed' }, y: { kind: 'fixed' }, primaryDirections: ['x', 'y'], divisions: [1, 2, 3, 4, 5],
  depthCap: null, maxDistinctSections: null,
}

/** In the order in which they are made: the last one is the first of the list of projects. */
export const demoProjects: DemoProject[] = [
  { number: '2425', name: 'Station Square block B (invented)', people: ['engineer'], plate: null, range: null },
  {
    number: '2409', name: 'Hill Street school (invented)', people: ['engineer', 'architect'],
    plate: PlateSchema.parse(school), range: null,
  },
  {
    number: '2417', name: 'Wharf Lane offices (invented)', people: ['engineer', 'architect', 'cost-planner', 'checker'],
    plate: PlateSchema.parse(office), range: drawnGrid,
  },
]
