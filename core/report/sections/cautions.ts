import type { Project } from '../../project/project.ts'
import type { Caution, ReportSection } from '../report.ts'

const BEFORE: readonly Caution[] = [
  {
    heading: 'Rotating parts',
    text: 'Before anyone touches the machine, its mounts or an absorber: stop it, lock the drive out, tag it, and wait until it stands still. Guards go back on before it runs.',
  },
  {
    heading: 'Absorbers',
    text: 'An absorber is a moving mass near people. It needs a second retention that holds the mass when its spring, blade or bolt breaks, stops that keep the travel within the limit, and a check of its spring against fatigue at the travel stated here.',
  },
  {
    heading: 'Lifting',
    text: 'The machine is lifted by qualified people with gear rated for the mass stated here and slung with regard to the centre of gravity stated here. Nobody works under it. Springs under load store energy: release them as their maker says.',
  },
  {
    heading: 'Pipes, ducts and cables',
    text: 'Whatever is connected must follow the motion at rest and in passing the resonances. A stiff connection strains its flange and passes vibration by; it is not part of this calculation.',
  },
  {
    heading: 'Wind and earthquake',
    text: 'Restraint against wind, earthquake and tipping is a matter of the local code and of a licensed engineer. Nothing here replaces either, least of all a static load sideways, which knows neither impact nor stops.',
  },
]

const AFTER: readonly Caution[] = [
  {
    heading: 'Limits of the model',
    text: 'The machine is one rigid body with small motions on a rigid support, mounts vibrate linearly about their static position, each with the tangent of its law there, and the same for every frequency and amplitude; temperature counts only where a factor is given for it; all inputs are taken as exact. Check the first machine by measurement before others are built alike.',
  },
  {
    heading: 'Figures from memory',
    text: 'Limits, formulas and tables marked "from memory" must be checked against the standard in force or the named book before a decision rests on them.',
  },
]

/** @param project which says whether run-up and coast-down were looked at */
export function cautionSection(project: Project): ReportSection {
  const passing = { heading: 'Run-up and coast-down', text: passingWords(project) }
  return {
    id: 'cautions',
    heading: 'Cautions',
    blocks: [
      {
        kind: 'paragraph',
        text: 'This calculation supports the judgement of a competent engineer; it does not replace it, nor the local codes.',
      },
      { kind: 'cautions', items: [...BEFORE, passing, ...AFTER] },
    ],
  }
}

function passingWords({ runUp }: Project): string {
  const steady = 'Curves against speed are steady: each speed is held until the motion has settled.'
  const sides = [runUp.up.enabled && 'run-up', runUp.down.enabled && 'coast-down'].filter(
    (side) => side !== false,
  )
  if (!runUp.enabled || sides.length === 0) {
    return `${steady} What this machine does while it passes a resonance was not asked for and is not computed here.`
  }
  return `${steady} What the machine does in passing a resonance is computed for the given ${sides.join(' and ')} alone. A slower passage gives higher peaks; a drive with little torque to spare may hang at a resonance instead of passing it, for the motion is not taken to hold the shaft back. A rotor turns on after the switch: guards stay closed until it stands.`
}

export function checksumSection(checksum: string): ReportSection {
  return {
    id: 'checksum',
    heading: 'Checksum of the inputs',
    blocks: [
      {
        kind: 'paragraph',
        text: 'The results follow from the inputs alone. Two reports with the same checksum were computed from the same inputs; a project that has changed since gives another one. It is SHA-256 (FIPS 180-4) over the project file as canonical JSON (RFC 8785).',
      },
      { kind: 'facts', rows: [{ label: 'SHA-256', value: checksum }] },
    ],
  }
}
