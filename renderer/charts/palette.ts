/** Inks of the present sheet, as colours that a canvas understands. */
export interface Palette {
  readonly ink: string
  readonly soft: string
  readonly faint: string
  readonly paper: string
  readonly grid: string
  readonly rule: string
  readonly accent: string
  readonly accentWash: string
  readonly danger: string
  readonly hatch: string
  readonly select: string
  readonly selectWash: string
  readonly curves: readonly string[]
  readonly font: string
}

const CURVES = ['--curve-1', '--curve-2', '--curve-3', '--curve-4', '--curve-5', '--curve-6']

/** Reads the tokens as they stand at the element, so that a part on the other sheet gets its own inks. */
export function readPalette(element: HTMLElement): Palette {
  const probe = document.createElement('span')
  probe.hidden = true
  element.append(probe)
  const colour = (token: string, share = 100) => {
    probe.style.color = `color-mix(in srgb, var(${token}) ${share}%, transparent)`
    return getComputedStyle(probe).color
  }
  const palette: Palette = {
    ink: colour('--ink'),
    soft: colour('--ink-soft'),
    faint: colour('--ink-faint'),
    paper: colour('--paper-raised'),
    grid: colour('--grid-line'),
    rule: colour('--rule'),
    accent: colour('--accent-speed'),
    accentWash: colour('--accent-speed-wash', 55),
    danger: colour('--danger'),
    hatch: colour('--hatch-danger-line'),
    select: colour('--select'),
    selectWash: colour('--select-wash'),
    curves: CURVES.map((token) => colour(token)),
    font: getComputedStyle(element).fontFamily,
  }
  probe.remove()
  return palette
}

/** Calls back when the sheet changes, by choice or with the system. @returns stops watching */
export function watchSheet(changed: () => void): () => void {
  const observer = new MutationObserver(changed)
  observer.observe(document.documentElement, {
    attributes: true,
    attributeFilter: ['data-sheet', 'class', 'style'],
  })
  const system = matchMedia('(prefers-color-scheme: dark)')
  system.addEventListener('change', changed)
  return () => {
    observer.disconnect()
    system.removeEventListener('change', changed)
  }
}

/** Waits for the weights that charts use: a canvas neither waits for a font nor redraws when it comes. */
export async function fontsReady(element: HTMLElement): Promise<void> {
  const family = getComputedStyle(element).fontFamily
  // a font that cannot be had leaves the next of the family, which needs no waiting
  await Promise.allSettled(['400', '600'].map((weight) => document.fonts.load(`${weight} 12px ${family}`)))
}
