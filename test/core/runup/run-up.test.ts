import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { evaluate } from '../../../core/evaluate.ts'
import type { Vec3 } from '../../../core/project/fields.ts'
import type { Project, ProjectInput } from '../../../core/project/project.ts'
import { readProject } from '../../../core/project/read.ts'
import type { RunUpPass } from '../../../core/results.ts'
import { judgedOf } from '../../../core/runup/judged.ts'
import { prepare } from '../../../core/runup/prepared.ts'
import { runUpTrace } from '../../../core/runup/run-up-trace.ts'
import { runUpOf } from '../../../core/runup/run-up.ts'
import { runUpInSmallSteps, type StepsInput } from './small-steps.ts'

const CENTRE: Vec3 = [0.03, -0.02, 0.35]
const PLACES: readonly Vec3[] = [
  [0.5, 0.3, 0],
  [0.45, -0.32, 0.02],
  [-0.5, 0.28, 0],
  [-0.42, -0.3, 0.04],
]
const TOP = 150

interface Mounts {
  readonly viscous: number
  readonly lossFactor?: number
}

function machine(
  { viscous, lossFactor = 0 }: Mounts,
  runUp: ProjectInput['runUp'],
  more: Partial<ProjectInput> = {},
): Project {
  return readProject({
    format: 'stillbed-project',
    version: 1,
    machine: {
      massProperties: {
        from: 'typed',
        mass: 400,
        centreOfGravity: CENTRE,
        inertia: { xx: 22, yy: 35, zz: 40, xy: 1, xz: -2 },
      },
      shaft: { axis: 'x', position: [0.1, 0, 0.4] },
      duty: { runningSpeed: TOP },
      points: [{ id: 'P', name: 'bearing', position: [0.4, 0.1, 0.45] }],
    },
    sources: [{ kind: 'unbalance', id: 'rotor', amount: { by: 'unbalance', unbalance: 0.01 } }],
    mounting: {
      types: PLACES.map((_, i) => ({
        id: `type ${i}`,
        stiffness: [9e4 + 1e4 * i, 8e4, 2e5 - 2e4 * i],
        viscous: [viscous, viscous * (1 + 0.2 * i), viscous * (2 - 0.3 * i)],
        lossFactor,
      })),
      placed: PLACES.map((position, i) => ({ id: `M${i + 1}`, type: `type ${i}`, position })),
    },
    analysis: { gravityStiffness: false },
    runUp,
    ...more,
  })
}

const ramp = (time: number, hold = 0): ProjectInput['runUp'] => ({
  enabled: true,
  up: { law: { by: 'ramp', time }, hold },
  down: { law: { by: 'ramp', time } },
})

function passes(project: Project): { up: RunUpPass; down: RunUpPass } {
  const { runUp, problems } = evaluate(project, { sweepPoints: 100 })
  if (!runUp?.up || !runUp.down) throw new Error(problems.map(({ message }) => message).join(' '))
  return { up: runUp.up, down: runUp.down }
}

const AXES = ['x', 'y', 'z'] as const

describe('a run-up', () => {
  it('is what small steps of the equations of motion give: two orders, a torque law, coupled damping', () => {
    const inertia = 2.5
    const [torque, load] = [80, 50]
    const push: Vec3 = [0, 0.4, 1]
    const project = machine(
      { viscous: 260 },
      {
        enabled: true,
        up: { law: { by: 'torque', inertia, torque, loadTorque: load }, hold: 1 },
        down: { enabled: false },
      },
      {
        sources: [
          { kind: 'unbalance', id: 'rotor', amount: { by: 'unbalance', unbalance: 0.01 } },
          {
            kind: 'harmonic',
            id: 'push',
            order: 2,
            phase: 0.7,
            position: [0.3, 0, 0.5],
            load: { kind: 'force', direction: push, amplitude: 40 },
          },
        ],
      },
    )
    const up = evaluate(project, { sweepPoints: 100 }).runUp?.up
    if (!up) throw new Error('no run-up')
    const arm = (place: Vec3): Vec3 => [place[0] - CENTRE[0], place[1] - CENTRE[1], place[2] - CENTRE[2]]
    const cross = (a: Vec3, b: Vec3) => [
      a[1] * b[2] - a[2] * b[1],
      a[2] * b[0] - a[0] * b[2],
      a[0] * b[1] - a[1] * b[0],
    ]
    const six = (force: Vec3, place: Vec3) => [...force, ...cross(arm(place), force)]
    const length = Math.hypot(...push)
    const steady = (40 / length) * Math.cos(0.7)
    const aside = (40 / length) * Math.sin(0.7)
    const input: StepsInput = {
      mass: [
        [400, 0, 0, 0, 0, 0],
        [0, 400, 0, 0, 0, 0],
        [0, 0, 400, 0, 0, 0],
        [0, 0, 0, 22, -1, 2],
        [0, 0, 0, -1, 35, 0],
        [0, 0, 0, 2, 0, 40],
      ],
      centre: CENTRE,
      mounts: project.mounting.placed.map(({ position }, i) => ({
        position,
        stiffness: project.mounting.types[i]?.stiffness ?? [0, 0, 0],
        viscous: project.mounting.types[i]?.viscous ?? [0, 0, 0],
      })),
      orders: [
        {
          order: 1,
          // U (w² - i w') (y - i z)
          force: (speed, acceleration) => {
            const u = 0.01
            const shaft: Vec3 = [0.1, 0, 0.4]
            return {
              re: six([0, u * speed * speed, -u * acceleration], shaft),
              im: six([0, -u * acceleration, -u * speed * speed], shaft),
            }
          },
        },
        {
          order: 2,
          force: () => ({
            re: six([push[0] * steady, push[1] * steady, push[2] * steady], [0.3, 0, 0.5]),
            im: six([push[0] * aside, push[1] * aside, push[2] * aside], [0.3, 0, 0.5]),
          }),
        },
      ],
      acceleration: (_, speed) => (speed < TOP ? (torque - load * (speed / TOP) ** 2) / inertia : 0),
      duration: up.duration,
      step: 5e-4,
      points: [[0.4, 0.1, 0.45]],
    }
    const expected = runUpInSmallSteps(input)
    // 2e-4: peaks are found to 5e-5 and more, the small steps stop at samples and at the end of the run-up
    AXES.forEach((axis, d) => {
      const found = up.points[0]?.peaks[axis].value ?? NaN
      expect(found / (expected.points[0]?.[d] ?? NaN)).toBeCloseTo(1, 3.7)
      up.mounts.forEach(({ force }, m) => {
        expect(force[axis].value / (expected.forces[m]?.[d] ?? NaN)).toBeCloseTo(1, 3.7)
      })
    })
    expect(up.converged).toBe(true)
  }, 60_000)

  it('tends to the steady motion when it is slow, upwards and downwards', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 160, max: 600, noNaN: true }),
        fc.double({ min: 0, max: 0.15, noNaN: true }),
        (viscous, lossFactor) => {
          // 40 000 s for 24 Hz: a free vibration lasts less than 7 s, in which the speed changes by 0.03 rad/s
          const { up, down } = passes(machine({ viscous, lossFactor }, ramp(40_000)))
          for (const pass of [up, down]) {
            const all = [
              ...pass.points.map((point) => point.peaks),
              ...pass.mounts.map((mount) => mount.travel),
            ]
            for (const peaks of all) {
              for (const axis of [...AXES, 'resultant'] as const) {
                // 1e-3: what is left of a slow passage falls as the sweep rate over the width squared
                expect(Math.abs((peaks[axis].ratio ?? NaN) - 1)).toBeLessThan(1e-3)
              }
            }
          }
        },
      ),
      { numRuns: 6 },
    )
  }, 60_000)

  it('stays below the steady peak when it is quick, and the later the quicker', () => {
    const peaks = [40, 10, 3].map(
      (time) => passes(machine({ viscous: 120 }, ramp(time, 3))).up.points[0]?.peaks.z,
    )
    const ratios = peaks.map((peak) => peak?.ratio ?? NaN)
    expect(ratios[0]).toBeGreaterThan(ratios[1] ?? NaN)
    expect(ratios[1]).toBeGreaterThan(ratios[2] ?? NaN)
    const speeds = peaks.map((peak) => peak?.speed ?? NaN)
    expect(speeds[1]).toBeGreaterThan(speeds[0] ?? NaN)
  })

  it('hides no instant above its peak: the trace between never exceeds it', () => {
    const project = machine({ viscous: 60 }, ramp(8, 2))
    const { up } = passes(project)
    const times = Float64Array.from({ length: 30_001 }, (_, i) => (10 * i) / 30_000)
    const { trace } = runUpTrace(project, 'up', [0.4, 0.1, 0.45], times, [])
    AXES.forEach((axis, d) => {
      const peak = up.points[0]?.peaks[axis]
      const re = trace?.re[d] ?? new Float64Array()
      const im = trace?.im[d] ?? new Float64Array()
      let largest = 0
      re.forEach((value, i) => (largest = Math.max(largest, Math.hypot(value, im[i] ?? NaN))))
      // above: the search's own tolerance; below: 0.3 ms between samples of a motion under 25 Hz
      expect(largest).toBeLessThanOrEqual((peak?.value ?? NaN) * (1 + 5e-5))
      expect(largest).toBeGreaterThan((peak?.value ?? NaN) * (1 - 1e-4))
    })
  })

  it('keeps the steady force of the response at the speed that it holds', () => {
    // hysteretic damping keeps its own force, so that it must be that of the response at 150 rad/s
    const project = machine(
      { viscous: 0, lossFactor: 0.12 },
      {
        enabled: true,
        up: { law: { by: 'ramp', from: TOP - 0.01, to: TOP, time: 60 }, hold: 20 },
        down: { enabled: false },
      },
    )
    const { runUp, response } = evaluate(project)
    const steady = response?.atSpeeds[0]?.mountForces ?? []
    runUp?.up?.mounts.forEach(({ force }, m) => {
      // 1 %: the motion itself is that of the equivalent viscous damping, far above every resonance; the
      // wrong force, that of a viscous damper, would be several percent larger
      expect(Math.abs(force.resultant.value / (steady[m] ?? NaN) - 1)).toBeLessThan(0.01)
    })
    expect(runUp?.up?.mounts.length).toBe(4)
  })

  it('draws an envelope that holds its peak and nothing above', () => {
    const { up, down } = passes(machine({ viscous: 40 }, ramp(30, 5)))
    for (const pass of [up, down]) {
      const { envelope, points } = pass
      if (!envelope) throw new Error('no envelope')
      const highest = Math.max(...envelope.displacement)
      expect(highest).toBe(points[0]?.peaks.resultant.value)
      expect(envelope.place).toBe('P')
      expect(envelope.time.length).toBeLessThanOrEqual(1502)
      expect([...envelope.time].every((time, i) => i === 0 || time >= (envelope.time[i - 1] ?? 0))).toBe(true)
      expect(envelope.time.at(-1)).toBeCloseTo(pass.duration + pass.hold, 9)
      expect(envelope.speed.at(-1)).toBeCloseTo(pass.to, 9)
    }
  })

  it('knows no steady peak without damping, but a run-up', () => {
    const { up } = passes(machine({ viscous: 0 }, ramp(10)))
    const peak = up.points[0]?.peaks.resultant
    expect(peak?.steady).toBeNull()
    expect(peak?.ratio).toBeNull()
    expect(peak?.value).toBeGreaterThan(0)
  })

  it('compares with the highest of the response over the same speeds, absorbers included', () => {
    const project = machine({ viscous: 200 }, ramp(20), {
      absorbers: [
        {
          id: 'A',
          host: { kind: 'mode', mode: 4, position: [0.4, 0.1, 0.45], direction: [0, 0, 1] },
          size: { by: 'mass', mass: 12 },
          tuning: { by: 'minimax' },
        },
      ],
    })
    const { runUp, response } = evaluate(project)
    const sweep = response?.sweep
    if (!runUp?.up || !sweep) throw new Error('not computed')
    const highest = (curve: Float64Array | undefined) =>
      (curve ?? new Float64Array()).reduce(
        (best, value, f) => ((sweep.speed[f] ?? Infinity) <= TOP ? Math.max(best, value) : best),
        0,
      )
    // 1e-3: the response stops at its own speeds, closest about the resonances
    const stroke = runUp.up.absorbers[0]?.stroke
    expect((stroke?.steady ?? NaN) / highest(sweep.strokes[0])).toBeCloseTo(1, 3)
    expect(stroke?.value).toBeGreaterThan(0.3 * (stroke?.steady ?? NaN))
    expect((runUp.up.support.resultant.steady ?? NaN) / highest(sweep.supportForce)).toBeCloseTo(1, 3)
    runUp.up.mounts.forEach(({ force }, m) => {
      expect((force.resultant.steady ?? NaN) / highest(sweep.mountForces[m])).toBeCloseTo(1, 3)
    })
  })

  it('finds in a trial the same worst mount as in full', () => {
    const project = machine({ viscous: 90 }, ramp(12, 1), {
      requirements: [
        { kind: 'runUpMotion', id: 'clearance', limit: 1e-3 },
        { kind: 'runUpForce', id: 'force', limit: 100 },
      ],
    })
    const found = prepare(project, [])
    const scope = judgedOf(project)
    if ('problems' in found || scope === null) throw new Error('not computed')
    const { observed, loads } = found.prepared
    const trial = runUpOf(project, observed, loads, scope).result
    const { up, down } = passes(project)
    const worst = (pass: RunUpPass | null, of: 'force' | 'travel') =>
      Math.max(...(pass?.mounts.map((mount) => mount[of].resultant.value) ?? []))
    // 1e-3: how exactly a trial searches
    for (const of of ['force', 'travel'] as const) {
      expect(worst(trial.up, of) / worst(up, of)).toBeCloseTo(1, 3)
      expect(worst(trial.down, of) / worst(down, of)).toBeCloseTo(1, 3)
    }
  })

  it('says what is missing at its field and leaves the rest alone', () => {
    const { runUp, problems, response } = evaluate(machine({ viscous: 90 }, { enabled: true }))
    expect(runUp).toEqual({ up: null, down: null })
    expect(problems.map(({ field }) => field)).toEqual(['runUp.up.law.time', 'runUp.down.law.time'])
    expect(response).not.toBeNull()
    expect(evaluate(machine({ viscous: 90 }, {})).runUp).toBeNull()
  })
})

describe('a requirement on the run-up', () => {
  const judged = (requirements: ProjectInput['requirements'], runUp = ramp(12, 1)) =>
    evaluate(machine({ viscous: 90 }, runUp, { requirements })).verdicts

  it('passes or fails by its largest peak, with the speed and place of it', () => {
    const { up, down } = passes(machine({ viscous: 90 }, ramp(12, 1)))
    const travels = [...up.mounts, ...down.mounts].map(({ travel }) => travel.resultant)
    const worst = travels.reduce((best, peak) => (peak.value > best.value ? peak : best))
    const [pass, fail] = judged([
      { kind: 'runUpMotion', id: 'a', limit: 2 * worst.value },
      { kind: 'runUpMotion', id: 'b', limit: worst.value / 2 },
    ])
    expect([pass?.status, fail?.status]).toEqual(['pass', 'fail'])
    expect(pass?.value).toBe(worst.value)
    expect(pass?.governingSpeed).toBe(worst.speed)
    expect(pass?.governingPlace).toMatch(/^M\d, (run-up|coast-down)$/)
    expect(fail?.advice).toMatch(/^What helps most/)
  })

  it('looks at one point, direction and passage where it is asked to', () => {
    const { down } = passes(machine({ viscous: 90 }, ramp(12, 1)))
    const [verdict] = judged([
      { kind: 'runUpMotion', id: 'a', place: 'point', point: 'P', direction: 'y', during: 'down', limit: 1 },
    ])
    expect(verdict?.value).toBe(down.points[0]?.peaks.y.value)
    expect(verdict?.governingPlace).toBe('bearing, y, coast-down')
  })

  it('takes the hardest pushed mount for a force', () => {
    const { up, down } = passes(machine({ viscous: 90 }, ramp(12, 1)))
    const forces = [...up.mounts, ...down.mounts].map(({ force }) => force.resultant.value)
    expect(judged([{ kind: 'runUpForce', id: 'a', limit: 1e4 }])[0]?.value).toBe(Math.max(...forces))
  })

  it('is unknown, with the reason, while the run-up is not known', () => {
    const requirement = { kind: 'runUpForce' as const, id: 'a', limit: 1e4 }
    const [off] = judged([requirement], {})
    expect([off?.status, off?.advice]).toEqual([
      'unknown',
      'Switch the run-up on and say how the shaft comes to speed.',
    ])
    const [open] = judged([requirement], { enabled: true, down: { law: { by: 'ramp', time: 9 } } })
    expect([open?.status, open?.advice]).toEqual(['unknown', 'Not known yet: Give the time of the run-up.'])
  })
})
