/* eslint-disable @typescript-eslint/no-non-null-assertion -- indices run within arrays of the caller's length by construction */
/** Complex curves in one array each, part k of a block beginning at its own offset. */
export interface ComplexParts {
  readonly re: Float64Array
  readonly im: Float64Array
}

/**
 * target[at + f] = sum over k of factors[k] · source[indices[k] step + f] for f < count. Three terms are
 * taken in one pass, so that memory is touched a third as often.
 */
export function combineParts(
  source: ComplexParts,
  indices: Int32Array,
  step: number,
  factors: Float64Array,
  target: ComplexParts,
  at: number,
  count: number,
): void {
  const terms = indices.length
  if (terms === 0) {
    target.re.fill(0, at, at + count)
    target.im.fill(0, at, at + count)
    return
  }
  for (let k = 0; k < terms; k += 3) {
    const second = k + 1 < terms ? k + 1 : k
    const third = k + 2 < terms ? k + 2 : k
    combineThree(
      source,
      indices[k]! * step,
      indices[second]! * step,
      indices[third]! * step,
      factors[k]!,
      second === k ? 0 : factors[second]!,
      third === k ? 0 : factors[third]!,
      target,
      at,
      count,
      k > 0,
    )
  }
}

function combineThree(
  { re: fromRe, im: fromIm }: ComplexParts,
  p: number,
  q: number,
  r: number,
  a: number,
  b: number,
  c: number,
  { re, im }: ComplexParts,
  at: number,
  count: number,
  accumulate: boolean,
): void {
  if (accumulate) {
    for (let f = 0; f < count; f++) {
      re[at + f]! += a * fromRe[p + f]! + b * fromRe[q + f]! + c * fromRe[r + f]!
      im[at + f]! += a * fromIm[p + f]! + b * fromIm[q + f]! + c * fromIm[r + f]!
    }
  } else {
    for (let f = 0; f < count; f++) {
      re[at + f] = a * fromRe[p + f]! + b * fromRe[q + f]! + c * fromRe[r + f]!
      im[at + f] = a * fromIm[p + f]! + b * fromIm[q + f]! + c * fromIm[r + f]!
    }
  }
}

/**
 * target[at + f] -= sum over k < terms of left[l + k leftStep + f] · right[r + k rightStep + f], complex.
 * Two terms are taken in one pass.
 */
export function subtractProducts(
  left: ComplexParts,
  l: number,
  leftStep: number,
  right: ComplexParts,
  r: number,
  rightStep: number,
  terms: number,
  target: ComplexParts,
  at: number,
  count: number,
): void {
  let k = 0
  for (; k + 1 < terms; k += 2) {
    subtractTwo(
      left,
      l + k * leftStep,
      l + (k + 1) * leftStep,
      right,
      r + k * rightStep,
      r + (k + 1) * rightStep,
      target,
      at,
      count,
    )
  }
  if (k < terms) subtractOne(left, l + k * leftStep, right, r + k * rightStep, target, at, count)
}

function subtractTwo(
  { re: leftRe, im: leftIm }: ComplexParts,
  l: number,
  l2: number,
  { re: rightRe, im: rightIm }: ComplexParts,
  r: number,
  r2: number,
  { re, im }: ComplexParts,
  at: number,
  count: number,
): void {
  for (let f = 0; f < count; f++) {
    const a = leftRe[l + f]!
    const b = leftIm[l + f]!
    const c = rightRe[r + f]!
    const d = rightIm[r + f]!
    const e = leftRe[l2 + f]!
    const g = leftIm[l2 + f]!
    const h = rightRe[r2 + f]!
    const i = rightIm[r2 + f]!
    re[at + f]! -= a * c - b * d + (e * h - g * i)
    im[at + f]! -= a * d + b * c + (e * i + g * h)
  }
}

function subtractOne(
  { re: leftRe, im: leftIm }: ComplexParts,
  l: number,
  { re: rightRe, im: rightIm }: ComplexParts,
  r: number,
  { re, im }: ComplexParts,
  at: number,
  count: number,
): void {
  for (let f = 0; f < count; f++) {
    const a = leftRe[l + f]!
    const b = leftIm[l + f]!
    const c = rightRe[r + f]!
    const d = rightIm[r + f]!
    re[at + f]! -= a * c - b * d
    im[at + f]! -= a * d + b * c
  }
}
