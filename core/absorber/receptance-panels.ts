/**
 * A receptance over a band as smooth panels, so that it can be read anywhere with its derivatives after
 * a few hundred samples. Each panel carries a polynomial through Chebyshev points, of the receptance
 * itself or of its inverse, whichever is smooth there: near a resonance the dynamic stiffness is almost
 * straight however small the damping, near an antiresonance the receptance is.
 */

/** Receptance at the attachment for rising frequencies [Hz]; parts in m/N. */
export type Receptance = (frequencies: Float64Array) => {
  readonly re: Float64Array
  readonly im: Float64Array
}

export interface Panel {
  /** [rad/s] */
  readonly low: number
  readonly high: number
  /** whether the coefficients are those of the receptance (else of its inverse) */
  readonly direct: boolean
  /** powers of (omega - middle) / half width, from the constant upwards */
  readonly re: Float64Array
  readonly im: Float64Array
}

const DEGREE = 12
const POINTS = DEGREE + 1
/** Relative size of the last Chebyshev coefficients at which a panel is taken as exact. */
const TOLERANCE = 1e-10
const FIRST_PANELS = 12
const MOST_LEVELS = 14
/** A receptance that needs more is not smooth at all: rounding, or a table's corners. */
const MOST_PANELS = 240

/**
 * @param band lowest and highest frequency [Hz], 0 < low < high
 * @returns panels in rising order; the narrowest ones are kept as they are where the curve is rougher
 *   than `MOST_LEVELS` halvings or `MOST_PANELS` panels can follow
 */
export function receptancePanels(receptance: Receptance, band: readonly [number, number]): Panel[] {
  const done: Panel[] = []
  let open: [number, number][] = []
  const ratio = band[1] / band[0]
  for (let k = 0; k < FIRST_PANELS; k++) {
    open.push([band[0] * ratio ** (k / FIRST_PANELS), band[0] * ratio ** ((k + 1) / FIRST_PANELS)])
  }
  for (let level = 0; open.length > 0; level++) {
    const frequencies = new Float64Array(open.length * POINTS)
    open.forEach(([low, high], index) => {
      for (let j = 0; j < POINTS; j++) {
        frequencies[index * POINTS + j] = (low + high) / 2 + ((high - low) / 2) * (NODES[j] ?? 0)
      }
    })
    const sampled = receptance(frequencies)
    const next: [number, number][] = []
    const mayRefine = level < MOST_LEVELS && done.length + 2 * open.length <= MOST_PANELS
    open.forEach(([low, high], index) => {
      const from = index * POINTS
      const re = sampled.re.subarray(from, from + POINTS)
      const im = sampled.im.subarray(from, from + POINTS)
      const direct = fit(re, im)
      const inverse = inverted(re, im)
      const other = inverse === null ? null : fit(inverse.re, inverse.im)
      const useDirect = other === null || direct.roughness <= other.roughness
      const chosen = useDirect ? direct : other
      if (chosen.roughness > TOLERANCE && mayRefine) {
        const middle = (low + high) / 2
        next.push([low, middle], [middle, high])
      } else {
        const turn = 2 * Math.PI
        done.push({ low: low * turn, high: high * turn, direct: useDirect, re: chosen.re, im: chosen.im })
      }
    })
    open = next
  }
  return done.sort((one, other) => one.low - other.low)
}

/** Dynamic stiffness 1 / H and its first two derivatives by omega: [re, im, re', im', re'', im'']. */
export function dynamicStiffness(panel: Panel, omega: number, out: Float64Array): void {
  const half = (panel.high - panel.low) / 2
  const t = (omega - panel.low) / half - 1
  let re = 0
  let im = 0
  let re1 = 0
  let im1 = 0
  let re2 = 0
  let im2 = 0
  for (let k = DEGREE; k >= 0; k--) {
    re2 = re2 * t + 2 * re1
    im2 = im2 * t + 2 * im1
    re1 = re1 * t + re
    im1 = im1 * t + im
    re = re * t + (panel.re[k] ?? 0)
    im = im * t + (panel.im[k] ?? 0)
  }
  re1 /= half
  im1 /= half
  re2 /= half * half
  im2 /= half * half
  if (panel.direct) {
    // Z = 1/H, Z' = -Z² H', Z'' = 2 Z³ H'² - Z² H''
    const square = re * re + im * im
    const zr = re / square
    const zi = -im / square
    const sr = zr * zr - zi * zi
    const si = 2 * zr * zi
    const dr = -(sr * re1 - si * im1)
    const di = -(sr * im1 + si * re1)
    const hr = 2 * (dr * re1 - di * im1)
    const hi = 2 * (dr * im1 + di * re1)
    // 2 Z³ H'² = -2 Z H' Z'
    const er = -(zr * hr - zi * hi) - (sr * re2 - si * im2)
    const ei = -(zr * hi + zi * hr) - (sr * im2 + si * re2)
    out[0] = zr
    out[1] = zi
    out[2] = dr
    out[3] = di
    out[4] = er
    out[5] = ei
    return
  }
  out[0] = re
  out[1] = im
  out[2] = re1
  out[3] = im1
  out[4] = re2
  out[5] = im2
}

/** Chebyshev points of the second kind, rising. */
const NODES = Float64Array.from({ length: POINTS }, (_, j) => -Math.cos((Math.PI * j) / DEGREE))

/** Row k gives the k-th Chebyshev coefficient from the values at the nodes. */
const TO_CHEBYSHEV: readonly Float64Array[] = Array.from({ length: POINTS }, (_, k) =>
  Float64Array.from({ length: POINTS }, (__, j) => {
    const ends = (j === 0 || j === DEGREE ? 0.5 : 1) * (k === 0 || k === DEGREE ? 0.5 : 1)
    return (2 / DEGREE) * ends * Math.cos((k * Math.PI * (DEGREE - j)) / DEGREE)
  }),
)

/** Row k: the Chebyshev polynomial T_k as powers. */
const CHEBYSHEV_POWERS: readonly Float64Array[] = chebyshevPowers()

function chebyshevPowers(): Float64Array[] {
  const rows: Float64Array[] = []
  for (let k = 0; k < POINTS; k++) {
    const row = new Float64Array(POINTS)
    const [last, before] = [rows[k - 1], rows[k - 2]]
    if (!last) row[0] = 1
    else if (!before) row[1] = 1
    else for (let j = 0; j < POINTS; j++) row[j] = 2 * (j > 0 ? (last[j - 1] ?? 0) : 0) - (before[j] ?? 0)
    rows.push(row)
  }
  return rows
}

function fit(re: Float64Array, im: Float64Array): { re: Float64Array; im: Float64Array; roughness: number } {
  const powersRe = new Float64Array(POINTS)
  const powersIm = new Float64Array(POINTS)
  let size = 0
  let tail = 0
  TO_CHEBYSHEV.forEach((row, k) => {
    let cRe = 0
    let cIm = 0
    for (let j = 0; j < POINTS; j++) {
      cRe += (row[j] ?? 0) * (re[j] ?? 0)
      cIm += (row[j] ?? 0) * (im[j] ?? 0)
    }
    const powers = CHEBYSHEV_POWERS[k]
    for (let j = 0; j <= k; j++) {
      powersRe[j] = (powersRe[j] ?? 0) + cRe * (powers?.[j] ?? 0)
      powersIm[j] = (powersIm[j] ?? 0) + cIm * (powers?.[j] ?? 0)
    }
    const magnitude = Math.hypot(cRe, cIm)
    size = Math.max(size, magnitude)
    if (k >= DEGREE - 1) tail += magnitude
  })
  const roughness = size > 0 ? tail / size : 0
  return { re: powersRe, im: powersIm, roughness: Number.isFinite(roughness) ? roughness : Infinity }
}

function inverted(re: Float64Array, im: Float64Array): { re: Float64Array; im: Float64Array } | null {
  const inverse = { re: new Float64Array(POINTS), im: new Float64Array(POINTS) }
  for (let j = 0; j < POINTS; j++) {
    const [x, y] = [re[j] ?? 0, im[j] ?? 0]
    const square = x * x + y * y
    if (!(square > 0)) return null
    inverse.re[j] = x / square
    inverse.im[j] = -y / square
  }
  return inverse
}
