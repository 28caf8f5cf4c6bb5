import type { Project } from '../../project/project.ts'
import type { RunUpPass, RunUpPeak, RunUpResult } from '../../results.ts'
import type { UnitSystem } from '../../units/dimensions.ts'
import { formatPlain, formatQuantity } from '../../units/format.ts'
import { PASS_NAMES } from './inputs-run-up.ts'
import { governingOf, peakGroups, type PeakGroup } from './run-up-peaks.ts'

/** What is said of each group; the whole support says little that its mounts do not. */
const SAID: readonly (readonly [id: PeakGroup['id'], where: string, verb: string])[] = [
  ['travel', ' across the mounts', 'moves'],
  ['force', ' through the mounts', 'carries'],
  ['points', '', 'moves'],
  ['absorbers', '', 'travels'],
]

/**
 * What governs, in words: `Coast-down governs across the mounts: M3 moves 4.1 mm at 412 rpm, 96 %
 * of the worst steady value.`
 */
export function runUpSummary(project: Project, runUp: RunUpResult, units: UnitSystem): readonly string[] {
  const groups = peakGroups(project, runUp)
  return SAID.flatMap(([id, where, verb]) => {
    const group = groups.find((candidate) => candidate.id === id)
    const governing = group ? governingOf(group) : null
    if (!group || !governing) return []
    const { row, direction, peak } = governing
    const head =
      runUp.up && runUp.down
        ? `${PASS_NAMES[direction]} governs${where}`
        : `During ${PASS_NAMES[direction].toLowerCase()}${where}`
    const value = formatQuantity(peak.value, group.dimension, units, 3)
    const speed = formatQuantity(peak.speed, 'shaftSpeed', units, 3)
    return [`${head}: ${row.place} ${verb} ${value} at ${speed}${steadyWords(peak)}.`]
  })
}

function steadyWords(peak: RunUpPeak): string {
  if (peak.ratio !== null) return `, ${percent(peak.ratio)} of the worst steady value`
  return peak.steady === null ? '; held there it would grow without bound' : ''
}

export function percent(ratio: number): string {
  return `${formatPlain(ratio * 100, ratio < 0.995 ? 2 : 3)} %`
}

/** `0 to 1450 rpm in 21.9 s, then 10 s at that speed`. */
export function courseWords(pass: RunUpPass, units: UnitSystem): string {
  const [from, to] = [pass.from, pass.to].map((speed) => formatQuantity(speed, 'shaftSpeed', units))
  const hold = pass.hold > 0 ? `, then ${formatQuantity(pass.hold, 'time', units, 3)} at that speed` : ''
  return `${from ?? ''} to ${to ?? ''} in ${formatQuantity(pass.duration, 'time', units, 3)}${hold}`
}
