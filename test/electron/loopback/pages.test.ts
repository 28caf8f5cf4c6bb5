import type { Browser, Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { launchBrowser } from '../../setup/browser.ts'
import { startLoopback, type LoopbackRun } from '../../setup/loopback.ts'
import { request } from './request.ts'

// Layer: the loopback host, and a real browser on its pages.
let host: LoopbackRun
let browser: Browser
beforeAll(async () => {
  host = await startLoopback()
  browser = await launchBrowser()
}, 90_000)
afterAll(async () => {
  await browser.close()
  await host.remove()
})

describe('pages over HTTP', () => {
  it('come with the policy and without a cache, referrer or guessing of types', async () => {
    const { status, headers } = await request(host, { path: '/' })
    expect(status).toBe(200)
    expect(headers).toMatchObject({
      'content-type': 'text/html; charset=utf-8',
      'referrer-policy': 'no-referrer',
      'x-content-type-options': 'nosniff',
      'cross-origin-opener-policy': 'same-origin',
      'cross-origin-resource-policy': 'same-origin',
    })
    expect(headers['content-security-policy']).toMatch(/^default-src 'none'; script-src 'self';/)
    expect(headers['content-security-policy']).not.toMatch(/unsafe-eval|script-src[^;]*unsafe-inline/)
  })

  it.each([
    '/../package.json',
    '/../../package.json',
    '/%2e%2e/%2e%2e/package.json',
    '/..%2f..%2fpackage.json',
    '/assets/..%5c..%5c..%5cpackage.json',
    '/assets/../../shell/main.js',
    '//etc/passwd',
    '/%00',
    '/%E0%A4%A',
    '/assets',
    '/no-such-page.html',
  ])('404 for %s', async (path) => {
    const { status, body } = await request(host, { path })
    expect(status).toBe(404)
    expect(body).not.toContain('better-sqlite3')
  })

  it('are refused under another host name', async () => {
    expect((await request(host, { path: '/', headers: { host: 'rebound.example.org' } })).status).toBe(403)
  })

  it('are only read', async () => {
    expect((await request(host, { method: 'POST', path: '/', body: 'x=1' })).status).toBe(405)
    expect(await request(host, { method: 'HEAD', path: '/' })).toMatchObject({ status: 200, body: '' })
  })
})

describe('in a browser', () => {
  async function open(): Promise<{ page: Page; violations: string[] }> {
    const page = await browser.newPage()
    const violations: string[] = []
    page.on('console', (message) => {
      if (/Content Security Policy/i.test(message.text())) violations.push(message.text())
    })
    page.on('pageerror', (error) => violations.push(error.message))
    await page.goto(host.address)
    await page.getByText('Kiln exhaust fan').first().waitFor()
    return { page, violations }
  }

  it('the Shelf shows, within the policy, and the token leaves the address', async () => {
    const { page, violations } = await open()
    expect(violations).toEqual([])
    expect(page.url()).not.toContain(host.token)
    await page.close()
  })

  it('a reload needs no token', async () => {
    const { page } = await open()
    await page.reload()
    await page.getByText('Kiln exhaust fan').first().waitFor()
    await page.close()
  })

  it('inline scripts, inline handlers, eval and other sites are refused', async () => {
    const { page } = await open()
    const ran = await page.evaluate(async () => {
      const done: string[] = []
      Object.assign(window, { done })
      const script = document.createElement('script')
      script.textContent = "window.done.push('inline script')"
      document.body.append(script)
      const button = document.createElement('button')
      button.setAttribute('onclick', "window.done.push('inline handler')")
      document.body.append(button)
      button.click()
      const remote = await fetch('https://example.org/').then(
        () => 'remote fetch',
        () => null,
      )
      if (remote) done.push(remote)
      return done
    })
    expect(ran).toEqual([])
    await page.close()
  })

  it('nothing works without the token', async () => {
    const page = await browser.newPage()
    await page.goto(host.origin)
    await page.waitForTimeout(300)
    expect(await page.getByText('Kiln exhaust fan').count()).toBe(0)
    await page.close()
  })
})
