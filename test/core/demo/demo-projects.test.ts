import { readFileSync } from 'node:fs'
import { join } from 'node:path'
import { describe, expect, it } from 'vitest'
import { z } from 'zod'
import { evaluate } from '../../../core/evaluate.ts'
import { mountTypeSchema } from '../../../core/project/mounts.ts'
import { demoProjects, withAbsorbers } from './demo-files.ts'

// These machines are invented; what is checked is that each shows the conflict its notes tell of.
const CATALOGUE = join(import.meta.dirname, '../../../resources/catalogue/mounts.json')
const catalogue = z.array(mountTypeSchema).parse(JSON.parse(readFileSync(CATALOGUE, 'utf8')))
const RPM = (2 * Math.PI) / 60

describe.each(demoProjects())('demonstration $file', ({ project }) => {
  const delivered = evaluate(project)
  const cured = evaluate(withAbsorbers(project))

  it('lacks nothing', () => {
    expect(delivered.problems.filter((problem) => problem.kind !== 'caution')).toEqual([])
    expect(cured.problems.filter((problem) => problem.kind !== 'caution')).toEqual([])
  })

  it('fails as delivered, at a speed that its notes name', () => {
    const failing = delivered.verdicts.filter((verdict) => verdict.status === 'fail')
    expect(failing.length).toBeGreaterThan(0)
    const told = [...project.job.notes.matchAll(/(\d+) rpm/g)].map((match) => Number(match[1]) * RPM)
    for (const { governingSpeed } of failing) {
      const nearest = Math.min(...told.map((speed) => Math.abs((governingSpeed ?? 0) / speed - 1)))
      expect(nearest).toBeLessThan(0.03) // the notes speak in round figures
    }
  })

  it('meets every requirement with its absorbers switched on', () => {
    expect(cured.verdicts.length).toBeGreaterThan(3)
    expect(cured.verdicts.map((verdict) => [verdict.title, verdict.status])).toEqual(
      cured.verdicts.map((verdict) => [verdict.title, 'pass']),
    )
  })

  it('says that it is invented, and takes its mounts from the catalogue', () => {
    expect(project.job.notes).toContain('invented')
    expect(project.mounting.types.length).toBeGreaterThan(0)
    for (const type of project.mounting.types) {
      expect(catalogue.find((candidate) => candidate.id === type.id)).toEqual(type)
    }
  })
})

describe('invented catalogue', () => {
  it('has mounts for loads from 100 N to 30 kN, each with its own name', () => {
    const loads = catalogue.map((type) => type.ratedLoad ?? NaN)
    expect(Math.min(...loads)).toBe(100)
    expect(Math.max(...loads)).toBe(30_000)
    expect(new Set(catalogue.map((type) => type.name)).size).toBe(catalogue.length)
    expect(new Set(catalogue.map((type) => type.id)).size).toBe(catalogue.length)
  })

  it('says of every mount that it is invented', () => {
    for (const type of catalogue) expect(type.note).toContain('invented for the demonstration')
  })

  it('keeps the rated load within the deflection that the mount allows', () => {
    for (const { ratedLoad, stiffness, deflectionLimit, name } of catalogue) {
      if (deflectionLimit === null) continue
      expect((ratedLoad ?? NaN) / stiffness[2], name).toBeLessThan(deflectionLimit)
    }
  })
})
