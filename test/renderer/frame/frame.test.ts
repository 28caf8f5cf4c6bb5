import { readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import { evaluate } from '../../../core/evaluate.ts'
import { readProject, readProjectText } from '../../../core/project/read.ts'
import type { Verdict } from '../../../core/results.ts'
import { newRequirement, readOrders, REQUIREMENT_KINDS } from '../../../renderer/frame/new-requirement.ts'
import { barCrossings, barProfile, barTicks, keyTarget } from '../../../renderer/frame/speed-bar.ts'
import { gaugeOf, governingWords, limitWords, marginWords } from '../../../renderer/frame/verdict-words.ts'

const RPM = (2 * Math.PI) / 60
const fan = readProjectText(readFileSync('resources/demo/kiln-exhaust-fan.json', 'utf8'))
const evaluation = evaluate(fan)
const TOP = 1800 * RPM

describe('speed bar', () => {
  it('has round ticks from standstill on that do not crowd', () => {
    const ticks = barTicks(TOP, 640, null)
    expect(ticks[0]).toEqual({ left: 0, text: '0' })
    expect(ticks.every((tick) => Number(tick.text) % 100 === 0)).toBe(true)
    ticks.slice(1).forEach((tick, index) => {
      expect(tick.left - (ticks[index]?.left ?? 0)).toBeGreaterThan(50)
    })
  })
  it('leaves room for the name of the running speed', () => {
    const kept = { left: (1450 / 1800) * 640, width: 80 }
    const near = (tick: { left: number }) => Math.abs(tick.left - kept.left) < 40
    expect(barTicks(TOP, 640, kept).some(near)).toBe(false)
    expect(barTicks(TOP, 640, null).some(near)).toBe(true)
  })
  it('keeps every crossing as a tick, with a name where there is room', () => {
    const crossings = barCrossings(evaluation, TOP, 640)
    expect(crossings.map(({ name }) => name)).toContain('1× heave')
    expect(crossings.length).toBe(6)
    const cramped = barCrossings(evaluation, TOP, 100)
    expect(cramped.length).toBe(6)
    expect(cramped.some(({ row }) => row === null)).toBe(true)
  })
  it('draws the force into the support inside its height', () => {
    const heights = barProfile(evaluation, TOP, 640, 30)
      .split(' ')
      .map((pair) => Number(pair.split(',')[1]))
    expect(Math.min(...heights)).toBe(0)
    expect(Math.max(...heights)).toBeLessThanOrEqual(30)
    expect(barProfile(null, TOP, 640, 30)).toBe('')
  })
  it('moves by keys: steps of whole rpm, crossings, ends, running speed', () => {
    const crossings = barCrossings(evaluation, TOP, 640)
    const go = (key: string, from: number, coarse = false) =>
      (keyTarget(key, coarse, from * RPM, TOP, fan, crossings) ?? NaN) / RPM
    expect(go('ArrowRight', 100.3)).toBeCloseTo(106, 9)
    expect(go('ArrowLeft', 100, true)).toBeCloseTo(40, 9)
    expect(go('ArrowLeft', 3)).toBe(0)
    expect(go('ArrowRight', 1799)).toBeCloseTo(1800, 9)
    expect(go('Home', 700)).toBe(0)
    expect(go('End', 700)).toBeCloseTo(1800, 9)
    expect(go('PageUp', 300)).toBeCloseTo((crossings[2]?.speed ?? 0) / RPM, 9)
    expect(go('PageDown', 300)).toBeCloseTo((crossings[1]?.speed ?? 0) / RPM, 9)
    expect(go('Enter', 300)).toBeCloseTo(1450, 9)
    expect(go('x', 300)).toBeNaN()
  })
})

describe('a new requirement', () => {
  it.each(REQUIREMENT_KINDS)('of kind %s can be stored and is judged, unknown at worst', (kind) => {
    const blank = readProject({ format: 'stillbed-project', version: fan.version })
    for (const project of [blank, fan]) {
      const stored = readProject({ ...project, requirements: [newRequirement(kind, project, 'r')] })
      expect(evaluate(stored).verdicts.length).toBe(1)
    }
  })
  it('leaves the limit to the person who answers for it', () => {
    expect(newRequirement('isolation', fan, 'r').limit).toBeNull()
    expect(newRequirement('vibrationVelocity', fan, 'r')).toMatchObject({ point: 'bearing-fan', limit: null })
  })
  it('asks about the orders that excite', () => {
    expect(newRequirement('modeSeparation', fan, 'r')).toMatchObject({ orders: [1], speeds: 'operating' })
  })
})

describe('orders as text', () => {
  it('reads lists as people write them', () => {
    expect(readOrders('1, 2, 9')).toEqual([1, 2, 9])
    expect(readOrders('1x; 0.5 2×')).toEqual([1, 0.5, 2])
  })
  it('refuses what is no order', () => {
    expect(['', 'one', '0', '-1', '1, two'].map(readOrders)).toEqual([null, null, null, null, null])
  })
})

describe('words of a verdict', () => {
  const verdict: Verdict = {
    requirement: 'r',
    kind: 'transmittedForce',
    title: 'Force into the support',
    status: 'fail',
    value: 552,
    limit: 300,
    dimension: 'force',
    keep: 'below',
    margin: (300 - 552) / 300,
    governingSpeed: 398 * RPM,
    governingPlace: 'support',
    advice: '',
    source: '',
  }
  it('say by how much it is over', () => {
    expect(limitWords(verdict, 'SI')).toBe('at most 300 N')
    expect(marginWords(verdict)).toBe('over by 84 %')
    expect(governingWords(verdict, 'SI')).toBe('at 398 rpm, support')
  })
  it('say by how much it is short, or what is in hand', () => {
    expect(marginWords({ ...verdict, keep: 'above', margin: -0.1 })).toBe('short by 10 %')
    expect(marginWords({ ...verdict, status: 'pass', margin: 0.25 })).toBe('25 % in hand')
    expect(marginWords({ ...verdict, margin: 0.25 })).toBe('kept, but another limit is not')
    expect(marginWords({ ...verdict, margin: null })).toBe('–')
  })
  it('do not invent a limit', () => {
    expect(limitWords({ ...verdict, limit: null }, 'SI')).toBe('no limit given')
    expect(gaugeOf({ ...verdict, limit: null })).toBeNull()
  })
  it('keep the gauge inside its ends', () => {
    expect(gaugeOf({ ...verdict, value: 1e9 })?.value).toBe(1)
    expect(gaugeOf({ ...verdict, value: -3 })?.value).toBe(0)
    expect(gaugeOf(verdict)?.limit).toBeCloseTo(2 / 3, 12)
  })
})
