import { describe, expect, it } from 'vitest'
import { cursorTarget } from '../../../renderer/charts/cursor-keys.ts'
import { toTabSeparated } from '../../../renderer/charts/data-text.ts'
import { toDecibels } from '../../../renderer/charts/decibels.ts'
import { drawModel, type DrawInput } from '../../../renderer/charts/draw-model.ts'
import { placeLabels } from '../../../renderer/charts/label-rows.ts'
import { valueRange } from '../../../renderer/charts/ranges.ts'
import { peakWithin, snap, valueAt } from '../../../renderer/charts/sample.ts'
import { logGrid, logTicks, tickText, withUnit } from '../../../renderer/charts/ticks.ts'

const RPM = (2 * Math.PI) / 60

describe('toDecibels', () => {
  // SOURCE  definition of a level of a field quantity, ISO 80000-3:2006 (from memory): 20 lg(x / x0); half the
  // amplitude is 20 lg 0.5 = -6.0206 dB.
  it('gives 20 lg of the amplitude ratio', () => {
    expect(toDecibels(10, 1)).toBeCloseTo(20, 12)
    expect(toDecibels(0.5, 1)).toBeCloseTo(-6.0206, 4)
    expect(toDecibels(2e-9, 1e-9)).toBeCloseTo(6.0206, 4)
  })
  it('has no level for nothing or less', () => {
    expect(toDecibels(0, 1)).toBeNull()
    expect(toDecibels(-1, 1)).toBeNull()
  })
})

describe('tick text', () => {
  it('shows neighbours apart and hides binary noise', () => {
    expect(tickText(0.30000000000000004, 0.1)).toBe('0.3')
    expect(tickText(1450, 50)).toBe('1450')
    expect(tickText(1.25, 0.25)).toBe('1.25')
    expect(tickText(0, 0.2)).toBe('0')
    expect(tickText(-40, 20)).toBe('−40')
  })
  it('labels 1, 2 and 5 over two decades and whole decades beyond', () => {
    expect(logTicks(0.1, 10)).toEqual([0.1, 0.2, 0.5, 1, 2, 5, 10])
    expect(logTicks(0.01, 100)).toEqual([0.01, 0.1, 1, 10, 100])
  })
  it('labels more of a short span, so that an axis is never without figures', () => {
    expect(logTicks(3, 8)).toEqual([3, 4, 5, 6, 7, 8])
  })
  it('draws fine lines for every digit of a decade', () => {
    expect(logGrid(1, 10)).toEqual([1, 2, 3, 4, 5, 6, 7, 8, 9, 10])
  })
  it('says the unit once, and none for a pure number', () => {
    expect(withUnit('Support force', 'N')).toBe('Support force [N]')
    expect(withUnit('Force ratio', '')).toBe('Force ratio')
  })
})

describe('reading a curve', () => {
  const x = Float64Array.of(0, 10, 20)
  const y = Float64Array.of(1, 5, 3)
  it('snaps to the nearest computed place', () => {
    expect([-5, 4, 6, 14.9, 99].map((value) => snap(x, value))).toEqual([0, 0, 10, 10, 20])
  })
  it('gives the computed value at a computed place, the straight line between, nothing outside', () => {
    expect(valueAt(x, y, 10)).toBe(5)
    expect(valueAt(x, y, 15)).toBe(4)
    expect(valueAt(x, y, 21)).toBeNull()
    expect(valueAt(x, y, -1)).toBeNull()
  })
  it('finds the peak of a span', () => {
    expect(peakWithin(x, y, 0, 20)).toEqual({ x: 10, y: 5 })
    expect(peakWithin(x, y, 11, 20)).toEqual({ x: 20, y: 3 })
    expect(peakWithin(x, y, 21, 30)).toBeNull()
  })
})

describe('valueRange', () => {
  it('holds curve and limit with room around the limit', () => {
    const range = valueRange([1, 2, 3], [10], 'log')
    expect(range.min).toBeLessThanOrEqual(1)
    expect(range.max).toBeGreaterThan(10)
  })
  it('starts a linear axis at zero', () => {
    expect(valueRange([40, 82], [], 'linear')).toEqual({ min: 0, max: 100 })
  })
  it('does not let a run to zero stretch a logarithmic axis beyond four decades', () => {
    const values = Array.from({ length: 1000 }, (_, index) => 10 ** (-index / 50))
    const range = valueRange(values, [], 'log')
    // each end may be rounded outwards by up to half as much again
    expect(range.max / range.min).toBeLessThanOrEqual(2.5e4)
  })
  it('does not let the spike of an undamped resonance flatten the rest', () => {
    const values = [...Array.from({ length: 999 }, () => 1), 1e12]
    expect(valueRange(values, [], 'log').max).toBeLessThan(1000)
    expect(valueRange(values, [], 'linear').max).toBeLessThan(1000)
  })
  it('has an axis without any value', () => {
    expect(valueRange([], [], 'log').max).toBeGreaterThan(valueRange([], [], 'log').min)
    expect(valueRange([NaN], [], 'linear').max).toBeGreaterThan(0)
  })
})

describe('toTabSeparated', () => {
  const speeds = Float64Array.of(100 * RPM, 200 * RPM)
  it('gives a heading with units and one row per computed place in shown units', () => {
    const text = toTabSeparated('Shaft speed [rpm]', RPM, [
      { heading: 'Support force [N]', x: speeds, y: Float64Array.of(1.5, 2), factor: 1 },
    ])
    expect(text).toBe('Shaft speed [rpm]\tSupport force [N]\n100\t1.5\n200\t2\n')
  })
  it('joins curves computed at different places, empty outside their range', () => {
    const text = toTabSeparated('x', 1, [
      { heading: 'a', x: Float64Array.of(0, 2), y: Float64Array.of(0, 4), factor: 2 },
      { heading: 'b', x: Float64Array.of(1), y: Float64Array.of(7), factor: 1 },
    ])
    expect(text).toBe('x\ta\tb\n0\t0\t\n1\t1\t7\n2\t2\t\n')
  })
})

describe('placeLabels', () => {
  it('moves a label that would overlap to the next row and drops what has no room', () => {
    const labels = [50, 55, 60].map((at) => ({ at, width: 40 }))
    expect(placeLabels(labels, 2, [0, 200]).map((label) => label.row)).toEqual([0, 1, null])
  })
  it('keeps labels within the ends', () => {
    expect(placeLabels([{ at: 2, width: 40 }], 1, [0, 200])[0]?.at).toBe(20)
  })
})

describe('drawModel', () => {
  const x = Float64Array.from({ length: 101 }, (_, index) => index * 10 * RPM)
  const input: DrawInput = {
    series: [{ id: 'a', label: 'a', x, y: x.map(() => 4.4482216152605), role: 'main', dash: 0 }],
    x: { title: 'Shaft speed', dimension: 'shaftSpeed' },
    y: { title: 'Force', dimension: 'force', decibelReference: 4.4482216152605, decibelLabel: 're 1 lbf' },
    yKind: 'linear',
    units: 'US',
    limits: [],
    hidden: new Set(),
    view: null,
    buckets: 500,
  }
  it('shows values in the unit of the axis', () => {
    const model = drawModel(input)
    expect(model.y.title).toBe('Force [lbf]')
    // 1e-9: the pound-force is exact by definition, the division rounds
    expect(model.curves[0]?.points.at(-1)?.x).toBeCloseTo(1000, 9)
    expect(model.curves[0]?.points.at(-1)?.y).toBeCloseTo(1, 9)
  })
  it('shows levels in dB against the reference', () => {
    const model = drawModel({ ...input, yKind: 'dB' })
    expect(model.y.title).toBe('Force [dB re 1 lbf]')
    expect(model.curves[0]?.points[3]?.y).toBeCloseTo(0, 9)
  })
  it('leaves hidden curves out', () => {
    expect(drawModel({ ...input, hidden: new Set(['a']) }).curves).toEqual([])
  })
  it('keeps the ends of a zoomed view', () => {
    const model = drawModel({ ...input, view: { x: { min: 200, max: 300 }, y: { min: 0, max: 9 } } })
    expect([model.x.min, model.x.max]).toEqual([expect.closeTo(200, 9), expect.closeTo(300, 9)])
    expect(model.y.max).toBe(9)
    expect(model.curves[0]?.points.length).toBeLessThan(15)
  })
})

describe('cursor keys', () => {
  const domain = Float64Array.of(0, 10, 20, 30, 40)
  it('go to neighbouring computed places, from between them too', () => {
    expect(cursorTarget('ArrowRight', domain, 20)).toBe(30)
    expect(cursorTarget('ArrowLeft', domain, 20)).toBe(10)
    expect(cursorTarget('ArrowRight', domain, 21)).toBe(30)
    expect(cursorTarget('ArrowLeft', domain, 21)).toBe(20)
  })
  it('stop at the ends', () => {
    expect(cursorTarget('ArrowRight', domain, 40)).toBe(40)
    expect(cursorTarget('Home', domain, 20)).toBe(0)
    expect(cursorTarget('End', domain, 20)).toBe(40)
  })
  it('leave other keys alone', () => {
    expect(cursorTarget('a', domain, 20)).toBeNull()
  })
})
