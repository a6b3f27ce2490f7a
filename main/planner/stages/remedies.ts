import type { Card } from '../../contract/cards'
import type { Result } from '../../contract/result'

export const withRemedies = (result: Result, _card: Card): Result => result
