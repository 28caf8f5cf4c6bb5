import { describe, expect, it } from 'vitest'
import type { MassProperties } from '../../../core/project/machine.ts'
import { summariseMass } from '../../../core/project/mass.ts'
import { boxInertia, toParts, toTyped } from '../../../renderer/pages/machine/mass-edits.ts'

const PARTS: MassProperties = {
  from: 'parts',
  parts: [
    { shape: 'box', id: 'a', name: '', mass: 120, centre: [0, 0, 0.1], size: [1.2, 0.6, 0.2] },
    {
      shape: 'cylinder',
      id: 'b',
      name: '',
      mass: 80,
      centre: [0.3, 0.1, 0.4],
      axis: 'x',
      diameter: 0.3,
      length: 0.5,
    },
  ],
}

describe('mass, typed or from parts', () => {
  it('keeps mass, centre and inertia when parts become typed numbers', () => {
    const before = summariseMass(PARTS).summary
    const after = summariseMass(toTyped(PARTS)).summary
    // the tensor is taken apart and put together again without arithmetic
    expect(after).toEqual(before)
  })

  it('keeps mass, centre and moments when typed numbers become a box', () => {
    const typed: MassProperties = {
      from: 'typed',
      mass: 600,
      centreOfGravity: [0.1, 0, 0.3],
      inertia: { xx: 40, yy: 90, zz: 100, xy: 0, xz: 0, yz: 0 },
    }
    const summary = summariseMass(toParts(typed)).summary
    expect(summary?.mass).toBe(600)
    expect(summary?.centreOfGravity).toEqual([0.1, 0, 0.3])
    // sides are square roots that are squared again: a few units in the last place
    for (const [axis, moment] of [40, 90, 100].entries()) {
      expect(summary?.inertia[axis]?.[axis]).toBeCloseTo(moment, 9)
    }
  })

  it('makes no box of what is not given, and none that cannot be', () => {
    const bare: MassProperties = {
      from: 'typed',
      mass: null,
      centreOfGravity: [0, 0, 0],
      inertia: { xx: null, yy: null, zz: null, xy: 0, xz: 0, yz: 0 },
    }
    expect(toParts(bare)).toEqual({ from: 'parts', parts: [] })
    const flat = toParts({ ...bare, mass: 10, inertia: { ...bare.inertia, xx: 1, yy: 1, zz: 5 } })
    expect(flat.from === 'parts' && flat.parts[0]?.mass).toBe(10)
  })

  it('estimates the inertia of a box as any handbook has it', () => {
    // SOURCE m (b² + c²) / 12 and so round: uniform box about its centre; common practice, no source
    expect(boxInertia(12, [1, 2, 3])).toEqual([13, 10, 5])
  })
})
