import { describe, expect, it } from 'vitest'
import { evaluate } from '../../../core/evaluate.ts'
import { blankProject } from '../../../core/project/create.ts'
import type { Project } from '../../../core/project/project.ts'
import { addMount } from '../../../renderer/pages/mounts/mount-edits.ts'
import { projectFileName, projectFileText } from '../../../renderer/state/project-file.ts'
import { readProjectText } from '../../../core/project/read.ts'
import { addressOf, readAddress, stepOfField } from '../../../renderer/state/route.svelte.ts'
import { stepStates } from '../../../renderer/state/steps.ts'

function machine(project: Project): void {
  project.machine.massProperties = {
    from: 'typed',
    mass: 600,
    centreOfGravity: [0, 0, 0.3],
    inertia: { xx: 50, yy: 90, zz: 104, xy: 0, xz: 0, yz: 0 },
  }
  project.machine.duty.runningSpeed = 150
  project.sources.push({
    kind: 'unbalance',
    id: 's',
    name: '',
    enabled: true,
    position: null,
    phase: 0,
    amount: { by: 'unbalance', unbalance: 0.01 },
  })
}

const states = (project: Project) => stepStates(project, evaluate(project))

describe('the path', () => {
  it('begins with nothing started', () => {
    const path = states(blankProject('x'))
    expect(Object.values(path).map((step) => step.state)).toEqual([
      'empty',
      'empty',
      'empty',
      'empty',
      'empty',
      'empty',
    ])
  })

  it('says what a half-described machine lacks', () => {
    const project = blankProject('x')
    machine(project)
    project.machine.duty.runningSpeed = null
    const path = states(project)
    expect(path.machine.state).toBe('incomplete')
    expect(path.machine.missing).not.toBe('')
    expect(path.response.missing).toContain('machine')
  })

  it('is done step by step', () => {
    const project = blankProject('x')
    machine(project)
    expect(states(project).machine).toEqual({ state: 'done', missing: '' })
    for (const [x, y] of [
      [-0.5, -0.3],
      [-0.5, 0.3],
      [0.5, -0.3],
      [0.5, 0.3],
    ] as const) {
      addMount(project, evaluate(project), [x, y, 0])
    }
    const path = states(project)
    expect(path.mounts.state).toBe('done')
    expect(path.response.state).toBe('done')
    expect(path.report).toEqual({ state: 'incomplete', missing: 'no requirement to judge by' })
  })

  it('says how far the run-up has come', () => {
    const project = blankProject('x')
    machine(project)
    expect(states(project)['run-up']).toEqual({ state: 'empty', missing: 'not looked at' })
    project.runUp.enabled = true
    expect(states(project)['run-up'].missing).toContain('waits for the machine')
    for (const x of [-0.5, 0, 0.5]) addMount(project, null, [x, x === 0 ? 0.3 : -0.3, 0])
    expect(states(project)['run-up'].missing).toContain('Give the time of the run-up')
    for (const pass of [project.runUp.up, project.runUp.down]) pass.law = { ...pass.law, time: 5 } as never
    expect(states(project)['run-up']).toEqual({ state: 'done', missing: '' })
    project.runUp.enabled = false
    const asked = {
      kind: 'runUpForce',
      id: 'r',
      enabled: true,
      source: '',
      during: 'both',
      limit: 1e6,
    } as const
    project.requirements.push(asked)
    project.job.name = 'Fan'
    const path = states(project)
    expect(path.response.state).toBe('done')
    expect(path['run-up']).toEqual({ state: 'incomplete', missing: 'asked for, not yet looked at' })
    expect(path.report).toEqual(path['run-up'])
    project.runUp.enabled = true
    expect(states(project).report.state).toBe('done')
    project.runUp.up.enabled = project.runUp.down.enabled = false
    expect(states(project)['run-up'].state).toBe('incomplete')
  })

  it('says when the mounts leave the machine free', () => {
    const project = blankProject('x')
    machine(project)
    addMount(project, null, [0, 0, 0])
    expect(states(project).mounts.state).toBe('incomplete')
  })
})

describe('addresses', () => {
  const id = '11111111-2222-4333-8444-555555555555'

  it('lead back to project and step, and anything else to the Shelf', () => {
    expect(readAddress(addressOf(id, 'mounts'))).toEqual({ id, step: 'mounts' })
    expect(readAddress(addressOf(id, 'run-up'))).toEqual({ id, step: 'run-up' })
    expect(readAddress(`#/project/${id}`)).toEqual({ id, step: 'machine' })
    expect(readAddress(addressOf(null, 'mounts'))).toBeNull()
    expect(readAddress('#/project/../etc')).toBeNull()
  })

  it('know on which step a field is edited', () => {
    expect(stepOfField('mounting.placed[2].position')).toBe('mounts')
    expect(stepOfField('absorbers[0].host')).toBe('absorber')
    expect(stepOfField('runUp.up.law.time')).toBe('run-up')
    expect(stepOfField('machine.massProperties.mass')).toBe('machine')
  })
})

describe('project files', () => {
  it('are read back to the last digit', () => {
    const project = blankProject('x')
    machine(project)
    project.machine.duty.runningSpeed = 154.98523713917
    expect(readProjectText(projectFileText(project))).toEqual(project)
  })

  it('get a name that every file system takes', () => {
    expect(projectFileName('Kiln fan / mezzanine: “A”')).toBe('Kiln-fan-mezzanine-A.stillbed.json')
    expect(projectFileName('..')).toBe('project.stillbed.json')
    expect(projectFileName('Glasur­mühle Nº 2')).toBe('Glasurmuhle-No-2.stillbed.json')
  })
})
