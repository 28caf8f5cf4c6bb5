/**
 * `npm run bench`: medians [ms] of the timed tasks as JSON; where Python with NumPy and SciPy is at
 * hand, the same tasks as an expert would script them, and how many times faster ours are
 * (`ratio` = peer / ours). `difference` is the largest relative one between both results.
 * No test asserts a time: machines differ and are busy.
 */
import { cpus } from 'node:os'
import { evaluate } from '../../core/evaluate.ts'
import { ABSORBER_CASE, minimaxTask, peakMap, peakMapTask } from './absorber.ts'
import { BENCH_BODY, BENCH_MOUNTS } from './bench-machine.ts'
import { modesOutput, modesTask, variantScales } from './modes-task.ts'
import { askPeer, hasPeer } from './peer.ts'
import { coarseMapTask, RUN_UP_CASE, runUpTask } from './run-up.ts'
import { failingProject, standardProject } from './standard-project.ts'
import { SWEEP_LOADS, sweepOmegas, sweepOutput, sweepTask } from './sweep-task.ts'
import { time } from './timing.ts'

interface NetworkPeer {
  readonly sweepBatched: number
  readonly sweepPoleResidue: number
  readonly sweepModalDiagonal: number
  readonly modes: number
  readonly sample: {
    readonly index: number
    readonly body: readonly (readonly [re: number, im: number])[]
    readonly forces: readonly (readonly [re: number, im: number])[]
    readonly frequencies: readonly number[]
  }
}
interface RunUpPeer {
  readonly filters: number
  readonly realFilters: number
  readonly integrator: number
  /** by mount and direction */
  readonly peaks: readonly number[]
}
interface AbsorberPeer {
  readonly minimax: number
  readonly minimaxSearchOnly: number
  readonly peakMap: number
  readonly found: { readonly peak: number }
  readonly map: readonly number[]
}

const peers = hasPeer()
const omegas = sweepOmegas()
const sweep = sweepOutput()
const scales = variantScales()
const modes = modesOutput()
const map = peakMap()
const project = standardProject()
const troubled = failingProject()

const ours = {
  sweep: time(() => {
    sweepTask(sweep, omegas)
  }),
  modes: time(() => {
    modesTask(scales, modes)
  }),
  runUp: time(runUpTask, 101, 200),
  minimax: time(minimaxTask, 25),
  peakMap: time(() => {
    peakMapTask(map)
  }),
  evaluation: time(() => evaluate(project), 41, 20),
  troubledEvaluation: time(() => evaluate(troubled), 41, 20),
  feasibilityMap: time(coarseMapTask(project)),
}
const heapUsed = process.memoryUsage().heapUsed

const network = peers
  ? askPeer<NetworkPeer>('peer_network.py', {
      body: BENCH_BODY,
      mounts: BENCH_MOUNTS,
      loads: SWEEP_LOADS,
      omega: Array.from(omegas),
      scales: Array.from(scales),
    })
  : null
const runUp = peers
  ? askPeer<RunUpPeer>('peer_run_up.py', { ...RUN_UP_CASE, body: BENCH_BODY, mounts: BENCH_MOUNTS })
  : null
const absorber = peers ? askPeer<AbsorberPeer>('peer_absorber.py', ABSORBER_CASE) : null

const report = {
  machine: { node: process.version, processor: cpus()[0]?.model ?? '', cores: cpus().length },
  peer: peers ? 'python3 with NumPy and SciPy, one thread' : 'not on this machine',
  tasks: {
    'T1 sweep': {
      ...ours.sweep,
      ...against(
        ours.sweep.median,
        network && {
          'pole-residue': network.sweepPoleResidue,
          'batched solve': network.sweepBatched,
          'modal, coupling left out': network.sweepModalDiagonal,
        },
      ),
      ...(network ? { difference: sweepDifference(network.sample) } : {}),
    },
    'T2 modes': {
      ...ours.modes,
      ...against(ours.modes.median, network && { 'batched eigh': network.modes }),
      ...(network ? { difference: largest(network.sample.frequencies, modes.frequencies.slice(-6)) } : {}),
    },
    'T4 run-up': {
      ...ours.runUp,
      ...against(
        ours.runUp.median,
        runUp && {
          'modal recursive filters': runUp.filters,
          'filters, one start angle, coupling left out': runUp.realFilters,
          'general integrator': runUp.integrator,
        },
      ),
      ...(runUp
        ? {
            difference: largest(
              runUp.peaks,
              runUpTask().flatMap((mount) => mount.slice(0, 3)),
            ),
          }
        : {}),
    },
    'T5 minimax': {
      ...ours.minimax,
      ...against(
        ours.minimax.median,
        absorber && {
          'search, then equations': absorber.minimax,
          'search only': absorber.minimaxSearchOnly,
        },
      ),
      ...(absorber ? { difference: largest([absorber.found.peak], [minimaxTask().peak]) } : {}),
    },
    'T5 map': {
      ...ours.peakMap,
      ...against(ours.peakMap.median, absorber && { vectorised: absorber.peakMap }),
      ...(absorber ? { difference: largest(absorber.map, map) } : {}),
    },
    'standard project, one evaluation': ours.evaluation,
    'the same with a failing requirement and its levers': ours.troubledEvaluation,
    'feasibility map of the standard project, 16 x 10 cells': ours.feasibilityMap,
  },
  heapUsedMB: Math.round(heapUsed / 1e6),
}
console.log(JSON.stringify(report, rounded, 2))

function against(median: number, peer: Readonly<Record<string, number>> | null) {
  if (peer === null) return {}
  const ratio = Object.fromEntries(Object.entries(peer).map(([way, value]) => [way, value / median]))
  return { peer, ratio }
}

/** Largest difference over the largest expected value. */
function largest(expected: ArrayLike<number>, found: ArrayLike<number>): number {
  const size = Math.max(...Array.from(expected, Math.abs))
  return Math.max(...Array.from(expected, (value, i) => Math.abs(value - (found[i] ?? NaN)))) / size
}

function sweepDifference({ index, body, forces }: NetworkPeer['sample']): number {
  const at = ({ re, im }: { re: Float64Array; im: Float64Array }) => [re[index] ?? NaN, im[index] ?? NaN]
  return Math.max(
    largest(
      body.flat(),
      sweep.body.flatMap((load) => load.flatMap(at)),
    ),
    largest(
      forces.flat(),
      sweep.forces.flatMap((load) => load.flatMap((mount) => mount.flatMap(at))),
    ),
  )
}

function rounded(_: string, value: unknown): unknown {
  return typeof value === 'number' && !Number.isInteger(value) ? Number(value.toPrecision(4)) : value
}
