import { describe, expect, it } from 'vitest'
import { coupledJet, coupledValue } from '../../../core/absorber/coupling.ts'
import { kindOf } from '../../../core/absorber/kinds.ts'
import { networkOptimum } from '../../../core/absorber/network-optimum.ts'
import { hostOptimum } from '../../../core/absorber/optimum.ts'
import {
  dynamicStiffness,
  receptancePanels,
  type Receptance,
} from '../../../core/absorber/receptance-panels.ts'

interface TestMode {
  readonly frequency: number
  readonly damping: number
  /** mass-normalised displacement */
  readonly shape: number
}
/** Sum of modes, written out: shares no code with the subject. */
const modal =
  (modes: readonly TestMode[]): Receptance =>
  (frequencies) => {
    const re = new Float64Array(frequencies.length)
    const im = new Float64Array(frequencies.length)
    frequencies.forEach((frequency, k) => {
      for (const mode of modes) {
        const [w, wn] = [2 * Math.PI * frequency, 2 * Math.PI * mode.frequency]
        const [a, b] = [wn * wn - w * w, 2 * mode.damping * wn * w]
        const scale = mode.shape ** 2 / (a * a + b * b)
        re[k] = (re[k] ?? 0) + scale * a
        im[k] = (im[k] ?? 0) - scale * b
      }
    })
    return { re, im }
  }
const THREE: readonly TestMode[] = [
  { frequency: 22, damping: 0.01, shape: 0.05 },
  { frequency: 31, damping: 0.012, shape: 0.03 },
  { frequency: 57, damping: 0.02, shape: 0.04 },
]
const scaled = (factor: number) => modal(THREE.map((mode) => ({ ...mode, damping: mode.damping * factor })))

describe('a receptance as panels', () => {
  it.each([1, 0.01, 0])('reads everywhere as the receptance itself, damping times %d', (factor) => {
    const receptance = scaled(factor)
    const panels = receptancePanels(receptance, [5, 60])
    const z = new Float64Array(6)
    for (let k = 0; k <= 2000; k++) {
      const frequency = 5 + (55 * (k + 0.37)) / 2001
      const omega = 2 * Math.PI * frequency
      const panel = panels.find(({ high }) => omega <= high)
      const exact = receptance(Float64Array.of(frequency))
      if (!panel) throw new Error('the panels cover the band')
      dynamicStiffness(panel, omega, z)
      const [re, im] = [exact.re[0] ?? 0, exact.im[0] ?? 0]
      const product = Math.hypot((z[0] ?? 0) * re - (z[1] ?? 0) * im - 1, (z[0] ?? 0) * im + (z[1] ?? 0) * re)
      // Z H = 1 to what the panels promise (1e-10 in their own quantity)
      expect(product).toBeLessThan(1e-7)
    }
  })

  it('takes few samples even where nothing is damped', () => {
    let samples = 0
    receptancePanels(
      (frequencies) => {
        samples += frequencies.length
        return scaled(0)(frequencies)
      },
      [5, 60],
    )
    expect(samples).toBeLessThan(1500)
  })
})

describe('coupling by receptance', () => {
  it('has the derivatives that differences give', () => {
    const panels = receptancePanels(scaled(1), [5, 60])
    const z = new Float64Array(6)
    const at = (omega: number, a: number, beta: number) => {
      const panel = panels.find(({ high }) => omega <= high)
      if (!panel) throw new Error('inside the band')
      dynamicStiffness(panel, omega, z)
      return coupledJet(z, omega, 12, a, beta)
    }
    const point = [2 * Math.PI * 23.3, (2 * Math.PI * 21.5) ** 2, 0.24 * 2 * Math.PI * 21.5] as const
    const steps = [1e-3, 1, 1e-3] as const
    const jet = at(...point)
    const slope = (k: 0 | 1 | 2, name: keyof typeof jet) => {
      const beside = (sign: number) =>
        at(
          point[0] + (k === 0 ? sign * steps[0] : 0),
          point[1] + (k === 1 ? sign * steps[1] : 0),
          point[2] + (k === 2 ? sign * steps[2] : 0),
        )[name]
      return (beside(1) - beside(-1)) / (2 * steps[k])
    }
    const pairs: readonly (readonly [keyof typeof jet, 0 | 1 | 2, keyof typeof jet])[] = [
      ['w', 0, 'value'],
      ['a', 1, 'value'],
      ['b', 2, 'value'],
      ['ww', 0, 'w'],
      ['wa', 1, 'w'],
      ['wb', 2, 'w'],
      ['aa', 1, 'a'],
      ['ab', 2, 'a'],
      ['bb', 2, 'b'],
    ]
    // relative steps of 1e-5: central differences are good to about 1e-8
    for (const [name, k, of] of pairs) expect(slope(k, of) / jet[name]).toBeCloseTo(1, 6)
  })
})

describe('least worst receptance over a band', () => {
  // two independent roads: polynomials of one freedom, and panels of a receptance
  it.each([0, 0.02, 0.1])('agrees with the minimax of one freedom, host damping %d', (damping) => {
    const mass = 3000
    const receptance = modal([{ frequency: 24, damping, shape: 1 / Math.sqrt(mass) }])
    const found = networkOptimum(receptance, 0.05 * mass, [10, 45])
    const expected = hostOptimum(
      kindOf({ excitation: 'force', response: 'displacement' }, damping),
      0.05,
      damping,
    )
    const stiffness = mass * (2 * Math.PI * 24) ** 2
    expect(found?.converged).toBe(true)
    // panels are good to 1e-10; the parameters feel the flat bottom less than their peaks do
    expect((found?.peak ?? 0) * stiffness).toBeCloseTo(expected.peak, 8)
    expect((found?.omega ?? 0) / (2 * Math.PI * 24)).toBeCloseTo(expected.frequencyRatio, 8)
    expect(found?.dampingRatio).toBeCloseTo(expected.dampingRatio, 7)
    if (damping === 0) expect(found?.peakWithout).toBeNull()
    else expect(found?.peakWithout).not.toBeNull()
  })

  it('no other absorber in a wide net does better on several modes', () => {
    const [mass, band] = [12, [15, 50]] as const
    const found = networkOptimum(scaled(1), mass, band)
    const frequencies = Float64Array.from(
      { length: 8001 },
      (_, k) => band[0] + ((band[1] - band[0]) * k) / 8000,
    )
    const { re, im } = scaled(1)(frequencies)
    const worst = (omega: number, zeta: number) => {
      let most = -Infinity
      frequencies.forEach((frequency, k) => {
        const [x, y] = [re[k] ?? 0, im[k] ?? 0]
        const square = x * x + y * y
        const value = coupledValue(
          x / square,
          -y / square,
          2 * Math.PI * frequency,
          mass,
          omega * omega,
          2 * zeta * omega,
        )
        most = Math.max(most, value)
      })
      return Math.exp(most / 2)
    }
    const peak = found?.peak ?? 0
    // its own peak as sampled, a step of 0.004 Hz beside the top at most
    expect(worst(found?.omega ?? 0, found?.dampingRatio ?? 0) / peak).toBeCloseTo(1, 5)
    for (let i = 0; i <= 30; i++) {
      for (let j = 0; j <= 12; j++) {
        expect(worst(2 * Math.PI * (12 + 1.5 * i), 0.01 * 60 ** (j / 12))).toBeGreaterThan(peak * (1 - 1e-5))
      }
    }
  })

  it('measures the bare receptance at a peak that falls between two panels', () => {
    // SOURCE  peak of one freedom, 1 / (2 zeta k sqrt(1 - zeta²)), wherever it lies in the band
    for (let k = 0; k < 40; k++) {
      const frequency = 18 + 0.11 * k
      const found = networkOptimum(modal([{ frequency, damping: 0.05, shape: 0.1 }]), 5, [10, 45])
      const stiffness = (2 * Math.PI * frequency) ** 2 / 0.01
      const expected = 1 / (2 * 0.05 * stiffness * Math.sqrt(1 - 0.0025))
      expect((found?.peakWithout ?? 0) / expected).toBeCloseTo(1, 9)
    }
  })

  it('stays finite where no absorber helps: a band far from every resonance', () => {
    const found = networkOptimum(scaled(1), 12, [200, 300])
    expect(found).not.toBeNull()
    for (const value of [found?.omega, found?.dampingRatio, found?.peak, found?.peakAt]) {
      expect(Number.isFinite(value)).toBe(true)
    }
  })

  it('has nothing to work on where the attachment does not move', () => {
    const still: Receptance = (frequencies) => ({
      re: new Float64Array(frequencies.length),
      im: new Float64Array(frequencies.length),
    })
    expect(networkOptimum(still, 12, [10, 20])).toBeNull()
  })
})
