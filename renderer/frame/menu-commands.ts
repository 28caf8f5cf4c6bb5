import type { ClosingAnswer, MenuCommand } from '../../electron/api/contract.ts'
import { invoke } from '../state/bridge.ts'
import { desk } from '../state/desk.svelte.ts'
import { notices } from '../state/notices.svelte.ts'
import { downloadProject, projectFileName, projectFileText } from '../state/project-file.ts'
import { route, STEPS } from '../state/route.svelte.ts'
import { settings } from '../state/settings.svelte.ts'
import { requests } from './requests.svelte.ts'

/** Carries out one command of the desktop's menus. */
export async function runMenuCommand(command: MenuCommand): Promise<void> {
  const [area, what = ''] = command.split(':')
  if (area === 'sheet') return settings.set({ sheet: what as 'light' | 'dark' | 'system' }) // the three of the menu
  if (area === 'units') return showUnits(what as 'SI' | 'US') // the two of the menu
  if (area === 'edit') return edit(what)
  if (area === 'step') {
    const step = STEPS[Number(what) - 1]
    if (step && desk.id !== null) route.goTo(step)
    return
  }
  if (command === 'search:show') requests.search = true
  else if (command === 'shelf:show') await desk.close()
  else if (command === 'project:new' || command === 'project:import') {
    await desk.close()
    if (command === 'project:new') requests.newProject = true
    else requests.importFiles = true
  } else if (desk.id === null) notices.say('Open a project first.')
  else if (command === 'project:export') downloadProject(desk.project)
  else if (command === 'project:rename') route.goTo('machine', 'job.name')
  else if (command === 'project:report') route.goTo('report')
  else if (command === 'project:duplicate') await openDuplicate(desk.id)
}

async function showUnits(units: 'SI' | 'US'): Promise<void> {
  if (desk.id === null) return settings.set({ units })
  desk.change(`show ${units} units`, (draft) => {
    draft.units = units
  })
}

function edit(what: string): void {
  // on the Shelf only the text fields have something to undo, and they keep it themselves
  if (desk.id === null) document.execCommand(what)
  else if (what === 'undo') desk.undo()
  else desk.redo()
}

async function openDuplicate(id: string): Promise<void> {
  await desk.flush()
  const reply = await invoke('shelf:duplicate', { id })
  if (!reply.ok) notices.problem(reply.error.message)
  else {
    await desk.open(reply.value.id)
    notices.say(`This is “${reply.value.name}”.`)
  }
}

/** Before the window closes: saves what is pending, or hands over what could not be saved. */
export async function answerClosing(): Promise<ClosingAnswer> {
  if (await desk.flush()) return { saved: true }
  const trouble = desk.saveState
  return {
    saved: false,
    message: typeof trouble === 'object' ? trouble.message : 'The last changes are not saved yet.',
    fileName: projectFileName(desk.project.job.name),
    text: projectFileText(desk.project),
  }
}
