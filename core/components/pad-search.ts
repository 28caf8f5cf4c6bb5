import { InputError } from '../errors.ts'
import { bracketedRoot } from '../numerics/bracketed-root.ts'
import { padDesignSchema, type PadDesign } from '../project/component-designs.ts'
import { padSection, shapeFactor } from './pad-geometry.ts'
import { analysePad, compressionModulus, padModuli, type PadFigures } from './rubber-pad.ts'
import { rubberTable } from './rubber.ts'

/** What a pad shall do; its shape, layers and limits as in `like`. */
export interface PadAim {
  /** vertical [N/m] */
  readonly rate: number
  /** static load [N] */
  readonly load: number
  /** proportions, limits and, where moduli are typed, the rubber; sizes are replaced */
  readonly like: PadDesign
  /** hardnesses that can be had [IRHD]; left out: the rows of the table */
  readonly hardnesses?: readonly number[]
}

export interface PadCandidate {
  readonly design: PadDesign
  readonly figures: PadFigures
}

export interface PadSearch {
  /** pads that meet the aim, least rubber first */
  readonly candidates: readonly PadCandidate[]
  /** why there is none; empty when there is one */
  readonly reason: string
}

/** Share of the compression limit that the load uses: the rest is left for motion and tolerance. */
const USED = 0.9
/** Sizes between which a pad is looked for, over the thickness. */
const SLIMMEST = 0.05
const WIDEST = 200
/** Remarks with which a pad still counts: creep belongs to rubber whatever its size. */
const BEARABLE = new Set(['creepPerDecade'])

/**
 * Pads of a wanted vertical rate for a load. The load and the compression limit give the thickness,
 * the rate then gives the size, for each hardness that can be had. A pad that gives way sideways or
 * breaks another rule of `analysePad` is left out.
 * @throws InputError when the aim is not positive
 */
export function searchPad({ rate, load, like, hardnesses }: PadAim): PadSearch {
  if (!(rate > 0)) throw new InputError('rate', rate, 'must be greater than 0')
  if (!(load > 0)) throw new InputError('load', load, 'must be greater than 0')
  const rubbers: PadDesign['rubber'][] =
    like.rubber.from === 'typed'
      ? [like.rubber]
      : (hardnesses ?? rubberTable.map(([row]) => row)).map((hardness) => ({ from: 'hardness', hardness }))
  const found: PadCandidate[] = []
  const refusals = new Map<string, number>()
  const refuse = (message: string) => refusals.set(message, (refusals.get(message) ?? 0) + 1)
  for (const rubber of rubbers) {
    const design = padOf(rate, load, { ...like, rubber })
    if (design === null) {
      refuse('No pad of this rubber has so low or so high a rate at the thickness that the load asks for.')
      continue
    }
    const { figures, problems } = analysePad(design)
    const against = problems.filter(({ field }) => !BEARABLE.has(field))
    if (figures !== null && against.length === 0) found.push({ design, figures })
    for (const { message } of against) refuse(message)
  }
  const commonest = [...refusals].toSorted(([, a], [, b]) => b - a)[0]?.[0] ?? ''
  const volume = ({ design, figures }: PadCandidate) => figures.area * (design.thickness ?? 0) * design.layers
  return {
    candidates: found.toSorted((a, b) => volume(a) - volume(b)),
    reason: found.length > 0 ? '' : `No rubber of the list serves. Mostly: ${commonest}`,
  }
}

/** The pad of one rubber that has the rate, or null. */
function padOf(rate: number, load: number, like: PadDesign): PadDesign | null {
  const thickness = load / rate / (USED * like.compressionLimit * like.layers)
  const scaled = (size: number) =>
    padDesignSchema.parse({ ...like, shape: shapeOf(like, size), thickness, load })
  const size = bracketedRoot(
    (candidate) => rateOf(scaled(candidate)) - rate,
    SLIMMEST * thickness,
    Math.min(WIDEST * thickness, 50),
  )
  return size === null ? null : scaled(size)
}

/** The shape of `like` with its proportions and a new first size; without proportions square, or full. */
function shapeOf({ shape }: PadDesign, size: number): PadDesign['shape'] {
  if (shape.kind === 'disc') {
    const share = shape.diameter === null ? 0 : shape.bore / shape.diameter
    return { kind: 'disc', diameter: size, bore: share * size }
  }
  const aspect = shape.length === null || shape.width === null ? 1 : shape.width / shape.length
  return { kind: 'rectangle', length: size, width: aspect * size }
}

function rateOf(design: PadDesign): number {
  const section = padSection(design.shape)
  const moduli = padModuli(design)
  if (section === null || moduli === null || design.thickness === null) return Number.NaN
  const modulus = compressionModulus(
    moduli,
    shapeFactor(section, design.thickness),
    design.volumeCompressibility,
  )
  return (modulus * section.area) / (design.thickness * design.layers)
}
