import type { Absorber, AbsorberTuning, Objective } from '../../../core/project/absorber.ts'

export const TUNINGS: readonly { readonly value: AbsorberTuning['by']; readonly label: string }[] = [
  { value: 'fixedPoints', label: "Den Hartog's closed form" },
  { value: 'minimax', label: 'least worst peak, computed' },
  { value: 'networkMinimax', label: 'least worst response of the machine' },
  { value: 'speed', label: 'to one running speed' },
  { value: 'given', label: 'as given' },
]

export const TUNING_HELP: Readonly<Record<AbsorberTuning['by'], string>> = {
  fixedPoints: 'Equal height at the fixed points of an undamped host.',
  minimax: 'The lowest possible highest peak on the damped single-freedom host.',
  networkMinimax:
    'The lowest possible highest receptance at the attachment over a band, with every mode counted.',
  speed: 'Takes out one exciting frequency; on either side of it two new resonances stand.',
  given: 'Frequency and damping as measured or bought.',
}

export const EXCITATIONS: readonly { readonly value: Objective['excitation']; readonly label: string }[] = [
  { value: 'force', label: 'harmonic force' },
  { value: 'unbalance', label: 'rotating unbalance' },
  { value: 'supportAcceleration', label: 'support acceleration' },
  { value: 'supportDisplacement', label: 'support displacement' },
]

export const RESPONSES: readonly { readonly value: Objective['response']; readonly label: string }[] = [
  { value: 'displacement', label: 'displacement' },
  { value: 'velocity', label: 'velocity' },
  { value: 'acceleration', label: 'acceleration' },
  { value: 'relativeDisplacement', label: 'displacement against the support' },
  { value: 'transmittedForce', label: 'transmitted force' },
]

const REFERENCES: Readonly<Record<Objective['excitation'], string>> = {
  force: 'static deflection F/k',
  unbalance: 'unbalance over host mass U/m',
  supportAcceleration: 'a/ω₁² of the support',
  supportDisplacement: 'displacement of the support',
}

/** What a response of 1 means: every curve of the single freedom is a ratio to this. */
export function referenceWords({ excitation, response }: Objective): string {
  const reference = REFERENCES[excitation]
  switch (response) {
    case 'displacement':
    case 'relativeDisplacement':
      return reference
    case 'velocity':
      return `${reference}, times ω₁`
    case 'acceleration':
      return `${reference}, times ω₁²`
    case 'transmittedForce':
      return excitation === 'force' ? 'exciting force F' : `${reference}, times host stiffness`
  }
}

/**
 * Tuning of another kind, with what can be kept of the present one. A band over the whole machine
 * begins half an octave about the host.
 * @param hostFrequency [Hz]; null where it is not known, and then the band is left open
 */
export function switchTuning(
  present: AbsorberTuning,
  by: AbsorberTuning['by'],
  hostFrequency: number | null,
): AbsorberTuning {
  const objective: Objective =
    present.by === 'fixedPoints' || present.by === 'minimax'
      ? present.objective
      : { excitation: 'force', response: 'displacement' }
  const dampingRatio = present.by === 'speed' || present.by === 'given' ? present.dampingRatio : 0
  switch (by) {
    case 'fixedPoints':
    case 'minimax':
      return { by, objective }
    case 'networkMinimax':
      return {
        by,
        lowest: hostFrequency === null ? null : Number((hostFrequency / Math.SQRT2).toPrecision(3)),
        highest: hostFrequency === null ? null : Number((hostFrequency * Math.SQRT2).toPrecision(3)),
      }
    case 'speed':
      return { by, speed: null, order: 1, dampingRatio }
    case 'given':
      return { by, frequency: null, dampingRatio }
  }
}

export function absorberName(absorber: Absorber, index: number): string {
  return absorber.name || `Absorber ${index + 1}`
}
