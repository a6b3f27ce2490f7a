import type { ComparatorEntry, Working } from '../../../contract/result'
import { references } from '../../references'
import { capacitanceParts } from './input-parts'
import type { Bank } from '../bank'
import { inlLine, offsetPart, perBitSigma, sigmaLimits, trimSigmas, yieldStep } from '../offset-limits'
import { digits } from '../digits'
import { offsetOnlyShifts, type FlashSituation, type SarSituation, type Situation } from '../situation'
import type { SearchCycle } from '../../models/timing/search'
import { numbers, working } from './working'

function flashTiming(s: Situation, flash: FlashSituation, entry: ComparatorEntry): Working[] {
  const { error_rate } = s.plan.converter
  const late = flash.evaluateTime - s.captureSetup
  const meta = (error_rate * s.lsb) / 2
  return [
    working('limits.window_s', 'Decision window', 'e · T_lane − t_u − t_su',
      numbers`${flash.flash.evaluate_fraction} * ${s.laneTime} - ${s.clockUncertainty} - ${s.captureSetup}`, entry.limits.window_s, 's', references.practice),
    working('limits.overdrive_meta_v', 'Overdrive that the error rate leaves', 'v_meta = P_e Δ / 2', numbers`${error_rate} * ${s.lsb} / 2`, meta, 'V', references.veendrick),
    working('limits.overdrive_v', 'Overdrive the comparator itself resolves', 'min(Δ/2, v_meta · exp(n_l T_ev / τ_c))',
      numbers`min(${s.lsb} / 2, ${meta} * exp(${flash.flash.capture_latches} * ${late} / ${s.card.logic.fo4_s}))`, entry.limits.overdrive_v, 'V', `${references.veendrick}; τ_c of a library latch 1 FO4: common practice`),
  ]
}

function settlingWorking(sar: SarSituation, cycle: SearchCycle): Working {
  return working('limits.settling_s', 'DAC settling before the decision', 'τ_dac · ln(step / tolerance), 0 inside the tolerance',
    cycle.settle > 0 ? numbers`${sar.sar.dac_tau_s} * ln(${cycle.step} / ${cycle.tolerance})` : '0', cycle.settle, 's', 'single-pole settling')
}

function synchronousTiming(s: Situation, sar: SarSituation, entry: ComparatorEntry): Working[] {
  const cycle = sar.cycles[entry.cycle! - 1]
  return [
    working('limits.cycle_s', 'Cycle', 'T_lane (1 − s) / K',
      numbers`${s.laneTime} * (1 - ${sar.sar.sample_fraction}) / ${sar.cycles.length}`, sar.cycleTime, 's', references.definition),
    settlingWorking(sar, cycle),
    working('limits.window_s', 'Decision window', 't_cycle − t_logic − t_dac − t_su',
      numbers`${sar.cycleTime} - ${sar.sar.logic_delay_s} - ${cycle.settle} - ${s.captureSetup}`, entry.limits.window_s, 's', references.practice),
    working('limits.overdrive_v', 'Overdrive that has to be resolved', 'P_e / Σ(1/step_i)',
      `${digits(s.plan.converter.error_rate)} / (${sar.cycles.map((c) => numbers`1/${c.step}`).join(' + ')})`,
      entry.limits.overdrive_v, 'V', references.veendrick),
  ]
}

function selfTimedTiming(s: Situation, sar: SarSituation, entry: ComparatorEntry): Working[] {
  const settles = sar.cycles.map((c) => numbers`(${sar.sar.logic_delay_s} + ${c.settle})`).join(' - ')
  const share = s.plan.budget.integration_share
  const count = sar.cycles.length
  const { window_s, integration_s, tau_s } = entry.limits
  return [
    settlingWorking(sar, sar.cycles[entry.cycle! - 1]),
    working('limits.window_s', 'Time for all decisions', 'B = T_lane (1 − s) − Σ(t_logic + t_dac,i)',
      `${numbers`${s.laneTime} * (1 - ${sar.sar.sample_fraction})`} - ${settles}`, window_s, 's', references.definition),
    working('limits.overdrive_v', 'Overdrive', 'does not apply: the decisions share one budget', '0', null, 'V', references.definition),
    working('limits.integration_s', 'Integration, to hand on', 's_0 · B / K', numbers`${share} * ${window_s} / ${count}`, integration_s, 's', references.practice),
    working('limits.tau_s', 'Regeneration, to hand on', tau_s > 0 ? '(B − K t_0) / β with P(β) = P_e in units of τ' : 'no positive solution: 0',
      tau_s > 0 ? numbers`(${window_s} - ${count} * ${integration_s}) / ${(window_s - count * integration_s) / tau_s}` : '0', tau_s, 's', references.tail),
  ]
}

function sarTiming(bank: Bank, sar: SarSituation, entry: ComparatorEntry): Working[] {
  return sar.sar.timing === 'self_timed' ? selfTimedTiming(bank.s, sar, entry)
    : [...synchronousTiming(bank.s, sar, entry), ...regenerationLimits(bank, entry)]
}

function regenerationLimits({ s }: Bank, entry: ComparatorEntry): Working[] {
  const share = s.plan.budget.integration_share
  const { window_s, overdrive_v, tau_s } = entry.limits
  return [
    working('limits.integration_s', 'Integration, to hand on', 's_0 · window', numbers`${share} * ${window_s}`, entry.limits.integration_s, 's', references.practice),
    working('limits.tau_s', 'Regeneration, to hand on', tau_s > 0 ? '(1 − s_0) · window / ln(V_DD / 2v)' : 'no positive solution: 0',
      tau_s > 0 ? numbers`(1 - ${share}) * ${window_s} / ln(${s.card.vdd_v} / (2 * ${overdrive_v!}))` : '0', tau_s, 's', references.veendrick),
  ]
}

function yieldWorkings(s: Situation): Working[] {
  const { inl_lsb, dnl_lsb, inl_method } = s.plan.converter
  const yields = sigmaLimits(s)
  return [
    working('limits.yield_each', 'Yield of INL and of DNL in each lane', '(1 − (1 − Y)/2)^(1/lanes)', numbers`(1 - (1 - ${s.plan.converter.yield}) / 2)^(1/${s.lanes})`, s.laneYield, '', references.practice),
    working('limits.sigma_inl_v', `Largest equal spread by INL, ${inl_method}`, 'σ_INL = (σ_max/L)(Y) · INL · Δ', numbers`${yields.inl / (inl_lsb * s.lsb)} * ${inl_lsb} * ${s.lsb}`, yields.inl, 'V', `${references.exactYield}, ${inlLine(s)} line; ${references.ieee1241}`),
    working('limits.sigma_dnl_v', 'Largest equal spread by DNL', 'σ_DNL = (σ_max/L)(Y) · DNL · Δ', numbers`${yields.dnl / (dnl_lsb * s.lsb)} * ${dnl_lsb} * ${s.lsb}`, yields.dnl, 'V', `${references.exactYield}, neighbours correlated; ${references.ieee1241}`),
  ]
}

function flashOffset({ s, budget }: Bank, flash: FlashSituation, entry: ComparatorEntry): Working[] {
  const tap = Math.round((entry.threshold_v! + s.fullScale / 2) / s.lsb)
  const yields = sigmaLimits(s)
  const sigma = flash.flash.ladder_sigma
  const part = offsetPart(s)
  const list = [...yieldWorkings(s), working('limits.offset_v', `Offset spread at tap ${tap}`, '√min[(1−ρ)R, σ_INL² − Δ²σ_R² k(M−k)/M, σ_DNL² − Δ²σ_R²/2], not below 0',
    numbers`sqrt(max(0, min(${part} * ${budget.spreadPower}, ${yields.inl}^2 - ${s.lsb}^2 * ${sigma}^2 * ${tap} * (${s.codes} - ${tap}) / ${s.codes}, ${yields.dnl}^2 - ${s.lsb}^2 * ${sigma}^2 / 2)))`,
    entry.limits.offset_v, 'V', 'a tap error is common to its neighbours: only one element counts against DNL')]
  if (entry.limits.trim_step_v !== null) {
    const byYield = yieldStep(s, sigma)
    list.push(working('limits.trim_step_v', 'Largest trim step', 'min(step by yield, √(12 (1−ρ)R))', numbers`min(${byYield}, sqrt(12 * ${part * budget.spreadPower}))`,
      entry.limits.trim_step_v, 'V', 'exact yield integrals of a residual uniform over one step with the ladder’s Gaussian'))
  }
  return list
}

function sarSpread({ s, budget }: Bank, sar: SarSituation, entry: ComparatorEntry): Working[] {
  const part = offsetPart(s)
  const share = numbers`${part} * ${budget.spreadPower}`
  if (sar.perLane === 1) {
    return [working('limits.offset_v', 'Offset spread between lanes', '√(¾(1 − ρ)R)', `sqrt(${share})`, entry.limits.offset_v, 'V', 'offsets of the lanes are threshold spread')]
  }
  const sigma = perBitSigma(s)
  const limit = Math.min(s.plan.converter.inl_lsb, s.plan.converter.dnl_lsb) * s.lsb
  return [
    working('limits.sigma_yield_v', 'Largest spread by INL and DNL', 'σ_yield = (σ_max/L)(Y) · min(INL, DNL) · Δ', numbers`${sigma / limit} * ${limit}`, sigma, 'V', references.perBit),
    working('limits.offset_v', 'Offset spread of the comparators', '√min[(1 − ρ)R, σ_yield²]', `sqrt(min(${share}, ${numbers`${sigma}^2`}))`, entry.limits.offset_v, 'V', references.perBit),
  ]
}

function sarOffset(bank: Bank, sar: SarSituation, entry: ComparatorEntry): Working[] {
  const { s } = bank
  const list = offsetOnlyShifts(s)
    ? [working('limits.offset_v', 'Offset spread by range loss', 'r · V_FS / 3', numbers`${sar.sar.range_loss} * ${s.fullScale} / 3`,
        entry.limits.offset_v, 'V', 'one comparator: its offset only shifts the transfer')]
    : sarSpread(bank, sar, entry)
  if (entry.limits.trim_step_v !== null) {
    list.push(working('limits.trim_step_v', 'Largest trim step', '√12 · σ_os,lim', numbers`sqrt(12) * ${entry.limits.offset_v}`,
      entry.limits.trim_step_v, 'V', 'residual uniform over one step'))
  }
  return list
}

function noiseWorking({ s, budget }: Bank, entry: ComparatorEntry): Working {
  const forgives = s.kind.architecture === 'sar' ? s.kind.cycles[entry.cycle! - 1].forgives : 0
  return forgives > 0
    ? working('limits.noise_v', 'Noise', 'max(√(ρR), r_i / 12)', numbers`max(sqrt(${budget.noisePower}), ${forgives} / 12)`, entry.limits.noise_v, 'V', 'noise share of the brief; redundancy forgives ± r_i')
    : working('limits.noise_v', 'Noise', '√(ρR)', numbers`sqrt(${budget.noisePower})`, entry.limits.noise_v, 'V', 'noise share of the brief')
}

function skewWorking({ s, budget }: Bank, entry: ComparatorEntry): Working {
  const { skew_s } = entry.limits
  if (skew_s === null) return working('limits.skew_s', 'Skew', 'does not apply: one sampling instant serves all comparators', '0', null, 's', references.definition)
  const error = numbers`sqrt(${budget.spreadPower} / 4)`
  const lanes = numbers`sqrt(8) / (2 * pi * ${s.inputFrequency} * ${s.fullScale})`
  if (s.kind.architecture === 'sar' || s.kind.flash.front_sampler) {
    return working('limits.skew_s', 'Skew between lanes, handed on to the layout', '√((1−ρ)R/4) · √8 / (2π f_in V_FS)',
      `${error} * ${lanes}`, skew_s, 's', 'mean error power of a displaced full-scale sine')
  }
  const tap = numbers`1 / (2 * pi * ${s.inputFrequency} * sqrt((${s.fullScale} / 2)^2 - ${entry.threshold_v!}^2))`
  return working('limits.skew_s', 'Skew at this threshold, handed on to the layout', '√((1−ρ)R/4) / (2π f_in √((V_FS/2)² − V_k²))',
    s.lanes > 1 ? `${error} * min(${tap}, ${lanes})` : `${error} * ${tap}`, skew_s, 's', 'slope of a full-scale sine at the threshold')
}

function shareWorkings(bank: Bank, entry: ComparatorEntry): Working[] {
  const { s } = bank
  const { kick_share, memory_share } = s.plan.budget
  const list = [
    noiseWorking(bank, entry),
    working('limits.kickback_v', 'Kickback', 'κ · Δ', numbers`${kick_share} * ${s.lsb}`, entry.limits.kickback_v, 'V', 'kickback share of the brief'),
    working('limits.memory_v', 'Memory', 'μ · Δ', numbers`${memory_share} * ${s.lsb}`, entry.limits.memory_v, 'V', 'memory share of the brief'),
    ...capacitanceParts(bank, entry),
  ]
  list.push(skewWorking(bank, entry))
  if (entry.limits.trim_step_v === null) list.push(working('limits.trim_step_v', 'Trim step', 'does not apply: the offset is not trimmed', '0', null, 'V', references.definition))
  return list
}

/** Workings of every limit of one comparator. */
export function limitWorkings(bank: Bank, entry: ComparatorEntry): Working[] {
  const { s } = bank
  const own = s.kind.architecture === 'flash'
    ? [...flashTiming(s, s.kind, entry), ...regenerationLimits(bank, entry), ...flashOffset(bank, s.kind, entry)]
    : [...sarTiming(bank, s.kind, entry), ...sarOffset(bank, s.kind, entry)]
  const range = bank.design.trim === null ? [] : [working('limits.trim_sigmas', 'Range the trim must hold', 'erf(z/√2)^n = Y_each, range ± z·σ_os',
    numbers`${trimSigmas(s)}`, trimSigmas(s), '', `${s.comparatorCount} comparators of the chip all inside`)]
  return [...own, ...shareWorkings(bank, entry), ...range]
}
