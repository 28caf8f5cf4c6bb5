export interface LaunchOptions {
  readonly host: 'any' | 'browser' | 'desktop'
  readonly library: string
  readonly port: number
  readonly open: boolean
  readonly help: boolean
}
export interface Facts {
  readonly wanted: LaunchOptions['host']
  readonly noWindow: string | null
  /** path of Electron's executable, or null */
  readonly runtime: string | null
}
export type Decision =
  | { readonly host: 'desktop'; readonly runtime: string; readonly reason: '' }
  | { readonly host: 'browser' | 'none'; readonly reason: string }

export const USAGE: string
export function parseLaunchArguments(args: readonly string[]): LaunchOptions
export function nodeIsRecentEnough(version: string): boolean
export function whyNoWindow(machine: {
  platform: string
  env: Readonly<Record<string, string | undefined>>
  uid: number | null
}): string | null
export function decideHost(facts: Facts): Decision
