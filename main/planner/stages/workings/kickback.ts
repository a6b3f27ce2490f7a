import type { ComparatorEntry, Working } from '../../../contract/result'
import type { Condition } from '../../latch/condition'
import { overlapPerWidth } from '../../models/mos/capacitance'
import { references } from '../../references'
import type { Bank } from '../bank'
import { designInputCap } from '../design'
import { bankCount } from '../limits-flash'
import { numbers, working } from './working'

/** Working of the kickback at the condition where it is largest. */
export function kickbackWorking({ s, design }: Bank, { supply, name }: Condition, entry: ComparatorEntry, a: number): Working {
  const edge = design.widths.input_m * overlapPerWidth(s.card)
  const imbalance = s.plan.budget.kick_imbalance
  if (s.kind.architecture === 'sar') {
    return working('reached.kickback_v', `Kickback, ${name}`, 'κ_i · V_DD · W_in c_f / C_DAC', numbers`${imbalance} * ${supply} * ${edge} / ${s.kind.arrayCap} / ${a}`, entry.reached.kickback_v, 'V', references.practice)
  }
  const { flash, resetTime } = s.kind
  const inputCap = designInputCap(s, design)
  const bank = bankCount(s, s.kind) * inputCap
  const onLadder = numbers`${supply} * ${edge} / ${inputCap} * exp(-${resetTime} * pi^2 / (${flash.ladder_ohm} * ${bank}))`
  const held = numbers`${imbalance} * ${supply} * ${s.codes - 1} * ${edge} / (${flash.sampling_cap_f} + ${bank})`
  const formula = 'V_DD·W_in c_f/C_in · exp(−t_reset π²/(R_L C_bank))'
  return working('reached.kickback_v', `Kickback, ${name}`, flash.front_sampler ? `${formula} + κ_i·V_DD·(M−1) W_in c_f/(C_s + C_bank)` : formula,
    flash.front_sampler ? `${onLadder} + ${held}` : onLadder, entry.reached.kickback_v, 'V',
    `${references.practice}; slowest mode of a uniformly loaded ladder`)
}
