import { describe, expect, it } from 'vitest'
import type { PlacedMount } from '../../../core/project/mounts.ts'
import {
  distinct,
  firstType,
  mirroredMounts,
  moveMounts,
  setOutPairs,
  snap,
  startPositions,
} from '../../../renderer/pages/mounts/plan-moves.ts'

function mount(id: string, x: number, y: number, tilt: PlacedMount['tilt'] = null): PlacedMount {
  return { id, name: id.toUpperCase(), type: 't', position: [x, y, 0.1], tilt, shim: 0, share: null }
}

describe('moving mounts', () => {
  it('snaps to the lines of the grid, and to none where there is none', () => {
    expect(snap(0.1234, 0.01)).toBe(0.12)
    expect(snap(-0.1251, 0.01)).toBe(-0.13)
    expect(snap(0.1234, 0)).toBe(0.1234)
    // 2.5 in, without the binary noise of 5 × 0.0127
    expect(snap(0.0633, 0.0127)).toBe(0.0635)
  })

  it('moves what is selected from where it stood, and nothing else', () => {
    const placed = [mount('m1', 0, 0), mount('m2', 1, 0)]
    const starts = startPositions(placed)
    moveMounts(placed, ['m2'], starts, [0.25, -0.5])
    moveMounts(placed, ['m2'], starts, [0.5, -0.5])
    expect(placed.map((item) => item.position)).toEqual([
      [0, 0, 0.1],
      [1.5, -0.5, 0.1],
    ])
  })
})

describe('mirroring', () => {
  it('copies to the other side of the line, with names of their own', () => {
    const placed = [mount('m1', 0.5, -0.2), mount('m2', -0.5, -0.2)]
    const added = mirroredMounts(placed, ['m1', 'm2'], 1, 0.1)
    expect(added.map((item) => [item.id, item.name, ...item.position])).toEqual([
      ['m3', 'M3', 0.5, 0.4, 0.1],
      ['m4', 'M4', -0.5, 0.4, 0.1],
    ])
  })

  it('adds nothing where a mount stands already', () => {
    const placed = [mount('m1', 0.5, -0.2), mount('m2', 0.5, 0.2), mount('m3', 0, 0)]
    expect(mirroredMounts(placed, ['m1', 'm2', 'm3'], 1, 0)).toEqual([])
  })

  it('leans a mirrored mount the other way', () => {
    // turned about x the axis leans along y, so its image across the x axis is turned back
    const about = (axis: [number, number, number]) =>
      mirroredMounts([mount('m1', 0, 0.3, { axis, angle: 0.2 })], ['m1'], 1, 0)[0]?.tilt
    expect(about([1, 0, 0])).toEqual({ axis: [-1, 0, 0], angle: 0.2 })
    expect(about([0, 1, 0])).toEqual({ axis: [0, 1, 0], angle: 0.2 })
  })
})

describe('setting out', () => {
  it('puts two pairs on the four corners', () => {
    const placed = setOutPairs({ pairs: 2, length: 2, width: 1, centre: [0.5, 0, 0.3], type: 't' })
    expect(placed.map((item) => item.position)).toEqual([
      [-0.5, -0.5, 0.3],
      [-0.5, 0.5, 0.3],
      [1.5, -0.5, 0.3],
      [1.5, 0.5, 0.3],
    ])
    expect(new Set(placed.map((item) => item.id)).size).toBe(4)
  })

  it('spreads further pairs evenly, and puts a single one in the middle', () => {
    const xs = setOutPairs({ pairs: 4, length: 3, width: 1, centre: [0, 0, 0], type: 't' }).map(
      (item) => item.position[0],
    )
    expect(distinct(xs)).toEqual([-1.5, -0.5, 0.5, 1.5])
    const [one] = setOutPairs({ pairs: 1, length: 3, width: 1, centre: [0.2, 0, 0], type: 't' })
    expect(one?.position[0]).toBe(0.2)
  })

  it('begins with springs that put heave at a third of the running speed', () => {
    const speed = 150
    const type = firstType([], 900, speed, 4)
    const heave = Math.sqrt((4 * type.stiffness[2]) / 900)
    // the stiffness is rounded to two digits, at most 5 %, so the frequency to at most 2.5 %
    expect(Math.abs(speed / 3 / heave - 1)).toBeLessThan(0.026)
    expect(firstType([], null, null, 4).stiffness[2]).toBeGreaterThan(0)
  })
})
