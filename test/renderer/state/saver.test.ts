import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import { blankProject } from '../../../core/project/create.ts'
import type { Project } from '../../../core/project/project.ts'
import type { ApiError, Reply } from '../../../electron/api/contract.ts'
import { Saver, type SaveState } from '../../../renderer/state/saver.ts'

type SaveReply = Reply<{ revision: number }>

function named(name: string): Project {
  return blankProject(name)
}

/** A library that answers when it is told to, so that saves can overlap with changes. */
function library() {
  const saved: { name: string; revision: number }[] = []
  const states: SaveState[] = []
  const waiting: ((reply: SaveReply) => void)[] = []
  const saver = new Saver('id', 7, {
    wait: 100,
    longest: 250,
    retry: 1000,
    save: (_id, revision, project) => {
      saved.push({ name: project.job.name, revision })
      return new Promise((resolve) => waiting.push(resolve))
    },
    onState: (state) => states.push(state),
  })
  async function answer(reply: SaveReply): Promise<void> {
    waiting.shift()?.(reply)
    await vi.advanceTimersByTimeAsync(0)
  }
  return { saver, saved, states, answer }
}

const refusal = (code: ApiError['code']): SaveReply => ({ ok: false, error: { code, message: 'no' } })

describe('saver', () => {
  beforeEach(() => {
    vi.useFakeTimers()
  })
  afterEach(() => {
    vi.useRealTimers()
  })

  it('saves the newest state once, a little after the last change', async () => {
    const { saver, saved, states, answer } = library()
    saver.push(named('a'))
    await vi.advanceTimersByTimeAsync(50)
    saver.push(named('b'))
    await vi.advanceTimersByTimeAsync(99)
    expect(saved).toEqual([])
    await vi.advanceTimersByTimeAsync(1)
    expect(saved).toEqual([{ name: 'b', revision: 7 }])
    expect(states.at(-1)).toBe('saving')
    await answer({ ok: true, value: { revision: 8 } })
    expect(states.at(-1)).toBe('saved')
  })

  it('does not wait longer than its limit while changes go on', async () => {
    const { saver, saved } = library()
    for (let time = 0; time < 300; time += 50) {
      saver.push(named(String(time)))
      await vi.advanceTimersByTimeAsync(50)
    }
    expect(saved).toEqual([{ name: '200', revision: 7 }])
  })

  it('saves again with the new revision what changed during a save', async () => {
    const { saver, saved, answer } = library()
    saver.push(named('a'))
    await vi.advanceTimersByTimeAsync(100)
    saver.push(named('b'))
    await vi.advanceTimersByTimeAsync(500)
    expect(saved).toHaveLength(1)
    await answer({ ok: true, value: { revision: 8 } })
    await vi.advanceTimersByTimeAsync(0)
    expect(saved.at(-1)).toEqual({ name: 'b', revision: 8 })
  })

  it('keeps a state that could not be saved and tries again', async () => {
    const { saver, saved, states, answer } = library()
    saver.push(named('a'))
    await vi.advanceTimersByTimeAsync(100)
    await answer(refusal('storage'))
    expect(states.at(-1)).toEqual({ code: 'storage', message: 'no' })
    expect(saver.hasUnsaved).toBe(true)
    await vi.advanceTimersByTimeAsync(1000)
    expect(saved).toHaveLength(2)
    await answer({ ok: true, value: { revision: 8 } })
    expect(states.at(-1)).toBe('saved')
    expect(saver.hasUnsaved).toBe(false)
  })

  it('stops at a stale state and leaves the decision to a person', async () => {
    const { saver, saved, answer } = library()
    saver.push(named('a'))
    await vi.advanceTimersByTimeAsync(100)
    await answer(refusal('stale'))
    saver.push(named('b'))
    await vi.advanceTimersByTimeAsync(10_000)
    expect(saved).toHaveLength(1)
    expect(saver.hasUnsaved).toBe(true)
    expect(await saver.flush()).toBe(false)
  })

  it('flushes at once what is pending, after the save that runs', async () => {
    const { saver, saved, answer } = library()
    saver.push(named('a'))
    await vi.advanceTimersByTimeAsync(100)
    saver.push(named('b'))
    const flushed = saver.flush()
    await answer({ ok: true, value: { revision: 8 } })
    await vi.advanceTimersByTimeAsync(0)
    await answer({ ok: true, value: { revision: 9 } })
    expect(await flushed).toBe(true)
    expect(saved.map((save) => save.name)).toEqual(['a', 'b'])
  })
})
