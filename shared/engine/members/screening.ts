import { criticalMomentUniform, ltbReduction, ltbSlenderness, rayleighFactor } from '../ec3'
import type { BucklingMesh } from '../ec3'
import { meshOf } from './prepare'
import type { PreparedCase, PreparedCombination, Stretch } from './prepare'
import type { Resistances } from './resistances'
import type { BeamRules } from './types'

/**
 * The trial shape's energies on one stretch under one combination. Its Rayleigh quotient is an upper
 * bound of the eigenvalue on the same mesh: a section that fails with it fails with the exact Mcr.
 */
interface TrialEnergy { bend1: number, bend2: number, base: number, mixed: number, self: number, raised: number }

function bandEnergy(band: Float64Array, shape: Float64Array): number {
  let sum = 0
  for (let i = 0; i < shape.length; i++) {
    for (let d = 0; d < 4 && i + d < shape.length; d++) {
      sum += (d === 0 ? 1 : 2) * band[4 * i + d]! * shape[i]! * shape[i + d]!
    }
  }
  return sum
}

function twist({ trial }: BucklingMesh, first: number, shape: Float64Array, at: number): number {
  return trial[first]! * shape[at]! + trial[first + 1]! * shape[at + 1]!
    + trial[first + 2]! * shape[at + 2]! + trial[first + 3]! * shape[at + 3]!
}

function trialEnergy(mesh: BucklingMesh, { self }: PreparedCase, { base, qTop, PTop }: PreparedCombination): TrialEnergy {
  const energy = {
    bend1: bandEnergy(mesh.bend1, mesh.trial) / mesh.length,
    bend2: bandEnergy(mesh.bend2, mesh.trial) / mesh.length ** 3,
    base: 0, mixed: 0, self: 0, raised: 0,
  }
  for (let p = 0; p < mesh.points; p++) {
    const i = mesh.start + mesh.interval[p]!
    const s = mesh.length * mesh.offset[p]!
    const theta = twist(mesh, mesh.first[p]!, mesh.shape, 4 * p)
    const w = mesh.length * mesh.weight[p]! * theta * theta
    const M = base.M[i]! + s * (base.V[i]! - 0.5 * s * base.q[i]!)
    const m = self.M[i]! + s * (self.V[i]! - 0.5 * s * self.q[i]!)
    energy.base += w * M * M
    energy.mixed += w * M * m
    energy.self += w * m * m
    energy.raised += w * qTop[i]!
  }
  for (let k = 0; k < mesh.stations; k++) {
    const theta = twist(mesh, mesh.stationFirst[k]!, mesh.stationShape, 4 * k)
    energy.raised += PTop[mesh.start + mesh.stationIndex[k]!]! * theta * theta
  }
  return energy
}

const kept = new WeakMap<PreparedCombination, (TrialEnergy | undefined)[]>()

function energyOf(index: number, stretch: Stretch, loads: PreparedCase, combination: PreparedCombination): TrialEnergy {
  let list = kept.get(combination)
  if (!list) kept.set(combination, list = [])
  return list[index] ??= trialEnergy(meshOf(stretch, loads), loads, combination)
}

/**
 * A lower bound of MEd/Mb,Rd of one free stretch (0 where there is none): with the trial shape in
 * place of the eigenvalue. Only without f, where χLT rises with Mcr.
 */
export function leastBucklingUtilisation(
  index: number, stretch: Stretch, MEd: number, loads: PreparedCase, combination: PreparedCombination, weight: number,
  resistances: Resistances, rules: BeamRules,
): number {
  if (stretch.inside > 0 || rules.useF) return MEd / resistances.MbRdFull
  const energy = energyOf(index, stretch, loads, combination)
  const w = combination.factors.permanent * weight
  const { GIt, EIw, EIz, section, W, fy, MbRdFull } = resistances
  const factor = rayleighFactor(
    GIt * energy.bend1 + EIw * energy.bend2,
    energy.raised * section.h / 2,
    (energy.base + w * (2 * energy.mixed + w * energy.self)) / EIz,
  )
  const chi = ltbReduction(ltbSlenderness(W, fy, factor * MEd), resistances.curves[rules.ltbMethod])
  return MEd / (chi * MbRdFull)
}

/**
 * An upper bound of MEd/Mb,Rd of one free stretch, Infinity where there is none: uniform moment of the
 * size MEd is the worst diagram there is. Not with raised loads, restraints inside or f.
 */
export function mostBucklingUtilisation(
  stretch: Stretch, MEd: number, { x }: PreparedCase, { raised }: PreparedCombination, { section, W, fy, MbRdFull, curves }: Resistances, rules: BeamRules,
): number {
  if (raised || stretch.inside > 0 || rules.useF) return Number.POSITIVE_INFINITY
  const Mcr = criticalMomentUniform(section, x[stretch.to]! - x[stretch.from]!)
  return MEd / (ltbReduction(ltbSlenderness(W, fy, Mcr), curves[rules.ltbMethod]) * MbRdFull)
}
