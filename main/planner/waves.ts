import type { Card } from '../contract/cards'
import type { Plan } from '../contract/plan'
import type { Waves } from '../contract/waves'

export const waves = (_document: Plan, _card: Card, _options: { index: number; overdrive_v: number | null }): Waves => { throw new Error('not yet') }
