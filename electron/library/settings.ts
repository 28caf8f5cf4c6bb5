import type { Database } from 'better-sqlite3'
import { settingsSchema, type Settings } from '../api/contract.ts'

const DEFAULTS: Settings = { sheet: 'system', units: 'SI' }

/** Settings by name, each a JSON value. One that cannot be read counts as not set. */
export function createSettingsRepository(db: Database) {
  const select = db.prepare<[string], { value: string }>('SELECT value FROM setting WHERE name = ?')
  const upsert = db.prepare<[string, string]>(
    'INSERT INTO setting (name, value) VALUES (?, ?) ON CONFLICT (name) DO UPDATE SET value = excluded.value',
  )
  const read = (name: string): unknown => {
    try {
      return JSON.parse(select.get(name)?.value ?? 'null')
    } catch {
      return null
    }
  }
  return {
    get(): Settings {
      const stored = read('interface')
      const known = typeof stored === 'object' && stored !== null ? stored : {}
      const parsed = settingsSchema.safeParse({ ...DEFAULTS, ...known })
      return parsed.success ? parsed.data : DEFAULTS
    },
    set(settings: Settings): Settings {
      upsert.run('interface', JSON.stringify(settings))
      return settings
    },
    /** A value that the shell keeps for itself, such as the window's place; null when not set. */
    read,
    write(name: string, value: unknown): void {
      upsert.run(name, JSON.stringify(value))
    },
  }
}

export type SettingsRepository = ReturnType<typeof createSettingsRepository>
