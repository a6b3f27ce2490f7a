import type { Migration } from './migrate'

/** Oldest first, one file each (0002-….ts). Version 1 is the first, so there is none yet. */
export const migrations: readonly Migration[] = []
