import type { PadDesign } from '../project/component-designs.ts'

/** A layer of rubber between two bonded plates. */
export interface PadSection {
  /** loaded area [m²] */
  readonly area: number
  /** edge that is free to bulge, all around [m] */
  readonly edge: number
  /** second moment of area for bending that goes with a shift along local x, and along y [m⁴] */
  readonly secondMoment: readonly [alongX: number, alongY: number]
  /** least width of the loaded area [m] */
  readonly width: number
  /** long side over short side of a rectangle; 1 for a disc */
  readonly aspect: number
}

/** Loaded area and edge of a pad; null where a dimension lacks or a bore is wider than its disc. */
export function padSection(shape: PadDesign['shape']): PadSection | null {
  if (shape.kind === 'disc') {
    const { diameter, bore } = shape
    if (diameter === null || bore >= diameter) return null
    const secondMoment = (Math.PI * (diameter ** 4 - bore ** 4)) / 64
    return {
      area: (Math.PI * (diameter ** 2 - bore ** 2)) / 4,
      edge: Math.PI * (diameter + bore),
      secondMoment: [secondMoment, secondMoment],
      width: diameter - bore,
      aspect: 1,
    }
  }
  const { length, width } = shape
  if (length === null || width === null) return null
  return {
    area: length * width,
    edge: 2 * (length + width),
    secondMoment: [(width * length ** 3) / 12, (length * width ** 3) / 12],
    width: Math.min(length, width),
    aspect: Math.max(length, width) / Math.min(length, width),
  }
}

/** Shape factor S of a layer: loaded area over the area that is free to bulge. */
export function shapeFactor({ area, edge }: PadSection, thickness: number): number {
  return area / (edge * thickness)
}

/**
 * Coefficient C of the pressure part C G S² of the compression modulus of an incompressible bonded
 * rectangle: 3 J P² / A³, with J the torsion constant of the rectangle, P its edge and A its area.
 * It is 6 for a disc, 6.75 for a square and tends to 4 for a long strip.
 * A. N. Gent and P. B. Lindley, The compression of bonded rubber blocks, Proc. IMechE 173, 1959
 * (parabolic pressure); J by Saint-Venant's series.
 * @param aspect long side over short side, >= 1
 */
export function idealPressureCoefficient(aspect: number): number {
  // tanh is 1 but for a part that falls with e^(-n pi aspect): the ones sum to 31 zeta(5) / 32
  let sum = (31 * 1.03692775514337) / 32
  for (let n = 1; n < 15; n += 2) sum -= 2 / (Math.expm1(n * Math.PI * aspect) + 2) / n ** 5
  const torsion = aspect * (1 / 3 - (64 / (Math.PI ** 5 * aspect)) * sum)
  const edge = 2 * (aspect + 1)
  return (3 * torsion * edge ** 2) / aspect ** 3
}
