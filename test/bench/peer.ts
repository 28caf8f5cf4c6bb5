import { spawnSync } from 'node:child_process'
import { fileURLToPath } from 'node:url'

/** One thread on both sides: what is compared is the work, not the number of cores. */
const ONE_THREAD = { OMP_NUM_THREADS: '1', OPENBLAS_NUM_THREADS: '1', MKL_NUM_THREADS: '1' }

const python = (args: readonly string[], input = '') =>
  spawnSync('python3', args, {
    input,
    encoding: 'utf8',
    env: { ...process.env, ...ONE_THREAD },
    maxBuffer: 1e9,
  })

/** Whether the tools of the peer scripts are on this machine. */
export function hasPeer(): boolean {
  return python(['-c', 'import numpy, scipy']).status === 0
}

/** What a script beside this file answers to a case, both JSON; null when it fails, with its last words. */
export function askPeer<Answer>(script: string, given: unknown): Answer | null {
  const { status, stdout, stderr } = python(
    [fileURLToPath(new URL(script, import.meta.url))],
    JSON.stringify(given),
  )
  if (status === 0) return JSON.parse(stdout) as Answer // the script's own format, stated by the caller
  process.stderr.write(`${script}: ${stderr.trim().split('\n').at(-1) ?? 'no answer'}\n`)
  return null
}
