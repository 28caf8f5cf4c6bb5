/** Group B, two stages: more nodes in the same network, without anything new in the solver. */
import { assemble, type System } from '../../../core/network/assemble.ts'
import { blockCurve, blockVector, readForce } from '../../../core/network/block-reader.ts'
import { springDamper } from '../../../core/network/elements.ts'
import { undampedModes, type UndampedModes } from '../../../core/network/modes.ts'
import { GROUND, type BodyNode, type Network, type NetworkElement } from '../../../core/network/network.ts'
import { BLOCK, emptyLoad, respond, responseSolver, type LoadCase } from '../../../core/network/response.ts'
import { cross, subtract } from '../../../core/numerics/vector3.ts'
import type { Vec3 } from '../../../core/project/fields.ts'
import type { Complex } from '../../../core/results.ts'
import type { BodyInputs } from '../cases/rigid-body.ts'
import { casesOf, once, type Check, type ReferenceCase } from '../check-type.ts'
import { checkMaker, missing } from './parts.ts'

const FILE = 'B_rigidbody6.json'
type Body = BodyInputs['body']
type Mounts = BodyInputs['mounts']

interface ChainInputs {
  readonly machine_mass_kg: number
  readonly upper_k: number
  readonly upper_eta: number
  readonly raft_mass_kg: number
  readonly lower_k: number
  readonly lower_eta: number
  readonly freqs_Hz: readonly number[]
}
interface ChainExpected {
  readonly undamped_fn_Hz: readonly number[]
  readonly T: readonly Complex[]
}
interface RaftInputs {
  readonly body: Body
  readonly upper_mounts: Mounts
  readonly raft_body: Body
  readonly lower_mounts: Mounts
  readonly unbalance: {
    readonly U_kg_m: number
    readonly point_m: Vec3
    readonly e1: Vec3
    readonly e2: Vec3
  }
  readonly freqs_Hz: readonly number[]
}
interface RaftExpected {
  readonly q_machine: readonly (readonly Complex[])[]
  readonly q_raft: readonly (readonly Complex[])[]
  readonly sum_force_on_foundation_N: readonly (readonly Complex[])[]
  readonly undamped_fn_Hz: readonly number[]
}

export const twoStageChecks: readonly Check[] = [
  ...casesOf<ChainInputs, ChainExpected>(FILE, 'B-TWO1D').flatMap(chainChecks),
  ...casesOf<RaftInputs, RaftExpected>(FILE, 'B-RAFT').flatMap(raftChecks),
]

interface Answer {
  /** by frequency, then freedom */
  readonly motion: readonly (readonly Complex[])[]
  /** by frequency: sum of the forces of the grounded elements */
  readonly support: readonly (readonly Complex[])[]
  readonly modes: UndampedModes
}

function ask(network: Network, load: (system: System) => LoadCase, frequencies: readonly number[]): Answer {
  const system = assemble(network)
  const modes = undampedModes(system) ?? missing()
  const omegas = Float64Array.from(frequencies, (frequency) => 2 * Math.PI * frequency)
  const motion: Complex[][] = []
  const support: Complex[][] = []
  const grounded = system.elements.filter(({ element }) => element.from.node === GROUND.id)
  respond(responseSolver(system, modes), omegas, [load(system)], (block) => {
    for (let f = 0; f < block.count; f++) {
      motion.push(
        Array.from({ length: modes.count }, (_, j) => ({
          re: block.motion.re[j * BLOCK + f] ?? missing(),
          im: block.motion.im[j * BLOCK + f] ?? missing(),
        })),
      )
      support.push([0, 1, 2].map(() => ({ re: 0, im: 0 })))
    }
    for (const element of grounded) {
      const force = blockVector()
      readForce(element, block, blockCurve(), force)
      for (let f = 0; f < block.count; f++) {
        const sum = support[block.first + f] ?? missing()
        force.forEach(({ re, im }, axis) => {
          const before = sum[axis] ?? missing()
          sum[axis] = { re: before.re + (re[f] ?? missing()), im: before.im + (im[f] ?? missing()) }
        })
      }
    }
  })
  return { motion, support, modes }
}

function frequencyOf(modes: UndampedModes, r: number): number {
  return Math.sqrt(modes.omegaSquared[r] ?? missing()) / (2 * Math.PI)
}

function chainChecks(given: ReferenceCase<ChainInputs, ChainExpected>): Check[] {
  const { inputs, expected } = given
  const check = checkMaker(given)
  const at = (node: string) => ({ node, position: [0, 0, 0] as const })
  const stage = (
    id: string,
    from: string,
    to: string,
    stiffness: number,
    lossFactor: number,
  ): NetworkElement => ({
    id,
    from: at(from),
    to: at(to),
    branches: [
      { axis: [0, 0, 1], motion: 'shift', law: { kind: 'springDamper', stiffness, lossFactor, viscous: 0 } },
    ],
  })
  const answer = once(() =>
    ask(
      {
        nodes: [
          GROUND,
          { kind: 'line', id: 'machine', mass: inputs.machine_mass_kg, direction: [0, 0, 1] },
          { kind: 'line', id: 'raft', mass: inputs.raft_mass_kg, direction: [0, 0, 1] },
        ],
        elements: [
          stage('upper', 'raft', 'machine', inputs.upper_k, inputs.upper_eta),
          stage('lower', 'ground', 'raft', inputs.lower_k, inputs.lower_eta),
        ],
      },
      () => ({ ...emptyLoad(2), constantRe: Float64Array.of(1, 0) }),
      inputs.freqs_Hz,
    ),
  )
  return [
    ...expected.undamped_fn_Hz.map((value, r) =>
      check(`natural frequency ${r + 1}`, 'Hz', value, 'network', () => frequencyOf(answer().modes, r)),
    ),
    ...inputs.freqs_Hz.flatMap((frequency, f) =>
      (['re', 'im'] as const).map((part) => {
        const value = expected.T[f] ?? missing()
        return check(
          `transmissibility at ${frequency} Hz, ${part}`,
          '',
          value[part],
          'network',
          () => answer().support[f]?.[2]?.[part] ?? missing(),
          given.tolerance.rel * Math.hypot(value.re, value.im),
        )
      }),
    ),
  ]
}

function bodyNode(id: string, { mass_kg, cg_m, inertia_about_cg_kg_m2: inertia }: Body): BodyNode {
  const { Ixx, Iyy, Izz, Ixy, Ixz, Iyz } = inertia
  return {
    kind: 'body',
    id,
    mass: mass_kg,
    centre: cg_m,
    inertia: [
      [Ixx, -Ixy, -Ixz],
      [-Ixy, Iyy, -Iyz],
      [-Ixz, -Iyz, Izz],
    ],
  }
}

function stageMounts(stage: string, from: string, to: string, mounts: Mounts): NetworkElement[] {
  return mounts.map(({ pos_m: position, k_N_per_m: stiffness, eta = 0 }, index) =>
    springDamper(
      { id: `${stage} ${index + 1}`, from: { node: from, position }, to: { node: to, position } },
      { stiffness, lossFactor: eta, viscous: [0, 0, 0] },
    ),
  )
}

function raftChecks(given: ReferenceCase<RaftInputs, RaftExpected>): Check[] {
  const { inputs, expected } = given
  const check = checkMaker(given)
  const { U_kg_m: unbalance, point_m: point, e1, e2 } = inputs.unbalance
  const arm = subtract(point, inputs.body.cg_m)
  const load = (): LoadCase => {
    const empty = emptyLoad(12)
    const six = (v: Vec3, sign: number) => [...v, ...cross(arm, v)].map((value) => sign * unbalance * value)
    empty.squaredRe.set(six(e1, 1))
    empty.squaredIm.set(six(e2, -1))
    return empty
  }
  const answer = once(() =>
    ask(
      {
        nodes: [GROUND, bodyNode('machine', inputs.body), bodyNode('raft', inputs.raft_body)],
        elements: [
          ...stageMounts('upper', 'raft', 'machine', inputs.upper_mounts),
          ...stageMounts('lower', 'ground', 'raft', inputs.lower_mounts),
        ],
      },
      load,
      inputs.freqs_Hz,
    ),
  )
  const parts = (what: string, unit: string, values: readonly Complex[], ours: () => readonly Complex[]) => {
    const largest = Math.max(...values.map(({ re, im }) => Math.hypot(re, im)))
    return values.flatMap((value, i) =>
      (['re', 'im'] as const).map((part) =>
        check(
          `${what} [${i}] ${part}`,
          unit,
          value[part],
          'network',
          () => ours()[i]?.[part] ?? missing(),
          // parts that all but cancel are known to the digits of the largest beside them
          given.tolerance.rel * Math.hypot(value.re, value.im) + 1e-10 * largest,
        ),
      ),
    )
  }
  return [
    ...expected.undamped_fn_Hz.map((value, r) =>
      check(`natural frequency ${r + 1}`, 'Hz', value, 'network', () => frequencyOf(answer().modes, r)),
    ),
    ...inputs.freqs_Hz.flatMap((frequency, f) => [
      ...parts(`motion of the machine at ${frequency} Hz`, 'm or rad', expected.q_machine[f] ?? [], () =>
        (answer().motion[f] ?? missing()).slice(0, 6),
      ),
      ...parts(`motion of the raft at ${frequency} Hz`, 'm or rad', expected.q_raft[f] ?? [], () =>
        (answer().motion[f] ?? missing()).slice(6),
      ),
      ...parts(
        `force into the support at ${frequency} Hz`,
        'N',
        expected.sum_force_on_foundation_N[f] ?? [],
        () => answer().support[f] ?? missing(),
      ),
    ]),
  ]
}
