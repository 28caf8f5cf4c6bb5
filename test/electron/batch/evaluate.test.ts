import { spawnSync } from 'node:child_process'
import { existsSync, readFileSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { describe, expect, it } from 'vitest'
import { evaluate } from '../../../core/evaluate.ts'
import type { Project } from '../../../core/project/project.ts'
import { readProject } from '../../../core/project/read.ts'
import type { Evaluation } from '../../../core/results.ts'
import { temporaryFolder } from '../../setup/folder.ts'
import { sampleProject } from '../projects.ts'

// Layer: the batch door as a process of its own, as `npm run -s evaluate --` starts it.
const DOOR = join(import.meta.dirname, '../../../electron/batch/evaluate.ts')

function run(args: readonly string[], input = '') {
  return spawnSync(process.execPath, [DOOR, ...args], { input, encoding: 'utf8', maxBuffer: 64 << 20 })
}

function fileOf(project: unknown): string {
  const file = join(temporaryFolder(), 'project.json')
  writeFileSync(file, JSON.stringify(project))
  return file
}

/** The sample with one requirement on the force into the support [N]. */
const limited = (limit: number): Project =>
  readProject({
    ...sampleProject(),
    requirements: [{ kind: 'transmittedForce', id: 'r1', limit, source: 'a limit set for this test' }],
  })

/** Typed arrays as the door writes them. */
const plain = (evaluation: Evaluation): unknown =>
  JSON.parse(
    JSON.stringify(evaluation, (_key, value: unknown) =>
      value instanceof Float64Array ? [...value] : value,
    ),
  )

describe('a project that can be computed', () => {
  it('prints the complete results, to the last digit those of the interface, and exits with 0', () => {
    const { status, stdout, stderr } = run([fileOf(limited(1e6))])
    expect({ status, stderr }).toEqual({ status: 0, stderr: '' })
    const results = JSON.parse(stdout) as Evaluation
    expect(JSON.stringify(results) === JSON.stringify(plain(evaluate(limited(1e6))))).toBe(true)
    expect(results.statics?.mounts).toHaveLength(4)
    expect(results.modes).toHaveLength(6)
    expect(results.response?.atSpeeds[0]?.orders[0]?.mountForces).toHaveLength(4)
    expect(Array.isArray(results.response?.sweep.speed)).toBe(true)
    expect(results.verdicts[0]?.status).toBe('pass')
  })

  it('exits with 1 when a requirement fails, and says which and by how much', () => {
    const { status, stdout, stderr } = run([fileOf(limited(0.001))])
    expect(status).toBe(1)
    expect((JSON.parse(stdout) as Evaluation).verdicts[0]?.status).toBe('fail')
    expect(stderr).toMatch(/^fails: Force into the support.*: [\d.]+ N, limit 0\.001 N$/m)
  })

  it('reads standard input, with quantities written by hand', () => {
    const text = JSON.stringify({ ...sampleProject(), units: 'US' }).replace(
      '"mass":250',
      '"mass":"551.155655 lb"',
    )
    const { status, stdout } = run(['-'], text)
    expect(status).toBe(0)
    // SOURCE  1 lb = 0.45359237 kg exactly (NIST SP 811, Appendix B.8): 551.155655 lb is 249.9999997 kg
    expect((JSON.parse(stdout) as Evaluation).massSummary?.mass).toBeCloseTo(551.155655 * 0.45359237, 9)
  })

  it('writes to a file instead, and then prints nothing', () => {
    const out = join(temporaryFolder(), 'results.json')
    const { status, stdout } = run([fileOf(sampleProject()), '--out', out])
    expect({ status, stdout }).toEqual({ status: 0, stdout: '' })
    // compared as a whole: half a megabyte of difference helps nobody
    expect(readFileSync(out, 'utf8') === run([fileOf(sampleProject())]).stdout).toBe(true)
  })

  it('writes the report as well', () => {
    const report = join(temporaryFolder(), 'report.pdf')
    const { status, stdout } = run([fileOf(sampleProject()), '--report', report])
    expect(status).toBe(0)
    expect(JSON.parse(stdout)).toMatchObject({ problems: [] })
    expect(readFileSync(report).subarray(0, 5).toString()).toBe('%PDF-')
  })

  it('prints the curves of run-up and coast-down as plain lists beside their peaks', () => {
    const ramp = (time: number) => ({ law: { by: 'ramp', time }, hold: 1 })
    const project = readProject({
      ...sampleProject(),
      runUp: { enabled: true, up: ramp(3), down: ramp(8) },
    })
    const { status, stdout } = run([fileOf(project)])
    expect(status).toBe(0)
    const { runUp } = JSON.parse(stdout) as Evaluation
    for (const [pass, duration] of [
      [runUp?.up, 3],
      [runUp?.down, 8],
    ] as const) {
      expect(pass?.duration).toBeCloseTo(duration, 12)
      expect(pass?.mounts).toHaveLength(4)
      const { time, speed, displacement } = pass?.envelope ?? {}
      expect([time, speed, displacement].every((list) => Array.isArray(list))).toBe(true)
      expect(time?.length).toBe(displacement?.length)
    }
  })

  it('computes what was asked for: natural frequencies need no force and no speed', () => {
    const { machine, ...rest } = sampleProject()
    const { status, stdout } = run([fileOf({ ...rest, sources: [], machine: { ...machine, duty: {} } })])
    expect(status).toBe(0)
    expect((JSON.parse(stdout) as Evaluation).modes).toHaveLength(6)
  })

  it('computes an absorber on a typed host without any machine', () => {
    const host = { kind: 'single', mass: '100 kg', frequency: '10 Hz' }
    const { status, stdout } = run(
      ['-'],
      JSON.stringify({ format: 'stillbed-project', version: 1, absorbers: [{ id: 'a', host }] }),
    )
    expect(status).toBe(0)
    expect((JSON.parse(stdout) as Evaluation).absorbers[0]?.mass).toBeCloseTo(5, 12)
  })
})

describe('bad input: code 2, nothing printed, the field named', () => {
  const withMass = (mass: unknown) => ({
    ...sampleProject(),
    machine: { ...sampleProject().machine, massProperties: { from: 'typed', mass } },
  })

  it.each([
    ['a negative mass', withMass('-3 kg'), 'machine.massProperties.mass'],
    ['a mass of zero', withMass(0), 'machine.massProperties.mass'],
    ['a mass in metres', withMass('3 m'), 'machine.massProperties.mass'],
    ['a mass that nobody gave', withMass(null), 'machine.massProperties.mass'],
    ['a key that is misspelt', { ...sampleProject(), mountings: {} }, 'mountings'],
    [
      'a mount of an unknown type',
      { ...sampleProject(), mounting: { placed: [{ id: 'm', type: 'x', position: [0, 0, 0] }] } },
      'mounting.placed[0].type',
    ],
    ['no mounts', { ...sampleProject(), mounting: {} }, 'mounting.placed'],
    [
      'a running speed that nobody gave',
      { ...sampleProject(), machine: { ...sampleProject().machine, duty: {} } },
      'machine.duty.runningSpeed',
    ],
    [
      'a force without an amount',
      { ...sampleProject(), sources: [{ kind: 'unbalance', id: 's', amount: { by: 'unbalance' } }] },
      'sources[0].amount.unbalance',
    ],
    [
      "an absorber without its host's mass",
      { ...sampleProject(), absorbers: [{ id: 'a', host: { kind: 'single', frequency: 10 } }] },
      'absorbers[0].host.mass',
    ],
    ['a file of another program', { hello: 'world' }, 'format'],
    ['a file of a newer program', { format: 'stillbed-project', version: 99 }, 'version'],
  ])('%s', (_what, project, field) => {
    const { status, stdout, stderr } = run(['-'], JSON.stringify(project))
    expect({ status, stdout }).toEqual({ status: 2, stdout: '' })
    expect(stderr).toContain(field)
    expect(stderr).not.toMatch(/\n\s+at /)
  })

  it.each([
    ['a file that is not there', ['/no/such/project.json'], '/no/such/project.json cannot be read'],
    ['no file at all', [], 'which project file?'],
    ['two files', ['a.json', 'b.json'], 'one project file at a time'],
    ['an option that it does not know', ['a.json', '--fast'], '--fast'],
  ])('%s', (_what, args, words) => {
    const { status, stdout, stderr } = run(args)
    expect({ status, stdout }).toEqual({ status: 2, stdout: '' })
    expect(stderr).toContain(words)
  })

  it('text that is not JSON', () => {
    const { status, stderr } = run(['-'], 'mass = 3')
    expect(status).toBe(2)
    expect(stderr).toContain('is not JSON')
  })
})

it('exits with 3 when the results cannot be written, and leaves nothing behind', () => {
  const out = join(temporaryFolder(), 'no', 'folder', 'results.json')
  const { status, stderr } = run([fileOf(sampleProject()), '--out', out])
  expect(status).toBe(3)
  expect(stderr).toContain('cannot be written')
  expect(existsSync(out)).toBe(false)
})

it('explains itself', () => {
  const { status, stdout } = run(['--help'])
  expect(status).toBe(0)
  for (const option of ['--out', '--report', '--schema', 'Exit code']) expect(stdout).toContain(option)
})
