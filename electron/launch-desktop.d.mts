export function openWindow(runtime: string, args: readonly string[]): Promise<string | null>
