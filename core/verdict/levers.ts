import { withStiffnessTimes } from '../mounts/mount-type.ts'
import type { Absorber } from '../project/absorber.ts'
import type { Project } from '../project/project.ts'
import type { Mode, Verdict } from '../results.ts'
import { formatPlain, formatQuantity } from '../units/format.ts'

/** By how much each lever is pulled when it is tried. */
const STEP = 0.1
const TRIAL_MASS_RATIO = 0.05
/** A lever that moves the margin by less than this is not worth naming. */
const WORTH_NAMING = 0.01

interface Lever {
  readonly words: string
  readonly pull: (project: Project) => Project | null
}

/**
 * Adds to each verdict that fails or is near the lever that would help it most: every lever is
 * pulled by 10 % in turn, the whole project is judged again, and the largest gain in margin is named.
 * @param rejudge judges a changed project with the same requirements
 * @param modes of the machine on its mounts, for the trial of an absorber; null where not known
 */
export function adviseLevers(
  project: Project,
  verdicts: readonly Verdict[],
  modes: readonly Mode[] | null,
  rejudge: (changed: Project) => readonly Verdict[],
): readonly Verdict[] {
  const troubled = verdicts.filter((verdict) => needsAdvice(verdict))
  if (troubled.length === 0) return verdicts
  const trials = COMMON_LEVERS.flatMap((lever) => {
    const changed = lever.pull(project)
    return changed === null ? [] : [{ words: lever.words, verdicts: rejudge(changed) }]
  })
  return verdicts.map((verdict) => {
    if (!needsAdvice(verdict)) return verdict
    const own = absorberTrial(project, verdict, modes)
    const all = own === null ? trials : [...trials, { words: own.words, verdicts: rejudge(own.project) }]
    return { ...verdict, advice: bestAdvice(project, verdict, all) }
  })
}

function needsAdvice(verdict: Verdict): boolean {
  return (
    (verdict.status === 'fail' || verdict.status === 'near') &&
    verdict.advice === '' &&
    verdict.margin !== null
  )
}

function bestAdvice(
  project: Project,
  verdict: Verdict,
  trials: readonly { words: string; verdicts: readonly Verdict[] }[],
): string {
  let best: { words: string; after: Verdict; gain: number } | null = null
  for (const trial of trials) {
    const after = trial.verdicts.find((candidate) => candidate.requirement === verdict.requirement)
    if (!after || after.margin === null || verdict.margin === null) continue
    const gain = after.margin - verdict.margin
    if (gain > (best?.gain ?? WORTH_NAMING)) best = { words: trial.words, after, gain }
  }
  if (best === null)
    return 'No small change of mounts, mass or excitation helps: think of other mounts or another speed.'
  const value = formatQuantity(best.after.value, verdict.dimension, project.units, 3)
  return `What helps most: ${best.words} would bring it to ${value}.`
}

const COMMON_LEVERS: readonly Lever[] = [
  { words: '10 % softer mounts', pull: (project) => withStiffness(project, 1 - STEP) },
  { words: '10 % stiffer mounts', pull: (project) => withStiffness(project, 1 + STEP) },
  { words: '10 % more damping in the mounts', pull: (project) => withDamping(project, 1 + STEP) },
  { words: '10 % less damping in the mounts', pull: (project) => withDamping(project, 1 - STEP) },
  { words: '10 % less excitation', pull: (project) => withExcitation(project, 1 - STEP) },
  { words: '10 % more mass in the machine', pull: (project) => withMass(project, 1 + STEP) },
  { words: '10 % more mass in the absorber', pull: (project) => withAbsorberMass(project, 1 + STEP) },
]

function withStiffness(project: Project, factor: number): Project | null {
  return withTypes(project, (type) => withStiffnessTimes(type, factor))
}

function withDamping(project: Project, factor: number): Project | null {
  const damped = project.mounting.types.some((type) => type.lossFactor > 0 || type.viscous.some((c) => c > 0))
  if (!damped) return null
  return withTypes(project, (type) => ({
    ...type,
    lossFactor: type.lossFactor * factor,
    viscous: [type.viscous[0] * factor, type.viscous[1] * factor, type.viscous[2] * factor],
  }))
}

type MountType = Project['mounting']['types'][number]

function withTypes(project: Project, change: (type: MountType) => MountType): Project | null {
  if (project.mounting.types.length === 0) return null
  return { ...project, mounting: { ...project.mounting, types: project.mounting.types.map(change) } }
}

function withExcitation(project: Project, factor: number): Project | null {
  const scale = (value: number | null) => (value === null ? null : value * factor)
  if (project.sources.length === 0) return null
  return {
    ...project,
    sources: project.sources.map((source) => {
      if (source.kind === 'harmonic') {
        return { ...source, load: { ...source.load, amplitude: scale(source.load.amplitude) } }
      }
      const { amount } = source
      switch (amount.by) {
        case 'unbalance':
          return { ...source, amount: { ...amount, unbalance: scale(amount.unbalance) } }
        case 'eccentricity':
          return { ...source, amount: { ...amount, eccentricity: scale(amount.eccentricity) } }
        case 'grade':
          return { ...source, amount: { ...amount, grade: scale(amount.grade) } }
      }
    }),
  }
}

function withMass(project: Project, factor: number): Project | null {
  const properties = project.machine.massProperties
  const scale = (value: number | null) => (value === null ? null : value * factor)
  const changed =
    properties.from === 'parts'
      ? { ...properties, parts: properties.parts.map((part) => ({ ...part, mass: part.mass * factor })) }
      : {
          ...properties,
          mass: scale(properties.mass),
          inertia: {
            xx: scale(properties.inertia.xx),
            yy: scale(properties.inertia.yy),
            zz: scale(properties.inertia.zz),
            xy: properties.inertia.xy * factor,
            xz: properties.inertia.xz * factor,
            yz: properties.inertia.yz * factor,
          },
        }
  return { ...project, machine: { ...project.machine, massProperties: changed } }
}

function withAbsorberMass(project: Project, factor: number): Project | null {
  if (!project.absorbers.some((absorber) => absorber.enabled && absorber.host.kind === 'mode')) return null
  const scale = (value: number | null) => (value === null ? null : value * factor)
  return {
    ...project,
    absorbers: project.absorbers.map((absorber) => ({
      ...absorber,
      size:
        absorber.size.by === 'mass'
          ? { by: 'mass', mass: scale(absorber.size.mass) }
          : absorber.size.by === 'ratio'
            ? { by: 'ratio', ratio: scale(absorber.size.ratio) }
            : absorber.size,
    })),
  }
}

/** A first absorber on the mode that governs a velocity verdict, at the judged point. */
function absorberTrial(
  project: Project,
  verdict: Verdict,
  modes: readonly Mode[] | null,
): { words: string; project: Project } | null {
  const requirement = project.requirements.find((candidate) => candidate.id === verdict.requirement)
  if (requirement?.kind !== 'vibrationVelocity' || modes === null || verdict.governingSpeed === null)
    return null
  if (project.absorbers.some((absorber) => absorber.enabled)) return null
  const point = project.machine.points.find((candidate) => candidate.id === requirement.point)
  const mode = nearestMode(modes, verdict.governingSpeed)
  if (!point || !mode) return null
  const axis = verdict.governingPlace.at(-1)
  const direction: [number, number, number] = axis === 'x' ? [1, 0, 0] : axis === 'y' ? [0, 1, 0] : [0, 0, 1]
  const absorber: Absorber = {
    id: 'trial',
    name: '',
    enabled: true,
    host: { kind: 'mode', mode: mode.number, position: point.position, direction },
    size: { by: 'ratio', ratio: TRIAL_MASS_RATIO },
    tuning: { by: 'minimax', objective: { excitation: 'force', response: 'displacement' } },
    strokeLimit: null,
  }
  return {
    words: `an absorber of ${formatPlain(100 * TRIAL_MASS_RATIO)} % of the modal mass on mode ${mode.number} (${mode.name}, ${formatPlain(mode.frequency)} Hz) at ${point.name || 'the point'}`,
    project: { ...project, absorbers: [...project.absorbers, absorber] },
  }
}

/** The mode that an order meets closest to a speed [rad/s]. */
function nearestMode(modes: readonly Mode[], speed: number): Mode | null {
  let best: { mode: Mode; distance: number } | null = null
  for (const mode of modes) {
    for (const crossing of mode.crossings) {
      const distance = Math.abs(Math.log(crossing.speed / speed))
      if (best === null || distance < best.distance) best = { mode, distance }
    }
  }
  return best?.mode ?? null
}
