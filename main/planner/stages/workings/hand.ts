import type { ComparatorEntry, Working } from '../../../contract/result'
import { boltzmann } from '../../constants'
import { handDelay, handNoise } from '../../models/merit/hand-formulas'
import { capacitanceOffset } from '../../models/offset/node-capacitance'
import { mosEvaluate, mosPoint, type MosDevice, type MosPoint } from '../../models/mos/device'
import { references } from '../../references'
import type { Bank } from '../bank'
import type { LatchFigures } from '../latch-figures'
import type { Evaluated } from '../reached'
import { numbers, working } from './working'

/** What the hand formulas are fed with: devices of the design at plain bias points. */
interface HandInputs {
  readonly tail: number
  readonly inputG: number
  readonly effective: number
  readonly regenerating: number
  readonly threshold: number
  readonly inner: number
  readonly output: number
}

function at(device: MosDevice, gate: number, drain: number): MosPoint {
  const point = mosPoint()
  mosEvaluate(device, gate, drain, 0, point)
  return point
}

/** Input pair saturated over a grounded tail; cross-coupled pairs with both outputs at half the supply. */
function handInputs({ circuit }: LatchFigures): HandInputs {
  const device = (pair: string) => circuit.devices.find((d) => d.pair === pair)!.device
  const { supply, commonMode, sideCapacitance } = circuit
  const input = at(device('input'), commonMode, supply)
  const middle = supply / 2
  return {
    tail: 2 * input.current,
    inputG: input.gateG,
    effective: (2 * input.current) / input.gateG,
    regenerating: at(device('cross_n'), middle, middle).gateG + at(device('cross_p'), middle, middle).gateG,
    threshold: device('cross_n').threshold,
    inner: sideCapacitance[circuit.inner],
    output: sideCapacitance[circuit.output],
  }
}

function against(hand: number, engine: number): string {
  const percent = Math.round((100 * (hand - engine)) / engine)
  return `${percent < 0 ? '−' : '+'}${Math.abs(percent)} % against the engine`
}

/** Relative difference of the inner nodes that the hand formula is shown for. */
const shownDifference = 0.05

function capacitanceWorking({ analysis, circuit }: LatchFigures, threshold: number, name: string): Working {
  const ratio = 1 + shownDifference
  const value = capacitanceOffset(threshold, ratio)
  const engine = Math.abs(analysis.capacitanceWeight[circuit.inner]) * shownDifference
  return working('hand.capacitance_offset_v', `Hand formula: 5 % between the inner nodes, ${name}, ${against(value, engine)}`, '(V_T/2)(r − 1/r)',
    numbers`${threshold} / 2 * (${ratio} - 1 / ${ratio})`, value, 'V',
    `${references.practice}, charge balance of the two nodes; the whole threshold at the input: the engine divides by the gain that the input pair has built up by then`)
}

/** First-order hand formulas at one condition, with how far they are from the engine and why. */
export function handWorkings({ s }: Bank, { figures, condition }: Evaluated, entry: ComparatorEntry): Working[] {
  const h = handInputs(figures!)
  const overdrive = entry.limits.overdrive_v
  const { analysis } = figures!
  const { gamma } = s.card.n
  const time = (2 * h.inner * h.threshold) / h.tail
  const noise = handNoise(condition.temperature, gamma, h.inputG, time)
  const list: Working[] = [capacitanceWorking(figures!, h.threshold, condition.name)]
  if (Number.isFinite(noise) && time > 0) {
    list.push(working('hand.noise_v', `Hand formula: noise, ${condition.name}, ${against(noise, analysis.noise)}`, '√(4kTγ / (g_m·t)), t = 2 C_X V_T / I_tail',
      numbers`sqrt(4 * ${boltzmann} * ${condition.temperature} * ${gamma} / (${h.inputG} * (2 * ${h.inner} * ${h.threshold} / ${h.tail})))`, noise, 'V',
      `${references.practice}; square law, input pair alone: the cross-coupled pairs, the reset samples and the moving bias are left out`))
  }
  if (overdrive === null || !(overdrive > 0)) return list
  const delay = handDelay(h.output, h.threshold, h.tail, h.regenerating, condition.supply, overdrive, h.effective)
  const engine = analysis.integration + analysis.tau * Math.log(condition.supply / (2 * overdrive))
  if (!Number.isFinite(delay)) return list
  return [...list, working('hand.delay_s', `Hand formula: decision, ${condition.name}, ${against(delay, engine)}`,
    '2 C_O V_T / I_tail + C_O/g_m · ln(V_DD/2v · V_eff/V_T)',
    numbers`2 * ${h.output} * ${h.threshold} / ${h.tail} + ${h.output} / ${h.regenerating} * ln(${condition.supply} / (2 * ${overdrive}) * ${h.effective} / ${h.threshold})`,
    delay, 's', `${references.wicht}; fixed g_m at half the supply and a hard start: the engine follows both along the trajectory`)]
}
