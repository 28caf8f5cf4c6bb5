import { RUBBER_SOURCE } from '../../components/rubber.ts'
import type { ComponentDesign } from '../../project/component-designs.ts'
import type { Project } from '../../project/project.ts'
import type { MethodNote } from '../report.ts'

const MECHANICS = ''

/** How curves, components, packing, temperature and the load sideways were computed, as far as used. */
export function mountNotes(project: Project): readonly MethodNote[] {
  const { types, setting, placed } = project.mounting
  const { temperature, lateralLoad } = project.analysis
  const notes: MethodNote[] = []
  const curved = types.some((type) => type.design === null && type.law.kind === 'curve')
  if (curved) {
    notes.push({
      what: 'Measured curves',
      how: 'Monotone cubic between the points, straight beyond them. The machine settles where its weight is in balance; modes and response use the tangent there times the dynamic ratio.',
      source:
        'F. N. Fritsch and R. E. Carlson, SIAM J. Numerical Analysis 17, 1980; F. N. Fritsch and J. Butland, SIAM J. Scientific and Statistical Computing 5, 1984',
    })
  }
  const kinds = new Set(types.flatMap(({ design }) => (design === null ? [] : [design.component])))
  notes.push(...new Set([...kinds].flatMap((kind) => COMPONENT_NOTES[kind])))
  if (setting.kind === 'levelled' || placed.some(({ shim }) => shim !== 0)) {
    notes.push({
      what: 'Packing',
      how:
        setting.kind === 'levelled'
          ? 'Packing on which the machine stands without tilt and the loads come as near to what is aimed at as the place of the weight allows (least squares, in proportion).'
          : 'Packing shortens the way of a mount by its thickness; the machine settles on what is left.',
      source: MECHANICS,
    })
  }
  if (temperature !== null && types.some((type) => type.stiffnessAtTemperature !== null)) {
    notes.push({
      what: 'Temperature of the mounts',
      how: 'Stiffness of vibration times a factor that runs straight between the points given; the rest position is that of the figures.',
      source: 'the points given',
    })
  }
  if (lateralLoad !== null) {
    notes.push({
      what: 'Static load sideways',
      how: 'A part of the weight through the centre of gravity, along a direction and against it, in balance with the mounts as their laws say; a lifted mount pulls. Without friction, stops or snubbers.',
      source: MECHANICS,
    })
  }
  return notes
}

const HARINGX: MethodNote = {
  what: 'Stiffness sideways and stability under load',
  how: 'A column that bends and shears under its load; it gives way where its stiffness across is used up.',
  source:
    'J. A. Haringx, Philips Research Reports, 1948-49; for rubber: A. N. Gent, J. Mechanical Engineering Science 6, 1964',
}

const COMPONENT_NOTES: Readonly<Record<ComponentDesign['component'], readonly MethodNote[]>> = {
  helicalSpring: [
    {
      what: 'Helical spring',
      how: 'Rate G d⁴ / (8 D³ n); shear stress 8 F D / (π d³) times the factor of Wahl, that of Bergsträsser beside it; clearance and buckling by the standard; surge of the coils between two still ends.',
      source: 'EN 13906-1 (formulas from memory: check the standard); A. M. Wahl, Mechanical Springs',
    },
    HARINGX,
  ],
  rubberPad: [
    {
      what: 'Rubber pad',
      how: `Bonded block: compression modulus E₀ (1 + 2 k S²) with shape factor S, in series with the bulk modulus where that is counted. The table of moduli against hardness was written down ${RUBBER_SOURCE.provenance}; compounds of one hardness differ by a quarter, so that measured stiffness comes first.`,
      source: `${RUBBER_SOURCE.source} (${RUBBER_SOURCE.provenance}); A. N. Gent and P. B. Lindley, Proc. IMechE 173, 1959`,
    },
    HARINGX,
  ],
  airSpring: [
    {
      what: 'Air spring',
      how: 'k = n p A² / V + (p - p_atm) dA/dx with one exponent for vibration and one for slow changes; volumes communicate freely; stiffness sideways is what its maker states.',
      source: 'C. M. Harris (ed.), Shock and Vibration Handbook',
    },
  ],
}
