export function partOf(path: string): string | null
export function importFault(file: string, specifier: string): string | null
