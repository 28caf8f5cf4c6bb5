import { describe, expect, it } from 'vitest'
import type { Figure } from '../../../core/report/report.ts'
import { linearScale, logScale, yScale } from '../../../electron/report/figure-scale.ts'
import { figureSvg } from '../../../electron/report/figure-svg.ts'

const SIZE = { width: 500, height: 200 }
const x = Array.from({ length: 20_001 }, (_, index) => index / 10)
const spike = x.map((speed) => (speed === 731.3 ? 50 : 1))

const figure: Figure = {
  id: 'test',
  title: 'Test',
  description: '',
  x: { label: 'Shaft speed', unit: 'rpm', scale: 'linear' },
  y: { label: 'Velocity', unit: 'mm/s', scale: 'log' },
  series: [{ label: 'a < b & "c"', style: 'main', x, y: spike }],
  limits: [{ value: 4.5, label: 'limit', forbidden: 'above', over: [300, 1500] }],
  marks: [
    { at: 1450, label: 'running', kind: 'running' },
    { at: 700, label: '1', kind: 'mode' },
    { at: 701, label: '2', kind: 'mode' },
  ],
  operating: [300, 1500],
}

/** Points of the first drawn curve. */
function points(svg: string): readonly (readonly [number, number])[] {
  const path = /clip-path="url\(#[^"]*\)"/.exec(svg) && /<path d="([^"]*)" clip-path/.exec(svg)?.[1]
  return [...(path ?? '').matchAll(/[ML](-?[\d.]+) (-?[\d.]+)/g)].map((match) => [
    Number(match[1]),
    Number(match[2]),
  ])
}

describe('a figure as a vector drawing', () => {
  const svg = figureSvg(figure, SIZE)

  it('draws few points and yet the one that stands out of twenty thousand', () => {
    const drawn = points(svg)
    expect(drawn.length).toBeGreaterThan(100)
    expect(drawn.length).toBeLessThan(8100) // four for each quarter point of width, 444 pt wide
    const top = drawn.reduce((a, b) => (b[1] < a[1] ? b : a))
    const level = drawn[0]
    expect(level?.[1]).toBeGreaterThan(top[1] + 50)
    // 46 pt to the left of the plot, 10 pt to its right: the place of 731.3 of 2000 rpm; drawn to 0.01 pt
    expect(top[0]).toBeCloseTo(46 + (500 - 56) * (731.3 / 2000), 1)
  })

  it('writes axes with units, limit, running speed, legend and operating range', () => {
    for (const words of [
      'Shaft speed [rpm]',
      'Velocity [mm/s]',
      'limit 4.5',
      'running',
      'operating speeds',
    ]) {
      expect(svg).toContain(`>${words}</text>`)
    }
    expect(svg).toContain('a &lt; b &amp; &quot;c&quot;')
  })

  it('sets labels of neighbouring modes in rows of their own', () => {
    const heights = ['1', '2'].map((label) => new RegExp(`y="([\\d.]+)"[^>]*>${label}</text>`).exec(svg)?.[1])
    expect(heights[0]).not.toBe(heights[1])
  })

  it('leaves out only labels for which three rows have no room, and never that of the running speed', () => {
    const crowd = Array.from({ length: 8 }, (_, index) => ({
      at: 1445 + index,
      label: `m${index}`,
      kind: 'mode' as const,
    }))
    const alone = { at: 200, label: 'alone', kind: 'mode' as const }
    const crowded = figureSvg({ ...figure, marks: [...crowd, alone, ...figure.marks] }, SIZE)
    const shown = (label: string) => crowded.includes(`>${label}</text>`)
    expect([shown('running'), shown('alone'), shown('1'), shown('2')]).toEqual([true, true, true, true])
    expect(crowd.filter(({ label }) => shown(label))).toHaveLength(2) // the rows that the running speed leaves
    expect(/y="([\d.]+)"[^>]*>alone</.exec(crowded)?.[1]).toBe(
      /y="([\d.]+)"[^>]*>running</.exec(crowded)?.[1],
    )
  })

  it('hatches the side that is not allowed', () => {
    const strokes = /<path d="(M[^"]*)" fill="none" stroke="[^"]*" stroke-width="0.6"\/>/.exec(svg)?.[1] ?? ''
    const pairs = [...strokes.matchAll(/M([\d.]+) ([\d.]+)L([\d.]+) ([\d.]+)/g)]
    expect(pairs.length).toBeGreaterThan(20)
    for (const [, , from, , to] of pairs) expect(Number(to)).toBeLessThan(Number(from)) // upwards
  })

  it('leaves a gap where a value is not known', () => {
    const broken = {
      ...figure,
      series: [
        { ...figure.series[0], label: '', style: 'main', x: [0, 1, 2, 3, 4], y: [1, 2, null, 2, 1] } as const,
      ],
    }
    const path = /<path d="([^"]*)" clip-path/.exec(figureSvg(broken, SIZE))?.[1] ?? ''
    expect(path.match(/M/g)).toHaveLength(2)
  })
})

describe('scales', () => {
  it('put round numbers on a linear axis', () => {
    expect(linearScale(0, 900).ticks.map((tick) => tick.text)).toEqual([
      '0',
      '100',
      '200',
      '300',
      '400',
      '500',
      '600',
      '700',
      '800',
      '900',
    ])
    expect(linearScale(0.3, 1.9).ticks.map((tick) => tick.text)).toContain('0.4')
  })

  it('put decades on a long logarithmic axis and 1, 2, 5 on a short one', () => {
    expect(logScale(0.009, 12).ticks.map((tick) => tick.text)).toEqual(['0.01', '0.1', '1', '10'])
    expect(logScale(0.9, 12).ticks.map((tick) => tick.text)).toEqual(['1', '2', '5', '10'])
    expect(logScale(0.1, 10).place(1)).toBeCloseTo(0.5, 12)
  })

  it('span curves and limits, and cut off what is far below', () => {
    const scale = yScale(figure)
    expect(scale.from).toBeLessThan(1)
    expect(scale.to).toBeGreaterThan(50)
    const deep = yScale({ ...figure, series: [{ label: '', style: 'main', x: [0, 1], y: [1e-14, 10] }] })
    expect(deep.from).toBeGreaterThan(1e-3)
  })

  it('stand on something where there is nothing to draw', () => {
    const empty = { ...figure, series: [], limits: [], marks: [], operating: null }
    expect(figureSvg(empty, SIZE)).not.toMatch(/NaN|Infinity|undefined/)
    const flat = { ...empty, series: [{ label: '', style: 'main', x: [5], y: [0] } as const] }
    expect(figureSvg(flat, SIZE)).not.toMatch(/NaN|Infinity|undefined/)
  })
})
