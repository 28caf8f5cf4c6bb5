import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { settle, type RestoringSpring } from '../../../core/network/settle.ts'

/** A spring along one freedom whose force is odd and never falls: k x + c x³, or one that levels off. */
const stiffening = (k: number, c: number) => (x: number) => ({
  force: k * x + c * x ** 3,
  tangent: k + 3 * c * x * x,
})
const levelling = (k: number, reach: number) => (x: number) => ({
  force: k * reach * Math.tanh(x / reach) + 1e-3 * k * x,
  tangent: k / Math.cosh(x / reach) ** 2 + 1e-3 * k,
})

function along(freedom: number, law: RestoringSpring['law'], offset = 0): RestoringSpring {
  return { row: { indices: Int32Array.of(freedom), values: Float64Array.of(1) }, offset, law, usual: 1 }
}
const single = (law: RestoringSpring['law'], load: number, offset = 0) =>
  settle({
    springs: [along(0, law, offset)],
    load: Float64Array.of(load),
    scale: Float64Array.of(Math.abs(load) || 1),
  })

describe('settling', () => {
  it('finds the root of a cubic spring', () => {
    // x + x³ = 10 at x = 2, by hand
    const { converged, displacement } = single(stiffening(1, 1), 10)
    expect(converged).toBe(true)
    expect(displacement[0]).toBeCloseTo(2, 12)
  })

  it('takes one step where the spring is straight', () => {
    const { iterations, displacement } = single(stiffening(4, 0), 10, 0.5)
    expect(iterations).toBe(1)
    // 4 (q + 0.5) = 10
    expect(displacement[0]).toBeCloseTo(2, 12)
  })

  it('comes to balance on springs that stiffen or level off, from far away', () => {
    const law = fc.oneof(
      fc
        .tuple(fc.double({ min: 0.1, max: 10, noNaN: true }), fc.double({ min: 0, max: 1e4, noNaN: true }))
        .map(([k, c]) => stiffening(k, c)),
      fc.double({ min: 0.01, max: 10, noNaN: true }).map((reach) => levelling(1, reach)),
    )
    fc.assert(
      fc.property(
        fc.array(law, { minLength: 2, maxLength: 6 }),
        fc.double({ min: -50, max: 50, noNaN: true }),
        fc.double({ min: -100, max: 100, noNaN: true }),
        (laws, load, start) => {
          // a chain: each spring between two freedoms, the first to the ground
          const n = laws.length
          const springs = laws.map((spring, k): RestoringSpring => ({
            row:
              k === 0
                ? { indices: Int32Array.of(0), values: Float64Array.of(1) }
                : { indices: Int32Array.of(k - 1, k), values: Float64Array.of(-1, 1) },
            offset: 0,
            law: spring,
            usual: 1,
          }))
          const loads = new Float64Array(n)
          loads[n - 1] = load
          const result = settle({
            springs,
            load: loads,
            scale: new Float64Array(n).fill(Math.max(1, Math.abs(load))),
            start: new Float64Array(n).fill(start),
          })
          expect(result.converged).toBe(true)
          // every spring of a chain bears the whole load
          springs.forEach(({ law: force }, k) => {
            const travel = (result.displacement[k] ?? 0) - (k === 0 ? 0 : (result.displacement[k - 1] ?? 0))
            // 1e-8: the balance is known to 1e-9 of the load
            expect(Math.abs(force(travel).force - load)).toBeLessThan(1e-8 * Math.max(1, Math.abs(load)))
          })
        },
      ),
    )
  })

  it('counts a further stiffness about the state that it is given for', () => {
    const springs = [along(0, stiffening(3, 0))]
    const further = { matrix: Float64Array.of(-1), about: Float64Array.of(2) }
    const { displacement } = settle({
      springs,
      load: Float64Array.of(10),
      scale: Float64Array.of(10),
      further,
    })
    // 3 q - (q - 2) = 10
    expect(displacement[0]).toBeCloseTo(4, 12)
  })

  it('says that it is slack where nothing resists', () => {
    const flat = (x: number) => ({ force: Math.min(x, 1), tangent: x < 1 ? 1 : 0 })
    const result = single(flat, 5)
    expect(result.converged).toBe(false)
    expect(result.reason).toBe('slack')
    expect(result.residual).toBeGreaterThan(0.1)
  })

  it('says that it is slack where a further stiffness tips it', () => {
    const further = { matrix: Float64Array.of(-4), about: Float64Array.of(0) }
    const result = settle({
      springs: [along(0, stiffening(3, 0))],
      load: Float64Array.of(10),
      scale: Float64Array.of(10),
      further,
    })
    expect(result.reason).toBe('slack')
  })

  it('leaves its start as it is', () => {
    const start = Float64Array.of(1)
    settle({
      springs: [along(0, stiffening(1, 1))],
      load: Float64Array.of(3),
      scale: Float64Array.of(3),
      start,
    })
    expect(start[0]).toBe(1)
  })
})
