import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import {
  BLOCK,
  blockMatrix,
  entryAt,
  factorBlock,
  factorDiagonal,
  isUnbounded,
  solveBlock,
  solveDiagonal,
} from '../../../core/numerics/block-symmetric.ts'

const entry = fc.double({ min: -1, max: 1, noNaN: true })

describe('factorBlock and solveBlock', () => {
  it('solve A x = b for every frequency of a block, the imaginary part of A positive definite', () => {
    const sizes = fc.integer({ min: 1, max: 8 })
    fc.assert(
      fc.property(sizes, fc.integer({ min: 1, max: BLOCK }), fc.infiniteStream(entry), (n, count, stream) => {
        const next = () => stream.next().value as number // the stream never ends
        const block = blockMatrix(n)
        const kept: { re: number[][]; im: number[][] }[] = []
        for (let f = 0; f < count; f++) {
          const re = Array.from({ length: n }, () => new Array<number>(n).fill(0))
          const root = Array.from({ length: n }, () => Array.from({ length: n }, next))
          const im = root.map((row, i) =>
            root.map((other, j) =>
              row.reduce((sum, value, k) => sum + value * (other[k] ?? 0), i === j ? 0.2 : 0),
            ),
          )
          for (let i = 0; i < n; i++) {
            for (let j = 0; j <= i; j++) {
              const value = next()
              const [row, column] = [re[i] ?? [], re[j] ?? []]
              row[j] = value
              column[i] = value
              block.matrix.re[entryAt(i, j) + f] = value
              block.matrix.im[entryAt(i, j) + f] = im[i]?.[j] ?? 0
            }
          }
          kept.push({ re, im })
        }
        const x = { re: new Float64Array(n * BLOCK), im: new Float64Array(n * BLOCK) }
        const right = { re: x.re.map(next), im: x.im.map(next) }
        x.re.set(right.re)
        x.im.set(right.im)
        factorBlock(block, count)
        solveBlock(block, count, x)
        kept.forEach(({ re, im }, f) => {
          for (let i = 0; i < n; i++) {
            let [real, imaginary] = [0, 0]
            for (let j = 0; j < n; j++) {
              const [a, b] = [re[i]?.[j] ?? 0, im[i]?.[j] ?? 0]
              const [c, d] = [x.re[j * BLOCK + f] ?? 0, x.im[j * BLOCK + f] ?? 0]
              real += a * c - b * d
              imaginary += a * d + b * c
            }
            // smallest eigenvalue 0.2 of the imaginary part bounds the growth of rounding
            expect(Math.abs(real - (right.re[i * BLOCK + f] ?? 0))).toBeLessThan(1e-10)
            expect(Math.abs(imaginary - (right.im[i * BLOCK + f] ?? 0))).toBeLessThan(1e-10)
          }
        })
      }),
      { numRuns: 30 },
    )
  })

  it('keep a driven resonance without damping apart from a silent one', () => {
    const block = blockMatrix(2)
    block.matrix.re[entryAt(0, 0)] = 0
    block.matrix.re[entryAt(1, 1)] = 4
    const x = { re: new Float64Array(2 * BLOCK), im: new Float64Array(2 * BLOCK) }
    x.re[BLOCK] = 8
    factorDiagonal(block, 1)
    solveDiagonal(block, 1, x)
    expect([x.re[0], x.re[BLOCK]]).toEqual([0, 2])
    x.re[0] = 1e-9
    solveDiagonal(block, 1, x)
    expect(isUnbounded(x.re[0] ?? 0)).toBe(true)
  })
})
