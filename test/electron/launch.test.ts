import { spawn, spawnSync } from 'node:child_process'
import { chmodSync, existsSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { describe, expect, it, onTestFinished } from 'vitest'
import { openWindow } from '../../electron/launch-desktop.mjs'
import { temporaryFolder } from '../setup/folder.ts'
import { startLoopback, type LoopbackRun } from '../setup/loopback.ts'
import { call } from './loopback/request.ts'

// Layer: `npm start` as a process of its own, on the built loopback host.
const ROOT = join(import.meta.dirname, '..', '..')
const LAUNCHER = join(ROOT, 'electron', 'launch.mjs')
const NO_DISPLAY = { ...process.env, DISPLAY: '', WAYLAND_DISPLAY: '' }

async function running(library?: string): Promise<LoopbackRun> {
  const host = await startLoopback(library)
  onTestFinished(() => host.remove())
  return host
}

function launch(args: readonly string[]) {
  return spawnSync(process.execPath, [LAUNCHER, ...args], {
    encoding: 'utf8',
    env: NO_DISPLAY,
    timeout: 60_000,
  })
}

describe('npm start', () => {
  it('says in one line what it does and why, then the address and the library', async () => {
    const host = await running()
    await expect.poll(() => host.output()).toContain('Ctrl-C ends it.')
    const said = host.output().split('\n')
    expect(said).toContain('Stillbed is served to your browser: as asked by --browser.')
    expect(said).toContain(`Library: ${host.libraryFile}`)
    expect(host.address).toMatch(/^http:\/\/127\.0\.0\.1:\d+\/#token=[\w-]{43}$/)
  })

  it('has another token each time', async () => {
    const host = await running()
    const { token } = host
    expect((await host.restart()).token).not.toBe(token)
  })

  it('ends on Ctrl-C with code 0 and gives the library back', async () => {
    const host = await running()
    expect((await call(host, 'app:info')).status).toBe(200)
    expect(await host.stop()).toBe(0)
    expect(existsSync(`${host.libraryFile}.holder.json`)).toBe(false)
  })

  it('tells a second start where the first one is', async () => {
    const host = await running()
    const second = launch(['--browser', '--no-open', '--library', host.libraryFile])
    expect(second.status).toBe(1)
    expect(second.stderr).toContain('Stillbed already runs with the library')
    expect(second.stderr).toContain(host.origin)
    expect(second.stderr).not.toContain(host.token)
  })

  it('says that a port is taken', async () => {
    const host = await running()
    const library = join(temporaryFolder(), 'library.sqlite')
    const second = launch([
      '--browser',
      '--no-open',
      '--library',
      library,
      '--port',
      new URL(host.origin).port,
    ])
    expect(second.status).toBe(1)
    expect(second.stderr).toMatch(/Port \d+ is taken/)
  })

  it('exits with 3 and the reason when a window is demanded that cannot be had', () => {
    const { status, stderr } = launch(['--desktop'])
    // macOS and Windows always have a display; there it would open
    expect({ status, stderr }).toEqual({
      status: 3,
      stderr: 'The desktop window cannot be had: there is no display.\n',
    })
  })

  it('exits with 2 on an option that it does not know, and shows those that it knows', () => {
    const { status, stderr } = launch(['--windowed'])
    expect(status).toBe(2)
    expect(stderr).toContain('unknown option --windowed')
    expect(stderr).toContain('--library FILE')
  })

  it('says what is wrong with a library that cannot be opened', () => {
    const library = join(temporaryFolder(), 'notes.sqlite')
    writeFileSync(library, 'notes '.repeat(500))
    const { status, stderr } = launch(['--browser', '--no-open', '--library', library])
    expect(status).toBe(1)
    expect(stderr).toContain('is not a Stillbed library')
  })

  it('ends with the process that started it', async () => {
    const library = join(temporaryFolder(), 'library.sqlite')
    const script = `
      const { spawn } = require('node:child_process')
      const child = spawn(process.execPath, ${JSON.stringify([LAUNCHER, '--browser', '--no-open', '--library', library])})
      child.stdout.on('data', (chunk) => { if (String(chunk).includes('Address')) console.log(child.pid) })
      setInterval(() => {}, 1000)`
    const parent = spawn(process.execPath, ['--eval', script])
    const pid = Number(await new Promise((resolve) => parent.stdout.once('data', resolve)))
    expect(isAlive(pid)).toBe(true)
    parent.kill('SIGKILL')
    await expect.poll(() => isAlive(pid), { timeout: 20_000 }).toBe(false)
    expect(existsSync(`${library}.holder.json`)).toBe(false)
  })
})

describe('a runtime that does not get its window open', () => {
  function runtime(script: string): string {
    const file = join(temporaryFolder(), 'electron')
    writeFileSync(file, `#!/bin/sh\n${script}\n`)
    chmodSync(file, 0o755)
    return file
  }

  it('leaves its last words', async () => {
    expect(await openWindow(runtime('echo starting >&2; echo "no GPU at all" >&2; exit 7'), [])).toBe(
      'no GPU at all',
    )
  })

  it('leaves its exit code when it says nothing', async () => {
    expect(await openWindow(runtime('exit 7'), [])).toBe('it ended with code 7')
    expect(await openWindow(runtime('kill -SEGV $$'), [])).toBe('it ended with SIGSEGV')
  })

  it('is told from one that handed its start to a running window', async () => {
    expect(await openWindow(runtime('exit 0'), [])).toBeNull()
  })

  it('is told from one that showed its window and failed later', async () => {
    expect(await openWindow(runtime('echo "Stillbed is open."; sleep 0.1; exit 7'), [])).toBeNull()
  })

  it('is named when it cannot be started at all', async () => {
    expect(await openWindow('/nowhere/electron', [])).toContain('ENOENT')
  })
})

function isAlive(pid: number): boolean {
  try {
    process.kill(pid, 0)
    return true
  } catch {
    return false
  }
}
