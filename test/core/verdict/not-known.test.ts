import { describe, expect, it } from 'vitest'
import { evaluate } from '../../../core/evaluate.ts'
import type { ProjectInput } from '../../../core/project/project.ts'
import { judge } from '../../../core/verdict/judge.ts'
import { CORNERS, sketchProject, type Sketch } from '../mounts/machine-project.ts'

type Requirements = NonNullable<ProjectInput['requirements']>
type Absorber = NonNullable<ProjectInput['absorbers']>[number]
type Vector = [number, number, number]

const up: Vector = [0, 0, 1]
/** Springs under the centre of gravity: heave alone at sqrt(4 x 3e5 / 400) = 54.77 rad/s. */
const HEAVE = Math.sqrt((4 * 3e5) / 400)

function judged(
  requirements: Requirements,
  duty: object,
  more: Partial<ProjectInput> = {},
  sketch: Sketch | object = {},
) {
  return evaluate(
    sketchProject({
      centre: [0, 0, 0],
      places: CORNERS,
      ...sketch,
      more: {
        machine: {
          massProperties: {
            from: 'typed',
            mass: 400,
            centreOfGravity: [0, 0, 0],
            inertia: { xx: 30, yy: 50, zz: 60 },
          },
          duty,
        },
        sources: [{ kind: 'harmonic', id: 'push', load: { kind: 'force', direction: up, amplitude: 1 } }],
        requirements,
        ...more,
      },
    }),
  ).verdicts
}

describe('a resonance without damping', () => {
  const undamped = { type: { lossFactor: 0 } }
  const force = (limit: number): Requirements => [
    { kind: 'transmittedForce', id: 'r', speeds: 'operating', limit },
  ]

  it('is never met, whatever the limit, where an order passes it', () => {
    const duty = { runningSpeed: 100, lowestSpeed: 20 }
    const [verdict] = judged(force(1e14), duty, {}, undamped)
    expect(verdict).toMatchObject({ status: 'unknown', value: null, margin: null })
    expect(verdict?.advice).toContain('heave')
  })

  it('fails a limit that is passed before it, with the reason and no lever', () => {
    const [verdict] = judged(force(2), { runningSpeed: 100, lowestSpeed: 20 }, {}, undamped)
    expect(verdict?.status).toBe('fail')
    expect(verdict?.advice).toContain('no bound')
  })

  it('says the same where the machine runs exactly on it', () => {
    const running: Requirements = [{ kind: 'transmittedForce', id: 'r', limit: 1e14 }]
    const [verdict] = judged(running, { runningSpeed: HEAVE }, {}, undamped)
    expect(verdict?.status).toBe('unknown')
    expect(verdict?.advice).toContain('no bound')
  })

  it('does not matter outside the speeds, nor to a force that does not drive it', () => {
    expect(judged(force(1e3), { runningSpeed: 100, lowestSpeed: 60 }, {}, undamped)[0]?.status).toBe('pass')
    const athwart = {
      sources: [
        {
          kind: 'harmonic' as const,
          id: 'push',
          load: { kind: 'force' as const, direction: [0, 1, 0] as Vector, amplitude: 1 },
        },
      ],
    }
    // sway alone at sqrt(4 x 2e5 / 400) = 44.7 rad/s lies below the speeds, heave at 54.8 within them
    const [verdict] = judged(force(1e3), { runningSpeed: 100, lowestSpeed: 50 }, athwart, undamped)
    expect(verdict?.status).toBe('pass')
  })
})

describe('an absorber that is not known', () => {
  const absorber = (id: string, more: Partial<Absorber> = {}): Absorber => ({
    id,
    name: id,
    host: { kind: 'mode', mode: 3, position: [0, 0, 0], direction: up },
    size: { by: 'mass', mass: 12 },
    tuning: { by: 'given', frequency: 8, dampingRatio: 0.1 },
    strokeLimit: 1,
    ...more,
  })
  const unsized = absorber('unsized', { size: { by: 'mass', mass: null } })
  const duty = { lowestSpeed: 120, highestSpeed: 130 }
  const requirements: Requirements = [
    { kind: 'transmittedForce', id: 'force', speeds: 'operating', limit: 1e3 },
    { kind: 'absorberStroke', id: 'stroke', speeds: 'operating' },
    { kind: 'modeSeparation', id: 'apart', speeds: 'operating', limit: 0.01 },
  ]
  const words = (absorbers: Absorber[]) =>
    judged(requirements, duty, { absorbers }).map(({ status }) => status)

  it('lets no requirement be met by the machine without it', () => {
    expect(words([absorber('a')])).toEqual(['pass', 'pass', 'pass'])
    expect(words([absorber('a'), unsized])).toEqual(['unknown', 'unknown', 'unknown'])
    expect(words([absorber('a'), { ...unsized, enabled: false }])).toEqual(['pass', 'pass', 'pass'])
  })

  it('says what it needs', () => {
    const [verdict] = judged(requirements, duty, { absorbers: [unsized] })
    expect(verdict?.advice).toBe('Not known yet: Give the absorber mass.')
  })
})

describe('the travel of several absorbers', () => {
  it('fails by one beyond its limit, though another has none', () => {
    const one = (id: string, strokeLimit: number | null): Absorber => ({
      id,
      name: id,
      host: { kind: 'mode', mode: 3, position: [0, 0, 0], direction: up },
      size: { by: 'mass', mass: 12 },
      tuning: { by: 'given', frequency: 8, dampingRatio: 0.1 },
      strokeLimit,
    })
    const stroke: Requirements = [{ kind: 'absorberStroke', id: 'stroke' }]
    const status = (absorbers: Absorber[]) => judged(stroke, { runningSpeed: 50 }, { absorbers })[0]?.status
    expect(status([one('a', null), one('b', 1e-9)])).toBe('fail')
    expect(status([one('a', null), one('b', 1)])).toBe('unknown')
  })
})

describe('a machine that its absorber tips over', () => {
  it('has no verdict met, and says why', () => {
    const requirements: Requirements = [{ kind: 'modeSeparation', id: 'apart', limit: 0.01 }]
    const absorbers: Absorber[] = [
      {
        id: 'mast',
        host: { kind: 'mode', mode: 3, position: [0, 0, 400], direction: up },
        size: { by: 'mass', mass: 90 },
        tuning: { by: 'given', frequency: 8, dampingRatio: 0.1 },
      },
    ]
    const [verdict] = judged(requirements, { runningSpeed: 100 }, { absorbers })
    expect(verdict?.status).toBe('unknown')
    expect(verdict?.advice).toContain('tip over')
  })
})

describe('mounts that carry their load at no deflection', () => {
  it('are judged against the limit of their design', () => {
    const standard = 9.80665
    const air = {
      design: {
        component: 'airSpring' as const,
        // a quarter of 400 kg on each of the four corners
        load: 100 * standard,
        effectiveArea: 0.005,
        bellowsVolume: 0.001,
        lateralStiffness: 1e5,
        bumpTravel: 0.02,
      },
    }
    const [verdict] = judged([{ kind: 'mountDeflection', id: 'r' }], { runningSpeed: 100 }, {}, { type: air })
    expect(verdict).toMatchObject({ status: 'pass', value: 0, margin: 1 })
    expect(verdict?.limit).toBeGreaterThan(0)
  })
})

describe('a run-up whose peaks were not all found', () => {
  it('meets no clearance, but fails one that is passed already', () => {
    const status = (limit: number, converged: boolean) => {
      const project = sketchProject({
        places: CORNERS,
        more: {
          runUp: { enabled: true, up: { law: { by: 'ramp', time: 5 } }, down: { enabled: false } },
          requirements: [{ kind: 'runUpForce', id: 'r', limit }],
        },
      })
      const computed = evaluate(project)
      const up = computed.runUp?.up
      if (!up) throw new Error('no run-up')
      return judge(project, { ...computed, runUp: { up: { ...up, converged }, down: null } })[0]?.status
    }
    expect(status(1e9, true)).toBe('pass')
    expect(status(1e9, false)).toBe('unknown')
    expect(status(1e-9, false)).toBe('fail')
  })
})
