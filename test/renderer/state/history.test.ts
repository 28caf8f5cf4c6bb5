import { describe, expect, it } from 'vitest'
import { GESTURE_PAUSE, History, newGesture } from '../../../renderer/state/history.ts'

describe('history', () => {
  it('goes back and forward through every state, with the words of the change', () => {
    const history = new History<string>()
    history.record('first', 'a', '', 0)
    history.record('second', 'b', '', 1)
    expect(history.canUndo).toBe('second')
    expect(history.undo('c')).toBe('b')
    expect(history.canRedo).toBe('second')
    expect(history.undo('b')).toBe('a')
    expect(history.undo('a')).toBeNull()
    expect(history.redo('a')).toBe('b')
    expect(history.redo('b')).toBe('c')
    expect(history.redo('c')).toBeNull()
  })

  it('takes changes of one gesture in quick succession as one step', () => {
    const history = new History<number>()
    history.record('type', 0, 'mass', 0)
    history.record('type', 1, 'mass', GESTURE_PAUSE)
    history.record('type', 2, 'mass', 2 * GESTURE_PAUSE)
    expect(history.undo(3)).toBe(0)
    expect(history.canUndo).toBeNull()
  })

  it('begins a new step after a pause, and for another gesture', () => {
    const history = new History<number>()
    history.record('type', 0, 'mass', 0)
    history.record('type', 1, 'mass', GESTURE_PAUSE + 1)
    history.record('type', 2, 'speed', GESTURE_PAUSE + 2)
    expect(history.undo(3)).toBe(2)
    expect(history.undo(2)).toBe(1)
    expect(history.undo(1)).toBe(0)
  })

  it('keeps one drag together however long it rests, and apart from the next drag', () => {
    const history = new History<number>()
    const [first, second] = [newGesture('mounts'), newGesture('mounts')]
    history.record('move', 0, first, 0)
    history.record('move', 1, first, 60_000)
    history.record('move', 2, second, 60_001)
    expect(history.undo(3)).toBe(2)
    expect(history.undo(2)).toBe(0)
  })

  it('does not join a change to a step that has been undone', () => {
    const history = new History<number>()
    history.record('type', 0, 'mass', 0)
    history.record('type', 1, '', 1)
    expect(history.undo(2)).toBe(1)
    history.record('type', 1, 'mass', 2)
    expect(history.canRedo).toBeNull()
    expect(history.undo(5)).toBe(1)
    expect(history.undo(1)).toBe(0)
  })
})
