import { spawnSync } from 'node:child_process'
import { describe, expect, it } from 'vitest'
import { failureOf, internalFailure } from '~~/workers/headless/failure'
import { members } from '~~/workers/headless/members'
import { sections } from '~~/workers/headless/sections'

const member = {
  id: 'a', section: 'UB 457x191x67', grade: 'S355', nationalChoice: 'UK', combination: '6.10', span: 9000,
  line: [{ from: 0, to: 9000, permanent: 3.1, variable: 2.0 }],
  point: [{ at: 3000, permanent: 42.0, variable: 55.0 }, { at: 6000, permanent: 42.0, variable: 55.0 }],
  selfWeight: true, restraint: { kind: 'points', at: [3000, 6000] }, loadHeight: 'shear-centre', criticalMoment: 'by-segment',
  ltbMethod: '6.3.2.3', useF: false, limits: { variable: 360, total: 250, frequency: null, variableShare: 0.1 },
}

describe('headless members', () => {
  it('answers in kN, kNm, mm, worked by hand for the loads of the contract', () => {
    const [answer] = members([member]) as Record<string, number>[]
    const own = 67.1 * 9.81 / 1000
    const w = 1.35 * (3.1 + own) + 1.5 * 2
    const P = 1.35 * 42 + 1.5 * 55
    expect(answer!.MEd).toBeCloseTo(w * 81 / 8 + P * 3, 9)
    expect(answer!.VEd).toBeCloseTo(w * 4.5 + P, 9)
    expect(answer).toMatchObject({ id: 'a', fy: 355, class: 1, passes: false, governing: 'deflectionTotal' })
    expect(answer!.reactions).toMatchObject({ left: { permanent: expect.closeTo((3.1 + own) * 4.5 + 42, 9), variable: expect.closeTo(64, 9) } })
  })

  it('keeps the order, and gives null for what does not apply', () => {
    const answers = members([{ ...member, id: 'b', restraint: { kind: 'continuous' } }, { ...member, id: 'c', restraint: { kind: 'none' } }]) as Record<string, unknown>[]
    expect(answers.map(({ id }) => id)).toEqual(['b', 'c'])
    expect(answers[0]).toMatchObject({ Mcr: null, lambdaLT: null, chiLT: 1, utilisation: { buckling: null, frequency: null } })
    expect((answers[1] as { utilisation: { buckling: number } }).utilisation.buckling).toBeGreaterThan(1)
  })

  const wrong: [string, unknown, string, string][] = [
    ['an unknown field', [{ ...member, colour: 'red' }], 'unknown-field', '[0].colour'],
    ['an unknown field inside', [{ ...member, limits: { ...member.limits, creep: 1 } }], 'unknown-field', '[0].limits.creep'],
    ['a load outside the beam', [member, { ...member, point: [{ at: 9001, permanent: 1, variable: 1 }] }], 'outside-span', '[1].point[0].at'],
    ['a restraint outside', [{ ...member, restraint: { kind: 'points', at: [3000, 9500] } }], 'outside-span', '[0].restraint.at[1]'],
    ['a negative span', [{ ...member, span: -9000 }], 'invalid-value', '[0].span'],
    ['a section that does not exist', [{ ...member, section: 'UB 1x1x1' }], 'unknown-section', '[0].section'],
    ['a grade not offered at that thickness', [{ ...member, section: 'UC 356x406x1299', nationalChoice: 'EN' }], 'out-of-range', '[0].grade'],
    ['a load that ends before its start', [{ ...member, line: [{ from: 5000, to: 4000, permanent: 1, variable: 1 }] }], 'invalid-value', '[0].line[0].to'],
    ['a load on a stretch of a hair', [{ ...member, line: [{ from: 100, to: 100 + 1e-9, permanent: 1e5, variable: 0 }] }], 'empty-stretch', '[0].line[0].to'],
    ['a missing value', [{ ...member, grade: undefined }], 'invalid-value', '[0].grade'],
    ['no array', member, 'invalid-value', ''],
    ['a load of 1e308', [{ ...member, point: [{ at: 1, permanent: 1e308, variable: 0 }] }], 'invalid-value', '[0].point[0].permanent'],
    ['a span of 1e308', [{ ...member, span: 1e308 }], 'invalid-value', '[0].span'],
    ['a span of 1e-9', [{ ...member, span: 1e-9, line: [], point: [], restraint: { kind: 'none' } }], 'invalid-value', '[0].span'],
    ['a hundred thousand loads', [{ ...member, point: Array.from({ length: 100_000 }, () => ({ at: 1, permanent: 1, variable: 1 })) }], 'invalid-value', '[0].point'],
    ['a hundred thousand restraints', [{ ...member, restraint: { kind: 'points', at: Array.from({ length: 100_000 }, (_, i) => i / 100) } }], 'invalid-value', '[0].restraint.at'],
  ]

  it.each(wrong)('%s is refused by its path', (_name, document, code, path) => {
    let failure = null
    try {
      members(document)
    } catch (error) {
      failure = failureOf(error)
    }
    expect(failure).toMatchObject({ code, path })
  })
})

describe('an error of our own', () => {
  it('is none of the input, and is answered in the same form', () => {
    const error = new RangeError('out of room')
    expect(failureOf(error)).toBeNull()
    expect(internalFailure(error)).toEqual({ code: 'internal', message: 'RangeError: out of room', path: '' })
    expect(internalFailure('words')).toEqual({ code: 'internal', message: 'words', path: '' })
  })
})

describe('headless sections', () => {
  it('lists the catalogue with the fields of the contract', () => {
    const list = sections({}) as Record<string, unknown>[]
    expect(list).toHaveLength(285)
    expect(Object.keys(list[0]!).sort()).toEqual([
      'A', 'It', 'Iw', 'Iy', 'Iz', 'WelY', 'WelZ', 'WplY', 'WplZ', 'b', 'designation', 'family', 'h', 'iy', 'iz', 'mass', 'perimeter', 'r', 'tf', 'tw',
    ])
  })
})

describe('the headless command', () => {
  const run = (name: string, input: string | Buffer) => spawnSync('npm', ['run', '--silent', 'headless', '--', name], { input, encoding: 'utf8', timeout: 60_000 })

  it('writes one document on standard output and nothing else', () => {
    const { status, stdout, stderr } = run('members', JSON.stringify([member]))
    expect([status, stderr]).toEqual([0, ''])
    expect(JSON.parse(stdout)).toHaveLength(1)
  }, 60_000)

  it('refuses what is not UTF-8', () => {
    const broken = Buffer.from(JSON.stringify([member]).replace('"a"', '"?"'))
    broken[broken.indexOf('?')] = 0xff
    const { status, stdout, stderr } = run('members', broken)
    expect([status, stdout]).toEqual([2, ''])
    expect(JSON.parse(stderr)).toEqual({ error: { code: 'invalid', message: 'The document is not valid UTF-8.', path: '' } })
  }, 60_000)

  it.each([['members', ''], ['members', '[{"id":'], ['sections', '{"a":1}'], ['nothing', '{}']])('%s with %j answers on standard error with code 2', (name, input) => {
    const { status, stdout, stderr } = run(name, input)
    expect([status, stdout]).toEqual([2, ''])
    expect(Object.keys((JSON.parse(stderr) as { error: object }).error)).toEqual(['code', 'message', 'path'])
  }, 60_000)
})
