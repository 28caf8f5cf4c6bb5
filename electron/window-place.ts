import { z } from 'zod'

/** Where the window stood last, in the screen's own units. */
const placeSchema = z.object({
  x: z.number().int(),
  y: z.number().int(),
  width: z.number().int().min(640).max(20_000),
  height: z.number().int().min(480).max(20_000),
  maximized: z.boolean(),
})
export type WindowPlace = z.infer<typeof placeSchema>

interface Area {
  readonly x: number
  readonly y: number
  readonly width: number
  readonly height: number
}

/** So much of the window's top edge must be on a screen for a hand to get hold of it. */
const LEAST_VISIBLE = 100

/**
 * The stored place, when it is still on one of the screens; a monitor may have gone since.
 * @param stored whatever the settings hold
 * @returns null for the system's choice
 */
export function usablePlace(stored: unknown, screens: readonly Area[]): WindowPlace | null {
  const parsed = placeSchema.safeParse(stored)
  if (!parsed.success) return null
  const place = parsed.data
  const onScreen = screens.some((screen) => {
    const visible = Math.min(place.x + place.width, screen.x + screen.width) - Math.max(place.x, screen.x)
    return (
      visible >= LEAST_VISIBLE && place.y >= screen.y && place.y <= screen.y + screen.height - LEAST_VISIBLE
    )
  })
  return onScreen ? place : null
}
