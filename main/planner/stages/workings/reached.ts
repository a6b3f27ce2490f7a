import type { ComparatorEntry, Working } from '../../../contract/result'
import { references } from '../../references'
import { boltzmann } from '../../constants'
import type { Bank } from '../bank'
import { drawnDevices, designInputCap } from '../design'
import type { LatchFigures } from '../latch-figures'
import type { Evaluated } from '../reached'
import { attainedAt } from '../reached'
import { attenuationOf, singleDelay, type Attained } from '../uses'
import { handWorkings } from './hand'
import { kickbackWorking } from './kickback'
import { gatePerWidth } from '../../models/mos/capacitance'
import { numbers, working } from './working'

/** The condition at which a quantity is worst for this comparator: workings show that one. */
function worstBy(points: readonly Evaluated[], read: (p: Evaluated) => number): Evaluated {
  return points.reduce((a, b) => (read(b) > read(a) ? b : a))
}

function latchWorkings(at: (read: (f: LatchFigures) => number) => Evaluated): Working[] {
  const slow = at((f) => f.analysis.tau)
  const late = at((f) => f.analysis.integration)
  const wide = at((f) => f.analysis.arrival10 - f.analysis.arrival90)
  const [a, b, c] = [slow, late, wide].map((p) => p.figures!.analysis)
  return [
    working('reached.tau_s', `Regeneration, ${slow.condition.name}`, 'τ = 1 / λ_max(A) at the balanced equilibrium', numbers`1 / ${1 / a.tau}`, a.tau, 's', references.engine),
    working('reached.integration_s', `Integration, ${late.condition.name}`, 't_0 = t_e − τ·ln|g| + δ',
      numbers`${b.settled} - ${b.tau} * ${b.logGain} + ${b.departure * b.tau}`, b.integration, 's',
      `${references.engine}; t_e equilibrium reached, g gain into the growing mode, δ large-signal stretch up to V_DD/2 by full transient`),
    working('reached.aperture_s', `Input aperture, 10–90 %, ${wide.condition.name}`, 't(10 %) − t(90 %) of the response over the arrival of an input step',
      numbers`${c.arrival10} - ${c.arrival90}`, c.arrival10 - c.arrival90, 's', references.engine),
  ]
}

function delayWorking(bank: Bank, point: Evaluated, entry: ComparatorEntry, a: number): Working {
  const { analysis } = point.figures!
  const { supply, name } = point.condition
  const { kind } = bank.s
  const { overdrive_v } = entry.limits
  const delay = attainedAt(bank.s, bank.design, point, overdrive_v)!.delay
  if (overdrive_v === null && kind.architecture === 'sar') {
    const count = kind.cycles.length
    const title = `All decisions of a conversion, ${name}`
    return point.conversion !== undefined
      ? working('reached.delay_s', title, 'B at which P(B) = P_e, the latch as it is in each cycle', numbers`${delay}`, delay, 's', references.tail)
      : working('reached.delay_s', title, 'K·t_0 + τ·β with P(β) = P_e in units of τ',
        numbers`${count} * ${analysis.integration} + ${analysis.tau} * ${(delay - count * analysis.integration) / analysis.tau}`, delay, 's', references.tail)
  }
  const { circuit } = point.figures!
  if (singleDelay(circuit, analysis, supply / a, overdrive_v!).transient) {
    return working('reached.delay_s', `Decision, ${name}`, 'full circuit: decided before its balanced equilibrium, later than t_0 + τ·ln(V_DD / 2v) says',
      numbers`${delay}`, delay, 's', references.transient)
  }
  return working('reached.delay_s', `Decision, ${name}`, kind.architecture === 'sar' ? 't_0 + τ·ln(V_DD / 2av)' : 't_0 + τ·ln(V_DD / 2v)',
    numbers`${analysis.integration} + ${analysis.tau} * ln(${supply} / (2 * ${a * overdrive_v!}))`, delay, 's', references.veendrick)
}

function offsetWorkings({ s, design }: Bank, point: Evaluated, a: number): Working[] {
  const { spreads, offset } = point.figures!
  const terms = spreads.flatMap((p) => [numbers`(${p.thresholdWeight} * ${p.thresholdSigma})^2`, numbers`(${p.gainWeight} * ${p.gainSigma})^2`])
  const { input_m, input_length_m } = design.widths
  return [
    working('reached.sigma_vt_input_v', 'Threshold spread of the input pair', 'A_VT / √(W L)',
      numbers`${s.card.n.avt_v_m} / sqrt(${input_m} * ${input_length_m})`, spreads.find((p) => p.pair === 'input')!.thresholdSigma, 'V', references.pelgrom),
    working('reached.offset_v', `Raw offset, ${point.condition.name}`, '√Σ (w·σ_VT)² + (w·σ_kp)² over all pairs, at the converter’s input',
      `sqrt(${terms.join(' + ')}) / ${numbers`${a}`}`, offset / a, 'V', `${references.engine}; ${references.pelgrom}`),
  ]
}

function trimWorkings({ s, design }: Bank, point: Evaluated, entry: ComparatorEntry, a: number): Working[] {
  if (design.trim === null) {
    const { offset_method, autozero_gain } = s.plan.comparator
    const [raw, left] = [entry.reached.offset_v!, entry.reached.residual_v]
    return [offset_method === 'autozero'
      ? working('reached.residual_v', 'Residual offset', 'raw / autozero gain', numbers`${raw} / ${autozero_gain}`, left, 'V', references.practice)
      : working('reached.residual_v', 'Residual offset', 'the raw one: nothing is trimmed', numbers`${raw}`, left, 'V', references.definition)]
  }
  const { circuit, analysis } = point.figures!
  const step = entry.reached.trim_step_v!
  return [
    working('reached.trim_step_v', `Trim step of ${design.trim.bits} bits, ${point.condition.name}`, '2 · unit · |w_CX| / C_X',
      numbers`2 * ${design.trim.unit} * ${Math.abs(analysis.capacitanceWeight[circuit.inner])} / ${circuit.sideCapacitance[circuit.inner]} / ${a}`, step, 'V',
      `${references.engine}; unit = max(smallest that can be drawn, ΔC/2^b)`),
    working('reached.residual_v', 'Residual offset', 'step / √12', numbers`${step} / sqrt(12)`, entry.reached.residual_v, 'V', 'uniform over one step'),
  ]
}

function memoryWorking(point: Evaluated, a: number): Working {
  const { leftover, analysis } = point.figures!
  const sum = leftover.differences.map((d, i) => numbers`${analysis.startWeight[i]} * ${d}`).join(' + ')
  return working('reached.memory_v', `Memory, ${point.condition.name}`, '|w_X·ΔX + w_O·ΔO| half a clock rise before the next decision',
    `abs(${sum}) / ${numbers`${a}`}`, leftover.atInput / a, 'V', references.transient)
}

function energyWorking(point: Evaluated): Working {
  const { supply } = point.condition
  return working('reached.energy_j', `Energy of a decision and its reset, ${point.condition.name}`, 'V_DD·Q + C_ck·V_DD²',
    numbers`${supply} * ${point.charge!} + ${point.figures!.circuit.clockGates} * ${supply}^2`, point.energy, 'J', references.transient)
}

function areaWorking({ s, design }: Bank, entry: ComparatorEntry): Working {
  const terms = drawnDevices(s, design).map((d) => numbers`${d.count} * ${d.width} * (${d.length} + ${s.card.layout.diffusion_pitch_m})`)
  return working('reached.area_m2', 'Area of one comparator, without trim', 'layout factor · ΣW(L + diffusion pitch)',
    `${numbers`${s.card.layout.factor}`} * (${terms.join(' + ')})`, entry.reached.area_m2, 'm²', references.practice)
}

function noiseWorking({ s }: Bank, { figures, condition }: Evaluated, entry: ComparatorEntry, a: number): Working {
  const { variance, gain } = figures!.analysis
  const title = `Noise of one decision, ${condition.name}`
  const { offset_method, autozero_cap_f } = s.plan.comparator
  const noise = entry.reached.noise_v
  return offset_method === 'autozero'
    ? working('reached.noise_v', title, '√(P/g² + 2kT/C_az), at the converter’s input',
        numbers`sqrt(${variance} / ${gain}^2 + 2 * ${boltzmann} * ${condition.temperature} / ${autozero_cap_f}) / ${a}`, noise, 'V', references.engine)
    : working('reached.noise_v', title, '√P / g, at the converter’s input', numbers`sqrt(${variance}) / ${gain} / ${a}`, noise, 'V', references.engine)
}

/** Workings of what one comparator reaches, each at the condition where it is worst. */
export function reachedWorkings(bank: Bank, entry: ComparatorEntry): Working[] {
  const { s, design } = bank
  const points = bank.evaluated.filter((e) => e.commonMode === bank.positions[entry.index - 1].commonMode)
  if (points.some((p) => p.figures === null)) return [areaWorking(bank, entry)]
  const inputCap = designInputCap(s, design)
  const a = attenuationOf(s, inputCap)
  const engine = (read: (f: LatchFigures) => number) => worstBy(points, (p) => read(p.figures!))
  const held = (read: (r: Attained) => number) => worstBy(points, (p) => read(attainedAt(s, design, p, entry.limits.overdrive_v)!))
  const noisy = held((r) => r.noise)
  return [
    ...latchWorkings(engine),
    delayWorking(bank, held((r) => r.delay), entry, a),
    noiseWorking(bank, noisy, entry, a),
    ...offsetWorkings(bank, held((r) => r.offset), a),
    ...trimWorkings(bank, held((r) => r.trimStep ?? 0), entry, a),
    kickbackWorking(bank, held((r) => r.kickback).condition, entry, a),
    memoryWorking(held((r) => r.memory), a),
    working('reached.input_cap_f', 'Input capacitance per side', 'W_in (c_ox L_in + 2 c_f)', numbers`${design.widths.input_m} * ${gatePerWidth(s.card, design.widths.input_length_m)}`, inputCap, 'F', 'linear gate capacitance of the card'),
    energyWorking(worstBy(points, (p) => p.energy!)),
    areaWorking(bank, entry),
    ...(s.plan.comparator.topology === 'strong_arm' ? handWorkings(bank, held((r) => r.delay), entry) : []),
  ]
}
