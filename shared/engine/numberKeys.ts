/** What is known by rows of numbers, without making text of them. */

export interface NumberMap<T> {
  /** Begins a row. */
  begin: () => void
  add: (value: number) => void
  /** Ends the row: what the first row equal to it stands for; `make` where it is the first. */
  end: (make: () => T) => T
}

const FNV_OFFSET = 0x811C9DC5
const FNV_PRIME = 0x01000193

export function numberMap<T>(): NumberMap<T> {
  let row = new Float64Array(256)
  let bits = new Uint32Array(row.buffer)
  let length = 0
  const known = new Map<number, { row: Float64Array, value: T }[]>()
  const hash = (): number => {
    let code = FNV_OFFSET
    for (let n = 0; n < 2 * length; n++) code = Math.imul(code ^ bits[n]!, FNV_PRIME) ^ (code >>> 15)
    return code
  }
  const isEqual = (other: Float64Array): boolean => {
    if (other.length !== length) return false
    for (let n = 0; n < length; n++) if (other[n] !== row[n]) return false
    return true
  }
  return {
    begin() {
      length = 0
    },
    add(value) {
      if (length === row.length) {
        const longer = new Float64Array(2 * length)
        longer.set(row)
        row = longer
        bits = new Uint32Array(row.buffer)
      }
      // Minus zero is zero.
      row[length++] = value + 0
    },
    end(make) {
      const code = hash()
      const rows = known.get(code)
      const twin = rows?.find(other => isEqual(other.row))
      if (twin) return twin.value
      const own = row.slice(0, length)
      const value = make()
      if (rows) rows.push({ row: own, value })
      else known.set(code, [{ row: own, value }])
      return value
    },
  }
}
