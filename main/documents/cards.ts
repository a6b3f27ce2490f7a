import { z } from 'zod'
import file from '../../assets/cards/generic.json'
import { cardSchema, type Card } from '../contract/cards'

/** The cards that come with the program, taken in at build time. */
export const builtInCards: readonly Card[] = z.array(cardSchema).parse(file.cards)

/** The card a plan names by id, or null when the program has none of that id. */
export function builtInCard(id: string): Card | null {
  return builtInCards.find((card) => card.id === id) ?? null
}
