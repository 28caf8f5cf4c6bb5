import type { Vec3 } from '../project/fields.ts'
import { MACHINE_AXES, type Matrix3 } from '../numerics/vector3.ts'
import type { Attachment, NetworkElement } from './network.ts'

interface Ends {
  readonly id: string
  readonly from: Attachment
  readonly to: Attachment
}

/**
 * Spring and damper in three directions at one place, as most mounts are described.
 * @param values stiffness [N/m] and viscous coefficient [N s/m] along the local axes, loss factor eta
 * @param axes local axes in fixed axes, one row each; left out: the machine axes
 */
export function springDamper(
  ends: Ends,
  values: {
    readonly stiffness: Readonly<Vec3>
    readonly viscous: Readonly<Vec3>
    readonly lossFactor: number
  },
  axes: Matrix3 = MACHINE_AXES,
): NetworkElement {
  const branch = (direction: 0 | 1 | 2) =>
    ({
      axis: axes[direction],
      motion: 'shift',
      law: {
        kind: 'springDamper',
        stiffness: values.stiffness[direction],
        lossFactor: values.lossFactor,
        viscous: values.viscous[direction],
      },
    }) as const
  return { ...ends, branches: [branch(0), branch(1), branch(2)] }
}

/** Spring and damper along one line, as that of an absorber. @param direction unit vector */
export function lineSpringDamper(
  ends: Ends,
  direction: Readonly<Vec3>,
  values: { readonly stiffness: number; readonly viscous: number; readonly lossFactor: number },
): NetworkElement {
  return {
    ...ends,
    branches: [{ axis: direction, motion: 'shift', law: { kind: 'springDamper', ...values } }],
  }
}
