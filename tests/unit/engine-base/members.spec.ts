import { describe, expect, it } from 'vitest'
import { applyOverrides, nationalChoice } from '#shared/engine/actions'
import { criticalMomentUniform, ltbCurve, ltbReduction } from '#shared/engine/ec3'
import { EngineError } from '#shared/engine/errors'
import { lightestSections, verifyBeam } from '#shared/engine/members'
import { findSection, sectionProperties, sectionsOf } from '#shared/engine/sections'
import { FREE, NO_LIMITS, beamOf, heldOver, line, point, rulesOf } from './beams'

const UB = findSection('UB 457x191x67')!
const W0 = 67.1 * 9.81 / 1000

describe('a beam held along its length, worked by hand', () => {
  const beam = beamOf(9000, { line: [line(0, 9000, 12, 9)], restraint: heldOver(9000) })
  const verified = verifyBeam(beam, UB, 'S355', rulesOf())
  const view = verified.cases[0]!
  const wEd = 1.35 * (12 + W0) + 1.5 * 9

  it('has wL²/8 against Wpl fy', () => {
    expect(view.MEd).toBeCloseTo(wEd * 9000 ** 2 / 8, 0)
    expect(view.McRd).toBeCloseTo(UB.WplY * 355, 3)
    expect(verified.utilisation.bending).toBeCloseTo(wEd * 9000 ** 2 / 8 / (UB.WplY * 355), 12)
  })

  it('has wL/2 against the shear area', () => {
    expect(view.VEd).toBeCloseTo(wEd * 4500, 6)
    expect(verified.utilisation.shear).toBeCloseTo(wEd * 4500 / view.VplRd, 12)
  })

  it('has no lateral-torsional buckling', () => {
    expect([view.Mcr, view.lambdaLT, view.chiLT, verified.utilisation.buckling]).toEqual([null, null, 1, null])
  })

  it('deflects 5wL⁴/384EI, own weight in the total', () => {
    const of = (w: number) => 5 * w * 9000 ** 4 / (384 * 210_000 * UB.Iy)
    expect(verified.deflection.variable).toBeCloseTo(of(9), 9)
    expect(verified.deflection.total).toBeCloseTo(of(21 + W0), 9)
    expect(verified.frequency).toBeCloseTo(18 / Math.sqrt(of(12 + W0 + 0.9)), 9)
    expect(verified.utilisation.deflectionVariable).toBeCloseTo(of(9) / 25, 12)
  })

  it('has reactions of its own loads', () => {
    expect(verified.reactions.left.permanent).toBeCloseTo((12 + W0) * 4500, 6)
    expect(verified.reactions.right.variable).toBeCloseTo(9 * 4500, 6)
    expect(verified.reactions.left.ultimate).toBeCloseTo(wEd * 4500, 6)
  })
})

describe('restraint of the compression flange', () => {
  const loads = { point: [point(3000, 40e3, 55e3), point(6000, 40e3, 55e3)] }

  it('by segment: the middle piece under nearly uniform moment governs', () => {
    const verified = verifyBeam(beamOf(9000, { ...loads, restraint: { held: [], points: [3000, 6000] } }, [], false), UB, 'S355', rulesOf())
    const view = verified.cases[0]!
    expect(view.segments.map(({ from, to }) => [from, to])).toEqual([[0, 3000], [3000, 6000], [6000, 9000]])
    expect(view.governingSegment).toBe(1)
    expect(view.Mcr! / criticalMomentUniform(UB, 3000)).toBeCloseTo(1, 4)
    const lambda = Math.sqrt(UB.WplY * 355 / criticalMomentUniform(UB, 3000))
    expect(view.chiLT).toBeCloseTo(ltbReduction(lambda, ltbCurve(UB, '6.3.2.3', nationalChoice('UK'))), 4)
  })

  it('by segment: not the longest but the most used piece governs', () => {
    const verified = verifyBeam(beamOf(10_000, { line: [line(0, 10_000, 10, 10)], restraint: { held: [], points: [2500, 6000] } }), UB, 'S355', rulesOf())
    const view = verified.cases[0]!
    const worst = Math.max(...view.segments.map(segment => segment.utilisation!))
    expect(view.segments[view.governingSegment!]!.utilisation).toBe(worst)
    expect(view.segments.map(({ to, from }) => to - from)).toEqual([2500, 3500, 4000])
    expect(view.governingSegment).toBe(1)
  })

  it('whole beam: one run with restraints inside, more than by segment', () => {
    const beam = beamOf(9000, { ...loads, restraint: { held: [], points: [3000, 6000] } })
    const [bySegment, whole] = (['by-segment', 'whole-beam'] as const).map(criticalMoment => verifyBeam(beam, UB, 'S355', rulesOf({ criticalMoment })))
    expect(whole!.cases[0]!.segments).toHaveLength(1)
    const ratio = whole!.cases[0]!.Mcr! / bySegment!.cases[0]!.Mcr!
    expect(ratio).toBeGreaterThan(1.3)
    expect(ratio).toBeLessThan(1.4)
  })

  it('under a slab on part of the span: each free length is a segment with forks', () => {
    const restraint = { held: [{ from: 2000, to: 5000 }], points: [3000, 7000] }
    const view = verifyBeam(beamOf(9000, { ...loads, restraint }), UB, 'S355', rulesOf()).cases[0]!
    expect(view.segments.map(({ from, to, held }) => [from, to, held])).toEqual([[0, 2000, false], [2000, 5000, true], [5000, 7000, false], [7000, 9000, false]])
    expect(view.segments[1]!.utilisation).toBeNull()
  })

  it('loads on the top flange lower Mcr, a point load at a restraint does not', () => {
    const of = (height: 'top' | 'shear-centre', points: number[]) => verifyBeam(
      beamOf(9000, { point: [point(4500, 40e3, 40e3, height)], restraint: { held: [], points } }, [], false), UB, 'S355', rulesOf(),
    ).cases[0]!.Mcr!
    expect(of('top', [])).toBeLessThan(0.85 * of('shear-centre', []))
    expect(of('top', [4500])).toBe(of('shear-centre', [4500]))
  })

  it('gives a stretch without moment no utilisation', () => {
    const view = verifyBeam(beamOf(6000, { point: [] }, [], false), UB, 'S355', rulesOf()).cases[0]!
    expect([view.MEd, view.Mcr, view.chiLT, view.utilisation.buckling]).toEqual([0, null, 1, 0])
  })

  it('general method and factor f change χLT in their directions', () => {
    const beam = beamOf(9000, { line: [line(0, 9000, 4, 4)] })
    const chi = (parts: Parameters<typeof rulesOf>[0]) => verifyBeam(beam, UB, 'S355', rulesOf(parts)).cases[0]!.chiLT
    expect(chi({ ltbMethod: '6.3.2.2' })).toBeLessThan(chi({}))
    expect(chi({ useF: true })).toBeGreaterThanOrEqual(chi({}))
    expect(chi({ ltbMethod: '6.3.2.2', useF: true })).toBe(chi({ ltbMethod: '6.3.2.2' }))
  })

  it('takes kc 0.94 of Table 6.6 under EN and 1/√C1 in the UK for a uniform load', () => {
    const beam = beamOf(6000, { line: [line(0, 6000, 10, 10)] }, [], false)
    const kc = (code: 'EN' | 'UK') => verifyBeam(beam, UB, 'S355', rulesOf({ choice: nationalChoice(code), useF: true })).cases[0]!.segments[0]!.kc
    expect(kc('EN')).toBe(0.94)
    expect(kc('UK')).toBeCloseTo(1 / Math.sqrt(1.1315), 3)
  })
})

describe('kc of f', () => {
  const kc = (code: 'EN' | 'UK', points: ReturnType<typeof point>[], restraints: number[] = [], criticalMoment: 'by-segment' | 'whole-beam' = 'by-segment') =>
    verifyBeam(
      beamOf(6000, { point: points, restraint: { held: [], points: restraints } }, [], false), UB, 'S355',
      rulesOf({ choice: nationalChoice(code), useF: true, criticalMoment }),
    ).cases[0]!.segments.map(segment => segment.kc)

  it('is 0.86 of Table 6.6 for a load in the middle, 1/√C1 for one beside it', () => {
    expect(kc('EN', [point(3000, 30e3, 30e3)])).toEqual([0.86])
    const [beside] = kc('EN', [point(2700, 30e3, 30e3)])
    expect(beside).not.toBe(0.86)
    expect(beside).toBeCloseTo(1 / Math.sqrt(1.36), 2)
  })

  it('is that of a linear diagram between restraints, whichever end has the larger moment', () => {
    // held at mid-span under the load: from 0 to M and from M to 0, ψ = 0
    expect(kc('EN', [point(3000, 30e3, 30e3)], [3000])).toEqual([1 / 1.33, 1 / 1.33])
    // load at the second of two restraints: 0, M/2, M, 0 with ψ 0, 0.5, 0
    expect(kc('EN', [point(4000, 30e3, 30e3)], [2000, 4000])).toEqual([1 / 1.33, 1 / (1.33 - 0.165), 1 / 1.33].map(value => expect.closeTo(value, 9)))
  })

  it('is 1 for a run with restraints inside, which are in Mcr', () => {
    expect(kc('UK', [point(3000, 30e3, 30e3)], [3000], 'whole-beam')).toEqual([1])
    expect(kc('UK', [point(3000, 30e3, 30e3)])[0]).toBeLessThan(0.87)
  })
})

describe('what the section brings', () => {
  it('takes fy by the thickest element, which is the flange', () => {
    const { fy, cases } = verifyBeam(beamOf(6000, { line: [line(0, 6000, 10, 10)] }), findSection('UB 457x191x89')!, 'S355', rulesOf())
    expect([fy, cases[0]!.McRd / 1e6]).toEqual([345, expect.closeTo(345 * findSection('UB 457x191x89')!.WplY / 1e6, 9)])
  })

  it('divides by γM0 in the section and by γM1 in buckling and in shear buckling', () => {
    const { choice } = applyOverrides(nationalChoice('UK'), { gammaM0: 1.05, gammaM1: 1.2 })
    const section = findSection('UB 762x267x134')!
    const beam = beamOf(6000, { line: [line(0, 6000, 10, 10)] })
    const [own, over] = [nationalChoice('UK'), choice].map(value => verifyBeam(beam, section, 'S355', rulesOf({ choice: value })).cases[0]!)
    expect([own!.McRd / over!.McRd, own!.VplRd / over!.VplRd]).toEqual([expect.closeTo(1.05, 12), expect.closeTo(1.05, 12)])
    const held = beamOf(6000, { line: [line(0, 6000, 10, 10)], restraint: heldOver(6000) })
    expect(verifyBeam(held, section, 'S355', rulesOf({ choice })).cases[0]!.MbRd * 1.2).toBeCloseTo(section.WplY * 355, 3)
    expect([own!.MbRd / over!.MbRd, own!.VbwRd! / over!.VbwRd!]).toEqual([expect.closeTo(1.2, 12), expect.closeTo(1.2, 12)])
  })
})

describe('bending with high shear', () => {
  const short = beamOf(2400, { point: [point(1000, 200e3, 330e3)], restraint: heldOver(2400) }, [], false)
  const verified = verifyBeam(short, UB, 'S355', rulesOf({ limits: NO_LIMITS }))
  const view = verified.cases[0]!

  it('reduces the resistance where M and V act together, on the worse side of the load', () => {
    const P = 1.35 * 200e3 + 1.5 * 330e3
    const V = P * 1400 / 2400
    const rho = (2 * V / view.VplRd - 1) ** 2
    const hw = UB.h - 2 * UB.tf
    const MvRd = (UB.WplY - rho * hw * hw * UB.tw / 4) * 355
    expect(view.bendingAt.x).toBe(1000)
    expect(view.bendingAt.rho).toBeCloseTo(rho, 12)
    expect(view.utilisation.bending).toBeCloseTo(V * 1000 / MvRd, 12)
  })

  it('looks at both sides of a load', () => {
    const mirrored = beamOf(2400, { point: [point(1400, 200e3, 330e3)], restraint: heldOver(2400) }, [], false)
    const other = verifyBeam(mirrored, UB, 'S355', rulesOf({ limits: NO_LIMITS })).cases[0]!
    expect(other.bendingAt.x).toBe(1400)
    expect(other.utilisation.bending).toBeCloseTo(view.utilisation.bending, 12)
  })

  it('finds the worst place where the shear leaves nothing of a section that is nearly all web', () => {
    const section = sectionProperties({ family: 'UB', designation: 'test', mass: 70, h: 453, b: 80, tw: 20, tf: 6, r: 0 }, -1)
    const w = 5600
    const found = verifyBeam(
      beamOf(800, { line: [line(0, 800, 0, w / 1.5)], restraint: heldOver(800) }, [], false), section, 'S355', rulesOf({ limits: NO_LIMITS }),
    ).cases[0]!
    let worst = 0
    for (let i = 0; i <= 800_000; i++) {
      const x = i / 1000
      const V = Math.abs(w * (400 - x))
      const rho = V > 0.5 * found.VplRd ? (2 * V / found.VplRd - 1) ** 2 : 0
      const W = Math.max(section.WplY - rho * 441 * 441 * 20 / 4, section.WplY / 1000)
      worst = Math.max(worst, w * x * (800 - x) / 2 / (W * 345))
    }
    expect(found.utilisation.bending / worst).toBeGreaterThan(1 - 1e-9)
    expect(found.utilisation.bending / worst).toBeLessThan(1.01)
  })

  it('stays a number that rises with the load far beyond the resistance in shear', () => {
    const used = [1, 3, 10, 100].map(times => verifyBeam(
      beamOf(2400, { line: [line(0, 2400, times * 200, 0)], point: [point(1000, times * 500e3, 0)], restraint: heldOver(2400) }), UB, 'S355', rulesOf(),
    ).utilisation.bending)
    for (let i = 1; i < used.length; i++) expect(used[i]!).toBeGreaterThan(used[i - 1]!)
    expect(used.every(Number.isFinite)).toBe(true)
  })

  it('finds the worst place inside a uniformly loaded stretch', () => {
    const beam = beamOf(3000, { line: [line(0, 3000, 100, 240)], restraint: heldOver(3000) }, [], false)
    const found = verifyBeam(beam, UB, 'S355', rulesOf({ limits: NO_LIMITS })).cases[0]!
    const w = 1.35 * 100 + 1.5 * 240
    let worst = 0
    for (let i = 0; i <= 300_000; i++) {
      const x = i / 100
      const M = w * x * (3000 - x) / 2
      const V = Math.abs(w * (1500 - x))
      const rho = V > 0.5 * found.VplRd ? (2 * V / found.VplRd - 1) ** 2 : 0
      const hw = UB.h - 2 * UB.tf
      worst = Math.max(worst, M / ((UB.WplY - rho * hw * hw * UB.tw / 4) * 355))
    }
    expect(found.utilisation.bending).toBeCloseTo(worst, 9)
  })
})

describe('shear buckling', () => {
  it('takes the smaller resistance for UB 762x267x134 in S355 with η 1.0', () => {
    const section = findSection('UB 762x267x134')!
    const view = verifyBeam(beamOf(6000, { line: [line(0, 6000, 100, 100)], restraint: heldOver(6000) }), section, 'S355', rulesOf()).cases[0]!
    expect(view.VbwRd).not.toBeNull()
    expect(view.utilisation.shear).toBeCloseTo(view.VEd / Math.min(view.VplRd, view.VbwRd!), 12)
  })
})

describe('combinations 6.10a and 6.10b', () => {
  it('shows the one with the larger moment and verifies both', () => {
    const of = (permanent: number, variable: number) => verifyBeam(
      beamOf(9000, { line: [line(0, 9000, permanent, variable)], restraint: heldOver(9000) }, [], false), UB, 'S355', rulesOf({ combination: '6.10ab' }),
    )
    const light = of(5, 15)
    expect(light.cases.map(({ combination }) => combination)).toEqual(['6.10a', '6.10b'])
    expect(light.cases[light.shown]!.combination).toBe('6.10b')
    expect(light.cases[1]!.MEd).toBeCloseTo((0.925 * 1.35 * 5 + 1.5 * 15) * 9000 ** 2 / 8, 0)
    const heavy = of(30, 2)
    expect(heavy.cases[heavy.shown]!.combination).toBe('6.10a')
    expect(heavy.cases[0]!.MEd).toBeCloseTo((1.35 * 30 + 1.5 * 0.7 * 2) * 9000 ** 2 / 8, 0)
  })
})

describe('both combinations', () => {
  it('are verified: the governing check may be under the one that is not shown, and a note says so', () => {
    // more moment under 6.10a from permanent load, more shear under 6.10b from variable load beside a support
    const beam = beamOf(3000, { line: [line(0, 3000, 30, 0)], point: [point(30, 0, 80e3)], restraint: heldOver(3000) }, [], false)
    const verified = verifyBeam(beam, UB, 'S355', rulesOf({ combination: '6.10ab', limits: NO_LIMITS }))
    const [a, b] = verified.cases
    expect(verified.cases[verified.shown]!.combination).toBe('6.10a')
    expect(b!.utilisation.shear).toBeGreaterThan(a!.utilisation.shear)
    expect([verified.governing, verified.largest]).toEqual(['shear', b!.utilisation.shear])
    expect(verified.notes).toEqual([expect.stringContaining('more under 6.10b than under 6.10a')])
    const same = verifyBeam(beamOf(3000, { line: [line(0, 3000, 5, 30)], restraint: heldOver(3000) }), UB, 'S355', rulesOf({ combination: '6.10ab' }))
    expect(same.notes).toEqual([])
  })

  it('count the accompanying part with its height', () => {
    const Mcr = (variable: ReturnType<typeof line>) => verifyBeam(
      beamOf(9000, { line: [line(0, 9000, 6, 0), variable] }, [], false), UB, 'S355', rulesOf({ combination: '6.10ab' }),
    ).cases[0]!.Mcr!
    expect(Mcr(line(0, 9000, 0, 4, 'top'))).toBeLessThan(0.97 * Mcr(line(0, 9000, 0, 4)))
  })
})

describe('frequency', () => {
  it('counts permanent load and the stated share of the variable load', () => {
    const of = (variableShare: number) => verifyBeam(
      beamOf(9000, { line: [line(0, 9000, 8, 10)], restraint: heldOver(9000) }, [], false), UB, 'S355', rulesOf({ limits: { ...NO_LIMITS, frequency: 4, variableShare } }),
    )
    const deflection = (w: number) => 5 * w * 9000 ** 4 / (384 * 210_000 * UB.Iy)
    expect(of(0.3).frequency).toBeCloseTo(18 / Math.sqrt(deflection(11)), 9)
    expect(of(0.3).utilisation.frequency).toBeCloseTo(4 / (18 / Math.sqrt(deflection(11))), 9)
    expect(of(0).frequency).toBeCloseTo(18 / Math.sqrt(deflection(8)), 9)
  })
})

describe('construction stage', () => {
  it('counts the worst of its cases, whatever their order', () => {
    const wet = (load: number) => ({ name: `wet slab of ${load}`, line: [line(0, 9000, load, 1, 'top' as const)], point: [], restraint: FREE })
    const of = (loads: number[]) => verifyBeam(beamOf(9000, { line: [line(0, 9000, 1, 1)], restraint: heldOver(9000) }, loads.map(wet)), UB, 'S355', rulesOf()).utilisation.construction
    expect(of([8, 2])).toBe(of([2, 8]))
    expect(of([8, 2])).toBeGreaterThan(of([2])!)
  })

  it('governs where the bare beam is free, and says so', () => {
    const service = { line: [line(0, 9000, 12, 8)], restraint: heldOver(9000) }
    const wet = { name: 'wet slab', line: [line(0, 9000, 12, 2.3, 'top')], point: [], restraint: FREE }
    const verified = verifyBeam(beamOf(9000, service, [wet]), UB, 'S355', rulesOf({ combination: '6.10ab' }))
    expect(verified.governing).toBe('construction')
    expect(verified.cases.at(-1)!.combination).toBe('6.10')
    expect(verified.utilisation.construction).toBe(verified.largest)
    expect(verified.passes).toBe(false)
  })
})

describe('class 4', () => {
  it('is named and does not pass, whatever its utilisation', () => {
    const section = findSection('HEAA 300')!
    const verified = verifyBeam(beamOf(4000, { line: [line(0, 4000, 1, 1)], restraint: heldOver(4000) }), section, 'S460', rulesOf())
    expect(verified.class).toBe(4)
    expect([verified.passes, verified.largest < 1, verified.notes.length]).toEqual([false, true, 1])
    expect(lightestSections(beamOf(4000, { line: [line(0, 4000, 1, 1)], restraint: heldOver(4000) }), [section], 'S460', rulesOf())).toEqual([])
  })
})

describe('overrides', () => {
  it('reach the resistances', () => {
    const beam = beamOf(9000, { line: [line(0, 9000, 4, 4)] })
    const { choice } = applyOverrides(nationalChoice('UK'), { gammaM1: 1.1 })
    const [own, over] = [nationalChoice('UK'), choice].map(value => verifyBeam(beam, UB, 'S355', rulesOf({ choice: value })).cases[0]!)
    expect(own!.MbRd / over!.MbRd).toBeCloseTo(1.1, 12)
    expect(own!.McRd).toBe(over!.McRd)
  })
})

describe('the staircase of mass and depth', () => {
  it('starts with the lightest and goes on with shallower ones', () => {
    const beam = beamOf(9000, { line: [line(0, 9000, 12, 9)], restraint: heldOver(9000) })
    const steps = lightestSections(beam, sectionsOf(['UB', 'UC']), 'S355', rulesOf())
    expect(steps.length).toBeGreaterThan(2)
    for (let i = 1; i < steps.length; i++) {
      expect(steps[i]!.section.mass).toBeGreaterThanOrEqual(steps[i - 1]!.section.mass)
      expect(steps[i]!.section.h).toBeLessThan(steps[i - 1]!.section.h)
    }
  })

  it('leaves out what the caller does not accept', () => {
    const beam = beamOf(9000, { line: [line(0, 9000, 12, 9)], restraint: heldOver(9000) })
    const [first] = lightestSections(beam, sectionsOf(['UB']), 'S355', rulesOf(), section => section.b >= 180)
    expect(first!.section.b).toBeGreaterThanOrEqual(180)
  })

  it('is empty where none passes', () => {
    expect(lightestSections(beamOf(9000, { line: [line(0, 9000, 12, 9000)] }), sectionsOf(['IPE']), 'S355', rulesOf())).toEqual([])
  })
})

describe('bad input', () => {
  const good = beamOf(6000, { line: [line(0, 6000, 1, 1)] })
  const wrong: [string, () => unknown, string][] = [
    ['negative span', () => verifyBeam({ ...good, span: -1 }, UB, 'S355', rulesOf()), 'span'],
    ['NaN', () => verifyBeam(beamOf(6000, { line: [line(0, 6000, Number.NaN, 1)] }), UB, 'S355', rulesOf()), 'service.line[0].permanent'],
    ['load outside', () => verifyBeam(beamOf(6000, { point: [point(1, 1, 1), point(6001, 1, 1)] }), UB, 'S355', rulesOf()), 'service.point[1].at'],
    ['uplift', () => verifyBeam(beamOf(6000, { line: [line(0, 6000, 1, -1)] }), UB, 'S355', rulesOf()), 'service.line[0].variable'],
    ['empty stretch', () => verifyBeam(beamOf(6000, { line: [line(2000, 2000, 1, 1)] }), UB, 'S355', rulesOf()), 'service.line[0].to'],
    ['restraint outside', () => verifyBeam(beamOf(6000, { restraint: { held: [], points: [7000] } }), UB, 'S355', rulesOf()), 'service.restraint.points[0]'],
    ['overlapping stretches', () => verifyBeam(beamOf(6000, { restraint: { held: [{ from: 0, to: 3000 }, { from: 2000, to: 4000 }], points: [] } }), UB, 'S355', rulesOf()), 'service.restraint.held[1].from'],
    ['infinite limit', () => lightestSections(good, [UB], 'S355', rulesOf({ limits: { ...NO_LIMITS, total: Infinity } })), 'limits.total'],
    ['share above 1', () => verifyBeam(good, UB, 'S355', rulesOf({ limits: { ...NO_LIMITS, variableShare: 2 } })), 'limits.variableShare'],
    ['a load out of all range', () => verifyBeam(beamOf(6000, { line: [line(0, 6000, 1e13, 1)] }), UB, 'S355', rulesOf()), 'service.line[0].permanent'],
    ['a span of a hair', () => verifyBeam(beamOf(0.5, { line: [line(0, 0.5, 1, 1)] }), UB, 'S355', rulesOf()), 'span'],
    ['a thousand restraints', () => verifyBeam(beamOf(6000, { restraint: { held: [], points: Array.from({ length: 1000 }, (_, i) => i) } }), UB, 'S355', rulesOf()), 'service.restraint.points'],
    ['grade not offered', () => verifyBeam(good, findSection('UC 356x406x1299')!, 'S355', rulesOf({ choice: nationalChoice('EN') })), 'grade'],
  ]

  it.each(wrong)('%s is a typed error that names the value', (_name, run, path) => {
    let error: unknown
    try {
      run()
    } catch (thrown) {
      error = thrown
    }
    expect(error).toBeInstanceOf(EngineError)
    expect((error as EngineError).path).toBe(path)
  })
})
