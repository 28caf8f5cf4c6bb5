import { describe, expect, it } from 'vitest'
import { cross, turnedAxes } from '../../../core/numerics/vector3.ts'

describe('turnedAxes', () => {
  // SOURCE right-hand rule: y turned about x towards z, and so on round
  it.each([
    [[1, 0, 0], 1, 2],
    [[0, 1, 0], 2, 0],
    [[0, 0, 1], 0, 1],
  ] as const)('turns by a right angle about %s', (axis, from, to) => {
    const turned = turnedAxes([...axis], Math.PI / 2)
    expect(turned[from][to]).toBeCloseTo(1, 14)
    expect(turned[to][from]).toBeCloseTo(-1, 14)
  })

  it('keeps the axes right-handed and of unit length about any line', () => {
    const [x, y, z] = turnedAxes([0.3, -2, 1.1], 2.4)
    cross(x, y).forEach((value, i) => {
      expect(value).toBeCloseTo(z[i] ?? NaN, 13)
    })
    expect(Math.hypot(...x)).toBeCloseTo(1, 13)
  })
})
