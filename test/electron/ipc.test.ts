import { EventEmitter } from 'node:events'
import { beforeEach, describe, expect, it, vi } from 'vitest'
import type { Dispatch } from '../../electron/api/dispatch.ts'
import { CALL_CHANNEL, CLOSING_CHANNEL } from '../../electron/channels.ts'

// Layer: main's end of the channels, with an emitter in place of Electron's; no runtime.
const ipcMain = Object.assign(new EventEmitter(), {
  answer: (async () => {}) as (...args: unknown[]) => Promise<unknown>,
  handle(channel: string, handler: typeof ipcMain.answer) {
    if (channel === CALL_CHANNEL) ipcMain.answer = handler
  },
})
vi.mock('electron', () => ({ ipcMain }))
const { answerCalls, askBeforeClosing } = await import('../../electron/ipc.ts')

const contents = { send: vi.fn() } as unknown as Electron.WebContents // all that is used of it
const frame = { url: 'stillbed://app/index.html', parent: null }
const trusted = { sender: contents, senderFrame: frame }
const hostile = { sender: contents, senderFrame: { ...frame, url: 'https://example.org/' } }

describe('answerCalls', () => {
  const dispatch = vi.fn(async () => ({ ok: true, value: 'answered' }))
  beforeEach(() => {
    dispatch.mockClear()
    answerCalls(dispatch as unknown as Dispatch, () => contents)
  })

  it('passes a call of our pages on', async () => {
    expect(await ipcMain.answer(trusted, 'shelf:list', { query: 'a' })).toEqual({
      ok: true,
      value: 'answered',
    })
    expect(dispatch).toHaveBeenCalledWith('shelf:list', { query: 'a' })
  })

  it('answers a stranger with a refusal and runs nothing', async () => {
    expect(await ipcMain.answer(hostile, 'shelf:list', {})).toMatchObject({ ok: false })
    expect(dispatch).not.toHaveBeenCalled()
  })

  it.each(['shelf:steal', 'constructor', 7, null])('refuses the endpoint %j', async (endpoint) => {
    expect(await ipcMain.answer(trusted, endpoint, {})).toMatchObject({
      ok: false,
      error: { code: 'not-found' },
    })
    expect(dispatch).not.toHaveBeenCalled()
  })
})

describe('askBeforeClosing', () => {
  const saved = { saved: false, message: 'full', fileName: 'a.json', text: '{}' }

  it('takes the answer of our pages', async () => {
    const asked = askBeforeClosing(contents, 1000)
    ipcMain.emit(CLOSING_CHANNEL, trusted, saved)
    expect(await asked).toEqual(saved)
  })

  it("does not take a stranger's word that all is saved", async () => {
    const asked = askBeforeClosing(contents, 20)
    ipcMain.emit(CLOSING_CHANNEL, hostile, { saved: true })
    expect(await asked).toBeNull()
  })

  it.each([null, 'saved', {}, { saved: 'yes' }, { saved: false, message: 1 }])(
    'takes %j for no answer',
    async (answer) => {
      const asked = askBeforeClosing(contents, 1000)
      ipcMain.emit(CLOSING_CHANNEL, trusted, answer)
      expect(await asked).toBeNull()
    },
  )

  it('stops listening when the time is over', async () => {
    expect(await askBeforeClosing(contents, 5)).toBeNull()
    expect(ipcMain.listenerCount(CLOSING_CHANNEL)).toBe(0)
  })
})
