import type { Card } from '../../contract/cards'
import type { CornerName } from '../../contract/choices'
import { cardTemperature } from '../constants'
import { mosKind, type MosKind } from '../models/mos/device'

/** A corner as evaluated: supply [V], temperature [K] and the two device kinds. */
export interface Condition {
  readonly name: string
  readonly corner: CornerName
  readonly supply: number
  readonly temperature: number
  readonly n: MosKind
  readonly p: MosKind
}

const hot = 398
const cold = 233

const shapes: Record<CornerName, { supply: number; shift: number; gain: number; temperatures: readonly number[] }> = {
  typical: { supply: 1, shift: 0, gain: 0, temperatures: [cardTemperature] },
  slow: { supply: 0.9, shift: 1, gain: -1, temperatures: [hot, cold] },
  fast: { supply: 1.1, shift: -1, gain: 1, temperatures: [hot, cold] },
}

/** `slow · 0.81 V · 125 °C`: a corner is named by what it is. */
function conditionName(corner: CornerName, supply: number, temperature: number): string {
  const celsius = Math.round(temperature - 273.15)
  return `${corner} · ${Number(supply.toPrecision(3))} V · ${celsius < 0 ? '−' : ''}${Math.abs(celsius)} °C`
}

/** The conditions of the chosen corners, in their order; slow and fast each hot and cold. */
export function conditionsOf(card: Card, corners: readonly CornerName[]): Condition[] {
  return corners.flatMap((corner) => {
    const shape = shapes[corner]
    return shape.temperatures.map((temperature) => {
      const supply = card.vdd_v * shape.supply
      const shift = shape.shift * card.corner.vt_shift_v
      const gain = 1 + shape.gain * card.corner.kp_ratio
      return {
        name: conditionName(corner, supply, temperature),
        corner,
        supply,
        temperature,
        n: mosKind(card.n, card.l_min_m, temperature, shift, gain),
        p: mosKind(card.p, card.l_min_m, temperature, shift, gain),
      }
    })
  })
}
