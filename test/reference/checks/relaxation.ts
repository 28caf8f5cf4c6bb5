import { assemble } from '../../../core/network/assemble.ts'
import { blockCurve, blockVector, readForce } from '../../../core/network/block-reader.ts'
import { undampedModes } from '../../../core/network/modes.ts'
import { GROUND, type Network } from '../../../core/network/network.ts'
import { emptyLoad, respond, responseSolver } from '../../../core/network/response.ts'
import { relaxationOptimum } from '../../../core/mounts/single-freedom.ts'
import type { Complex } from '../../../core/results.ts'
import { casesOf, once, type Check, type ReferenceCase } from '../check-type.ts'
import { checkMaker, magnitude, missing, phaseNear } from './parts.ts'

const FILE = 'A_sdof.json'
const MASS = 70
const OMEGA = 41
const STIFFNESS = MASS * OMEGA ** 2

interface CurveInputs {
  readonly N_stiffness_ratio: number
  readonly zeta: number
  readonly r_points: readonly number[]
}
interface CurveExpected {
  readonly T_mag: readonly number[]
  readonly T_phase_deg: readonly number[]
}
interface OptimumExpected {
  readonly zeta_opt_absolute: number
  readonly T_opt: number
  readonly r_at_T_opt_absolute: number
  readonly zeta_opt_relative: number
  readonly relative_T_opt: number
  readonly r_at_T_opt_relative: number
  readonly T_mag_at_zeta_opt_absolute: readonly number[]
}

export const relaxationChecks: readonly Check[] = [
  ...casesOf<Omit<CurveInputs, 'zeta'>, OptimumExpected>(FILE, 'A-RX-').flatMap(optimumChecks),
  ...casesOf<CurveInputs, CurveExpected>(FILE, 'A-RXC').flatMap(curveChecks),
]

/** Force into the ground per unit force on one mass over an elastically supported damper. */
function transmissibility(inputs: CurveInputs): () => readonly Complex[] {
  return once(() => {
    const at = (node: string) => ({ node, position: [0, 0, 0] as const })
    const network: Network = {
      nodes: [GROUND, { kind: 'line', id: 'mass', mass: MASS, direction: [0, 0, 1] }],
      elements: [
        {
          id: 'isolator',
          from: at('ground'),
          to: at('mass'),
          branches: [
            {
              axis: [0, 0, 1],
              motion: 'shift',
              law: {
                kind: 'relaxation',
                stiffness: STIFFNESS,
                seriesStiffness: inputs.N_stiffness_ratio * STIFFNESS,
                viscous: 2 * inputs.zeta * MASS * OMEGA,
              },
            },
          ],
        },
      ],
    }
    const system = assemble(network)
    const solver = responseSolver(system, undampedModes(system) ?? missing())
    const load = emptyLoad(1)
    load.constantRe[0] = 1
    const force = blockVector()
    const values: Complex[] = []
    respond(
      solver,
      Float64Array.from(inputs.r_points, (r) => r * OMEGA),
      [load],
      (block) => {
        readForce(system.elements[0] ?? missing(), block, blockCurve(), force)
        for (let f = 0; f < block.count; f++) {
          values.push({ re: force[2].re[f] ?? missing(), im: force[2].im[f] ?? missing() })
        }
      },
    )
    return values
  })
}

function curveChecks(given: ReferenceCase<CurveInputs, CurveExpected>): Check[] {
  const check = checkMaker(given)
  const curve = transmissibility(given.inputs)
  const value = (k: number) => curve()[k] ?? missing()
  return given.inputs.r_points.flatMap((r, k) => {
    const phase = given.expected.T_phase_deg[k] ?? missing()
    return [
      check(`transmissibility at r = ${r}`, '', given.expected.T_mag[k] ?? missing(), 'network', () =>
        magnitude(value(k)),
      ),
      check(`its phase at r = ${r}`, '°', phase, 'network', () => phaseNear(value(k), phase)),
    ]
  })
}

function optimumChecks(given: ReferenceCase<Omit<CurveInputs, 'zeta'>, OptimumExpected>): Check[] {
  const { inputs, expected } = given
  const ratio = inputs.N_stiffness_ratio
  const check = checkMaker(given)
  const absolute = () => relaxationOptimum(ratio)
  const relative = () => relaxationOptimum(ratio, 'relative')
  const curve = once(() => transmissibility({ ...inputs, zeta: absolute().dampingRatio })())
  const peak = once(() =>
    transmissibility({
      ...inputs,
      zeta: absolute().dampingRatio,
      r_points: [expected.r_at_T_opt_absolute],
    })(),
  )
  return [
    check('best damping, absolute', '', expected.zeta_opt_absolute, 'formula', () => absolute().dampingRatio),
    check('its peak', '', expected.T_opt, 'formula', () => absolute().peak.height),
    check('r of its peak', '', expected.r_at_T_opt_absolute, 'formula', () => absolute().peak.at),
    check('peak on the network', '', expected.T_opt, 'network', () => magnitude(peak()[0] ?? missing())),
    check('best damping, relative', '', expected.zeta_opt_relative, 'formula', () => relative().dampingRatio),
    check('its peak, relative', '', expected.relative_T_opt, 'formula', () => relative().peak.height),
    check('r of its peak, relative', '', expected.r_at_T_opt_relative, 'formula', () => relative().peak.at),
    ...inputs.r_points.map((r, k) =>
      check(
        `transmissibility at best damping, r = ${r}`,
        '',
        expected.T_mag_at_zeta_opt_absolute[k] ?? missing(),
        'network',
        () => magnitude(curve()[k] ?? missing()),
      ),
    ),
  ]
}
