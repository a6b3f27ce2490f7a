import { version } from '../../package.json'
import { cautionText } from '../contract/caution'

/** The program, and the first thing that has to be known about its numbers. */
export const about = { name: 'Latchwright', version, caution: cautionText } as const
