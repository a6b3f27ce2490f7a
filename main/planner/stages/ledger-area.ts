import { digits as n } from './digits'
import type { LedgerItem } from '../../contract/choices'
import { gates, onesCounterAdders, clockWirePerLength } from '../models/ledger/power'
import { gatePerWidth } from '../models/mos/capacitance'
import type { Bank } from './bank'
import { bankLength, clockGatesOf, type DraftLine } from './ledger-power'
import type { FlashSituation, SarSituation } from './situation'
import { comparatorArea, trimArea } from './sizing/cost'

function line(item: LedgerItem, value: number, model: string, numbers: string): DraftLine {
  return { item, value, model, numbers }
}

function comparatorLines(bank: Bank): DraftLine[] {
  const { s, design } = bank
  const each = comparatorArea(s, design)
  const comparators = line('area.comparators', s.comparatorCount * each, 'count × layout factor·ΣW(L + diffusion pitch)', `${n(s.comparatorCount)} * ${n(each)}`)
  if (design.trim === null) return [comparators]
  const { bits, unit } = design.trim
  const gate = s.card.logic.gate_area_m2
  return [comparators, line(
    'area.trim', s.comparatorCount * trimArea(s, design), 'count × (2^b units at the capacitor density + a latch of 4 gates per bit)',
    `${n(s.comparatorCount)} * (2^${bits} * ${n(unit)} / ${n(s.card.cap.dac_f_m2)} + 4 * ${bits} * ${n(gate)})`,
  )]
}

function clockArea(bank: Bank): DraftLine {
  const { s } = bank
  const load = s.comparatorCount * clockGatesOf(bank) + clockWirePerLength * bankLength(bank)
  const perWidth = gatePerWidth(s.card, s.card.l_min_m)
  const { factor, diffusion_pitch_m } = s.card.layout
  const length = s.card.l_min_m + diffusion_pitch_m
  return line(
    'area.clock', factor * (load / 3 / perWidth) * length, 'buffers with a third of the driven capacitance as gates: factor·W(L + diffusion pitch)',
    `${n(factor)} * (${n(load)} / 3 / ${n(perWidth)}) * ${n(length)}`,
  )
}

function logicArea(bank: Bank, item: LedgerItem, count: number, model: string): DraftLine {
  const { gate_area_m2 } = bank.s.card.logic
  return line(item, bank.s.lanes * count * gate_area_m2, model, `${n(bank.s.lanes)} * ${n(count)} * ${n(gate_area_m2)}`)
}

function ladderArea({ s }: Bank, ladders: number): DraftLine {
  const { gate_area_m2 } = s.card.logic
  return line('area.ladder', ladders * s.codes * gate_area_m2, 'one gate area per element of every ladder: a place holder until the resistor is known',
    `${n(ladders)} * ${n(s.codes)} * ${n(gate_area_m2)}`)
}

function capacitorArea(bank: Bank, item: LedgerItem, perSide: number): DraftLine {
  const density = bank.s.card.cap.dac_f_m2
  return line(item, (bank.s.lanes * 2 * perSide) / density, 'both sides of every lane at the capacitor density', `${n(bank.s.lanes)} * 2 * ${n(perSide)} / ${n(density)}`)
}

function flashLines(bank: Bank, { flash }: FlashSituation): DraftLine[] {
  const { s } = bank
  return [
    ...comparatorLines(bank),
    ...(flash.capture_latches === 0 ? [] : [
      logicArea(bank, 'area.capture', gates.captureLatch * flash.capture_latches * (s.codes - 1), 'gates × gate area, every lane')]),
    logicArea(bank, 'area.encoder', gates.fullAdder * onesCounterAdders(s.codes, s.bits), 'gates × gate area, every lane'),
    clockArea(bank),
    ladderArea(bank, flash.front_sampler ? s.lanes : 1),
    ...(flash.front_sampler ? [capacitorArea(bank, 'area.sampler', flash.sampling_cap_f)] : []),
  ]
}

function sarLines(bank: Bank, { cycles, arrayCap }: SarSituation): DraftLine[] {
  return [
    ...comparatorLines(bank),
    clockArea(bank),
    logicArea(bank, 'area.sar_logic', gates.sarCycle * cycles.length, '12 gates per cycle × gate area'),
    capacitorArea(bank, 'area.dac', arrayCap),
  ]
}

/** Area lines before overrides [m²]. */
export function areaLines(bank: Bank): DraftLine[] {
  const { kind } = bank.s
  return kind.architecture === 'flash' ? flashLines(bank, kind) : sarLines(bank, kind)
}
