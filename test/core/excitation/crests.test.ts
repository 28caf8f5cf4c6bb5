import { describe, expect, it } from 'vitest'
import { evaluate } from '../../../core/evaluate.ts'
import { crestSpeeds } from '../../../core/excitation/crests.ts'
import { CORNERS, sketchProject } from '../mounts/machine-project.ts'

const flat = (value: Float64Array) => value.map(() => 0)

describe('crests of a sweep', () => {
  it('stand where a single resonance has its peak, however few speeds show it', () => {
    // |H|² of one freedom with hysteretic damping against omega², which is all but omega over a narrow peak
    const speed = Float64Array.of(97, 98.5, 99.9, 101.2, 103)
    const curve = speed.map((s) => 1 / Math.hypot(1 - s / 100.3, 0.01))
    const [crest, ...more] = crestSpeeds({
      speed,
      forceRatio: null,
      supportForce: curve,
      mountForces: [flat(curve)],
      pointVelocity: [],
      strokes: [],
    })
    expect(more).toEqual([])
    // 1e-9: 1 / curve² is an exact parabola here
    expect(crest).toBeCloseTo(100.3, 9)
  })

  it('leave a resonance without damping alone, whose curve has no top', () => {
    const speed = Float64Array.of(99, 99.9, 100.2, 101)
    const curve = speed.map((s) => 1 / Math.abs(1 - s / 100))
    expect(
      crestSpeeds({
        speed,
        forceRatio: null,
        supportForce: curve,
        mountForces: [],
        pointVelocity: [],
        strokes: [],
      }),
    ).toEqual(new Float64Array())
  })

  it('make a judged peak the closed form of one freedom, where many orders leave each few speeds', () => {
    // heave alone: 400 kg on 4 x 3e5 N/m, eta 0.05; vertical force, transmissibility sqrt(1 + eta²) / eta at most
    const orders = [1, 1.05, 1.3, 1.7, 2, 2.4, 3, 3.5, 4, 4.5, 5]
    const project = sketchProject({
      centre: [0, 0, 0],
      places: CORNERS,
      type: { lossFactor: 0.05 },
      more: {
        sources: orders.map((order, index) => ({
          kind: 'harmonic' as const,
          id: `s${index}`,
          load: { kind: 'force' as const, direction: [0, 0, 1] as [number, number, number], amplitude: 1 },
          order,
        })),
      },
    })
    const { sweep } = evaluate(project, { sweepPoints: 200 }).response ?? {}
    if (!sweep) throw new Error('no response')
    const omega = Math.sqrt(1.2e6 / 400)
    const squareAt = (speed: number) =>
      orders.reduce((sum, order) => {
        const [eta, gap] = [0.05, 1 - ((order * speed) / omega) ** 2]
        return sum + (1 + eta * eta) / (gap * gap + eta * eta)
      }, 0)
    let exact = 0
    for (let speed = 10; speed < 70; speed += 1e-4) exact = Math.max(exact, squareAt(speed))
    // 1e-5: what the second round leaves; steps of 1e-4 rad/s leave less
    expect(Math.max(...sweep.supportForce) / Math.sqrt(exact)).toBeCloseTo(1, 5)
  })
})
