import { describe, expect, it } from 'vitest'
import { blankProject } from '../../../core/project/create.ts'
import { readProject } from '../../../core/project/read.ts'
import { canonicalJson, inputChecksum } from '../../../core/report/checksum.ts'

describe('canonical JSON', () => {
  // SOURCE  RFC 8785, sec. 3.2.2 and 3.2.3: the input and output of its two examples.
  it('writes the example of primitive values', () => {
    const example = {
      numbers: [Number('333333333.33333329'), 1e30, 4.5, 2e-3, 0.000000000000000000000000001],
      string: '\u20ac$\u000f\nA\'B"\\\\"/',
      literals: [null, true, false],
    }
    expect(canonicalJson(example)).toBe(
      String.raw`{"literals":[null,true,false],"numbers":[333333333.3333333,1e+30,4.5,0.002,1e-27],"string":"€$\u000f\nA'B\"\\\\\"/"}`,
    )
  })

  it('sorts the example of property names by UTF-16 code units', () => {
    const example = {
      '\u20ac': 'Euro Sign',
      '\r': 'Carriage Return',
      '\ufb33': 'Hebrew Letter Dalet With Dagesh',
      '1': 'One',
      '\ud83d\ude00': 'Emoji: Grinning Face',
      '\u0080': 'Control',
      '\u00f6': 'Latin Small Letter O With Diaeresis',
    }
    expect([...canonicalJson(example).matchAll(/"([^"]*)"[,}]/g)].map((match) => match[1])).toEqual([
      'Carriage Return',
      'One',
      'Control',
      'Latin Small Letter O With Diaeresis',
      'Euro Sign',
      'Emoji: Grinning Face',
      'Hebrew Letter Dalet With Dagesh',
    ])
  })

  it('refuses what JSON cannot hold', () => {
    expect(() => canonicalJson({ mass: NaN })).toThrow()
    expect(() => canonicalJson([() => 1])).toThrow()
  })
})

describe('checksum of the inputs', () => {
  // SOURCE  SHA-256 of the two bytes "{}", computed apart with the OpenSSL command line.
  it('is the SHA-256 of the canonical text', () => {
    expect(inputChecksum({})).toBe('44136fa355b3678a1146ad16f7e8649e94fb4fc21fe77e8310c060f61caaff8a')
  })

  it('does not depend on the order in which a file names its keys', () => {
    const project = blankProject('Fan')
    const turned = readProject(Object.fromEntries(Object.entries(project).reverse()))
    expect(inputChecksum(turned)).toBe(inputChecksum(project))
  })

  it('changes with any input', () => {
    const project = blankProject('Fan')
    const other = { ...project, analysis: { ...project.analysis, gravity: 9.80666 } }
    expect(inputChecksum(other)).not.toBe(inputChecksum(project))
  })
})
