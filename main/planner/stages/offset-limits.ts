import { sigmasHoldingAll } from '../models/yield/absolute-inl'
import { comparatorPerBitSigmaLimit } from '../models/yield/successive'
import { dnlSigmaLimit, inlSigmaLimit, type InlLine } from '../models/yield/sigma-limits'
import { trimStepLimit } from '../models/yield/trim-step'
import type { Situation } from './situation'

/** `best_fit` has no integral: it is left to the trials and refused in a plan until then. */
export const inlLine = (s: Situation): InlLine => (s.plan.converter.inl_method === 'absolute' ? 'absolute' : 'terminal')

/** Largest spread of equal thresholds for which INL and DNL meet their yields [V]. */
export function sigmaLimits(s: Situation): { inl: number; dnl: number } {
  const { inl_lsb, dnl_lsb } = s.plan.converter
  return {
    inl: inlSigmaLimit(inlLine(s), s.codes - 1, s.laneYield) * inl_lsb * s.lsb,
    dnl: dnlSigmaLimit(s.codes - 1, s.laneYield) * dnl_lsb * s.lsb,
  }
}

/** Largest trim step by yield alone [V]. */
export function yieldStep(s: Situation, ladderSigma: number): number {
  const { inl_lsb, dnl_lsb } = s.plan.converter
  return trimStepLimit({
    codes: s.codes, deltaV: s.lsb, inlLsb: inl_lsb, inlMethod: inlLine(s), dnlLsb: dnl_lsb, ladderSigma, yieldEach: s.laneYield,
  })
}

/** Largest trim step of a flash bank [V]: what the yields allow, and step²/12 within the spread's share [V²]. */
export function trimLimit(s: Situation, spread: number): number {
  const sigma = s.kind.architecture === 'flash' ? s.kind.flash.ladder_sigma : 0
  return Math.min(yieldStep(s, sigma), Math.sqrt(12 * spread))
}

/** Largest spread of the comparators of a SAR with one per bit for which INL and DNL meet their yields [V]. */
export function perBitSigma(s: Situation): number {
  const { inl_lsb, dnl_lsb } = s.plan.converter
  return comparatorPerBitSigmaLimit(s.bits, s.laneYield) * Math.min(inl_lsb, dnl_lsb) * s.lsb
}

/** The part of the spread share that offsets may use: all of it, ¾ where skew has a quarter (lanes, or no front sampler). */
export const offsetPart = ({ lanes, kind }: Situation): number =>
  (lanes > 1 || (kind.architecture === 'flash' && !kind.flash.front_sampler) ? 0.75 : 1)

/** ± so many σ_os hold the raw offset of every comparator of the chip. */
export const trimSigmas = (s: Situation): number => sigmasHoldingAll(s.comparatorCount, s.yieldEach)
