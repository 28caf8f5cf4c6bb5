import { spawn } from 'node:child_process'

/** What `window.ts` prints when its window shows. */
const WINDOW_SHOWN = 'Stillbed is open.'
const SIGNALS = ['SIGINT', 'SIGTERM', 'SIGHUP']

/**
 * Runs Electron until it ends. What it says on standard error before its window shows is kept for
 * the case that it never does.
 * @param {string} runtime path of its executable
 * @param {readonly string[]} args
 * @returns {Promise<string | null>} null when a window has shown or the start was handed to a running
 * one; else the runtime's last words
 */
export function openWindow(runtime, args) {
  return new Promise((resolve) => {
    const child = spawn(runtime, args, { stdio: ['ignore', 'pipe', 'pipe'] })
    let shown = false
    let words = ''
    child.stdout.on('data', (chunk) => {
      if (String(chunk).includes(WINDOW_SHOWN)) shown = true
      process.stdout.write(chunk)
    })
    child.stderr.on('data', (chunk) => {
      words = (words + chunk).slice(-2000)
      if (shown) process.stderr.write(chunk)
    })
    const forward = (signal) => child.kill(signal)
    for (const signal of SIGNALS) process.on(signal, forward)
    const end = (failure) => {
      for (const signal of SIGNALS) process.off(signal, forward)
      resolve(failure)
    }
    child.once('error', (error) => end(error.message))
    child.once('close', (code, signal) => {
      end(shown || code === 0 ? null : lastLine(words) || `it ended with ${signal ?? `code ${code}`}`)
    })
  })
}

const lastLine = (text) => text.trim().split('\n').at(-1)?.slice(0, 300) ?? ''
