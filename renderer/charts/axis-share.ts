import type { DrawnAxis } from './draw-model.ts'

/** Where a shown value stands along its axis: 0 at the lower end, 1 at the upper. */
export function shareOf(at: number, { min, max, kind }: DrawnAxis): number {
  return kind === 'log' ? Math.log(at / min) / Math.log(max / min) : (at - min) / (max - min)
}

/** The shown value at a share of the axis. */
export function valueAtShare(share: number, { min, max, kind }: DrawnAxis): number {
  return kind === 'log' ? min * (max / min) ** share : min + share * (max - min)
}
