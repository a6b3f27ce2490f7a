import type { PlanInput } from '../../main/contract/plan'

/** The smallest plan there is: what has no default and nothing else. */
export const smallest: PlanInput = {
  schema: 'latchwright.plan/1',
  converter: { architecture: 'flash', resolution_bits: 6, sample_rate_hz: 2e9 },
}

export const smallestSar: PlanInput = {
  schema: 'latchwright.plan/1',
  converter: { architecture: 'sar', resolution_bits: 10, sample_rate_hz: 5e7 },
}
