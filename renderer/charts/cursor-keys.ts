import { lowerBound } from './thin.ts'

const FAR_SHARE = 1 / 20

/**
 * Where a key takes the cursor: to neighbouring computed places, far ones, or an end.
 * @param domain computed places, rising
 * @param standing where the cursor stands now
 * @returns null when the key means nothing here
 */
export function cursorTarget(key: string, domain: Float64Array, standing: number): number | null {
  const last = domain.length - 1
  const after = lowerBound(domain, standing)
  const next = domain[after] === standing ? after + 1 : after
  const far = Math.max(1, Math.round(last * FAR_SHARE))
  const jumps: Readonly<Record<string, number>> = {
    ArrowLeft: after - 1,
    ArrowRight: next,
    ArrowDown: after - 1,
    ArrowUp: next,
    PageDown: after - far,
    PageUp: after + far,
    Home: 0,
    End: last,
  }
  const target = jumps[key]
  return target === undefined ? null : (domain[Math.max(0, Math.min(last, target))] ?? null)
}
