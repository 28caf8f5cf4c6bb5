import { z } from 'zod'

// The pages' content security policy forbids compiling text; zod must not even try.
// Imported before every module that builds a schema.
z.config({ jitless: true })
