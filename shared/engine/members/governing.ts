import type { CheckName } from './types'

/** Keeps the highest utilisation of all checks under all combinations; ties go to the check taken first. */
export class Governing {
  bending = 0
  shear = 0
  buckling = 0
  construction: number | null = null
  private service: { name: CheckName, value: number }[] = []

  takeCase(stage: 'service' | 'construction', bending: number, shear: number, buckling: number | null): void {
    if (stage === 'construction') {
      this.construction = Math.max(this.construction ?? 0, bending, shear, buckling ?? 0)
      return
    }
    this.bending = Math.max(this.bending, bending)
    this.shear = Math.max(this.shear, shear)
    this.buckling = Math.max(this.buckling, buckling ?? 0)
  }

  take(name: CheckName, value: number | null): void {
    if (value !== null) this.service.push({ name, value })
  }

  private get highest(): { name: CheckName, value: number } {
    const all = [
      { name: 'bending' as CheckName, value: this.bending },
      { name: 'shear' as CheckName, value: this.shear },
      { name: 'buckling' as CheckName, value: this.buckling },
      ...this.service,
      { name: 'construction' as CheckName, value: this.construction ?? 0 },
    ]
    return all.reduce((best, next) => next.value > best.value ? next : best)
  }

  get largest(): number {
    return this.highest.value
  }

  get name(): CheckName {
    return this.highest.name
  }
}
