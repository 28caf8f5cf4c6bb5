import { describe, expect, it } from 'vitest'
import type { DampingNeed } from '../../../core/feasibility/damping-need.ts'
import { blankProject } from '../../../core/project/create.ts'
import { readProject } from '../../../core/project/read.ts'
import { governingOf, peakGroups } from '../../../core/report/sections/run-up-peaks.ts'
import type { RunUpPass, RunUpPeak, RunUpPeaks, RunUpResult } from '../../../core/results.ts'
import {
  clearanceChoices,
  dampingRows,
  dampingSentence,
} from '../../../renderer/pages/run-up/damping-words.ts'
import { addEntry, setLawField, switchLaw } from '../../../renderer/pages/run-up/law-edits.ts'
import { courseWords, runUpSummary } from '../../../core/report/sections/run-up-words.ts'
import {
  clearanceLimits,
  speedAtTime,
  standingTime,
  timesOfSpeed,
} from '../../../renderer/pages/run-up/time-axis.ts'

const RPM = (2 * Math.PI) / 60

const peak = (value: number, rpm: number, steady: number | null = 2 * value): RunUpPeak => ({
  value,
  time: 1,
  speed: rpm * RPM,
  steady,
  ratio: steady === null ? null : value / steady,
})
const peaks = (resultant: RunUpPeak, x = peak(0, 0)): RunUpPeaks => ({ x, y: x, z: x, resultant })

function pass(travel: number, force: number, rpm: number, steady: number | null = 2 * travel): RunUpPass {
  return {
    from: 0,
    to: 1450 * RPM,
    duration: 21.9,
    hold: 10,
    converged: true,
    errorEstimate: 1e-5,
    points: [],
    mounts: [
      { id: 'a', force: peaks(peak(force / 2, rpm)), travel: peaks(peak(travel / 2, rpm)) },
      {
        id: 'b',
        force: peaks(peak(force, rpm)),
        travel: peaks(peak(travel, rpm, steady), peak(travel / 4, 99)),
      },
    ],
    support: peaks(peak(force, rpm)),
    absorbers: [],
    envelope: null,
  }
}

function project() {
  const made = blankProject('x')
  made.machine.duty.runningSpeed = 1450 * RPM
  made.mounting.placed = ['a', 'b'].map((id, at) => ({
    id,
    name: at === 0 ? '' : 'M3',
    type: 't',
    position: [at, 0, 0],
    tilt: null,
  })) as unknown as typeof made.mounting.placed // only ids and names are read here
  return made
}

describe('peaks side by side', () => {
  const runUp: RunUpResult = { up: pass(3e-3, 200, 500), down: pass(4.1e-3, 150, 412) }

  it('puts both passages of each place into one row, and finds what governs each group', () => {
    const groups = peakGroups(project(), runUp)
    expect(groups.map(({ id }) => id)).toEqual(['travel', 'force', 'support'])
    const [travel, force] = groups
    expect(travel?.rows.map(({ place }) => place)).toEqual(['mount 1', 'M3'])
    expect([travel?.rows[1]?.up?.value, travel?.rows[1]?.down?.value]).toEqual([3e-3, 4.1e-3])
    expect(travel && governingOf(travel)?.direction).toBe('down')
    expect(force && governingOf(force)?.direction).toBe('up')
  })

  it('shows one direction alone when asked', () => {
    const travel = peakGroups(project(), runUp, 'x').find(({ id }) => id === 'travel')
    expect(travel?.rows[1]?.down?.value).toBe(4.1e-3 / 4)
  })

  it('leaves a passage open that is not computed', () => {
    const [travel] = peakGroups(project(), { up: null, down: runUp.down })
    expect(travel?.rows[0]?.up).toBeNull()
  })
})

describe('in words', () => {
  it('says which passage governs, where, how much and at which speed', () => {
    const lines = runUpSummary(
      project(),
      { up: pass(3e-3, 200, 500), down: pass(4.1e-3, 150, 412, 4.1e-3 / 0.96) },
      'SI',
    )
    expect(lines).toEqual([
      'Coast-down governs across the mounts: M3 moves 4.1 mm at 412 rpm, 96 % of the worst steady value.',
      'Run-up governs through the mounts: M3 carries 200 N at 500 rpm, 50 % of the worst steady value.',
    ])
  })

  it('does not compare with what is not computed, nor with a steady value without bound', () => {
    const [line] = runUpSummary(project(), { up: pass(3e-3, 200, 500, null), down: null }, 'SI')
    expect(line).toBe(
      'During run-up across the mounts: M3 moves 3 mm at 500 rpm; held there it would grow without bound.',
    )
  })

  it('tells the course of a passage', () => {
    expect(courseWords(pass(1, 1, 1), 'SI')).toBe('0 rpm to 1450 rpm in 21.9 s, then 10 s at that speed')
  })
})

describe('speed and time', () => {
  // up to 100 rad/s in 10 s, held, and down again: speed = 10 t, so that 25 rad/s is passed at 2.5 s
  const course = {
    time: Float64Array.of(0, 10, 15, 25),
    speed: Float64Array.of(0, 100, 100, 0),
  }

  it('finds every time at which a speed is passed', () => {
    expect(timesOfSpeed(course, 25)).toEqual([2.5, 22.5])
    expect(timesOfSpeed(course, 100)).toEqual([10])
    expect(timesOfSpeed(course, 101)).toEqual([])
  })

  it('reads the speed at a time', () => {
    expect([0, 2.5, 12, 22.5, 99].map((time) => speedAtTime(course, time))).toEqual([0, 25, 100, 25, 0])
  })

  it('keeps the chosen time while the common cursor has its speed, and follows it otherwise', () => {
    expect(standingTime(course, 25, 22.5)).toBe(22.5)
    expect(standingTime(course, 50, 22.5)).toBe(5)
    expect(standingTime(course, 200, null)).toBe(10)
  })

  it('draws a clearance where it is judged', () => {
    const judged = readProject({
      ...blankProject('x'),
      requirements: [
        { kind: 'runUpMotion', id: 'm', limit: '4 mm', during: 'down' },
        { kind: 'runUpMotion', id: 'p', limit: '1 mm', place: 'point', point: 'bearing' },
        { kind: 'runUpForce', id: 'f', limit: '90 N' },
      ],
    })
    const envelope = { ...course, displacement: course.time, place: 'a', of: 'mount' } as const
    const drawn = (of: 'mount' | 'point', place: string, direction: 'up' | 'down') =>
      clearanceLimits(judged, { ...envelope, of, place }, direction).map(({ y, label }) => [y, label])
    expect(drawn('mount', 'a', 'down')).toEqual([[4e-3, 'limit 4 mm']])
    expect(drawn('mount', 'a', 'up')).toEqual([])
    expect(drawn('point', 'bearing', 'up')).toEqual([[1e-3, 'limit 1 mm']])
    expect(drawn('point', 'other', 'up')).toEqual([])
  })
})

describe('laws of speed', () => {
  it('keep their ends from a ramp to a torque and back', () => {
    const draft = project()
    setLawField(draft, 'down', 'to', 20)
    setLawField(draft, 'down', 'time', 60)
    switchLaw(draft, 'down', 'torque')
    expect(draft.runUp.down.law).toMatchObject({ by: 'torque', to: 20, inertia: null })
    switchLaw(draft, 'down', 'ramp')
    expect(draft.runUp.down.law).toEqual({ by: 'ramp', from: null, to: 20, time: null })
    expect(readProject({ ...blankProject('x'), runUp: draft.runUp }).runUp).toEqual(draft.runUp)
  })

  it('turn a ramp into the two ends of its line, to be refined', () => {
    const draft = project()
    setLawField(draft, 'up', 'time', 12)
    switchLaw(draft, 'up', 'table')
    addEntry(draft, 'up')
    expect(draft.runUp.up.law).toEqual({
      by: 'table',
      entries: [
        { time: 0, speed: 0 },
        { time: 12, speed: 1450 * RPM },
        { time: 24, speed: 1450 * RPM },
      ],
    })
  })

  it('start an empty table at rest when the ramp has no time yet', () => {
    const draft = project()
    switchLaw(draft, 'up', 'table')
    expect(draft.runUp.up.law).toEqual({ by: 'table', entries: [] })
    addEntry(draft, 'up')
    expect(draft.runUp.up.law).toMatchObject({ entries: [{ time: 0, speed: 0 }] })
  })
})

describe('damping that is needed', () => {
  const at = (dampingRatio: number, peakAt: number | null): DampingNeed['present'] => ({
    factor: 1,
    dampingRatio,
    types: [{ id: 't', lossFactor: 2 * dampingRatio, viscous: [0, 0, 0], equivalentViscous: [1, 2, 3] }],
    peak: peakAt,
    forceRatio: 0.1,
    isolationEfficiency: 0.9,
    supportForce: 50,
  })
  const need: DampingNeed = {
    outcome: 'found',
    referenceFrequency: 6.6,
    present: at(0.03, 5e-3),
    needed: at(0.075, 4e-3),
    converged: true,
    iterations: 9,
    residual: 0,
  }

  it('is told against what there is', () => {
    expect(dampingSentence(need, 'SI')).toBe(
      'The clearance needs a damping ratio of 7.5 % in the vertical motion at 6.6 Hz, 2.5 times what there is.',
    )
    expect(dampingSentence({ ...need, present: at(0, null) }, 'SI')).toContain('the mounts have none')
    expect(dampingSentence({ ...need, outcome: 'none' }, 'SI')).toContain('without any damping')
    expect(dampingSentence({ ...need, outcome: 'outOfReach' }, 'SI')).toContain('Not even critical damping')
  })

  it('stands beside what it costs in isolation', () => {
    const rows = dampingRows(project(), need)
    expect(rows.find(({ label }) => label.startsWith('Largest'))).toMatchObject({
      present: 5e-3,
      needed: 4e-3,
    })
    expect(rows.find(({ label }) => label.endsWith('loss factor'))).toMatchObject({
      present: 0.06,
      needed: 0.15,
    })
  })

  it('is asked for a clearance that is judged', () => {
    const judged = readProject({
      ...blankProject('x'),
      requirements: [
        { kind: 'runUpMotion', id: 'm', limit: '4 mm', during: 'down', direction: 'z' },
        { kind: 'runUpMotion', id: 'off', limit: '4 mm', enabled: false },
        { kind: 'runUpMotion', id: 'open' },
        { kind: 'runUpMotion', id: 'lost', limit: '1 mm', place: 'point', point: 'gone' },
      ],
    })
    expect(clearanceChoices(judged)).toEqual([
      {
        id: 'm',
        label: '4 mm across the mounts, z',
        clearance: { place: 'mounts', point: null, direction: 'z', during: 'down', limit: 4e-3 },
      },
    ])
  })
})
