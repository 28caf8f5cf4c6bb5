import { severityScales } from '../../criteria/severity.ts'
import type { Project } from '../../project/project.ts'
import type { MethodNote, ReportSection } from '../report.ts'
import { mountNotes } from './methods-mounts.ts'

const MECHANICS = ''

/** How the results were computed: only what this project really uses, with its source. */
export function methodSection(project: Project): ReportSection {
  return {
    id: 'methods',
    heading: 'Methods and sources',
    blocks: [
      {
        kind: 'paragraph',
        text: 'Everything is computed in SI units and shown in those of the project. Where no source stands, the statement follows from the equations of motion of a rigid body on springs.',
      },
      {
        kind: 'sources',
        items: [
          ...massNotes(project),
          ...networkNotes(project),
          ...mountNotes(project),
          ...excitationNotes(project),
          ...responseNotes(project),
          ...runUpNotes(project),
          ...absorberNotes(project),
          ...severityNotes(project),
          {
            what: 'Units',
            how: '1 in = 25.4 mm and 1 lb = 0.453 592 37 kg exactly; 1 lbf = 4.448 221 615 260 5 N.',
            source: 'International yard and pound agreement, 1959; NIST SP 811, App. B',
          },
        ],
      },
    ],
  }
}

function massNotes(project: Project): readonly MethodNote[] {
  if (project.machine.massProperties.from !== 'parts') return []
  return [
    {
      what: 'Mass and inertia',
      how: 'Sum of uniform boxes and cylinders, moved to the common centre of gravity by the parallel-axis theorem.',
      source: MECHANICS,
    },
  ]
}

function networkNotes(project: Project): readonly MethodNote[] {
  const types = project.mounting.types
  const hysteretic = types.some((type) => type.lossFactor > 0)
  return [
    {
      what: 'Machine on its mounts',
      how: 'One rigid body with six freedoms; each mount is a spring and damper in three directions at its place, u + θ × r for small rotations.',
      source: MECHANICS,
    },
    {
      what: 'Stiffness in motion',
      how: `Static stiffness for loads at rest; static stiffness times the dynamic ratio for modes and response${hysteretic ? ', with the loss factor as complex stiffness k (1 + i η)' : ''}.`,
      source: MECHANICS,
    },
    ...(project.analysis.gravityStiffness
      ? [
          {
            what: 'Overturning effect of the weight',
            how: 'A body whose centre of gravity lies above its mounts tips more easily: the moment of its weight in the tilted position is part of the stiffness.',
            source: MECHANICS,
          },
        ]
      : []),
    {
      what: 'Natural modes',
      how: 'K φ = ω² M φ, shapes normalised to unit modal mass; a motion is named where it holds more than 60 % of the kinetic energy.',
      source: MECHANICS,
    },
    {
      what: 'Damped modes',
      how: `Eigenvalues of the state-space form${hysteretic ? '; hysteretic damping as the equivalent viscous value at each mode (η = 2 ζ)' : ''}.`,
      source: 'L. Meirovitch, Fundamentals of Vibrations, McGraw-Hill, 2001',
    },
  ]
}

function excitationNotes(project: Project): readonly MethodNote[] {
  const active = project.sources.filter((source) => source.enabled)
  const notes: MethodNote[] = []
  if (active.some((source) => source.kind === 'unbalance')) {
    notes.push({
      what: 'Unbalance',
      how: 'A force U ω² that turns with the shaft, in the plane normal to it.',
      source: MECHANICS,
    })
  }
  if (active.some((source) => source.kind === 'unbalance' && source.amount.by === 'grade')) {
    notes.push({
      what: 'Balance quality grade',
      how: 'Residual unbalance U = m G / ω at the service speed, so that e ω = G.',
      source: 'ISO 21940-11 (formerly ISO 1940-1)',
    })
  }
  if (active.some((source) => source.kind === 'harmonic')) {
    notes.push({
      what: 'Harmonic forces',
      how: 'Each at its order of the shaft speed, with its phase; forces of one order add as vectors.',
      source: MECHANICS,
    })
  }
  return notes
}

function responseNotes(project: Project): readonly MethodNote[] {
  const slow = project.machine.duty.lowestSpeed ?? project.machine.duty.runningSpeed
  return [
    {
      what: 'Response',
      how: 'Steady state at each speed with the full complex stiffness; orders combine as the root of the sum of squares, absorber travel as the sum.',
      source: MECHANICS,
    },
    {
      what: 'Force ratio and isolation efficiency',
      how: 'Force into the rigid support over the exciting force, both as the vector RMS over directions and orders; efficiency is one less this ratio and may be negative.',
      source: MECHANICS,
    },
    {
      what: 'Peak force',
      how: 'Longest that the force vector gets in a cycle: the long half axis of its ellipse.',
      source: MECHANICS,
    },
    ...(project.machine.points.length > 0 && slow !== null
      ? [
          {
            what: 'Overall velocity',
            how: 'Root of the sum of squares over the orders of the RMS velocity in one direction.',
            source: MECHANICS,
          },
        ]
      : []),
  ]
}

function runUpNotes(project: Project): readonly MethodNote[] {
  const { enabled, up, down } = project.runUp
  const laws = [up, down].flatMap((pass) => (enabled && pass.enabled ? [pass.law.by] : []))
  if (laws.length === 0) return []
  return [
    {
      what: 'Run-up and coast-down',
      how: 'The damped modes are taken exactly through the given course of speed, the phase of each force being its order times the shaft angle, unbalance with its tangential part; from rest where the first speed is zero, otherwise from the steady state there. Hysteretic damping enters by the damping ratio of each mode.',
      source:
        'F. M. Lewis, Vibration during acceleration through a critical speed, Trans. ASME 54, 1932 (the problem)',
    },
    ...(laws.includes('torque')
      ? [
          {
            what: 'Speed under torque',
            how: "Inertia times acceleration is the constant torque less a load torque that grows with the square of speed. The machine's motion does not react on the speed.",
            source: MECHANICS,
          },
        ]
      : []),
  ]
}

function absorberNotes(project: Project): readonly MethodNote[] {
  const { absorbers } = project
  if (absorbers.length === 0) return []
  const by = (wanted: string) => absorbers.some((absorber) => absorber.tuning.by === wanted)
  const notes: MethodNote[] = []
  if (absorbers.some((absorber) => absorber.host.kind === 'mode')) {
    notes.push({
      what: 'Host of an absorber',
      how: 'A mode of the machine on its mounts; its mass at the attachment is 1 / φ² with the mass-normalised shape along the line of the absorber.',
      source: MECHANICS,
    })
  }
  if (by('fixedPoints')) {
    notes.push({
      what: 'Tuning in closed form',
      how: 'Equal height at the two points that every damping leaves in place, for an undamped host.',
      source:
        'J. P. Den Hartog, Mechanical Vibrations, 4th ed., 1956; J. E. Brock, J. Applied Mechanics 13, 1946; G. B. Warburton, Earthquake Engineering and Structural Dynamics 10, 1982',
    })
  }
  if (by('minimax')) {
    notes.push({
      what: 'Least worst peak',
      how: 'Frequency and damping for which the highest peak of the damped host is least, from the conditions of the optimum; a damped host has no closed form.',
      source: 'Objectives after G. B. Warburton, Earthquake Engineering and Structural Dynamics 10, 1982',
    })
  }
  if (by('networkMinimax')) {
    notes.push({
      what: 'Least worst receptance on the whole network',
      how: 'The absorber is coupled to the receptance H at its attachment, H / (1 + H D), and the highest value in the band is made least.',
      source: 'R. E. D. Bishop and D. C. Johnson, The Mechanics of Vibration, 1960 (coupling of receptances)',
    })
  }
  if (by('speed')) {
    notes.push({
      what: 'Tuning to one running speed',
      how: "The absorber's own frequency is the exciting frequency; the pair of frequencies left beside it follows from g⁴ - g² (1 + f² (1 + μ)) + f² = 0.",
      source: 'J. P. Den Hartog, Mechanical Vibrations, 4th ed., 1956',
    })
  }
  return notes
}

function severityNotes(project: Project): readonly MethodNote[] {
  const used = new Set(
    project.requirements.flatMap((requirement) =>
      requirement.enabled && requirement.kind === 'vibrationVelocity' ? [requirement.scale as string] : [],
    ),
  )
  return severityScales
    .filter((scale) => used.has(scale.id))
    .map((scale) => ({
      what: 'Severity scale',
      how: `${scale.name}. The table was written down ${scale.provenance}: check it against the standard.`,
      source: scale.source,
    }))
}
