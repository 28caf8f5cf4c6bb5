const DAY = 86_400_000

/** When it was, as one would say it: the time today, yesterday, else the date. @param iso UTC */
export function sayWhen(iso: string, now = new Date()): string {
  const then = new Date(iso)
  const days = Math.round((midnight(now) - midnight(then)) / DAY)
  const time = then.toLocaleTimeString(undefined, { hour: '2-digit', minute: '2-digit' })
  if (days === 0) return `today ${time}`
  if (days === 1) return `yesterday ${time}`
  return then.toLocaleDateString(undefined, { day: 'numeric', month: 'short', year: 'numeric' })
}

function midnight(date: Date): number {
  return new Date(date.getFullYear(), date.getMonth(), date.getDate()).getTime()
}
