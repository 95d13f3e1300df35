import { PlateSchema, type Plate, type PlateInput } from '#shared/schemas/plate'

/** Six bays of 9 m by 7.5, 7.5, 6, 7.5, 7.5 m, with one void, one zone and one keep-clear zone. */
export function officePlate(change: Partial<PlateInput> = {}): Plate {
  return PlateSchema.parse({
    format: 'baywright-plate', version: 1, name: 'Level 3',
    gridX: [0, 9000, 18000, 27000, 36000, 45000, 54000].map((at, i) => ({ label: String(i + 1), at })),
    gridY: [0, 7500, 15000, 21000, 28500, 36000].map((at, i) => ({ label: 'ABCDEF'[i] ?? '', at })),
    outline: [[0, 0], [54000, 0], [54000, 36000], [0, 36000]],
    voids: [{ name: 'Core east', x: 38000, y: 15500, width: 5000, height: 5000 }],
    keepClear: [{ name: 'Bridge', x: 22500, y: 15000, width: 9000, height: 6000 }],
    zones: [{ name: 'Plant', x: 18000, y: 15000, width: 18000, height: 6000, permanent: 3.25, variable: 7.5, category: 'E' }],
    slab: { system: 'deck', name: 'Deck 130/60', depth: 130, weight: 2.75, maxSpan: 3300 },
    floorLoad: { permanent: 3.6, variable: 3.8, category: 'B' },
    lineLoads: [{ name: 'Curtain wall', on: 'outline', permanent: 4, variable: 0 }],
    storeys: 4, storeyHeight: 4000,
    ...change,
  } satisfies PlateInput)
}

/** The L of the school: eight bays of 7.2 m, the north-east quarter cut out at 4/D. */
export function schoolPlate(): Plate {
  return officePlate({
    gridX: Array.from({ length: 9 }, (_, i) => ({ label: String(i + 1), at: i * 7200 })),
    gridY: [0, 7500, 10500, 18000, 25200, 32400, 39600].map((at, i) => ({ label: 'ABCDEFG'[i] ?? '', at })),
    outline: [[0, 0], [57600, 0], [57600, 18000], [21600, 18000], [21600, 39600], [0, 39600]],
    voids: [], keepClear: [], zones: [],
  })
}
