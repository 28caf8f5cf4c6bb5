import { Menu, type MenuItemConstructorOptions } from 'electron'
import type { MenuCommand } from './api/contract.ts'

export interface MenuActions {
  /** hands a command to the pages */
  readonly command: (command: MenuCommand) => void
  readonly showLog: () => void
  readonly about: () => void
}

interface MenuSettings {
  readonly platform: NodeJS.Platform
  /** developer tools are for builds that are not packaged */
  readonly packaged: boolean
}

/** Steps of the job by number; the key is the one that the pages take themselves in a browser. */
const STEPS = ['Machine', 'Mounts', 'Response', 'Run-up', 'Absorber', 'Report']

export function installMenu(settings: MenuSettings, actions: MenuActions): void {
  Menu.setApplicationMenu(Menu.buildFromTemplate(menuTemplate(settings, actions)))
}

/**
 * Every item has an id and a key of its own. Keys that a system keeps for itself (hiding,
 * minimising, switching windows) are not taken.
 */
export function menuTemplate(
  { platform, packaged }: MenuSettings,
  { command, showLog, about }: MenuActions,
): MenuItemConstructorOptions[] {
  const mac = platform === 'darwin'
  const item = (id: MenuCommand, label: string, accelerator: string): MenuItemConstructorOptions => ({
    id,
    label,
    accelerator,
    click: () => command(id),
  })
  const role = (
    role: NonNullable<MenuItemConstructorOptions['role']>,
    label: string,
    accelerator: string,
  ): MenuItemConstructorOptions => ({ id: `role:${role}`, role, label, accelerator })
  const line: MenuItemConstructorOptions = { type: 'separator' }
  const quit = role('quit', 'Quit Stillbed', 'CmdOrCtrl+Q')
  const aboutItem = { id: 'help:about', label: 'About Stillbed', accelerator: 'F1', click: about }
  return [
    // macOS shows the first menu under the program's name
    ...(mac ? [{ id: 'menu:app', label: 'Stillbed', submenu: [aboutItem, line, quit] }] : []),
    {
      id: 'menu:project',
      label: '&Project',
      submenu: [
        item('project:new', 'New Project', 'CmdOrCtrl+N'),
        item('project:import', 'Import a Project File…', 'CmdOrCtrl+O'),
        item('shelf:show', 'Back to the Shelf', 'CmdOrCtrl+Shift+L'),
        line,
        item('project:rename', 'Rename', 'F2'),
        item('project:duplicate', 'Duplicate', 'CmdOrCtrl+Shift+D'),
        item('project:export', 'Keep a Project File…', 'CmdOrCtrl+Shift+S'),
        item('project:report', 'Report as PDF…', 'CmdOrCtrl+P'),
        line,
        role('close', 'Close Window', 'CmdOrCtrl+W'),
        ...(mac ? [] : [quit]),
      ],
    },
    {
      id: 'menu:edit',
      label: '&Edit',
      submenu: [
        item('edit:undo', 'Undo', 'CmdOrCtrl+Z'),
        item('edit:redo', 'Redo', mac ? 'Cmd+Shift+Z' : 'Ctrl+Shift+Z'),
        line,
        role('cut', 'Cut', 'CmdOrCtrl+X'),
        role('copy', 'Copy', 'CmdOrCtrl+C'),
        role('paste', 'Paste', 'CmdOrCtrl+V'),
        role('selectAll', 'Select All', 'CmdOrCtrl+A'),
        line,
        item('search:show', 'Search Anywhere…', 'CmdOrCtrl+K'),
      ],
    },
    {
      id: 'menu:steps',
      label: '&Steps',
      submenu: STEPS.map((label, index) => {
        const number = index + 1
        // the list above is shorter than the nine numbers that the contract knows
        return item(`step:${number}` as MenuCommand, label, mac ? `Cmd+${number}` : `Alt+${number}`)
      }),
    },
    {
      id: 'menu:view',
      label: '&View',
      submenu: [
        item('sheet:light', 'Light Sheet', 'CmdOrCtrl+F7'),
        item('sheet:dark', 'Dark Sheet', 'CmdOrCtrl+F8'),
        item('sheet:system', 'Sheet as the System', 'CmdOrCtrl+F9'),
        line,
        item('units:SI', 'SI Units', 'Shift+F7'),
        item('units:US', 'US Customary Units', 'Shift+F8'),
        line,
        role('zoomIn', 'Larger', 'CmdOrCtrl+Plus'),
        role('zoomOut', 'Smaller', 'CmdOrCtrl+-'),
        role('resetZoom', 'Actual Size', 'CmdOrCtrl+0'),
        role('togglefullscreen', 'Full Screen', mac ? 'Cmd+Shift+F' : 'F11'),
        ...(packaged ? [] : [role('toggleDevTools', 'Developer Tools', 'F12')]),
      ],
    },
    {
      id: 'menu:help',
      label: '&Help',
      submenu: [
        ...(mac ? [] : [aboutItem]),
        { id: 'help:log', label: 'Show the Log', accelerator: 'CmdOrCtrl+Shift+J', click: showLog },
      ],
    },
  ]
}
