import { spawn } from 'node:child_process'
import { mkdirSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { describe, expect, it } from 'vitest'
import { temporaryFolder } from '../../setup/folder.ts'

// The stand-in must fail where Electron fails, or what passes on it means nothing.
const RUNTIME = join(import.meta.dirname, '../../stand-in/electron')

/** Runs a main of a few lines until it ends. */
async function run(main: string): Promise<{ code: number | null; said: string }> {
  const folder = temporaryFolder()
  mkdirSync(join(folder, 'out'))
  writeFileSync(join(folder, 'package.json'), '{"type":"module","main":"out/main.js","version":"1.2.3"}')
  writeFileSync(join(folder, 'out', 'main.js'), main)
  const child = spawn(RUNTIME, [folder], { env: { ...process.env, STAND_IN_PATIENCE: '1500' } })
  let said = ''
  for (const stream of [child.stdout, child.stderr]) stream.on('data', (chunk) => (said += String(chunk)))
  const code = await new Promise<number | null>((resolve) => child.once('close', resolve))
  return { code, said }
}

describe('a main that Electron would not stand', () => {
  it('fails when it waits for readiness at its top level, which never comes', async () => {
    const { code, said } = await run("import { app } from 'electron'\nawait app.whenReady()\napp.exit(0)")
    expect(code).toBe(1)
    expect(said).toContain('main waits at its top level')
  })

  it.each([
    ['registers a scheme after readiness', 'protocol.registerSchemesAsPrivileged([{ scheme: "a" }])'],
    ['enables the sandbox after readiness', 'app.enableSandbox()'],
    ['shows a dialog that no test scripted', 'dialog.showMessageBox({})'],
    ['opens something outside', 'shell.openExternal("https://example.org")'],
  ])('throws when it %s', async (_what, statement) => {
    const { code, said } = await run(`
      import { app, dialog, protocol, shell } from 'electron'
      app.whenReady().then(() => { ${statement} }).then(() => app.exit(0), (error) => { console.log('threw ' + error.message); app.exit(5) })`)
    expect(code).toBe(5)
    expect(said).toContain('threw ')
  })

  it.each([
    [
      'registers schemes twice',
      'protocol.registerSchemesAsPrivileged([{ scheme: "a" }]); protocol.registerSchemesAsPrivileged([{ scheme: "b" }])',
    ],
    ['opens a window before readiness', 'new BrowserWindow({ webPreferences: { preload: "" } })'],
    ['serves a scheme before readiness', 'protocol.handle("a", () => new Response())'],
  ])('throws when it %s', async (_what, statement) => {
    const { code, said } = await run(`
      import { app, protocol, BrowserWindow } from 'electron'
      try { ${statement} } catch (error) { console.log('threw ' + error.message); app.exit(5) }
      app.whenReady().then(() => app.exit(0))`)
    expect(code).toBe(5)
    expect(said).toContain('threw ')
  })
})

it('tells main its version, and that it is ready after main and not before', async () => {
  const { code, said } = await run(`
    import { app } from 'electron'
    console.log('ready before: ' + app.isReady())
    app.whenReady().then(() => { console.log('ready then: ' + app.isReady() + ' ' + app.getVersion()); app.quit() })`)
  expect(code).toBe(0)
  expect(said).toContain('ready before: false')
  expect(said).toContain('ready then: true 1.2.3')
})
