/**
 * Least worst receptance at the attachment over a band, on the full network: the absorber's frequency
 * and damping for which the highest |H / (1 + H D_a)| in the band is lowest. No mode is singled out.
 */
import { minimax, type MinimaxResult, type Pair, type Piece } from '../numerics/minimax.ts'
import { coupledJet, coupledValue } from './coupling.ts'
import { dynamicStiffness, receptancePanels, type Panel, type Receptance } from './receptance-panels.ts'

export interface NetworkOptimum {
  /** omega_a [rad/s] */
  readonly omega: number
  /** zeta_a = c / (2 m_a omega_a) [-] */
  readonly dampingRatio: number
  /** least worst receptance in the band [m/N] */
  readonly peak: number
  /** where it stands [Hz] */
  readonly peakAt: number
  /** worst receptance in the band without the absorber [m/N]; null when a resonance is not damped */
  readonly peakWithout: number | null
  readonly converged: boolean
  readonly iterations: number
  readonly residual: number
}

/**
 * @param receptance of the structure at the attachment along the absorber's line
 * @param mass of the absorber [kg]
 * @param band lowest and highest frequency [Hz], 0 < low < high
 * @returns null when the receptance is zero or not finite all over the band: nothing to attach to
 */
export function networkOptimum(
  receptance: Receptance,
  mass: number,
  band: readonly [number, number],
): NetworkOptimum | null {
  const curve = new BandCurve(receptancePanels(receptance, band), mass)
  if (curve.samples.length < 2) return null
  let best: MinimaxResult | null = null
  for (const start of startingPoints(curve, band)) {
    const found = minimax((p) => curve.pieces(p), start)
    const better =
      best === null || (found.converged === best.converged ? found.value < best.value : found.converged)
    if (better) best = found
    // two starts that agree are enough
    else if (best?.converged && Math.abs(found.value - best.value) < 1e-9) break
  }
  if (best === null) return null
  const { parameters, value, converged, iterations, residual } = best
  const omega = Math.exp(parameters[0] / 2)
  const dampingRatio = Math.exp(parameters[1]) / (2 * omega)
  return {
    omega,
    dampingRatio,
    peak: Math.exp(value / 2),
    peakAt: curve.worst(parameters) / (2 * Math.PI),
    peakWithout: curve.worstWithout(),
    converged,
    iterations,
    residual,
  }
}

/** Per panel, at which the curve is scanned for maxima. */
const SAMPLES = 10

/** A resonance this far above the band's middling receptance is one without damping, met to rounding. */
const UNBOUNDED = 1e8

interface Sample {
  readonly omega: number
  readonly panel: Panel
  readonly re: number
  readonly im: number
}

/** Level curve over the band for any absorber of one mass. Parameters: ln omega_a² and ln(c / m). */
class BandCurve {
  readonly samples: readonly Sample[]
  readonly low: number
  readonly high: number
  private readonly mass: number
  private readonly z = new Float64Array(6)

  constructor(panels: readonly Panel[], mass: number) {
    this.mass = mass
    this.samples = panels
      .flatMap((panel, index) => this.sampled(panel, index === panels.length - 1))
      .filter(({ re, im }) => Number.isFinite(re + im))
    this.low = this.samples[0]?.omega ?? 0
    this.high = this.samples.at(-1)?.omega ?? 0
  }

  /** The upper end belongs to the next panel, so that no frequency comes twice. */
  private sampled(panel: Panel, last: boolean): Sample[] {
    return Array.from({ length: last ? SAMPLES + 1 : SAMPLES }, (_, k) => {
      const omega = panel.low + ((panel.high - panel.low) * k) / SAMPLES
      dynamicStiffness(panel, omega, this.z)
      return { omega, panel, re: this.z[0] ?? 0, im: this.z[1] ?? 0 }
    })
  }

  /** Highest level at the samples: quick, for choosing starting points. */
  coarse([logA, logBeta]: Pair): number {
    const [a, beta] = [Math.exp(logA), Math.exp(logBeta)]
    let most = -Infinity
    for (const { omega, re, im } of this.samples) {
      most = Math.max(most, coupledValue(re, im, omega, this.mass, a, beta))
    }
    return most
  }

  /** Every local maximum within the band and every end at which the curve still rises outwards. */
  pieces([logA, logBeta]: Pair): readonly Piece[] | null {
    const [a, beta] = [Math.exp(logA), Math.exp(logBeta)]
    const found: Piece[] = []
    for (const { omega, panel, end } of this.maxima(a, beta)) {
      const jet = this.jet(panel, omega, a, beta)
      const moves = end ? 0 : 1 / jet.ww
      const aa = jet.aa - jet.wa * jet.wa * moves
      const ab = jet.ab - jet.wa * jet.wb * moves
      const bb = jet.bb - jet.wb * jet.wb * moves
      if (!Number.isFinite(jet.value + aa + ab + bb)) return null
      found.push({
        value: jet.value,
        gradient: [a * jet.a, beta * jet.b],
        hessian: [a * a * aa + a * jet.a, a * beta * ab, beta * beta * bb + beta * jet.b],
      })
    }
    return found
  }

  /** omega of the highest point [rad/s]. */
  worst([logA, logBeta]: Pair): number {
    const [a, beta] = [Math.exp(logA), Math.exp(logBeta)]
    let at = this.low
    let most = -Infinity
    for (const { omega, panel } of this.maxima(a, beta)) {
      const { value } = this.jet(panel, omega, a, beta)
      if (value > most) [most, at] = [value, omega]
    }
    return at
  }

  worstWithout(): number | null {
    const mass = 0
    let most = 0
    for (const { omega, panel } of this.maxima(1, 1, mass)) {
      const { value } = this.jet(panel, omega, 1, 1, mass)
      most = Math.max(most, Math.exp(value / 2))
    }
    const levels = this.samples.map(({ re, im }) => 1 / Math.hypot(re, im)).sort((one, other) => one - other)
    const usual = levels[levels.length >> 1] ?? 0
    return most > 0 && most < UNBOUNDED * usual ? most : null
  }

  /** Resonances of the bare structure, with the mass ratio that the absorber would have there. */
  resonances(): { readonly omega: number; readonly massRatio: number }[] {
    return this.maxima(1, 1, 0)
      .filter(({ end }) => !end)
      .map(({ omega, panel }) => {
        dynamicStiffness(panel, omega, this.z)
        const hostMass = -(this.z[2] ?? 0) / (2 * omega)
        return { omega, massRatio: this.mass / hostMass }
      })
      .filter(({ massRatio }) => massRatio > 0 && Number.isFinite(massRatio))
  }

  private jet(panel: Panel, omega: number, a: number, beta: number, mass = this.mass) {
    dynamicStiffness(panel, omega, this.z)
    return coupledJet(this.z, omega, mass, a, beta)
  }

  private maxima(a: number, beta: number, mass = this.mass): { omega: number; panel: Panel; end: boolean }[] {
    const points = this.scanPoints(a, beta)
    const found: { omega: number; panel: Panel; end: boolean }[] = []
    const levels = points.map(({ omega, re, im }) => coupledValue(re, im, omega, mass, a, beta))
    points.forEach((point, k) => {
      const level = levels[k] ?? 0
      const [before, after] = [points[k - 1], points[k + 1]]
      if ((levels[k - 1] ?? -Infinity) > level || (levels[k + 1] ?? -Infinity) >= level) return
      const left = before ?? point
      const right = after ?? point
      const refined = this.refine(left, point, right, a, beta, mass)
      found.push(refined)
    })
    return found
  }

  /** The samples, with more points about the absorber's own frequency, where it may be sharp. */
  private scanPoints(a: number, beta: number): readonly Sample[] {
    const own = Math.sqrt(a)
    const width = beta / 2
    const extra: Sample[] = []
    for (let k = -8; k <= 8; k++) {
      const omega = own + width * k * 0.4
      if (omega <= this.low || omega >= this.high) continue
      const panel = this.panelAt(omega)
      dynamicStiffness(panel, omega, this.z)
      extra.push({ omega, panel, re: this.z[0] ?? 0, im: this.z[1] ?? 0 })
    }
    return merged(this.samples, extra)
  }

  private panelAt(omega: number): Panel {
    const { samples } = this
    let [from, to] = [0, samples.length - 1]
    while (to - from > 1) {
      const middle = (from + to) >> 1
      if ((samples[middle]?.omega ?? 0) <= omega) from = middle
      else to = middle
    }
    const sample = samples[from]
    if (!sample) throw new Error('a band without samples has no panel')
    return sample.panel
  }

  /** Newton's method on the slope, kept between the neighbours of a sampled maximum. */
  private refine(left: Sample, point: Sample, right: Sample, a: number, beta: number, mass: number) {
    let [low, high] = [left.omega, right.omega]
    let omega = point.omega
    for (let iteration = 0; iteration < 60; iteration++) {
      const panel = this.panelAt(omega)
      const jet = this.jet(panel, omega, a, beta, mass)
      if (omega === this.low && jet.w <= 0) return { omega, panel, end: true }
      if (omega === this.high && jet.w >= 0) return { omega, panel, end: true }
      if (jet.w > 0) low = omega
      else high = omega
      let next = jet.ww < 0 ? omega - jet.w / jet.ww : NaN
      if (!(next > low && next < high)) next = (low + high) / 2
      if (Math.abs(next - omega) <= 1e-13 * omega) break
      omega = next
    }
    return { omega, panel: this.panelAt(omega), end: false }
  }
}

function merged(one: readonly Sample[], other: readonly Sample[]): readonly Sample[] {
  if (other.length === 0) return one
  return [...one, ...other].sort((a, b) => a.omega - b.omega)
}

/**
 * Starting values, best first: Den Hartog's tuning for each resonance of the structure in the band (its
 * mass read from the slope of the dynamic stiffness, -2 m omega), then a coarse net over the band.
 */
function startingPoints(curve: BandCurve, band: readonly [number, number]): Pair[] {
  const starts: { p: Pair; level: number }[] = []
  const consider = (omega: number, zeta: number) => {
    const p: Pair = [2 * Math.log(omega), Math.log(2 * zeta * omega)]
    starts.push({ p, level: curve.coarse(p) })
  }
  for (const { omega, massRatio } of curve.resonances()) {
    consider(omega / (1 + massRatio), Math.sqrt((3 * massRatio) / (8 * (1 + massRatio))))
  }
  const [low, high] = [2 * Math.PI * band[0], 2 * Math.PI * band[1]]
  for (let k = 0; k <= 10; k++) {
    const omega = low * 0.8 * (high / low / 0.7) ** (k / 10)
    for (const zeta of [0.03, 0.12, 0.35]) consider(omega, zeta)
  }
  return starts
    .sort((one, other) => one.level - other.level)
    .slice(0, 3)
    .map(({ p }) => p)
}
