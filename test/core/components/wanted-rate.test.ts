import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { searchPad } from '../../../core/components/pad-search.ts'
import { searchSpring } from '../../../core/components/spring-search.ts'
import { rateForFrequency } from '../../../core/components/wanted-rate.ts'
import { InputError } from '../../../core/errors.ts'
import { evaluate } from '../../../core/evaluate.ts'
import {
  padDesignSchema,
  springDesignSchema,
  type ComponentDesign,
} from '../../../core/project/component-designs.ts'
import { CORNERS, sketchProject } from '../mounts/machine-project.ts'

const LOAD = 100 * 9.80665

/** Heave of 400 kg on four mounts of a design. */
function heave(design: ComponentDesign, dynamicRatio: number): number {
  const project = sketchProject({ centre: [0, 0, 0], places: CORNERS, type: { design, dynamicRatio } })
  const modes = evaluate(project, { sweepPoints: 60 }).modes
  return modes?.find(({ energyShare }) => energyShare[2] > 0.99)?.frequency ?? NaN
}

describe('the rate for a wanted frequency', () => {
  it('follows from the static deflection where nothing stiffens', () => {
    // g / (2 pi f)² is the deflection, by hand at 5 Hz: 9.9362 mm
    expect(LOAD / rateForFrequency(5, LOAD)).toBeCloseTo(9.80665 / (10 * Math.PI) ** 2, 12)
    expect(rateForFrequency(5, 1000)).toBeCloseTo(100641.9, 0)
  })

  it('gives springs and pads on which the machine then stands at that frequency', () => {
    const wire = springDesignSchema.parse({ component: 'helicalSpring', material: { strength: 1400e6 } })
    const rubber = padDesignSchema.parse({ component: 'rubberPad' })
    let designs = 0
    fc.assert(
      fc.property(fc.double({ min: 2.5, max: 5, noNaN: true }), (frequency) => {
        for (const { design } of searchSpring({
          rate: rateForFrequency(frequency, LOAD),
          load: LOAD,
          like: wire,
        }).candidates) {
          designs += 1
          expect(heave(design, 1) / frequency).toBeCloseTo(1, 9)
        }
        const rate = rateForFrequency(3 * frequency, LOAD, 1.4)
        for (const { design } of searchPad({ rate, load: LOAD, like: rubber }).candidates) {
          designs += 1
          expect(heave(design, 1.4) / (3 * frequency)).toBeCloseTo(1, 9)
        }
      }),
      { numRuns: 8 },
    )
    expect(designs).toBeGreaterThan(20)
  })

  it.each([0, -1, NaN, Infinity])('is refused for %d', (frequency) => {
    expect(() => rateForFrequency(frequency, LOAD)).toThrow(InputError)
  })
})
