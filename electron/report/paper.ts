/** Look of the printed sheet: ink on white paper, one warm colour for the running speed alone. */
export const INK = '#1b2730'
export const INK_SOFT = '#4a575f'
export const RULE = '#c3c9c5'
export const RULE_STRONG = '#77838b'
export const GRID = '#e4e7e3'
export const SPEED = '#a94507'
export const DANGER = '#9c1c45'
export const FILL_HEAD = '#eef0ec'
export const FILL_BAD = '#f6e4e8'
export const FILL_NEAR = '#f6efdc'
export const CURVES = { main: '#1f5d9a', second: '#0f7268', third: '#6a4c9c', without: '#2f3d47' } as const
/** Never colour alone: every curve has dashes of its own [pt]. */
export const DASHES = { main: '', second: '7 3', third: '2 2.4', without: '9 3 2 3' } as const
export const WIDTHS = { main: 1.5, second: 1.3, third: 1.3, without: 1 } as const

export const FONT = 'Roboto'
/** [pt] */
export const TEXT_SIZE = 9
export const TABLE_SIZE = 8
export const MARGIN = { left: 48, top: 54, right: 42, bottom: 50 } as const
