export function electronPath(root: string): string | null
export function fetchElectron(root: string, options?: { quiet_ms?: number; script?: string }): Promise<string | null>
