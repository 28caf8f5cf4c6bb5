/* eslint-disable @typescript-eslint/no-non-null-assertion -- indices run within series of one degree */
/**
 * Power series in x over one panel of what drives the states of one order, w = order · speed: force per
 * unit of the constant law exp(i order rest), of the squared law, times w², and of the inertial law,
 * times w² - i w'.
 */
export interface ForceSeries {
  /** [rad/s], filled by the caller, and its square */
  readonly speed: Float64Array
  readonly speedSquared: Float64Array
  readonly baseRe: Float64Array
  readonly baseIm: Float64Array
  readonly squareRe: Float64Array
  readonly squareIm: Float64Array
  readonly massRe: Float64Array
  readonly massIm: Float64Array
  /** order · rest at the panel's begin and end [rad] */
  readonly phase: Float64Array
  /** size of the last terms against the first: what has been cut */
  readonly cut: Float64Array
}

export function emptyForceSeries(degree: number): ForceSeries {
  const make = () => new Float64Array(degree + 1)
  return {
    speed: make(),
    speedSquared: make(),
    baseRe: make(),
    baseIm: make(),
    squareRe: make(),
    squareIm: make(),
    massRe: make(),
    massIm: make(),
    phase: new Float64Array(2),
    cut: new Float64Array(1),
  }
}

/** Fills the series from that of the speed. @param order of the force @param half the panel's half length [s] */
export function fillForceSeries(series: ForceSeries, order: number, half: number): void {
  const { speed, speedSquared, phase, cut } = series
  const { baseRe, baseIm, squareRe, squareIm, massRe, massIm } = series
  const degree = speed.length - 1
  let begin = 0
  let end = 0
  let top = 1
  for (let k = 1; k < degree; k++) {
    // rest' = half (speed - speed at the middle)
    const term = (order * half * speed[k]!) / (k + 1)
    if (term !== 0) top = k
    end += term
    begin += k % 2 === 0 ? -term : term
  }
  phase[0] = begin
  phase[1] = end
  baseRe[0] = 1
  baseIm[0] = 0
  for (let k = 1; k <= degree; k++) {
    let re = 0
    let im = 0
    // k E_k = i sum (m rest_m) E_(k-m), with m rest_m = order half speed_(m-1)
    for (let m = 2; m <= Math.min(k, top + 1); m++) {
      const slope = order * half * speed[m - 1]!
      re -= slope * baseIm[k - m]!
      im += slope * baseRe[k - m]!
    }
    baseRe[k] = re / k
    baseIm[k] = im / k
  }
  for (let m = 0; m <= degree; m++) speedSquared[m] = m <= 2 * top ? coefficientOfSquare(speed, m) : 0
  for (let k = 0; k <= degree; k++) {
    let re = 0
    let im = 0
    let massR = 0
    let massI = 0
    for (let m = 0; m <= Math.min(k, 2 * top); m++) {
      const square = order * order * speedSquared[m]!
      re += square * baseRe[k - m]!
      im += square * baseIm[k - m]!
      if (m < top) {
        const rate = (order * (m + 1) * speed[m + 1]!) / half
        massR += rate * baseIm[k - m]!
        massI -= rate * baseRe[k - m]!
      }
    }
    squareRe[k] = re
    squareIm[k] = im
    massRe[k] = re + massR
    massIm[k] = im + massI
  }
  const last =
    Math.hypot(baseRe[degree]!, baseIm[degree]!) + Math.hypot(baseRe[degree - 1]!, baseIm[degree - 1]!)
  cut[0] = last
}

/** Coefficient m of the square of a series. */
function coefficientOfSquare(series: Float64Array, m: number): number {
  let sum = 0
  for (let i = 0; i <= m; i++) sum += series[i]! * series[m - i]!
  return sum
}
