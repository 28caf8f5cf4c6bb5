import { describe, expect, it } from 'vitest'
import {
  kindOf,
  travelShape,
  unboundedAt,
  valueAtInfinity,
  valueAtZero,
} from '../../../core/absorber/kinds.ts'
import { shapeMagnitude } from '../../../core/absorber/response.ts'
import type { Objective } from '../../../core/project/absorber.ts'

// SOURCE  table of kinds of test/reference/C_absorbers.json (notes), after Warburton 1982.
const UNDAMPED: Readonly<Record<Objective['excitation'], Readonly<Record<Objective['response'], string>>>> = {
  force: {
    displacement: 'F0',
    velocity: 'F1',
    acceleration: 'F2',
    relativeDisplacement: 'F0',
    transmittedForce: 'F0',
  },
  unbalance: {
    displacement: 'F2',
    velocity: 'F3',
    acceleration: 'F4',
    relativeDisplacement: 'F2',
    transmittedForce: 'F2',
  },
  supportAcceleration: {
    displacement: 'F-2',
    velocity: 'F-1',
    acceleration: 'F0',
    relativeDisplacement: 'R0',
    transmittedForce: 'R0',
  },
  supportDisplacement: {
    displacement: 'F0',
    velocity: 'F1',
    acceleration: 'F2',
    relativeDisplacement: 'R2',
    transmittedForce: 'R2',
  },
}
const objectives = Object.entries(UNDAMPED).flatMap(
  ([excitation, row]) =>
    Object.entries(row).map(([response, kind]) => [{ excitation, response } as Objective, kind] as const), // keys of the table
)

describe('the table of objectives', () => {
  it.each(objectives)('%o on an undamped host is %s', (objective, kind) => {
    expect(kindOf(objective, 0).name).toBe(kind)
  })

  it('counts the damper of a damped host where the suspension carries the response', () => {
    expect(kindOf({ excitation: 'force', response: 'transmittedForce' }, 0.1).name).toBe('TF')
    expect(kindOf({ excitation: 'supportDisplacement', response: 'displacement' }, 0.1).name).toBe('TF')
    expect(kindOf({ excitation: 'supportDisplacement', response: 'velocity' }, 0.1).name).toBe('TF1')
    expect(kindOf({ excitation: 'supportAcceleration', response: 'transmittedForce' }, 0.1).name).toBe('RT0')
    expect(kindOf({ excitation: 'force', response: 'displacement' }, 0.1).name).toBe('F0')
  })

  it.each(objectives)(
    '%o: what is called bounded stays finite at both ends, the rest does not',
    (objective) => {
      for (const hostDamping of [0, 0.2]) {
        const system = { massRatio: 0.3, hostDamping, frequencyRatio: 0.8, dampingRatio: 0.2 }
        for (const shape of [
          kindOf(objective, hostDamping),
          travelShape(objective.excitation, hostDamping),
        ]) {
          const [slow, fast] = [shapeMagnitude(shape, system, 1e-5), shapeMagnitude(shape, system, 1e5)]
          const unbounded = unboundedAt(shape, hostDamping)
          if (unbounded === null) {
            // at 1e5 times resonance the first neglected term is 1e-5 of the limit
            expect(slow).toBeCloseTo(valueAtZero(shape, 0.3, 0.8), 3)
            expect(fast).toBeCloseTo(valueAtInfinity(shape, hostDamping), 3)
          } else expect(unbounded === 'zero' ? slow : fast).toBeGreaterThan(1e3)
        }
      }
    },
  )
})
