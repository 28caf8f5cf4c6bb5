import { app, protocol, shell, type Session, type WebContents } from 'electron'
import { PAGE_HEADERS, readPage } from './pages.ts'
import { SCHEME, isExternalLink, isOwnAddress, isOwnRequest } from './origin.ts'

/** Before the app is ready, exactly once: makes `stillbed:` a scheme with an origin of its own. */
export function registerPageScheme(): void {
  protocol.registerSchemesAsPrivileged([
    { scheme: SCHEME, privileges: { standard: true, secure: true, supportFetchAPI: true, codeCache: true } },
  ])
}

/** Serves the built pages, and nothing else, at `stillbed://app/`. */
export function servePages(folder: string): void {
  protocol.handle(SCHEME, async (request) => {
    const refused = (status: number) => new Response(null, { status, headers: { ...PAGE_HEADERS } })
    if (!isOwnAddress(request.url) || request.method !== 'GET') return refused(403)
    const page = await readPage(folder, new URL(request.url).pathname)
    if (!page) return refused(404)
    return new Response(page.body, { headers: { ...PAGE_HEADERS, 'content-type': page.type } })
  })
}

/** No device, no notification, no remote content: the pages need nothing but their own files. */
export function lockSession(session: Session): void {
  session.setPermissionRequestHandler((_contents, _permission, answer) => answer(false))
  session.setPermissionCheckHandler(() => false)
  session.setDevicePermissionHandler(() => false)
  session.webRequest.onBeforeRequest((details, answer) => answer({ cancel: !isOwnRequest(details.url) }))
}

/** Keeps every window at our own pages; links to published sources open in the browser. */
export function lockNavigation(): void {
  app.on('web-contents-created', (_event, contents: WebContents) => {
    const stay = (event: { preventDefault: () => void; url: string }) => {
      if (!isOwnAddress(event.url)) event.preventDefault()
    }
    contents.on('will-navigate', stay)
    contents.on('will-redirect', stay)
    contents.on('will-attach-webview', (event) => event.preventDefault())
    contents.setWindowOpenHandler(({ url }) => {
      if (isExternalLink(url)) void shell.openExternal(url)
      return { action: 'deny' }
    })
  })
}
