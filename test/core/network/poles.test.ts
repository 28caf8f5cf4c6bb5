import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { assemble } from '../../../core/network/assemble.ts'
import { springDamper } from '../../../core/network/elements.ts'
import { undampedModes } from '../../../core/network/modes.ts'
import { GROUND, type Network } from '../../../core/network/network.ts'
import { polesFromModal, polesOf, type Poles } from '../../../core/network/poles.ts'
import { pointReceptance } from '../../../core/network/receptance.ts'
import { responseSolver } from '../../../core/network/response.ts'
import type { Vec3 } from '../../../core/project/fields.ts'

/** Receptance of modal force s on modal displacement r at omega, summed over the poles. */
function receptance(poles: Poles, r: number, s: number, omega: number): { re: number; im: number } {
  let re = 0
  let im = 0
  for (let j = 0; j < poles.count; j++) {
    const [a, b] = [poles.shapeRe[r * poles.count + j] ?? 0, poles.shapeIm[r * poles.count + j] ?? 0]
    const [c, d] = [poles.inputRe[j * poles.modes + s] ?? 0, poles.inputIm[j * poles.modes + s] ?? 0]
    const [p, q] = [a * c - b * d, a * d + b * c]
    const [x, y] = [-(poles.re[j] ?? 0), omega - (poles.im[j] ?? 0)]
    const size = x * x + y * y
    re += (p * x + q * y) / size
    im += (q * x - p * y) / size
  }
  return { re, im }
}

/** A body on three mounts of different viscous damping, so that damping couples the modes. */
function network(viscous: number): Network {
  const mount = (id: string, position: Vec3, share: number) =>
    springDamper(
      { id, from: { node: 'ground', position }, to: { node: 'machine', position } },
      { stiffness: [8e4, 9e4, 2e5], viscous: [viscous * share, viscous, viscous * share], lossFactor: 0 },
    )
  return {
    nodes: [
      GROUND,
      {
        kind: 'body',
        id: 'machine',
        mass: 320,
        centre: [0, 0, 0.3],
        inertia: [
          [18, -1, 2],
          [-1, 26, -0.5],
          [2, -0.5, 31],
        ],
      },
    ],
    elements: [
      mount('M1', [0.5, 0.3, 0], 1),
      mount('M2', [0.4, -0.4, 0], 3),
      mount('M3', [-0.6, 0, 0.05], 0.4),
    ],
  }
}

describe('poles', () => {
  it('give the frequency response that the network solver gives', () => {
    const system = assemble(network(700))
    const modes = undampedModes(system)
    if (modes === null) throw new Error('no modes')
    const poles = polesOf(system, modes)
    if (poles === null) throw new Error('no poles')
    const place = { node: 'machine', position: [0.2, 0.1, 0.4] as Vec3 }
    const frequencies = Float64Array.of(0.7, 3, 4.4, 6.1, 9, 20)
    const expected = pointReceptance(system, responseSolver(system, modes), place, [0, 0, 1], frequencies)
    // the vertical motion of the place in each mode: z + rx (y - 0) - ry (x - 0)
    const motion = Array.from({ length: 6 }, (_, r) => {
      const at = (i: number) => modes.shapes[r * 6 + i] ?? 0
      return at(2) + at(3) * 0.1 - at(4) * 0.2
    })
    frequencies.forEach((frequency, f) => {
      let re = 0
      let im = 0
      motion.forEach((a, r) => {
        motion.forEach((b, s) => {
          const one = receptance(poles, r, s, 2 * Math.PI * frequency)
          re += a * b * one.re
          im += a * b * one.im
        })
      })
      // 1e-11: two exact methods, eigenvalues of a 12 x 12 matrix between them
      const size = Math.hypot(expected.re[f] ?? 0, expected.im[f] ?? 0)
      expect(Math.hypot(re - (expected.re[f] ?? 0), im - (expected.im[f] ?? 0)) / size).toBeLessThan(1e-11)
    })
  })

  it('follow a single freedom through critical damping', () => {
    fc.assert(
      fc.property(fc.oneof(fc.constant(1), fc.double({ min: 0, max: 3, noNaN: true })), (ratio) => {
        const omega = 17
        const poles = polesFromModal(Float64Array.of(omega), Float64Array.of(2 * ratio * omega))
        if (poles === null) throw new Error('no poles')
        const at = 1.3 * omega
        const { re, im } = receptance(poles, 0, 0, at)
        const [x, y] = [omega * omega - at * at, 2 * ratio * omega * at]
        const size = x * x + y * y
        // 1e-6: at critical damping the two poles are held a little apart
        expect(Math.hypot(re - x / size, im + y / size) * Math.sqrt(size)).toBeLessThan(1e-6)
      }),
    )
  })

  it('are told apart where damping couples modes that meet', () => {
    const poles = polesFromModal(Float64Array.of(10, 10.1), Float64Array.of(20, 0.01, 0.01, 20.2))
    if (poles === null) throw new Error('no poles')
    const { re, im } = receptance(poles, 0, 0, 10)
    // det of the two coupled freedoms at 10 rad/s, solved by hand: (k - w² + i w c)⁻¹
    const a = { re: 0, im: 200 }
    const d = { re: 10.1 ** 2 - 100, im: 202 }
    const b = { re: 0, im: 0.1 }
    const det = { re: a.re * d.re - a.im * d.im + b.im * b.im, im: a.re * d.im + a.im * d.re }
    const size = det.re ** 2 + det.im ** 2
    const expected = {
      re: (d.re * det.re + d.im * det.im) / size,
      im: (d.im * det.re - d.re * det.im) / size,
    }
    expect(
      Math.hypot(re - expected.re, im - expected.im) / Math.hypot(expected.re, expected.im),
    ).toBeLessThan(1e-5)
  })

  it('are not there when a mode has no stiffness', () => {
    const system = assemble({ ...network(100), elements: [] })
    const modes = undampedModes(system)
    if (modes === null) throw new Error('no modes')
    expect(polesOf(system, modes)).toBeNull()
  })
})
