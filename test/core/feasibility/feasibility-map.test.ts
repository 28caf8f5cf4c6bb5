import { describe, expect, it } from 'vitest'
import { InputError } from '../../../core/errors.ts'
import { evaluate } from '../../../core/evaluate.ts'
import { boundaryLines } from '../../../core/feasibility/boundary.ts'
import { candidatePoints, withType } from '../../../core/feasibility/candidates.ts'
import { feasibilityMap, projectAt, type FeasibilityMap } from '../../../core/feasibility/feasibility-map.ts'
import { refinedGrid, startGrid, startSize } from '../../../core/feasibility/map-refinement.ts'
import type { Project, ProjectInput } from '../../../core/project/project.ts'
import { heavingMachine, HEAVE } from './machine.ts'

const REQUIREMENTS: ProjectInput['requirements'] = [
  { kind: 'isolation', id: 'isolation', limit: 0.9 },
  { kind: 'transmittedForce', id: 'force', speeds: 'chart', limit: 400 },
  { kind: 'mountDeflection', id: 'sag' },
  { kind: 'runUpMotion', id: 'clearance', direction: 'z', during: 'up', limit: 0.004 },
]

function mapOf(project: Project, grid = GRID, previous: FeasibilityMap | null = null): FeasibilityMap {
  const { map, problems } = feasibilityMap(project, grid, evaluate(project), previous)
  if (map === null) throw new Error(problems.map(({ message }) => message).join(' '))
  return map
}
const PRESENT = HEAVE.omega / (2 * Math.PI)
const GRID = startGrid(PRESENT, 9, 7)

describe('the feasibility map', () => {
  const project = heavingMachine({ viscous: 400, lossFactor: 0.03 }, { requirements: REQUIREMENTS })
  const map = mapOf(project)

  it('says of every cell what evaluate says of the machine on such mounts', () => {
    for (const [i, j] of [
      [0, 0],
      [2, 5],
      [4, 3],
      [6, 1],
      [8, 6],
    ] as const) {
      const { verdicts } = evaluate(projectAt(project, map, i, j))
      map.layers.forEach((layer) => {
        const verdict = verdicts.find(({ requirement }) => requirement === layer.requirement)
        const margin = layer.margin[j * map.frequencies.length + i] ?? NaN
        // 1e-2 of the value judged: resonances are looked at in few speeds, run-ups quickly
        const size = 1 + Math.abs(verdict?.margin ?? NaN)
        expect(Math.abs(margin - (verdict?.margin ?? NaN)) / size, layer.requirement).toBeLessThan(0.01)
      })
    }
  })

  it('has the natural frequency across and the damping ratio up', () => {
    map.frequencies.forEach((frequency, i) => {
      map.ratios.forEach((ratio, j) => {
        const mode = evaluate(projectAt(project, map, i, j), { sweepPoints: 10 }).modes?.find(
          ({ name }) => name === 'heave',
        )
        // 1e-6: how exactly the stiffness is found
        expect((mode?.frequency ?? NaN) / frequency).toBeCloseTo(1, 5)
        expect((mode?.dampingRatio ?? NaN) / ratio).toBeCloseTo(1, 5)
      })
    })
    expect(map.present.frequency).toBeCloseTo(PRESENT, 9)
    expect(map.present.ratio).toBeCloseTo(400 / (0.5 * HEAVE.mass * HEAVE.omega) + 0.015, 9)
  })

  it('takes stiffness by its root with the overturning of the weight too', () => {
    const standing = heavingMachine(
      { lossFactor: 0.1 },
      { requirements: REQUIREMENTS, analysis: { gravityStiffness: true } },
    )
    const high: Project = {
      ...standing,
      machine: {
        ...standing.machine,
        massProperties: {
          ...standing.machine.massProperties,
          centreOfGravity: [0.2, 0.1, 0.6],
        } as Project['machine']['massProperties'], // typed as it was
      },
    }
    const found = mapOf(high, { frequencies: [3, 5, 9], ratios: [0.05] })
    found.frequencies.forEach((frequency, i) => {
      const vertical = evaluate(projectAt(high, found, i, 0), { sweepPoints: 10 }).modes?.toSorted(
        (a, b) => b.energyShare[2] - a.energyShare[2],
      )[0]
      expect((vertical?.frequency ?? NaN) / frequency).toBeCloseTo(1, 5)
    })
  })

  it('is bounded by the closed form of isolation', () => {
    const layer = map.layers.find(({ requirement }) => requirement === 'isolation')
    if (!layer) throw new Error('no layer')
    const fine = mapOf(project, {
      frequencies: Array.from({ length: 61 }, (_, i) => 3 + i * 0.1),
      ratios: [0.01, 0.011, 0.3, 0.301],
    })
    const isolation = fine.layers.find(({ requirement }) => requirement === 'isolation')
    if (!isolation) throw new Error('no layer')
    const lines = boundaryLines(fine, isolation)
    const all = lines.flat()
    expect(all.length).toBeGreaterThan(2)
    for (const [frequency, ratio] of all.filter(([, value]) => value < 0.02)) {
      const r = 150 / (2 * Math.PI * frequency)
      // mixed damping: both parts scale with the ratio, and at 0.01 neither shows
      expect(1 / (r * r - 1)).toBeCloseTo(0.1, 2)
      expect(ratio).toBeGreaterThan(0)
    }
  })

  it('runs from one edge of the map to the other, and never through what is not known', () => {
    const lines = map.layers.map((layer) => boundaryLines(map, layer))
    expect(lines.flat().length).toBeGreaterThan(2)
    for (const line of lines.flat()) {
      expect(line.length).toBeGreaterThan(1)
      for (const [frequency, ratio] of line) {
        expect(frequency).toBeGreaterThanOrEqual(map.frequencies[0] ?? NaN)
        expect(frequency).toBeLessThanOrEqual(map.frequencies.at(-1) ?? NaN)
        expect(ratio).toBeGreaterThanOrEqual(map.ratios[0] ?? NaN)
        expect(ratio).toBeLessThanOrEqual(map.ratios.at(-1) ?? NaN)
      }
    }
    const blind = { margin: map.worst.margin, status: new Uint8Array(map.worst.status.length) }
    expect(boundaryLines(map, blind)).toEqual([])
  })

  it('runs where a margin that changes evenly is zero, also across a saddle', () => {
    const grid = { ...map, frequencies: Float64Array.of(1, 2, 4), ratios: Float64Array.of(0.1, 0.2, 0.4) }
    const cells = (margin: (frequency: number, ratio: number) => number) => ({
      margin: Float64Array.from({ length: 9 }, (_, at) =>
        margin(grid.frequencies[at % 3] ?? NaN, grid.ratios[Math.floor(at / 3)] ?? NaN),
      ),
      status: new Uint8Array(9).fill(1),
    })
    const [upright, ...more] = boundaryLines(
      grid,
      cells((frequency) => frequency - 3.3),
    )
    expect(more).toEqual([])
    expect(upright?.map(([, ratio]) => ratio).toSorted((a, b) => a - b)).toEqual([0.1, 0.2, 0.4])
    upright?.forEach(([frequency]) => {
      expect(frequency).toBeCloseTo(3.3, 12)
    })
    const crossed = boundaryLines(
      grid,
      cells((frequency, ratio) => (frequency - 3) * (ratio - 0.3) + 1e-3),
    )
    expect(crossed.length).toBe(2)
  })

  it('keeps its cells in a finer map and computes only where requirements change their mind', () => {
    const finer = mapOf(project, refinedGrid(GRID), map)
    const whole = mapOf(project, refinedGrid(GRID))
    const width = finer.frequencies.length
    map.layers.forEach((layer, l) => {
      map.ratios.forEach((_, j) => {
        map.frequencies.forEach((_, i) => {
          const at = 2 * j * width + 2 * i
          expect(finer.layers[l]?.margin[at]).toBe(layer.margin[j * map.frequencies.length + i])
        })
      })
      finer.computed.forEach((computed, at) => {
        expect(finer.layers[l]?.status[at]).toBe(whole.layers[l]?.status[at])
        if (computed === 1) expect(finer.layers[l]?.margin[at]).toBe(whole.layers[l]?.margin[at])
      })
    })
    const share = finer.computed.reduce((sum, one) => sum + one, 0) / finer.computed.length
    expect(share).toBeGreaterThan(0.25)
    expect(share).toBeLessThan(0.85)
  })

  it('starts smaller where run-ups have to be computed, and grows to twice the grid less one', () => {
    expect(startSize(project)).toEqual({ columns: 9, rows: 6 })
    expect(startSize(heavingMachine({ viscous: 400 }))).toEqual({ columns: 16, rows: 10 })
    const finer = refinedGrid(GRID)
    expect([finer.frequencies.length, finer.ratios.length]).toEqual([17, 13])
    expect(finer.frequencies.filter((_, i) => i % 2 === 0)).toEqual(GRID.frequencies)
  })

  it('names the worst of all requirements in every cell', () => {
    map.worst.margin.forEach((margin, at) => {
      expect(margin).toBe(Math.min(...map.layers.map((layer) => layer.margin[at] ?? NaN)))
      expect(map.worst.status[at]).toBe(Math.min(...map.layers.map((layer) => layer.status[at] ?? NaN)))
    })
  })

  it('gives mounts without damping a loss factor, and says so', () => {
    const bare = heavingMachine({}, { requirements: REQUIREMENTS })
    const found = mapOf(bare, { frequencies: [3], ratios: [0.04] })
    expect(found.dampingBy).toBe('lossFactor')
    expect(found.present.ratio).toBe(0)
    expect(projectAt(bare, found, 0, 0).mounting.types[0]?.lossFactor).toBeCloseTo(0.08, 9)
  })

  it('does not know what cannot be computed, and says why when nothing can', () => {
    const silent = mapOf({ ...project, sources: [] }, { frequencies: [3], ratios: [0.04] })
    const status = (id: string) => silent.layers.find(({ requirement }) => requirement === id)?.status[0]
    expect(status('isolation')).toBe(0)
    expect(status('sag')).toBeGreaterThan(0)
    expect(silent.worst.status[0]).toBe(0)
    const empty = { ...project, mounting: { ...project.mounting, placed: [] } }
    const { map: none, problems } = feasibilityMap(empty, GRID, evaluate(empty))
    expect(none).toBeNull()
    expect(problems.map(({ field }) => field)).toEqual(['mounting.placed'])
  })

  it.each([
    [{ frequencies: [], ratios: [0.1] }, 'grid.frequencies'],
    [{ frequencies: [3, 3], ratios: [0.1] }, 'grid.frequencies[1]'],
    [{ frequencies: [3], ratios: [0] }, 'grid.ratios[0]'],
  ])('refuses a grid that does not rise: %j', (grid, field) => {
    expect(() => feasibilityMap(project, grid, evaluate(project))).toThrow(InputError)
    expect(() => feasibilityMap(project, grid, evaluate(project))).toThrow(field)
  })
})

describe('a candidate', () => {
  it('stands on the map where evaluate finds the machine on such mounts', () => {
    const project = heavingMachine({ lossFactor: 0.1 })
    const { massSummary } = evaluate(project)
    const [own] = project.mounting.types
    if (!own || massSummary === null) throw new Error('no type')
    const soft = {
      ...own,
      id: 'soft',
      stiffness: [2e4, 2e4, 1e4] as [number, number, number],
      lossFactor: 0.2,
    }
    const loose = { ...own, id: 'loose', stiffness: [0, 0, 1e4] as [number, number, number] }
    const points = candidatePoints(project, [own, soft, loose], massSummary)
    expect(points[0]?.frequency).toBeCloseTo(PRESENT, 9)
    expect(points[1]?.frequency).toBeCloseTo(Math.sqrt(4e4 / HEAVE.mass) / (2 * Math.PI), 9)
    expect(points[1]?.ratio).toBeCloseTo(0.1, 9)
    expect(points[2]).toEqual({ type: 'loose', frequency: null, ratio: null })
    expect(withType(project, soft).mounting.placed.every(({ type }) => type === 'soft')).toBe(true)
  })
})
