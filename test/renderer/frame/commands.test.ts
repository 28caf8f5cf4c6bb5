import { describe, expect, it } from 'vitest'
import { allCommands, findCommands } from '../../../renderer/frame/commands.ts'

describe('search anywhere', () => {
  const commands = allCommands([
    { label: 'Show US units', kind: 'action', also: 'customary', run: () => undefined },
  ])
  const labels = (query: string) => findCommands(commands, query).map((command) => command.label)

  it('finds pages, fields and things to do by the beginnings of words', () => {
    expect(labels('mou')[0]).toBe('Mounts')
    expect(labels('run sp')).toEqual(['Running speed'])
    expect(labels('customary')).toEqual(['Show US units'])
    expect(labels('weight')).toContain('Mass')
    expect(labels('unbalance')).toEqual(['What shakes it'])
  })

  it('finds nothing rather than something else', () => {
    expect(labels('zzz')).toEqual([])
    expect(labels('ass')).toEqual([])
  })

  it('shows everything while nothing is asked for', () => {
    expect(labels('  ')).toHaveLength(commands.length)
  })
})
