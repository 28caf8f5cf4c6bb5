import { describe, expect, it } from 'vitest'
import { blankProject } from '../../../core/project/create.ts'
import { buildScene } from '../../../renderer/drawing/scene.ts'
import { layOutPlan, layOutViews, placeLabels, roundLength } from '../../../renderer/drawing/views.ts'

describe('the sheet of views', () => {
  const bounds = {
    min: [-1, -0.5, 0] as [number, number, number],
    max: [1, 0.5, 1.5] as [number, number, number],
  }

  it('keeps one scale, lines the views up and stays on the sheet', () => {
    for (const [width, height] of [
      [400, 500],
      [900, 400],
    ] as const) {
      const { plan, side, end, scale } = layOutViews(bounds, width, height)
      expect([plan.scale, side.scale, end.scale]).toEqual([scale, scale, scale])
      expect(side.left).toBe(plan.left)
      expect(end.top).toBe(side.top)
      expect(side.top).toBeGreaterThan(plan.top + plan.height)
      expect(end.left).toBeGreaterThan(side.left + side.width)
      expect(end.left + end.width).toBeLessThanOrEqual(width)
      expect(side.top + side.height).toBeLessThanOrEqual(height)
    }
  })

  it('shows x to the right, and y or z upwards', () => {
    const { plan, side, end } = layOutViews(bounds, 600, 600)
    expect(plan.toSheet([1, 0.5, 0])).toEqual([plan.left + plan.width, plan.top])
    expect(side.toSheet([-1, 0, 1.5])).toEqual([side.left, side.top])
    expect(end.toSheet([0, 0.5, 1.5])[0]).toBeCloseTo(end.left + end.width, 9)
  })

  it('centres a single plan with its margin', () => {
    const plan = layOutPlan(bounds, 500, 300, 50)
    expect(plan.left).toBeGreaterThanOrEqual(50)
    expect(plan.toSheet([0, 0, 0])).toEqual([250, 150])
  })

  it('measures with round lengths', () => {
    expect([0.9, 0.21, 3.9, 70].map(roundLength)).toEqual([0.5, 0.2, 2, 50])
  })
})

describe('labels', () => {
  it('avoid each other where there is room', () => {
    const labels = [
      { id: 'a', text: 'Bearing', x: 100, y: 100, clear: 5 },
      { id: 'b', text: 'Flange', x: 110, y: 100, clear: 5 },
    ]
    const [a, b] = placeLabels(labels, 12, 300, 200)
    expect([a?.textX, a?.textY, a?.anchor]).not.toEqual([b?.textX, b?.textY, b?.anchor])
  })

  it('stay on the sheet at its edge', () => {
    const [label] = placeLabels([{ id: 'a', text: 'Suction flange', x: 290, y: 100, clear: 5 }], 12, 300, 200)
    expect(label?.anchor).toBe('end')
  })
})

describe('the scene', () => {
  it('is drawable for a blank project', () => {
    const { bounds, solids, centreOfGravity } = buildScene(blankProject(), null)
    expect(solids).toEqual([])
    expect(centreOfGravity).toBeNull()
    for (const axis of [0, 1, 2] as const) expect(bounds.max[axis]).toBeGreaterThan(bounds.min[axis])
  })

  it('gives no dimension that nobody gave', () => {
    const project = blankProject()
    expect(buildScene(project, null).spans).toEqual([null, null, null])
    project.machine.points.push({ id: 'a', name: 'Bearing', position: [0.2, 0, 0] })
    expect(buildScene(project, null).spans).toEqual([[0, 0.2], null, null])
  })

  it('draws typed inertia as the uniform box that has it', () => {
    const project = blankProject()
    // m (b² + c²) / 12 of a box 1.2 x 0.8 x 0.6 m of 600 kg: 50, 90, 104 kg m²
    project.machine.massProperties = {
      from: 'typed',
      mass: 600,
      centreOfGravity: [0, 0, 0.3],
      inertia: { xx: 50, yy: 90, zz: 104, xy: 0, xz: 0, yz: 0 },
    }
    const [box] = buildScene(project, null).solids
    expect(box?.equivalent).toBe(true)
    for (const [axis, side] of [1.2, 0.8, 0.6].entries()) expect(box?.size[axis]).toBeCloseTo(side, 12)
  })
})
