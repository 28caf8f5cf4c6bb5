import type { HarmonicSource, Source, UnbalanceSource } from '../../../core/project/sources.ts'
import { newId } from '../../state/ids.ts'

/** A further source to begin with: its kind is chosen, its size is still to be given. */
export function newSource(kind: 'unbalance' | 'force' | 'moment', sources: readonly Source[]): Source {
  const id = newId('source', sources)
  const common = { id, enabled: true, position: null, phase: 0 }
  if (kind === 'unbalance') {
    return { ...common, kind, name: 'Unbalance', amount: { by: 'unbalance', unbalance: null } }
  }
  return {
    ...common,
    kind: 'harmonic',
    name: kind === 'force' ? 'Force' : 'Moment',
    load: { kind, direction: kind === 'force' ? [0, 0, 1] : [1, 0, 0], amplitude: null },
    order: 1,
    dependence: { on: 'constant' },
  }
}

/** The amount in another way of giving it; the rotor's mass goes along where both have one. */
export function amountBy(
  by: UnbalanceSource['amount']['by'],
  old: UnbalanceSource['amount'],
): UnbalanceSource['amount'] {
  const rotorMass = 'rotorMass' in old ? old.rotorMass : null
  if (by === 'unbalance') return { by, unbalance: null }
  if (by === 'eccentricity') return { by, rotorMass, eccentricity: null }
  return { by, rotorMass, grade: null, serviceSpeed: null }
}

export function dependenceOn(on: HarmonicSource['dependence']['on']): HarmonicSource['dependence'] {
  return on === 'constant' ? { on } : { on, referenceSpeed: null }
}
