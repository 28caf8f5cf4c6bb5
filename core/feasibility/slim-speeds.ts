import { chartRange } from '../mounts/speeds.ts'
import type { Project } from '../project/project.ts'
import type { SpeedSpan } from '../project/requirements.ts'
import type { Mode } from '../results.ts'
import { operatingRange } from '../verdict/span.ts'

/** Evenly spaced speeds of a span, besides those at the resonances. */
const EVEN = 14
/** Distances from a resonance in half-power widths at which it is looked at. */
const AROUND = [-1.5, -0.5, 0, 0.5, 1.5] as const
const LEAST_WIDTH = 1e-3

/**
 * As few speeds as show the judged values of a span: its ends, a few between, and the resonances in it.
 * @param dampingRatios of the modes, in their order
 * @returns rising [rad/s]; null where the project names no speed
 */
export function slimSpeeds(
  project: Project,
  modes: readonly Mode[],
  dampingRatios: readonly number[],
  spans: ReadonlySet<SpeedSpan>,
): Float64Array | null {
  const range = chartRange(project, modes)
  if (range === null) return null
  const speeds = new Set<number>(range.exact)
  const operating = operatingRange(project)
  const whole = spans.has('chart')
    ? ([range.lowest, range.highest] as const)
    : spans.has('operating')
      ? operating
      : null
  if (whole !== null) {
    const [lowest, highest] = whole
    for (let k = 0; k < EVEN; k++) speeds.add(lowest + ((highest - lowest) * k) / (EVEN - 1))
    modes.forEach((mode, r) => {
      const width = Math.max(LEAST_WIDTH, dampingRatios[r] ?? 0)
      for (const { speed } of mode.crossings) {
        for (const away of AROUND) {
          const near = speed * (1 + away * width)
          if (near > lowest && near < highest) speeds.add(near)
        }
      }
    })
  }
  return Float64Array.from(speeds).sort()
}
