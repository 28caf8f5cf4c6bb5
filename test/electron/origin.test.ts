import { describe, expect, it } from 'vitest'
import { isExternalLink, isOwnAddress, isOwnRequest, isTrustedSender } from '../../electron/origin.ts'

describe('our own address', () => {
  it.each(['stillbed://app/', 'stillbed://app/index.html#/shelf', 'stillbed://app/assets/a.js?x=1'])(
    '%s',
    (url) => {
      expect(isOwnAddress(url)).toBe(true)
    },
  )

  it.each([
    'stillbed://other/',
    'stillbed://app.example.org/',
    'https://app/',
    'file:///app',
    'data:text/html,x',
    'javascript:alert(1)',
    'not an address',
    '',
  ])('is not %j', (url) => {
    expect(isOwnAddress(url)).toBe(false)
  })
})

describe('what pages may load', () => {
  it.each(['stillbed://app/a.js', 'data:image/png;base64,AA', 'blob:stillbed://app/0-1'])('%s', (url) => {
    expect(isOwnRequest(url)).toBe(true)
  })

  it.each([
    'https://example.org/a.js',
    'http://127.0.0.1/',
    'ws://127.0.0.1/',
    'file:///etc/passwd',
    'blob:https://example.org/1',
  ])('not %s', (url) => {
    expect(isOwnRequest(url)).toBe(false)
  })
})

describe('what opens outside', () => {
  it.each([
    ['https://doi.org/10.1000/1', true],
    ['https://www.iso.org/standard/1.html', true],
    ['http://doi.org/10.1000/1', false],
    ['https://doi.org.example.org/', false],
    ['https://doi.org:8443/', false],
    ['https://example.org/', false],
    ['file:///etc/passwd', false],
    ['', false],
  ])('%s: %s', (url, opens) => {
    expect(isExternalLink(url)).toBe(opens)
  })
})

// The runtimes reach only the first case; the others are a hostile frame's.
describe('isTrustedSender', () => {
  const ours = { id: 1 }
  const frame = { url: 'stillbed://app/index.html', parent: null }

  it('listens to the main frame of our window at our own pages', () => {
    expect(isTrustedSender({ sender: ours, senderFrame: frame }, ours)).toBe(true)
  })

  it.each([
    ['a frame that has gone', { sender: ours, senderFrame: null }],
    ['a frame within a page', { sender: ours, senderFrame: { ...frame, parent: {} } }],
    ['another site in our window', { sender: ours, senderFrame: { ...frame, url: 'https://example.org/' } }],
    ['another window', { sender: { id: 2 }, senderFrame: frame }],
  ])('refuses %s', (_who, event) => {
    expect(isTrustedSender(event, ours)).toBe(false)
  })

  it('refuses everyone while there is no window', () => {
    expect(isTrustedSender({ sender: null, senderFrame: frame }, null)).toBe(false)
  })
})
