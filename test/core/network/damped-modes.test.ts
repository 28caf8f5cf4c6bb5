import { EVD, Matrix } from 'ml-matrix'
import { describe, expect, it } from 'vitest'
import { assemble, type System } from '../../../core/network/assemble.ts'
import { dampedModes } from '../../../core/network/damped-modes.ts'
import { undampedModes } from '../../../core/network/modes.ts'
import { GROUND, type Network } from '../../../core/network/network.ts'
import type { Law } from '../../../core/network/laws.ts'

/** Masses in a row, each on the one before through a spring and damper; the first on the ground. */
function chain(links: readonly { readonly mass: number; readonly law: Law }[]): Network {
  const at = (node: string) => ({ node, position: [0, 0, 0] as const })
  return {
    nodes: [
      GROUND,
      ...links.map(({ mass }, i) => ({
        kind: 'line' as const,
        id: `m${i}`,
        mass,
        direction: [0, 0, 1] as const,
      })),
    ],
    elements: links.map(({ law }, i) => ({
      id: `e${i}`,
      from: at(i === 0 ? 'ground' : `m${i - 1}`),
      to: at(`m${i}`),
      branches: [{ axis: [0, 0, 1], motion: 'shift', law }],
    })),
  }
}

const spring = (stiffness: number, viscous: number, lossFactor = 0): Law => ({
  kind: 'springDamper',
  stiffness,
  viscous,
  lossFactor,
})

function modesOf(system: System) {
  const modes = undampedModes(system)
  const damped = modes === null ? null : dampedModes(system, modes)
  if (modes === null || damped === null) throw new Error('no modes')
  return { modes, damped }
}

describe('dampedModes', () => {
  // SOURCE zeta = c / (2 √(k m)), omega_d = omega_0 √(1 - zeta²): S. S. Rao, Mechanical Vibrations
  it.each([0, 0.01, 0.4, 0.99])('gives the textbook values of a single freedom, zeta = %d', (zeta) => {
    const { damped } = modesOf(assemble(chain([{ mass: 4, law: spring(4 * 30 ** 2, 2 * zeta * 4 * 30) }])))
    expect(damped[0]?.dampingRatio).toBeCloseTo(zeta, 13)
    expect(damped[0]?.omegaDamped).toBeCloseTo(30 * Math.sqrt(1 - zeta ** 2), 11)
  })

  it('says of an overdamped freedom that it does not oscillate', () => {
    const { damped } = modesOf(assemble(chain([{ mass: 4, law: spring(4 * 30 ** 2, 2 * 3 * 4 * 30) }])))
    expect(damped[0]).toEqual({ dampingRatio: expect.closeTo(3, 12) as number, omegaDamped: null })
  })

  it('takes half the loss factor as the damping ratio', () => {
    const { damped } = modesOf(assemble(chain([{ mass: 4, law: spring(4 * 30 ** 2, 0, 0.3) }])))
    expect(damped[0]?.dampingRatio).toBeCloseTo(0.15, 13)
  })

  // SOURCE eigenvalues of the physical state matrix by ml-matrix (general-purpose library)
  it('gives every eigenvalue of the state matrix where dampers couple the modes', () => {
    const links = [
      { mass: 5, law: spring(9000, 60) },
      { mass: 2, law: spring(4000, 1) },
      { mass: 1, law: spring(6000, 25) },
    ]
    const system = assemble(chain(links))
    const { damped } = modesOf(system)
    const n = 3
    const state = Matrix.zeros(2 * n, 2 * n)
    for (let i = 0; i < n; i++) {
      state.set(i, n + i, 1)
      const mass = system.mass[i * n + i] ?? NaN
      for (let j = 0; j < n; j++) {
        state.set(n + i, j, -(system.stiffness[i * n + j] ?? NaN) / mass)
        state.set(n + i, n + j, -(system.viscous[i * n + j] ?? NaN) / mass)
      }
    }
    const library = new EVD(state)
    const expected = library.imaginaryEigenvalues
      .map((im, i) => ({ im, re: library.realEigenvalues[i] ?? NaN }))
      .filter(({ im }) => im > 0)
      .toSorted((a, b) => a.im - b.im)
    const ours = damped.toSorted((a, b) => (a.omegaDamped ?? 0) - (b.omegaDamped ?? 0))
    expect(expected).toHaveLength(3)
    expected.forEach(({ im, re }, r) => {
      expect(ours[r]?.omegaDamped).toBeCloseTo(im, 9)
      expect(ours[r]?.dampingRatio).toBeCloseTo(-re / Math.hypot(re, im), 11)
    })
  })

  it('keeps each value with the undamped mode that it belongs to', () => {
    const system = assemble(
      chain([
        { mass: 5, law: spring(9000, 2) },
        { mass: 0.05, law: spring(9000, 20) },
      ]),
    )
    const { modes, damped } = modesOf(system)
    // the light mass on its stiff damped spring is the upper mode, and the damped one
    expect(damped[0]?.dampingRatio).toBeLessThan(0.01)
    expect(damped[1]?.dampingRatio).toBeGreaterThan(0.3)
    expect(damped[0]?.omegaDamped).toBeCloseTo(Math.sqrt(modes.omegaSquared[0] ?? NaN), 1)
  })

  it('gives an elastically supported damper the damping that it has at the mode', () => {
    const [mass, stiffness, seriesStiffness, viscous] = [3, 2700, 8100, 14]
    const { damped } = modesOf(
      assemble(chain([{ mass, law: { kind: 'relaxation', stiffness, seriesStiffness, viscous } }])),
    )
    // by hand: Im z / (2 k) at omega_0 = 30, z = k + i w c k_s / (k_s + i w c)
    const resistance = 30 * viscous
    const loss = (resistance * seriesStiffness ** 2) / (seriesStiffness ** 2 + resistance ** 2)
    expect(damped[0]?.dampingRatio).toBeCloseTo(loss / (2 * stiffness), 12)
  })

  it('says null of a network that does not stand', () => {
    const system = assemble(chain([{ mass: 1, law: spring(0, 0) }]))
    const modes = undampedModes(system)
    expect(modes === null ? null : dampedModes(system, modes)).toBeNull()
  })
})
