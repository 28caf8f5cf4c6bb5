import type { Vec3 } from '../../../core/project/fields.ts'
import type { MachinePart } from '../../../core/project/machine.ts'
import type { Project } from '../../../core/project/project.ts'
import type { Evaluation } from '../../../core/results.ts'
import { mountName } from '../../../core/verdict/names.ts'

export interface Attachment {
  readonly id: string
  readonly label: string
  readonly position: Readonly<Vec3>
}

/** Places that the project knows and where an absorber may be fixed. */
export function attachments(project: Project, evaluation: Evaluation | null): readonly Attachment[] {
  const centre = evaluation?.massSummary?.centreOfGravity
  return [
    ...(centre ? [{ id: 'centre', label: 'centre of gravity', position: centre }] : []),
    ...project.machine.points.map((point, index) => ({
      id: `point-${point.id}`,
      label: point.name || `point ${index + 1}`,
      position: point.position,
    })),
    ...corners(project),
    ...project.mounting.placed.map((mount) => ({
      id: `mount-${mount.id}`,
      label: `above ${mountName(project, mount.id)}`,
      position: mount.position,
    })),
  ]
}

/** The known place at a position, or null when it was typed. */
export function attachmentAt(places: readonly Attachment[], position: Readonly<Vec3>): Attachment | null {
  const same = (place: Attachment) =>
    place.position.every((part, axis) => Math.abs(part - (position[axis] ?? 0)) < 1e-9)
  return places.find(same) ?? null
}

/** Upper corners of the box around the machine's parts. */
function corners(project: Project): readonly Attachment[] {
  const { massProperties } = project.machine
  if (massProperties.from !== 'parts' || massProperties.parts.length === 0) return []
  const boxes = massProperties.parts.map((part) => ({ centre: part.centre, half: halfSize(part) }))
  // twelve digits: sums of halves leave noise that a field would show
  const end = (axis: 0 | 1 | 2, sign: 1 | -1) => {
    const outermost = Math.max(...boxes.map(({ centre, half }) => sign * centre[axis] + half[axis]))
    return Number((sign * outermost).toPrecision(12))
  }
  const signs = [-1, 1] as const
  return signs.flatMap((sx) =>
    signs.map((sy) => ({
      id: `corner-${sx}-${sy}`,
      label: `upper corner ${sx < 0 ? '−' : '+'}x ${sy < 0 ? '−' : '+'}y`,
      position: [end(0, sx), end(1, sy), end(2, 1)] as const,
    })),
  )
}

function halfSize(part: MachinePart): Vec3 {
  if (part.shape === 'box') return [part.size[0] / 2, part.size[1] / 2, part.size[2] / 2]
  const along = { x: 0, y: 1, z: 2 }[part.axis]
  const half: Vec3 = [part.diameter / 2, part.diameter / 2, part.diameter / 2]
  half[along] = part.length / 2
  return half
}
