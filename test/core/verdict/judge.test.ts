import { describe, expect, it } from 'vitest'
import { evaluate } from '../../../core/evaluate.ts'
import type { ProjectInput } from '../../../core/project/project.ts'
import { readProject } from '../../../core/project/read.ts'
import type { Verdict } from '../../../core/results.ts'

type Requirements = NonNullable<ProjectInput['requirements']>

/** 200 kg on four springs of 50 N/mm under the centre of gravity: heave at 5.03 Hz, nothing coupled. */
function machine(requirements: Requirements, changes: Partial<ProjectInput> = {}) {
  const corner = (id: string, x: number, y: number) => ({
    id,
    name: id,
    type: 'spring',
    position: [x, y, 0] as [number, number, number],
  })
  return readProject({
    format: 'stillbed-project',
    version: 1,
    machine: {
      massProperties: {
        from: 'typed',
        mass: 200,
        centreOfGravity: [0, 0, 0],
        inertia: { xx: 10, yy: 15, zz: 18 },
      },
      duty: { runningSpeed: '1500 rpm', lowestSpeed: '600 rpm' },
      points: [{ id: 'P', name: 'bearing', position: [0, 0, 0] }],
    },
    sources: [
      { kind: 'harmonic', id: 'push', load: { kind: 'force', direction: [0, 0, 1], amplitude: 100 } },
    ],
    mounting: {
      types: [
        {
          id: 'spring',
          name: 'spring',
          stiffness: [5e4, 5e4, 5e4],
          lossFactor: 0.1,
          ratedLoad: 600,
          deflectionLimit: 0.012,
        },
      ],
      placed: [
        corner('M1', 0.4, 0.3),
        corner('M2', 0.4, -0.3),
        corner('M3', -0.4, 0.3),
        corner('M4', -0.4, -0.3),
      ],
    },
    requirements,
    ...changes,
  })
}

function only(requirements: Requirements, changes: Partial<ProjectInput> = {}): Verdict {
  const verdict = evaluate(machine(requirements, changes)).verdicts[0]
  if (!verdict) throw new Error('no verdict')
  return verdict
}

/** Force transmissibility of a hysteretic single freedom, the same formula as in any textbook on vibration. */
function transmissibility(frequency: number): number {
  const r2 = (frequency / (Math.sqrt(2e5 / 200) / (2 * Math.PI))) ** 2
  return Math.hypot(1, 0.1) / Math.hypot(1 - r2, 0.1)
}

describe('a verdict', () => {
  // 1e-9: the same closed form, evaluated once by the engine and once here; rounding only
  it('passes, is near or fails by the margin to its limit', () => {
    const efficiency = 1 - transmissibility(25)
    const at = (limit: number) => only([{ kind: 'isolation', id: 'r', limit }])
    expect(at(0.8).status).toBe('pass')
    expect(at(0.8).value).toBeCloseTo(efficiency, 9)
    expect(at(0.8).margin).toBeCloseTo((efficiency - 0.8) / 0.8, 9)
    expect(at(0.95).status).toBe('near')
    expect(at(0.99).status).toBe('fail')
  })

  it('is governed by the worst speed of its span', () => {
    const running = only([{ kind: 'transmittedForce', id: 'r', limit: 100 }])
    const operating = only([{ kind: 'transmittedForce', id: 'r', limit: 100, speeds: 'operating' }])
    expect(running.value).toBeCloseTo(100 * transmissibility(25), 7)
    expect(operating.value).toBeCloseTo(100 * transmissibility(10), 7)
    // 600 rpm in rad/s
    expect(operating.governingSpeed).toBeCloseTo(20 * Math.PI, 9)
    const chart = only([{ kind: 'transmittedForce', id: 'r', limit: 100, speeds: 'chart' }])
    // the resonant peak of a hysteretic spring is sqrt(1 + 1/eta²); 1e-4: the sweep samples it
    expect((chart.value ?? 0) / (100 * Math.sqrt(1 + 1 / 0.01))).toBeCloseTo(1, 4)
    expect(chart.status).toBe('fail')
  })

  it('is unknown without a limit, and unknown with the reason when nothing can be computed', () => {
    const open = only([{ kind: 'isolation', id: 'r' }])
    expect([open.status, open.margin]).toEqual(['unknown', null])
    expect(open.value).not.toBeNull()
    const empty = only([{ kind: 'isolation', id: 'r', limit: 0.9 }], { mounting: { types: [], placed: [] } })
    expect([empty.status, empty.value]).toEqual(['unknown', null])
    expect(empty.advice).toContain('mounts')
  })

  it('leaves out a requirement that is switched off', () => {
    expect(evaluate(machine([{ kind: 'isolation', id: 'r', limit: 0.9, enabled: false }])).verdicts).toEqual(
      [],
    )
  })

  it('judges static load and deflection by the worst mount, and unrated mounts as unknown', () => {
    const load = only([{ kind: 'mountLoad', id: 'r' }])
    // 200 kg x 9.80665 m/s² over four mounts of 600 N
    expect(load.value).toBeCloseTo((200 * 9.80665) / 4 / 600, 9)
    expect(load.status).toBe('pass')
    const deflection = only([{ kind: 'mountDeflection', id: 'r' }])
    expect(deflection.value).toBeCloseTo((200 * 9.80665) / 4 / 5e4, 12)
    expect(deflection.limit).toBeCloseTo(0.012, 12)
    const types = [{ id: 'spring', stiffness: [5e4, 5e4, 5e4] as [number, number, number] }]
    const unrated = machine([{ kind: 'mountLoad', id: 'r' }])
    const verdict = evaluate({
      ...unrated,
      mounting: readProject({ format: 'stillbed-project', version: 1, mounting: { types } }).mounting,
    })
    expect(verdict.verdicts[0]?.status).toBe('unknown')
  })

  it('measures how far natural frequencies keep from an order, zero where they meet', () => {
    const apart = only([{ kind: 'modeSeparation', id: 'r', limit: 0.2 }])
    const highest = Math.max(...(evaluate(machine([])).modes ?? []).map((mode) => mode.frequency))
    // every mode lies below 25 Hz; the highest governs
    expect(highest).toBeLessThan(25)
    expect(apart.value).toBeCloseTo((25 - highest) / 25, 9)
    const meeting = only([{ kind: 'modeSeparation', id: 'r', limit: 0.2, speeds: 'chart' }])
    expect([meeting.value, meeting.status]).toEqual([0, 'fail'])
    const several = only([{ kind: 'modeSeparation', id: 'r', limit: 0.2, orders: [1, 2, 9] }])
    expect([meeting.title, several.title]).toEqual([
      expect.stringMatching(/^Natural frequencies clear of order 1 /),
      'Natural frequencies clear of orders 1, 2 and 9 at running speed',
    ])
  })

  it('holds a point to the limit of a severity zone and says where the table comes from', () => {
    const verdict = only([
      {
        kind: 'vibrationVelocity',
        id: 'r',
        point: 'P',
        scale: 'iso20816-3',
        machineClass: '2-flexible',
        zone: 'B',
      },
    ])
    expect(verdict.limit).toBeCloseTo(4.5e-3, 12)
    expect(verdict.source).toContain('from memory')
    // X = F / |k(1 + i eta) - m omega²|, v = omega X / sqrt 2
    const omega = 50 * Math.PI
    const amplitude = 100 / Math.hypot(2e5 - 200 * omega ** 2, 2e4)
    expect(verdict.value).toBeCloseTo((omega * amplitude) / Math.SQRT2, 12)
    expect(verdict.governingPlace).toBe('bearing, z')
  })

  it('names the lever that helps most, with the value that it would bring', () => {
    const verdict = only([{ kind: 'transmittedForce', id: 'r', limit: 3, speeds: 'running' }])
    expect(verdict.status).toBe('fail')
    // above resonance force falls with stiffness and with mass alike; both beat ten per cent less force
    expect(verdict.advice).toMatch(
      /^What helps most: 10 % (softer mounts|more mass in the machine) would bring it to \d/,
    )
  })
})
