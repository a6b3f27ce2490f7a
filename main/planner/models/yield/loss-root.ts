import { findRoot } from '../../numerics/roots'
import { normalTailInverse } from '../../numerics/statistics'

/** Losses below this look alike: far below every loss that a plan can ask for. */
const smallestLoss = 1e-20
/** Losses above this look alike: the bank is lost. */
const largestLoss = 1 - 1e-12
/** Doublings (or halvings) of the failing end before the search for a failing bank is given up. */
const widenings = 60

/**
 * Where a loss that is monotone in x reaches its target. The search runs on the loss as a Gaussian quantile, on which yield
 * integrals are close to straight lines.
 *
 * @param loss       fraction of failing chips at x; 0 is allowed over a range
 * @param target     allowed loss [1], 0 < target < 1
 * @param safe       an x ≥ 0 with no more than the target
 * @param failing    an x > 0 that likely loses more; doubled, or halved if it lies below `safe`, until it does
 * @param tolerance  relative closeness of x
 * @throws RangeError where no x loses more than the target
 */
export function whereLossReaches(loss: (x: number) => number, target: number, safe: number, failing: number, tolerance: number): number {
  const goal = quantile(target)
  const short = (x: number) => quantile(loss(x)) - goal
  const factor = failing > safe ? 2 : 0.5
  let inside = safe
  let outside = failing
  for (let i = 0; short(outside) > 0; i++) {
    if (i === widenings) throw new RangeError(`whereLossReaches: loss stays below ${target} up to ${outside}`)
    inside = outside
    outside *= factor
  }
  return findRoot(short, inside, outside, { tolerance: tolerance * outside })
}

function quantile(loss: number): number {
  return normalTailInverse(Math.min(Math.max(loss, smallestLoss), largestLoss))
}
