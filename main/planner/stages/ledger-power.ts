import { digits as n } from './digits'
import type { LedgerItem } from '../../contract/choices'
import type { Condition } from '../latch/condition'
import { meanSwitchingEnergy } from '../models/dac/switching-energy'
import { totalWidth } from '../models/ledger/area'
import {
  activity, clockPower, clockWirePerLength, dacPower, driverPower, gates, ladderPower, leakagePower, logicPower, onesCounterAdders,
} from '../models/ledger/power'
import type { Bank } from './bank'
import { designInputCap, drawnDevices } from './design'
import { circuitOf } from './latch-figures'
import { bankCount } from './limits-flash'
import { comparatorArea, trimArea } from './sizing/cost'
import type { FlashSituation, SarSituation } from './situation'

/** A line before overrides: what it is worth, the model behind it, and the expression that gives the value. */
export interface DraftLine { readonly item: LedgerItem; readonly value: number | null; readonly model: string; readonly numbers: string }

/** Mean energy of a decision over the positions at one condition [J]; null where the latch could not be evaluated. */
export function meanEnergy({ positions, evaluated }: Bank, condition: Condition): number | null {
  const energies = new Map(evaluated.filter((e) => e.condition === condition).map((e) => [e.commonMode, e.energy]))
  const values = positions.map((p) => energies.get(p.commonMode) ?? null)
  return values.some((v) => v === null) ? null : (values as number[]).reduce((sum, v) => sum + v, 0) / values.length
}

/** Length of the bank for the clock wire [m]: comparators in a row, each a square of its own area; common practice. */
export const bankLength = ({ s, design }: Bank): number => s.comparatorCount * Math.sqrt(comparatorArea(s, design) + trimArea(s, design))

/** Clocked gates of one comparator [F]. */
export const clockGatesOf = ({ s, design }: Bank): number => circuitOf(s, design, s.conditions[0], s.plan.converter.common_mode_v).clockGates

function comparatorsLine(bank: Bank, condition: Condition): DraftLine {
  const energy = meanEnergy(bank, condition)
  return {
    item: 'power.comparators', value: energy === null ? null : energy * bank.s.decisionRate,
    model: 'energy of a decision and its reset by full transient × decisions per second', numbers: `${n(energy ?? 0)} * ${n(bank.s.decisionRate)}`,
  }
}

function clockLine(bank: Bank, { supply }: Condition): DraftLine {
  const { s } = bank
  const gateCap = s.comparatorCount * clockGatesOf(bank)
  const wire = clockWirePerLength * bankLength(bank)
  const rate = s.decisionRate / s.comparatorCount
  return {
    item: 'power.clock', value: clockPower(gateCap, wire, supply, rate),
    model: 'buffers tapered by 4 and wire of 0.2 fF/µm along the bank: (⅓·ΣC_gates + 4/3·C_wire)·V_DD²·f',
    numbers: `(${n(gateCap)} / 3 + 4 / 3 * ${n(wire)}) * ${n(supply)}^2 * ${n(rate)}`,
  }
}

function leakageLine(bank: Bank, { supply, temperature }: Condition): DraftLine {
  const { s } = bank
  const width = s.comparatorCount * totalWidth(drawnDevices(s, bank.design))
  return {
    item: 'power.leakage', value: leakagePower(width, s.card.logic.leak_a_m, temperature, supply),
    model: 'comparators only, that of the logic is left out: ½·ΣW·I_leak·2^((T−300)/14)·V_DD',
    numbers: `0.5 * ${n(width)} * ${n(s.card.logic.leak_a_m)} * 2^((${n(temperature)} - 300) / 14) * ${n(supply)}`,
  }
}

function driverLine(bank: Bank, capacitance: number, { supply }: Condition): DraftLine {
  const { s } = bank
  return {
    item: 'power.input_driver', value: driverPower(s.inputFrequency, capacitance, s.fullScale, supply),
    model: 'ideal class-B driver of both sides: f_in·C·V_FS·V_DD',
    numbers: `${n(s.inputFrequency)} * ${n(capacitance)} * ${n(s.fullScale)} * ${n(supply)}`,
  }
}

function logicLine(bank: Bank, item: LedgerItem, count: number, active: number, model: string, { supply }: Condition): DraftLine {
  const { card, plan } = bank.s
  const rate = plan.converter.sample_rate_hz
  return {
    item, value: logicPower(count, active, card.logic.gate_energy_j, supply / card.vdd_v, rate), model,
    numbers: `${n(count)} * ${n(active)} * ${n(card.logic.gate_energy_j)} * (${n(supply)} / ${n(card.vdd_v)})^2 * ${n(rate)}`,
  }
}

function flashLines(bank: Bank, kind: FlashSituation, condition: Condition): DraftLine[] {
  const { s } = bank
  const { flash } = kind
  const adders = onesCounterAdders(s.codes, s.bits)
  const captured = gates.captureLatch * flash.capture_latches * (s.codes - 1)
  const ladders = flash.front_sampler ? s.lanes : 1
  return [
    comparatorsLine(bank, condition),
    ...(flash.capture_latches === 0 ? [] : [
      logicLine(bank, 'power.capture', captured, activity.latch, 'capture latches of 4 gates each, all switching: gates·E_gate·(V/V_card)²·f_s', condition)]),
    logicLine(bank, 'power.encoder', gates.fullAdder * adders, activity.logic, 'ones counter of M−1−N full adders, 6 gates each, activity ½: gates·½·E_gate·(V/V_card)²·f_s', condition),
    clockLine(bank, condition),
    {
      item: 'power.ladder', value: ladders * ladderPower(condition.supply, s.fullScale, flash.ladder_ohm),
      model: `${flash.front_sampler ? 'one ladder per lane' : 'one ladder for all'} across full scale, fed from the supply: V_DD·V_FS/R`,
      numbers: `${n(ladders)} * ${n(condition.supply)} * ${n(s.fullScale)} / ${n(flash.ladder_ohm)}`,
    },
    leakageLine(bank, condition),
    driverLine(bank, flash.front_sampler ? flash.sampling_cap_f : bankCount(s, kind) * designInputCap(s, bank.design), condition),
  ]
}

function sarLines(bank: Bank, { sar, cycles, arrayCap }: SarSituation, condition: Condition): DraftLine[] {
  const { s } = bank
  const energy = meanSwitchingEnergy(sar.dac_scheme, s.bits)
  const reference = s.fullScale / 2
  const rate = s.plan.converter.sample_rate_hz
  return [
    comparatorsLine(bank, condition),
    clockLine(bank, condition),
    leakageLine(bank, condition),
    driverLine(bank, arrayCap, condition),
    logicLine(bank, 'power.sar_logic', gates.sarCycle * cycles.length, activity.logic, '12 gates per cycle, activity ½: gates·½·E_gate·(V/V_card)²·f_s', condition),
    {
      item: 'power.dac', value: dacPower(rate, energy, sar.unit_cap_f, reference),
      model: 'exact mean switching energy over all codes, drawn from V_ref = V_FS/2: f_s·E·C_u·V_ref²',
      numbers: `${n(rate)} * ${n(energy)} * ${n(sar.unit_cap_f)} * ${n(reference)}^2`,
    },
  ]
}

/** Power lines of one condition, before overrides [W]. */
export function powerLines(bank: Bank, condition: Condition): DraftLine[] {
  const { kind } = bank.s
  return kind.architecture === 'flash' ? flashLines(bank, kind, condition) : sarLines(bank, kind, condition)
}
