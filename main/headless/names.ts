/** Names of the commands, in the order in which they are listed; each has a file here and a face in run.ts. */
export const faceNames = ['plan', 'sheet', 'waves', 'serve'] as const
export type FaceName = (typeof faceNames)[number]

/** What may stand first on the command line. */
export const commandNames: readonly string[] = [...faceNames, 'help']
